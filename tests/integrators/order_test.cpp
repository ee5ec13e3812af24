// The order of every scheme, measured from both sides. From the differences of marches at dt, dt/2, dt/4, ... over the
// times of the coarsest (over all of them, so that no zero crossing of an error is taken for convergence), order =
// log2(|U(dt) - U(dt/2)| / |U(dt/2) - U(dt/4)|): no reference needed, and the sequence shows whether it has settled.
#include <fmt/format.h>
#include <fmt/ranges.h>

#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

constexpr int halvings = 4;

struct Case {
  const char* name;
  Stick stick;
  double law_order;  // of the rule itself, when it is integrated numerically; large: closed form
  double window;     // s; the yielding buildings move one way only in it, so that their law stays smooth
  long steps;        // of the coarsest march by a scheme of order 1 or 2

  bool yields() const { return law_order < 100; }
};

std::vector<Case> cases() {
  const Stick linear = stick_of(3, 1e5, 3, Linear{5e7});
  // |z| + z = 0 or 2 z: dz/dx = 1 - z while the drift grows; the header says: integrated along d by a fourth-order
  // rule.
  const Stick smooth = stick_of(3, 1e5, 3, smooth_law(5e7, 5e5, 0.1, 1));
  std::vector<Case> list{{"linear, undamped", linear, 1e9, 1.2, 320},
                         {"linear, damped", linear, 1e9, 1.2, 320},
                         {"Bouc-Wen, undamped", smooth, 4, 0.12, 32},
                         {"Bouc-Wen, damped", smooth, 4, 0.12, 32}};
  for (Case& one : list)
    if (std::string(one.name).find(", damped") != std::string::npos)
      one.stick.damping = RayleighByModes{0.05, 0.05, 1, 2};
  return list;
}

// A pulse on the roof, smooth at the steps of the smallest march, or a ramp: linear in time, because loads between
// steps are linear by contract and a scheme of higher order would see only that.
Load push(const System& system, bool ramp, double window, double sampling) {
  FloorForce force{3, {}, {}};
  const long points = ramp ? 1 : std::lround(window / sampling);
  for (long i = 0; i <= points; ++i) {
    const double t = window * static_cast<double>(i) / static_cast<double>(points);
    force.times.push_back(t);
    force.forces.push_back(ramp ? 1e5 + 2e6 * t : 3e5 * std::sin(10 * t));
  }
  return Load(system, nullptr, 1, {force});
}

using Values = std::vector<std::vector<double>>;  // [time][freedom]

// Root of the summed squares of a - b at the times of a march with `steps` steps; every a.size() / steps-th of a, b
// likewise.
double distance(const Values& a, const Values& b, long steps) {
  double sum = 0;
  const std::size_t every_a = (a.size() - 1) / steps, every_b = (b.size() - 1) / steps;
  for (long i = 1; i <= steps; ++i)
    for (std::size_t j = 0; j < a[0].size(); ++j) sum += std::pow(a[i * every_a][j] - b[i * every_b][j], 2);
  return std::sqrt(sum);
}

double distance(const std::vector<double>& a, const std::vector<double>& b) { return distance({a, a}, {b, b}, 1); }

struct Differences {
  std::vector<double> u, v;               // between successive halvings
  double rounding_u = 0, rounding_v = 0;  // below this they say nothing
};

// Each march from the same start, the coarsest with `steps` steps.
Differences differences(const Case& one, const Scheme& scheme, long steps) {
  const System system = assemble(one.stick);
  const bool ramp = scheme.traits().order > 2;
  const Load load = push(system, ramp, one.window, one.window / static_cast<double>(steps << halvings));
  Differences out;
  Track before;
  for (int k = 0; k <= halvings; ++k) {
    const long n = steps << k;
    const Marched run =
        marched(system, load, scheme, one.window / static_cast<double>(n), n, {{}, {0.1, 0.2, 0.3}}, 1e-8);
    EXPECT_EQ(run.end.ending, MarchEnding::done);
    EXPECT_EQ(run.track.seen, n + 1) << "a step was not taken whole";
    for (const auto& v : run.track.v)
      EXPECT_TRUE(!one.yields() || (v[0] > 0 && v[1] > v[0] && v[2] > v[1])) << "it turned round: not smooth";
    if (k > 0) {
      out.u.push_back(distance(run.track.u, before.u, steps));
      out.v.push_back(distance(run.track.v, before.v, steps));
    }
    before = run.track;
  }
  out.rounding_u = 1e-13 * distance(before.u, Values(before.u.size(), std::vector<double>(3)), steps);
  out.rounding_v = 1e-13 * distance(before.v, Values(before.v.size(), std::vector<double>(3)), steps);
  return out;
}

std::vector<double> orders(const std::vector<double>& differences) {
  std::vector<double> list;
  for (std::size_t i = 1; i < differences.size(); ++i) list.push_back(std::log2(differences[i - 1] / differences[i]));
  return list;
}

// The last order before the differences sink into rounding.
double settled(const std::vector<double>& differences, double rounding) {
  double order = 0;
  for (std::size_t i = 1; i < differences.size() && (i == 1 || differences[i] > rounding); ++i)
    order = std::log2(differences[i - 1] / differences[i]);
  return order;
}

// Adaptive pairs: with tolerances this wide every step is taken whole (checked above).
std::shared_ptr<const Scheme> as_measured(const Method& method, const std::vector<double>& values) {
  const auto scheme = make_scheme(method.name, values, "test");
  return scheme->traits().adaptive ? make_scheme(method.name, std::vector<double>{0.1, 1.0}, "test") : scheme;
}

// 0.15: the next term of the error expansion changes the order by about dt times the rates of the building, 0.1 at the
// steps taken; the printed sequence shows it closing in.
void expect_order(const Case& one, const Scheme& scheme) {
  const Traits traits = scheme.traits();
  const double expected = std::min<double>(traits.order, one.law_order);
  const Differences found = differences(one, scheme,
                                        traits.order > 5   ? one.steps / 12
                                        : traits.order > 2 ? one.steps / 3
                                                           : one.steps);
  const std::string sequence =
      fmt::format("{} on {}: orders of u {:.3f}, of v {:.3f}; differences {:.2e}", scheme.description(), one.name,
                  fmt::join(orders(found.u), " "), fmt::join(orders(found.v), " "), fmt::join(found.u, " "));
  EXPECT_NEAR(settled(found.u, found.rounding_u), expected, 0.15) << sequence;
  EXPECT_NEAR(settled(found.v, found.rounding_v), expected, 0.15) << sequence;
}

// Exact schemes: the same state at any step, to rounding.
void expect_exact(const Case& one, const Scheme& scheme) {
  const System system = assemble(one.stick);
  const double window = one.window;
  const Load load = push(system, true, window, window);
  const Marched coarse = marched(system, load, scheme, window, 1, {{}, {0.1, 0.2, 0.3}});
  const Marched fine = marched(system, load, scheme, window / 640, 640, {{}, {0.1, 0.2, 0.3}});
  EXPECT_LT(distance(coarse.state.u, fine.state.u), 1e-12) << scheme.description();
  EXPECT_LT(distance(coarse.state.v, fine.state.v), 1e-11) << scheme.description();
}

TEST(Order, OfEverySchemeInTheCatalogue) {
  for (const Method& method : scheme_catalogue()) {
    const auto settings = scheme_settings().find(method.name);
    ASSERT_NE(settings, scheme_settings().end())
        << "no settings for " << method.name << " in tests/integrators/support.hpp";
    for (const std::vector<double>& values : settings->second)
      for (const Case& one : cases()) {
        const auto scheme = as_measured(method, values);
        if (scheme->traits().linear_only && !assemble(one.stick).is_linear()) continue;
        scheme->traits().order == 0 ? expect_exact(one, *scheme) : expect_order(one, *scheme);
      }
  }
}

// Adaptive schemes as used: the error at the end falls with the tolerance, one power of ten for each of its own, within
// two.
TEST(Order, ErrorFollowsTheTolerance) {
  const Case one = cases()[1];
  const System system = assemble(one.stick);
  const double window = one.window;
  const Load load = push(system, true, window, window);
  const Marched exact = marched(system, load, *scheme_of("piecewise_exact"), window, 1, {{}, {0.1, 0.2, 0.3}});
  for (const char* name : {"dormand_prince", "fehlberg"})
    for (double rtol : {1e-4, 1e-6, 1e-8, 1e-10}) {
      const Marched run =
          marched(system, load, *scheme_of(name, {rtol, rtol / 1000}), window, 1, {{}, {0.1, 0.2, 0.3}});
      const double size = std::hypot(run.state.v[0], run.state.v[1], run.state.v[2]);
      EXPECT_LT(distance(run.state.v, exact.state.v), 10 * rtol * size) << name << " at " << rtol;
      EXPECT_LT(distance(run.state.u, exact.state.u), 10 * rtol * size) << name << " at " << rtol;
    }
}

}  // namespace
}  // namespace pilotis::test
