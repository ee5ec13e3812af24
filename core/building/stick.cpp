#include "core/building/stick.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

// "study.toml: story[2].height", or the path alone when the caller has no place to name.
std::string at(const std::string& where, const std::string& path) {
  return where.empty() ? path : fmt::format("{}: {}", where, path);
}

void require(bool good, const std::string& where, const std::string& found, const std::string& needed) {
  if (!good) throw input_error(where, found, needed);
}

bool positive(double value) { return std::isfinite(value) && value > 0; }
bool not_negative(double value) { return std::isfinite(value) && value >= 0; }

void check_story(const Story& story, const std::string& where) {
  require(positive(story.height), where + ".height", fmt::format("found {:g} m", story.height),
          "the height of a story must be greater than 0 m");
  require(positive(story.mass), where + ".mass", fmt::format("found {:g} kg", story.mass),
          "every floor needs a mass greater than 0 kg: a stick has no freedom without one");
  require(positive(initial_stiffness(story.spring)), where + ".spring",
          fmt::format("its initial stiffness is {:g} N/m", initial_stiffness(story.spring)),
          "it must be greater than 0 N/m");
  require(not_negative(story.dashpot), where + ".dashpot", fmt::format("found {:g} N s/m", story.dashpot),
          "the coefficient of a dashpot must be at least 0 N s/m");
}

void check_ratio(double ratio, const std::string& where) {
  require(not_negative(ratio), where, fmt::format("found {:g}", ratio),
          "a damping ratio is a fraction of critical damping, at least 0");
}

// One checker for each kind of damping; `floors` is their number.
struct DampingCheck {
  int floors;
  const std::string& where;

  void operator()(const NoDamping&) const {}

  void operator()(const RayleighByModes& damping) const {
    check_ratio(damping.ratio_first, where + ".ratio");
    check_ratio(damping.ratio_second, where + ".ratio");
    require(damping.first >= 1 && damping.first < damping.second && damping.second <= floors, where + ".modes",
            fmt::format("found modes {} and {} of a building with {} {}", damping.first, damping.second, floors,
                        floors == 1 ? "floor" : "floors"),
            floors == 1 ? "one floor has one mode: give mass_factor and stiffness_factor, or modal damping"
                        : fmt::format("two different modes are needed, rising, from 1 to {}", floors));
  }

  void operator()(const RayleighByFactors& damping) const {
    require(not_negative(damping.mass_factor), where + ".mass_factor",
            fmt::format("found {:g} 1/s", damping.mass_factor), "it must be at least 0 1/s");
    require(not_negative(damping.stiffness_factor), where + ".stiffness_factor",
            fmt::format("found {:g} s", damping.stiffness_factor), "it must be at least 0 s");
  }

  void operator()(const ModalDamping& damping) const {
    const int count = static_cast<int>(damping.ratios.size());
    require(count >= 1 && count <= floors, where + ".ratio",
            fmt::format("found {} ratios for a building with {} modes", count, floors),
            "one ratio for all modes, or one for each of the first modes");
    for (const double ratio : damping.ratios) check_ratio(ratio, where + ".ratio");
  }
};

}  // namespace

void validate(const Stick& stick, const std::string& where) {
  require(!stick.stories.empty(), at(where, "story"), "the building has no story", "give at least one");
  for (std::size_t i = 0; i < stick.stories.size(); ++i)
    check_story(stick.stories[i], at(where, fmt::format("story[{}]", i + 1)));
  std::visit(DampingCheck{static_cast<int>(stick.stories.size()), at(where, "building.damping")}, stick.damping);
  require(positive(stick.gravity), at(where, "building.gravity"), fmt::format("found {:g} m/s2", stick.gravity),
          "gravity must be greater than 0 m/s2");
}

}  // namespace pilotis
