#include <fmt/format.h>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

std::string checked_unit(const ValueReader& value, Dimension dimension) {
  const std::string unit = value.text();
  si_factor(unit, dimension, value.where());
  return unit;
}

std::string consistent_mass(const StudyUnits& units) { return fmt::format("{} s2/{}", units.force, units.length); }

}  // namespace

std::string StudyUnits::name(Dimension dimension) const {
  switch (dimension) {
    case Dimension::none:
      return "1";
    case Dimension::length:
      return length;
    case Dimension::time:
      return "s";
    case Dimension::mass:
      return mass.empty() ? consistent_mass(*this) : mass;
    case Dimension::force:
      return force;
    case Dimension::stiffness:
      return fmt::format("{}/{}", force, length);
    case Dimension::dashpot:
      return fmt::format("{} s/{}", force, length);
    case Dimension::velocity:
      return fmt::format("{}/s", length);
    case Dimension::acceleration:
      return fmt::format("{}/s2", length);
    case Dimension::moment:
      return fmt::format("{} {}", force, length);
    case Dimension::per_time:
      return "1/s";
    case Dimension::frequency:
    case Dimension::stress:
    case Dimension::density:
    case Dimension::slowness:
    case Dimension::spectral_density:
      return std::string(si_unit(dimension));  // in SI whatever the study's units
  }
  return "1";
}

double StudyUnits::factor(Dimension dimension) const {
  const auto force_factor = [this] { return si_factor(force, Dimension::force, "units.force"); };
  const auto length_factor = [this] { return si_factor(length, Dimension::length, "units.length"); };
  switch (dimension) {
    case Dimension::none:
    case Dimension::time:
    case Dimension::per_time:
    case Dimension::frequency:
    case Dimension::stress:
    case Dimension::density:
    case Dimension::slowness:
    case Dimension::spectral_density:
      return 1;
    case Dimension::mass:
      return mass.empty() ? force_factor() / length_factor() : si_factor(mass, Dimension::mass, "units.mass");
    case Dimension::force:
      return force_factor();
    case Dimension::stiffness:
    case Dimension::dashpot:
      return force_factor() / length_factor();
    case Dimension::length:
    case Dimension::velocity:
    case Dimension::acceleration:
      return length_factor();
    case Dimension::moment:
      return force_factor() * length_factor();
  }
  return 1;
}

StudyUnits read_units(const TableReader& root, std::vector<std::string>& notes) {
  const auto given = root.find("units");
  if (!given) {
    notes.push_back(fmt::format("{}: no [units], so bare numbers are in N, m, s and kg", root.source().file));
    return {};
  }
  TableReader table(*given);
  table.known_keys({"force", "length", "mass"});
  StudyUnits units;
  units.force = checked_unit(table.at("force", "give the unit of bare forces, such as \"kN\""), Dimension::force);
  units.length = checked_unit(table.at("length", "give the unit of bare lengths, such as \"m\""), Dimension::length);
  if (const auto mass = table.find("mass")) units.mass = checked_unit(*mass, Dimension::mass);
  return units;
}

}  // namespace pilotis
