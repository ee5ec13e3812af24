// The energy balance fed with exact solutions, so that what is left over is its own summing. Free vibration of a damped
// oscillator: u = e^(-zeta w t) (cos wd t + zeta w / wd sin wd t), u(0) = 1 m, v(0) = 0 (Chopra, ch. 2; from memory,
// and checked by substitution).
#include "core/response/energy.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "core/system/assemble_stick.hpp"
#include "tests/core/response/shown.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double mass = 2e4, omega = 5.0, zeta = 0.1, stiffness = mass * omega * omega;

Stick oscillator() {
  Stick stick = linear_stick({mass}, {stiffness});
  stick.stories[0].dashpot = 2 * zeta * omega * mass;
  return stick;
}

State<double> free_vibration(const System& system, double t) {
  const double damped = omega * std::sqrt(1 - zeta * zeta), decay = std::exp(-zeta * omega * t);
  State<double> state = state_at_rest<double>(system);
  state.u[0] = decay * (std::cos(damped * t) + zeta * omega / damped * std::sin(damped * t));
  state.v[0] = -decay * omega * omega / damped * std::sin(damped * t);
  return state;
}

EnergyWatch watched_free_vibration(const System& system, WorkRule rule, double duration, int steps) {
  const Load load(system, nullptr, 1.0, {});
  Stage stage(system, load);
  EnergyWatch watch(system, rule);
  for (int i = 0; i <= steps; ++i) {
    const double t = duration * i / steps;
    stage.show(watch, free_vibration(system, t), t);
  }
  return watch;
}

// The energy it starts with is k/2; what is no longer there as kinetic and elastic energy went into damping.
TEST(EnergyWatch, DampedFreeVibrationFromTheClosedForm) {
  const System system = assemble(oscillator());
  const double duration = 1.7;
  const State<double> last = free_vibration(system, duration);
  const double kinetic = 0.5 * mass * last.v[0] * last.v[0], elastic = 0.5 * stiffness * last.u[0] * last.u[0];
  const double start = 0.5 * stiffness, lost = start - kinetic - elastic;
  for (const WorkRule rule : {WorkRule::trapezoid, WorkRule::corrected}) {
    const int steps = 2000;
    const EnergyWatch watch = watched_free_vibration(system, rule, duration, steps);
    const double dt = duration / steps;
    EXPECT_NEAR(watch.now().input, start, 1e-14 * start);
    EXPECT_NEAR(watch.now().kinetic, kinetic, 1e-13 * start);
    EXPECT_NEAR(watch.now().elastic, elastic, 1e-13 * start);
    EXPECT_EQ(watch.now().absorbed, 0);
    // Trapezoid rule: dt^2/12 times the change of the slope of the power c v^2, which is at most c (2 v a) <= 2 c w^3,
    // at both ends; force times displacement increment adds dt^2/12 of the integral of c a^2 <= c w^4 T.
    const double c = 2 * zeta * omega * mass;
    const double second = dt * dt / 12 * c * (4 * std::pow(omega, 3) + std::pow(omega, 4) * duration);
    // Corrected: dt^4/720 times the change of the third derivative of c v^2, at most 8 c w^5 at each end.
    const double fourth = std::pow(dt, 4) / 720 * c * 16 * std::pow(omega, 5);
    const double tolerance = rule == WorkRule::trapezoid ? second : fourth + 1e-12 * start;
    EXPECT_NEAR(watch.now().damping, lost, tolerance);
    EXPECT_LE(watch.error(), tolerance / start);
  }
}

// Halving the step divides what is left by 4 (trapezoid) and 16 (corrected): two-sided.
TEST(EnergyWatch, OrderOfTheWorkRules) {
  const System system = assemble(oscillator());
  for (const auto& [rule, order] : {std::pair{WorkRule::trapezoid, 2.0}, std::pair{WorkRule::corrected, 4.0}}) {
    const double coarse = watched_free_vibration(system, rule, 1.7, 100).error();
    const double fine = watched_free_vibration(system, rule, 1.7, 200).error();
    EXPECT_NEAR(std::log2(coarse / fine), order, 0.15);
  }
}

// Undamped, the ground accelerates by a constant a0 from rest: u = -a0/w^2 (1 - cos w t), and the input is -m a0 u.
// With a constant load both rules have the input right: the trapezoid exactly, the corrected one to fourth order.
TEST(EnergyWatch, InputOfASuddenConstantGroundAcceleration) {
  const System system = assemble(linear_stick({mass}, {stiffness}));
  const double a0 = 2.0, duration = 1.1;
  const Accelerogram ground{2.0, 0.0, {a0, a0}};
  const Load load(system, &ground, 1.0, {});
  for (const WorkRule rule : {WorkRule::trapezoid, WorkRule::corrected}) {
    Stage stage(system, load);
    EnergyWatch watch(system, rule);
    const int steps = 500;
    State<double> state = state_at_rest<double>(system);
    for (int i = 0; i <= steps; ++i) {
      const double t = duration * i / steps;
      state.u[0] = -a0 / (omega * omega) * (1 - std::cos(omega * t));
      state.v[0] = -a0 / omega * std::sin(omega * t);
      stage.show(watch, state, t);
    }
    const double input = -mass * a0 * state.u[0], dt = duration / steps;
    // Fourth order: dt^4/720 times twice the third derivative of the power m a0 v, m a0^2 w^2.
    const double tolerance =
        1e-12 * input + (rule == WorkRule::corrected ? std::pow(dt, 4) / 360 * mass * a0 * a0 * omega * omega : 0);
    EXPECT_NEAR(watch.now().input, input, tolerance);
    EXPECT_NEAR(watch.now().kinetic + watch.now().elastic, input, 1e-12 * input);
    EXPECT_EQ(watch.now().damping, 0);
    EXPECT_LE(watch.error(), tolerance / (mass * a0 * a0 / (omega * omega)));
  }
}

// A ramped load: the corrected rule must take the load's own slope in. u by hand for p = q t from rest, undamped:
// u = q/k (t - sin(w t)/w); the input is the integral of q t v = q^2/k (t^2/2 - t sin(w t)/w - (cos(w t) - 1)/w^2).
TEST(EnergyWatch, InputOfARampToFourthOrder) {
  const System system = assemble(linear_stick({mass}, {stiffness}));
  const double q = 1e5, duration = 1.3;
  const Load load(system, nullptr, 1.0, {{1, {0, 2}, {0, 2 * q}}});
  std::vector<double> misses;
  for (const int steps : {50, 100}) {
    Stage stage(system, load);
    EnergyWatch watch(system, WorkRule::corrected);
    State<double> state = state_at_rest<double>(system);
    for (int i = 0; i <= steps; ++i) {
      const double t = duration * i / steps;
      state.u[0] = q / stiffness * (t - std::sin(omega * t) / omega);
      state.v[0] = q / stiffness * (1 - std::cos(omega * t));
      stage.show(watch, state, t);
    }
    const double t = duration;
    const double input =
        q * q / stiffness * (t * t / 2 - t * std::sin(omega * t) / omega - (std::cos(omega * t) - 1) / (omega * omega));
    misses.push_back(std::abs(watch.now().input - input));
    // dt^4/720 times the change of the third derivative of q t v: at most 2 q^2/k (3 w + t w^2).
    EXPECT_LE(misses.back(),
              std::pow(duration / steps, 4) / 720 * 2 * q * q / stiffness * (3 * omega + t * omega * omega));
  }
  EXPECT_NEAR(std::log2(misses[0] / misses[1]), 4, 0.15);
}

// A bilinear story pushed quasi-statically by its own force around whole loops at ductility 3: absorbed energy is
// PUBLISHED P per cycle, and the work of the push is all there is. Load and force are in balance, so no kinetic energy.
TEST(EnergyWatch, AbsorbedIsTheAreaOfTheLoops) {
  const double f_y = 1e5, k = 1e7, u_y = f_y / k, r = 0.1, mu = 3;
  Stick stick = linear_stick({mass}, {k});
  stick.stories[0].spring = Bilinear{k, f_y, r};
  const System system = assemble(stick);
  EnergyWatch watch(system, WorkRule::trapezoid);
  State<double> state = state_at_rest<double>(system);
  const double still = 0;
  auto& memory = std::get<std::vector<Bilinear::Memory<double>>>(state.memory)[0];
  const auto push_to = [&](double d) {
    auto trial = memory;
    const double force =
        reply<double>(std::get<ElementGroup<Bilinear>>(system.groups).laws[0], d, 0.0, memory, trial).force;
    memory = trial;
    state.u[0] = d;
    watch.see({0, true, state, &force, 0, nullptr, &still, &still, &d, nullptr});
  };
  for (const double d : {0.0, u_y, mu * u_y}) push_to(d);
  const double first = watch.now().absorbed;
  EXPECT_NEAR(first, (1 - r) * f_y * (mu - 1) * u_y, 1e-12 * f_y * u_y);
  // At the corners of the loop, where the trapezoid rule is exact.
  for (const double d : {(mu - 2) * u_y, -mu * u_y, (2 - mu) * u_y, mu * u_y}) push_to(d);
  const double loop = 4 * f_y * u_y * (1 - r) * (mu - 1);
  EXPECT_NEAR(watch.now().absorbed - first, loop, 1e-11 * loop);
  // Elastic by hand: the backbone r k d^2/2 and the slider's spring at its strength (1-r) f_y.
  EXPECT_NEAR(watch.now().elastic, 0.5 * r * k * mu * mu * u_y * u_y + 0.5 * (1 - r) * f_y * u_y, 1e-11 * loop);
  EXPECT_NEAR(watch.now().imbalance(), 0, 1e-11 * loop);
  EXPECT_LE(watch.error(), 1e-11);
}

// With P-Delta the elastic energy is that of k - P/h: the weight gives back what it gains in height.
TEST(EnergyWatch, ElasticEnergyIncludesPDelta) {
  Stick stick = linear_stick({mass}, {stiffness}, 4.0);
  stick.p_delta = true;
  stick.gravity = 10;
  const System system = assemble(stick);
  const Load load(system, nullptr, 1.0, {});
  Stage stage(system, load);
  EnergyWatch watch(system, WorkRule::trapezoid);
  State<double> state = state_at_rest<double>(system);
  state.u[0] = 0.02;
  stage.show(watch, state, 0);
  const double expected = 0.5 * (stiffness - mass * 10 / 4) * 0.02 * 0.02;
  EXPECT_NEAR(watch.now().elastic, expected, 1e-13 * expected);
}

TEST(EnergyWatch, NothingPutInIsNoError) {
  const System system = assemble(linear_stick({mass}, {stiffness}));
  const Load load(system, nullptr, 1.0, {});
  Stage stage(system, load);
  EnergyWatch watch(system, WorkRule::trapezoid);
  for (const double t : {0.0, 1.0}) stage.show(watch, state_at_rest<double>(system), t);
  EXPECT_EQ(watch.error(), 0);
}

}  // namespace
}  // namespace pilotis
