// What the tests of schemes and marches share: settings of every scheme, small buildings, watchers.
#pragma once

#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>
#include <map>
#include <memory>
#include <numbers>
#include <span>
#include <string>
#include <vector>

#include "core/building/stick.hpp"
#include "core/motion/accelerogram.hpp"
#include "core/motion/floor_force.hpp"
#include "core/response/observer.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/modes.hpp"
#include "integrators/catalogue.hpp"
#include "integrators/march.hpp"
#include "tests/integrators/twenty_stories.hpp"

namespace pilotis::test {

inline constexpr double pi = std::numbers::pi;

// The parameters each scheme is tested with. A scheme of the catalogue that is missing here fails its tests.
inline const std::map<std::string, std::vector<std::vector<double>>, std::less<>>& scheme_settings() {
  static const std::map<std::string, std::vector<std::vector<double>>, std::less<>> settings{
      {"newmark", {{0.25, 0.5}, {0.0, 0.5}, {1.0 / 12, 0.5}, {1.0 / 6, 0.5}, {0.5, 0.5}, {0.3025, 0.6}, {0.4, 0.8}}},
      {"average_acceleration", {{}}},
      {"linear_acceleration", {{}}},
      {"hht_alpha", {{0.0}, {-0.05}, {-0.1}, {-0.3}, {-1.0 / 3}}},
      {"dormand_prince", {{1e-6, 1e-9}}},
      {"fehlberg", {{1e-6, 1e-9}}},
      {"piecewise_exact", {{}}},
      {"modal", {{0.0}}}};
  return settings;
}

// Every scheme of the catalogue with each of its settings.
inline std::vector<std::shared_ptr<const Scheme>> all_schemes() {
  std::vector<std::shared_ptr<const Scheme>> schemes;
  for (const Method& method : scheme_catalogue()) {
    const auto found = scheme_settings().find(method.name);
    if (found == scheme_settings().end()) {
      ADD_FAILURE() << "the scheme " << method.name << " has no settings in tests/integrators/support.hpp";
      continue;
    }
    for (const std::vector<double>& values : found->second) schemes.push_back(make_scheme(method.name, values, "test"));
  }
  return schemes;
}

inline std::shared_ptr<const Scheme> scheme_of(const char* name, std::vector<double> values = {}) {
  return make_scheme(name, values, "test");
}

// Bouc-Wen with beta = gamma = 1/2 and A = 1.
inline Law smooth_law(double stiffness, double yield, double post_yield_ratio, double exponent) {
  const double values[] = {stiffness, yield, post_yield_ratio, exponent, 0.5, 0.5, 1};
  return make_law("bouc_wen", values, "test");
}

inline Stick stick_of(int stories, double mass, double height, const Law& law) {
  Stick stick;
  for (int i = 0; i < stories; ++i) stick.stories.push_back({"", height, mass, law, 0});
  return stick;
}

inline Stick single(double mass, double stiffness, double ratio) {
  Stick stick = stick_of(1, mass, 1.0, Linear{stiffness});
  if (ratio > 0) stick.damping = ModalDamping{{ratio}};
  return stick;
}

inline bool el_centro_is_there() { return std::filesystem::exists(el_centro_file()); }
#define SKIP_WITHOUT_EL_CENTRO() \
  if (!pilotis::test::el_centro_is_there()) GTEST_SKIP() << "no record at " << pilotis::test::el_centro_file()

// Keeps the displacement and velocity of every whole step.
class Track : public Observer {
 public:
  bool see(const Instant& instant) noexcept override {
    ++seen;
    if (!instant.whole_step) return true;
    time.push_back(instant.time);
    u.push_back(instant.state.u);
    v.push_back(instant.state.v);
    return true;
  }
  long seen = 0;
  std::vector<double> time;
  std::vector<std::vector<double>> u, v;  // [step][freedom]
};

struct Start {
  std::vector<double> u, v;  // empty: at rest
};

struct Marched {
  State<double> state;
  Track track;
  MarchEnd end;
};

inline State<double> started(const System& system, const Load& load, const Start& from) {
  State<double> state = state_at_rest<double>(system);
  if (!from.u.empty()) state.u = from.u;
  if (!from.v.empty()) state.v = from.v;
  start(system, load, state);
  return state;
}

// `steps` steps of dt. The Newton tolerance is absolute, N.
inline Marched marched(const System& system, const Load& load, const Scheme& scheme, double dt, long steps,
                       const Start& from = {}, double tolerance = 1e-9) {
  Marched out;
  out.state = started(system, load, from);
  const auto stepper = scheme.prepare(system, {dt, tolerance});
  Observer* watch[] = {&out.track};
  out.end = march(system, load, *stepper, {dt, steps}, out.state, watch);
  return out;
}

inline double largest(const std::vector<std::vector<double>>& history, int freedom = 0) {
  double most = 0;
  for (const auto& x : history) most = std::max(most, std::abs(x[freedom]));
  return most;
}

}  // namespace pilotis::test
