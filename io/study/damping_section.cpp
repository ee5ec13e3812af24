#include <array>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter ratio{
    "ratio", Dimension::none, "the damping ratio, a fraction of critical (5% is 0.05),", {}, 0.0, 1.0, true, false};
constexpr Parameter mass_factor{"mass_factor", Dimension::per_time, "the factor of the mass matrix", {}, 0.0};
constexpr Parameter stiffness_factor{
    "stiffness_factor", Dimension::time, "the factor of the stiffness matrix", {}, 0.0};
constexpr std::array<std::string_view, 3> kinds{"rayleigh", "modal", "none"};

const char* const ratio_wanted = "give the damping ratio, such as 0.05";

// One number or a list of them.
std::vector<double> ratios_of(const ValueReader& value) {
  if (value.node().kind == NodeKind::array) return value.quantities(ratio);
  return {value.quantity(ratio)};
}

void require_initial_stiffness(const TableReader& table) {
  const std::array<std::string_view, 1> allowed{"initial"};
  if (const auto stiffness = table.find("stiffness")) stiffness->choice("stiffness to damp by", allowed);
}

RayleighByFactors by_factors(TableReader& table) {
  table.known_keys({"kind", "mass_factor", "stiffness_factor", "stiffness"});
  require_initial_stiffness(table);
  return {table.quantity(mass_factor), table.quantity(stiffness_factor)};
}

RayleighByModes by_modes(TableReader& table, int floors) {
  table.known_keys({"kind", "ratio", "modes", "stiffness"});
  require_initial_stiffness(table);
  const ValueReader ratio_value = table.at("ratio", ratio_wanted);
  const std::vector<double> ratios = ratios_of(ratio_value);
  if (ratios.empty() || ratios.size() > 2)
    throw ratio_value.wrong_type("one ratio for both modes, or one for each of the two, is needed");
  const ValueReader modes_value = table.at("modes", "name the two modes that get the ratio, such as [1, 3]");
  if (floors < 2)
    throw modes_value.wrong("a building with one floor has one mode",
                            "give mass_factor and stiffness_factor, or kind = \"modal\"");
  const std::vector<double> modes = modes_value.quantities(whole_number("modes", "the number of a mode", 1, floors));
  if (modes.size() != 2 || modes[0] >= modes[1])
    throw modes_value.wrong("these are not two rising mode numbers", "two different modes are needed, such as [1, 3]");
  return {ratios.front(), ratios.back(), static_cast<int>(modes[0]), static_cast<int>(modes[1])};
}

ModalDamping modal(TableReader& table, int floors) {
  table.known_keys({"kind", "ratio"});
  const ValueReader value = table.at("ratio", ratio_wanted);
  ModalDamping damping{ratios_of(value)};
  if (damping.ratios.empty() || static_cast<int>(damping.ratios.size()) > floors)
    throw value.wrong_type("one ratio for all modes, or a list with one for each of the first modes, is needed");
  return damping;
}

}  // namespace

Damping read_damping(const ValueReader& value, int floors) {
  TableReader table(value);
  // The keys of any kind, so that a misspelled "kind" is told apart from a missing one.
  if (!table.has("kind")) table.known_keys({"kind", "ratio", "modes", "stiffness", "mass_factor", "stiffness_factor"});
  const std::string kind =
      table.at("kind", "name the kind of damping: rayleigh, modal or none").choice("kind of damping", kinds);
  if (kind == "modal") return modal(table, floors);
  if (kind == "none") {
    table.known_keys({"kind"});
    return NoDamping{};
  }
  if (table.has("mass_factor") || table.has("stiffness_factor")) return by_factors(table);
  return by_modes(table, floors);
}

}  // namespace pilotis
