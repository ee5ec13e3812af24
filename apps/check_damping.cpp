#include <fmt/format.h>
#include <fmt/ranges.h>

#include "apps/check_show.hpp"

namespace pilotis {

namespace {

std::string percent(double ratio) { return fmt::format("{:.6g}%", 100 * ratio); }

struct DampingText {
  std::string operator()(const NoDamping&) const { return "none besides the stories' dashpots"; }

  std::string operator()(const RayleighByModes& d) const {
    const std::string ratios =
        d.ratio_first == d.ratio_second
            ? fmt::format("{} of critical in modes {} and {}", percent(d.ratio_first), d.first, d.second)
            : fmt::format("{} of critical in mode {}, {} in mode {}", percent(d.ratio_first), d.first,
                          percent(d.ratio_second), d.second);
    return fmt::format("Rayleigh, {}, from the initial stiffness", ratios);
  }

  std::string operator()(const RayleighByFactors& d) const {
    return fmt::format("Rayleigh, {:g} 1/s times the masses and {:g} s times the initial stiffness", d.mass_factor,
                       d.stiffness_factor);
  }

  std::string operator()(const ModalDamping& d) const {
    if (d.ratios.size() == 1) return fmt::format("modal, {} of critical in every mode", percent(d.ratios.front()));
    std::vector<std::string> ratios;
    for (const double ratio : d.ratios) ratios.push_back(percent(ratio));
    return fmt::format("modal, {} of critical in modes 1 to {}, none beyond", fmt::join(ratios, ", "), d.ratios.size());
  }
};

}  // namespace

std::string damping_text(const Damping& damping) { return std::visit(DampingText{}, damping); }

}  // namespace pilotis
