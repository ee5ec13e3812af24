#include "core/system/damping.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"
#include "core/system/modes.hpp"

namespace pilotis {

namespace {

void add_rayleigh(double mass_factor, double stiffness_factor, const Band& elastic, System& system) {
  for (int i = 0; i < system.freedoms; ++i) system.damping.add(i, i, mass_factor * system.mass[i]);
  for (std::size_t k = 0; k < elastic.entries.size(); ++k)
    system.damping.entries[k] += stiffness_factor * elastic.entries[k];
}

// zeta_n = a0 / (2 omega_n) + a1 omega_n / 2 in both modes: Chopra, Dynamics of Structures, ch. 11.
void add_rayleigh_by_modes(const RayleighByModes& damping, const Band& elastic, System& system) {
  if (damping.first < 1 || damping.second > system.freedoms || damping.first >= damping.second)
    throw input_error(
        "building.damping",
        fmt::format("found modes {} and {} of a building with {}", damping.first, damping.second, system.freedoms),
        "two different modes are needed, rising, from 1 to the number of modes");
  const ModalBasis basis = modal_basis(elastic, system.mass);
  const double wi = std::sqrt(basis.omega_squared[damping.first - 1]);
  const double wj = std::sqrt(basis.omega_squared[damping.second - 1]);
  if (!(wj > wi * (1 + 1e-9)))
    throw input_error(
        "building.damping",
        fmt::format("modes {} and {} have the same frequency, {:.6g} rad/s", damping.first, damping.second, wi),
        "two modes of different frequency are needed");
  const double zi = damping.ratio_first, zj = damping.ratio_second;
  const double spread = wj * wj - wi * wi;
  add_rayleigh(2 * wi * wj * (zi * wj - zj * wi) / spread, 2 * (zj * wj - zi * wi) / spread, elastic, system);
}

// C = sum of 2 zeta omega (M phi)(M phi)^T with mass-normalised shapes: Chopra, ch. 11; Clough & Penzien.
void add_modal(const ModalDamping& damping, System& system) {
  const ModalBasis basis = modal_basis(initial_stiffness(system), system.mass);
  require_stable(basis);
  for (int j = 0; j < system.freedoms; ++j) {
    const bool listed = damping.ratios.size() == 1 || j < static_cast<int>(damping.ratios.size());
    const double ratio = listed ? damping.ratios[damping.ratios.size() == 1 ? 0 : j] : 0.0;
    if (ratio == 0) continue;
    std::vector<double> column(system.freedoms);
    for (int i = 0; i < system.freedoms; ++i) column[i] = system.mass[i] * basis.shapes(i, j);
    system.modal_damping.columns.push_back(column);
    system.modal_damping.weight.push_back(2 * ratio * std::sqrt(basis.omega_squared[j]));
  }
}

}  // namespace

void add_damping(const Damping& damping, const Band& elastic, System& system) {
  if (const auto* modes = std::get_if<RayleighByModes>(&damping))
    add_rayleigh_by_modes(*modes, elastic, system);
  else if (const auto* factors = std::get_if<RayleighByFactors>(&damping))
    add_rayleigh(factors->mass_factor, factors->stiffness_factor, elastic, system);
  else if (const auto* modal = std::get_if<ModalDamping>(&damping))
    add_modal(*modal, system);
}

}  // namespace pilotis
