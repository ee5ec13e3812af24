// Runs in lanes give the bits of the run alone: on every instruction set this machine has, for every number of runs
// around the lane width, in any order, whatever their neighbors do. No source: it is what makes results independent of
// how runs are put together.
#include <algorithm>
#include <cstring>
#include <numeric>
#include <random>

#include "integrators/implicit_stepper.hpp"
#include "integrators/march_lanes.hpp"
#include "integrators/stepper_take.hpp"
#include "integrators/task_feed.hpp"
#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

struct Case {
  std::string name;
  Stick stick;
  ImplicitCoefficients coefficients;

  friend void PrintTo(const Case& one, std::ostream* out) { *out << one.name; }
};

Stick with(Stick stick, Damping damping, bool p_delta) {
  stick.damping = std::move(damping);
  stick.p_delta = p_delta;
  return stick;
}

Stick mixed() {
  Stick stick = stick_of(4, 1e5, 3, Linear{5e7});
  stick.stories[0].spring = Bilinear{5e7, 4e5, 0.05};
  stick.stories[1].spring = Trilinear{5e7, 1.5e5, 0.4, 4e5, 0.02};
  stick.stories[3].spring = smooth_law(5e7, 2e5, 0.05, 1.5);
  stick.stories[2].dashpot = 1e5;
  return stick;
}

std::vector<Case> cases() {
  const Damping rayleigh = RayleighByModes{0.03, 0.03, 1, 3};
  const ImplicitCoefficients average{0.25, 0.5, 0}, hht{1.21 / 4, 0.6, -0.1}, first_order{0.3025, 0.6, 0};
  return {{"bilinear", with(stick_of(5, 1e5, 3, Bilinear{5e7, 4e5, 0.05}), rayleigh, true), average},
          {"every law", with(mixed(), NoDamping{}, true), average},
          {"hht, modal damping", with(mixed(), ModalDamping{{0.05}}, false), hht},
          {"linear, first order", with(stick_of(3, 1e5, 3, Linear{5e7}), rayleigh, false), first_order},
          {"one story", with(stick_of(1, 1e5, 3, Bilinear{5e7, 4e5, -0.02}), NoDamping{}, true), average}};
}

// Motions of different length, step and strength: some lanes end early, some collapse, some never yield.
struct Suite {
  Suite(const System& system, int runs) {
    std::mt19937 random(41);
    std::normal_distribution<double> normal(0, 1);
    for (int i = 0; i < runs; ++i) {
      records.push_back({0.02, i % 3 == 1 ? 0.02 : 0.0, {}});
      const double strength = 0.5 * std::pow(3, i % 5);
      for (int k = 0; k < 60 + 17 * (i % 7); ++k) records.back().samples.push_back(strength * normal(random));
    }
    for (int i = 0; i < runs; ++i) {
      const std::vector<FloorForce> push{{1, {0.1, 0.5, 0.6}, {0, 2e5, 0}}};
      loads.push_back(std::make_unique<Load>(system, &records[i], 1.0, i % 4 == 3 ? push : std::vector<FloorForce>{}));
      const double dt = i % 2 == 0 ? 0.01 : 0.02;
      const long steps = std::lround(std::ceil((loads[i]->end() + 0.5) / dt));
      tasks.push_back({loads[i].get(), dt, steps, static_cast<double>(steps) * dt - 0.3, i % 3 == 0});
    }
  }
  std::vector<Accelerogram> records;
  std::vector<std::unique_ptr<Load>> loads;
  std::vector<MarchTask> tasks;
};

BatchSettings settings() {
  BatchSettings settings;
  settings.histories = {find_quantity("drift"), find_quantity("base_shear")};
  settings.every = 3;
  settings.halvings = 3;
  return settings;
}

// All numbers of a march, so that they can be compared byte for byte.
std::vector<double> numbers_of(const pilotis::Marched& m) {
  std::vector<double> all{static_cast<double>(m.end.ending),
                          m.end.time,
                          m.energy_error,
                          m.energies.input,
                          m.energies.kinetic,
                          m.energies.damping,
                          m.energies.absorbed,
                          m.energies.elastic,
                          static_cast<double>(m.collapsed_story)};
  for (const Peak& peak : m.peaks) all.insert(all.end(), {peak.value, peak.time});
  for (const auto* values : {&m.between_states, &m.residual_drift, &m.residual_swing, &m.times})
    all.insert(all.end(), values->begin(), values->end());
  for (const History& history : m.histories) all.insert(all.end(), history.values.begin(), history.values.end());
  return all;
}

bool same_bits(const pilotis::Marched& a, const pilotis::Marched& b) {
  const std::vector<double> x = numbers_of(a), y = numbers_of(b);
  return x.size() == y.size() && std::memcmp(x.data(), y.data(), x.size() * sizeof(double)) == 0;
}

// The run alone, one number at a time, through the seam of the schemes.
pilotis::Marched alone(const System& system, const Case& one, const BatchSettings& settings, const MarchTask& task) {
  const State<double> from = initial_state(system, *task.load, settings);
  const auto stepper =
      make_implicit_stepper(system, one.coefficients, {task.dt, step_tolerance(system, *task.load, from, settings)});
  Watches<double> watches(system, settings);
  pilotis::Marched out;
  TaskFeed<double> feed(system, settings, {&task, 1}, watches, &out, nullptr);
  StepperTake take{*stepper};
  LaneLoop<double>(system, settings.halvings, watches.all()).run(take, feed, nullptr);
  return out;
}

class Lanes : public ::testing::TestWithParam<Case> {};

TEST_P(Lanes, GiveTheBitsOfTheRunAlone) {
  const System system = assemble(GetParam().stick);
  const BatchSettings common = settings();
  constexpr int most = 19;  // over twice the widest pack
  const Suite suite(system, most);
  std::vector<pilotis::Marched> expected;
  for (const MarchTask& task : suite.tasks) expected.push_back(alone(system, GetParam(), common, task));
  for (InstructionSet set : instruction_sets()) {
    const int w = lanes_of(set);
    for (int runs : {1, w - 1, w, w + 1, 2 * w + 1, most}) {
      std::vector<pilotis::Marched> out(runs);
      std::atomic<long> ended = 0;
      ASSERT_TRUE(march_lanes(set)(system, GetParam().coefficients, common, std::span(suite.tasks).first(runs),
                                   out.data(), nullptr, &ended));
      EXPECT_EQ(ended, runs);
      for (int i = 0; i < runs; ++i)
        EXPECT_TRUE(same_bits(out[i], expected[i])) << name_of(set) << ", run " << i << " of " << runs;
    }
  }
}

// The suite is worth nothing if all its runs end alike.
TEST_P(Lanes, SuiteHasRunsThatEndDifferently) {
  const System system = assemble(GetParam().stick);
  const Suite suite(system, 19);
  int done = 0, stopped = 0;
  for (const MarchTask& task : suite.tasks) {
    const pilotis::Marched one = alone(system, GetParam(), settings(), task);
    done += one.end.ending == MarchEnding::done;
    stopped += one.end.ending == MarchEnding::stopped;
  }
  EXPECT_GT(done, 0);
  if (!system.is_linear()) EXPECT_GT(stopped, 0) << "no run collapsed";
}

TEST_P(Lanes, AnyOrderAndCompany) {
  const System system = assemble(GetParam().stick);
  const BatchSettings common = settings();
  const Suite suite(system, 19);
  std::mt19937 random(43);
  std::vector<std::size_t> order(suite.tasks.size());
  std::iota(order.begin(), order.end(), 0);
  std::shuffle(order.begin(), order.end(), random);
  std::vector<MarchTask> tasks;
  for (std::size_t i : order) tasks.push_back(suite.tasks[i]);
  const InstructionSet best = instruction_sets().back();
  std::vector<pilotis::Marched> straight(tasks.size()), shuffled(tasks.size());
  march_lanes(best)(system, GetParam().coefficients, common, suite.tasks, straight.data(), nullptr, nullptr);
  march_lanes(best)(system, GetParam().coefficients, common, tasks, shuffled.data(), nullptr, nullptr);
  for (std::size_t i = 0; i < order.size(); ++i) EXPECT_TRUE(same_bits(shuffled[i], straight[order[i]])) << order[i];
}

TEST_P(Lanes, AStopIsObeyed) {
  const System system = assemble(GetParam().stick);
  const Suite suite(system, 3);
  std::vector<pilotis::Marched> out(3);
  const std::atomic<bool> stop = true;
  EXPECT_FALSE(march_lanes(instruction_sets().back())(system, GetParam().coefficients, settings(), suite.tasks,
                                                      out.data(), &stop, nullptr));
}

INSTANTIATE_TEST_SUITE_P(Integrators, Lanes, ::testing::ValuesIn(cases()), [](const auto& info) {
  std::string name = info.param.name;
  std::replace_if(
      name.begin(), name.end(), [](char c) { return std::isalnum(c) == 0; }, '_');
  return name;
});

// A run in which one step must be halved, beside others whose steps need not be.
TEST(LanesHalving, OneLaneHalvesAlone) {
  const System system = assemble(stick_of(1, 1e3, 3, Bilinear{1e8, 1e5, 0}));
  BatchSettings common = settings();
  common.initial_velocity = {0.2};
  common.tolerance = 1e-3;
  const Case one{"", {}, {0.25, 0.5, 0}};
  const Load load(system, nullptr, 1, {});
  std::vector<MarchTask> tasks;
  for (double dt : {0.02, 0.001, 0.02, 0.003, 0.002}) tasks.push_back({&load, dt, 20, 0, true});
  for (InstructionSet set : instruction_sets()) {
    std::vector<pilotis::Marched> out(tasks.size());
    march_lanes(set)(system, one.coefficients, common, tasks, out.data(), nullptr, nullptr);
    for (std::size_t i = 0; i < tasks.size(); ++i)
      EXPECT_TRUE(same_bits(out[i], alone(system, one, common, tasks[i]))) << name_of(set) << " " << i;
  }
}

}  // namespace
}  // namespace pilotis::test
