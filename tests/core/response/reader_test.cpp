// Every quantity of a hand-made state of three stories, worked out on paper (the numbers stand beside the checks); and
// the balance of story shear with inertia and floor forces above (d'Alembert).
#include "core/response/reader.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "core/system/assemble_stick.hpp"
#include "core/system/load.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;

// Heights 4, 3, 3 m; masses 30, 20, 10 t; springs linear 6 MN/m, bilinear 4 MN/m yielding at 40 kN (10 mm) with ratio
// 0.1, linear 2 MN/m; dashpots 50, 30, 20 kN s/m; g = 10 m/s2.
Stick three_stories() {
  Stick stick;
  stick.stories = {linear_story(3e4, 6e6, 4, 5e4), linear_story(2e4, 4e6, 3, 3e4), linear_story(1e4, 2e6, 3, 2e4)};
  stick.stories[1].spring = Bilinear{4e6, 4e4, 0.1};
  stick.p_delta = true;
  stick.gravity = 10;
  return stick;
}

struct Reading {
  ResponseLayout layout;
  std::vector<double> values, acceleration, damping_force;

  std::vector<double> of(std::string_view name) const {
    const Quantity* quantity = find_quantity(name);
    const auto first = values.begin() + layout.offset(*quantity);
    return {first, first + layout.count(*quantity)};
  }
};

Reading read(const System& system, const State<double>& state, const Load& load, double t) {
  ResponseReader reader(system);
  std::vector<double> p(system.freedoms), values(reader.layout().size(), NAN);
  load.at(t, p.data());
  reader.read(state, p.data(), load.ground(t), values.data());
  return {reader.layout(), values, reader.acceleration(), reader.forces().damping};
}

void expect_values(const std::vector<double>& found, const std::vector<double>& expected, const char* what) {
  ASSERT_EQ(found.size(), expected.size()) << what;
  double scale = 0;
  for (const double value : expected) scale = std::max(scale, std::abs(value));
  for (std::size_t i = 0; i < found.size(); ++i) EXPECT_NEAR(found[i], expected[i], 1e-12 * scale) << what << " " << i;
}

class HandMadeState : public ::testing::Test {
 protected:
  HandMadeState() {
    state.u = {0.005, 0.025, 0.020};  // drifts 5, 20, -5 mm
    state.v = {0.1, 0.3, 0.2};        // drift rates 0.1, 0.2, -0.1 m/s
  }
  const System system = assemble(three_stories());
  State<double> state = state_at_rest<double>(system);
  const Accelerogram ground{1.0, 0.0, {0.5, 0.5}};                   // m/s2
  const Load load{system, &ground, 1.0, {{3, {0, 1}, {7e3, 7e3}}}};  // 7 kN on floor 3
};

TEST_F(HandMadeState, DisplacementsAndDrifts) {
  const Reading r = read(system, state, load, 0.5);
  expect_values(r.of("floor_displacement"), {0.005, 0.025, 0.020}, "displacement");
  expect_values(r.of("floor_velocity"), {0.1, 0.3, 0.2}, "velocity");
  expect_values(r.of("drift"), {0.005, 0.020, -0.005}, "drift");
  expect_values(r.of("drift_ratio"), {0.005 / 4, 0.020 / 3, -0.005 / 3}, "drift ratio");
  expect_values(r.of("ductility"), {0, 2, 0}, "ductility");  // 20 mm over 10 mm; linear springs do not yield
}

TEST_F(HandMadeState, ShearsAndMoments) {
  const Reading r = read(system, state, load, 0.5);
  // 6e6 * 0.005; 4e4 + 0.1 * 4e6 * 0.010; -2e6 * 0.005
  expect_values(r.of("story_shear_spring"), {3.0e4, 4.4e4, -1.0e4}, "spring");
  // 5e4 * 0.1; 3e4 * 0.2; -2e4 * 0.1
  expect_values(r.of("story_shear_damping"), {5e3, 6e3, -2e3}, "damping");
  expect_values(r.of("story_shear"), {3.5e4, 5.0e4, -1.2e4}, "shear");
  expect_values(r.of("base_shear"), {3.5e4}, "base");
  // -1.2e4 * 3; + 5e4 * 3; + 3.5e4 * 4
  expect_values(r.of("overturning_moment"), {2.54e5, 1.14e5, -3.6e4}, "moment");
}

// P/h by hand: 6e5/4, 3e5/3, 1e5/3 N/m, times drifts: 750, 2000, -500/3 N taken off each story's shear.
TEST_F(HandMadeState, AccelerationsFollowFromEquilibrium) {
  const Reading r = read(system, state, load, 0.5);
  const double s1 = 3.5e4 - 750, s2 = 5.0e4 - 2000, s3 = -1.2e4 + 500.0 / 3;
  // m a = forces on the floor: shear of the story above less that below, and the floor force; absolute acceleration.
  const std::vector<double> absolute{(s2 - s1) / 3e4, (s3 - s2) / 2e4, (7e3 - s3) / 1e4};
  expect_values(r.of("floor_acceleration"), absolute, "absolute");
  expect_values(r.acceleration, {absolute[0] - 0.5, absolute[1] - 0.5, absolute[2] - 0.5}, "relative");
  // C v floor by floor: damping shears' differences.
  expect_values(r.damping_force, {5e3 - 6e3, 6e3 + 2e3, -2e3}, "damping force");
}

// A spring that has slipped and unloads: committed slip 12 mm, so f = 0.1 * 4e6 * d + 0.9 * 4e6 (d - 0.012).
TEST_F(HandMadeState, ForcesRememberTheCommittedSlip) {
  std::get<std::vector<Bilinear::Memory<double>>>(state.memory)[0].slip = 0.012;
  const Reading r = read(system, state, load, 0.5);
  EXPECT_NEAR(r.of("story_shear_spring")[1], 8e3 + 2.88e4, 1e-8);
}

// Without P-Delta, whatever the damping: shear of story i = sum over floors above of floor force less mass times
// absolute acceleration.
TEST(StoryShear, BalancesInertiaAndFloorForcesAbove) {
  std::mt19937 dice(31);
  std::uniform_real_distribution<double> move(-0.02, 0.02);
  const Accelerogram ground{1.0, 0.0, {1.7, -0.6}};
  for (const Damping& damping :
       {Damping{NoDamping{}}, Damping{RayleighByFactors{0.3, 0.001}}, Damping{ModalDamping{{0.05}}}})
    for (int n = 1; n <= 10; ++n) {
      Stick stick = random_stick(n, dice);
      stick.damping = damping;
      const System system = assemble(stick);
      const double push = 3e4;
      const Load load(system, &ground, 1.0, {{(n + 1) / 2, {0, 1}, {push, push}}});
      State<double> state = state_at_rest<double>(system);
      for (double& u : state.u) u = move(dice);
      for (double& v : state.v) v = 10 * move(dice);
      const Reading r = read(system, state, load, 0.25);
      const auto shear = r.of("story_shear"), acceleration = r.of("floor_acceleration");
      double above = 0;
      for (int i = n; i-- > 0;) {
        above -= stick.stories[i].mass * acceleration[i];
        if (i + 1 == (n + 1) / 2) above += push;
        EXPECT_NEAR(shear[i], above, 1e-13 * n * 2e8 * 0.04) << n << " " << i;  // rounding of the largest spring force
      }
    }
}

}  // namespace
}  // namespace pilotis
