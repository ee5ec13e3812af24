// How marches end badly, and how schemes and steps are refused.
#include <random>

#include "core/error.hpp"
#include "integrators/auto_step.hpp"
#include "integrators/runs.hpp"
#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

RunPlan plan_of(std::shared_ptr<const Scheme> scheme, double step, double duration) {
  RunPlan plan;
  plan.scheme = std::move(scheme), plan.step = step, plan.duration = duration, plan.fundamental_period = 1;
  return plan;
}

// The lower story softens for good under a lasting push above its strength: nothing can hold it.
TEST(Failure, CollapseNamesStoryAndTime) {
  Stick stick = stick_of(2, 1e5, 3, Bilinear{5e7, 5e5, -0.05});
  stick.stories[1].spring = Linear{5e7};
  const System system = assemble(stick);
  const Load load(system, nullptr, 1, {{2, {0, 20}, {6e5, 6e5}}});
  for (const auto& scheme : {scheme_of("average_acceleration"), scheme_of("hht_alpha", {-0.05}),
                             scheme_of("dormand_prince", {1e-6, 1e-9})}) {
    const RunResult result = run_once(system, load, plan_of(scheme, 0.01, 20));
    EXPECT_EQ(result.status, RunStatus::collapsed) << scheme->description();
    EXPECT_NE(result.status_note.find("story 1 passed the drift ratio 0.1"), std::string::npos) << result.status_note;
    EXPECT_GT(result.time_reached, 0);
    EXPECT_LT(result.time_reached, 20);
    // The drift that stopped it is there to see, just past the ratio.
    const double ratio = result.peaks[ResponseLayout(2).offset(*find_quantity("drift_ratio"))].value;
    EXPECT_GT(ratio, 0.1);
    EXPECT_LT(ratio, 0.15);
  }
}

// Elastoplastic, T = 0.02 s in steps of 0.02 s, and moving fast: Newton starts on one plateau of the spring, lands on
// the other, and goes to and fro for ever, f_y beta dt^2 / m being larger than v dt. At half the step it lands between
// them.
struct ToAndFro {
  System system = assemble(stick_of(1, 1e3, 3, Bilinear{1e8, 1e5, 0}));
  Load load{system, nullptr, 1, {}};
};

TEST(Failure, AStepThatDoesNotConvergeIsHalved) {
  const ToAndFro fast;
  const Marched run = marched(fast.system, fast.load, *scheme_of("average_acceleration"), 0.02, 1, {{}, {0.2}}, 1e-3);
  EXPECT_EQ(run.end.ending, MarchEnding::done);
  EXPECT_EQ(run.track.seen, 3) << "the start and two halves";
  EXPECT_EQ(run.state.clock[0].step, 1);
}

TEST(Failure, WithoutHalvingsItSaysNotConverged) {
  const ToAndFro fast;
  RunPlan plan = plan_of(scheme_of("average_acceleration"), 0.02, 0.5);
  plan.halvings = 0;
  plan.initial_velocity = {0.2};
  plan.tolerance = 1e-3;  // nothing is loaded at the start: absolute, through a scale of 1 N
  const RunResult result = run_once(fast.system, fast.load, plan);
  EXPECT_EQ(result.status, RunStatus::not_converged);
  EXPECT_NE(result.status_note.find("not converged at 0 s"), std::string::npos) << result.status_note;
  EXPECT_EQ(result.time_reached, 0);
  for (const Peak& peak : result.peaks) EXPECT_TRUE(std::isnan(peak.step_error));
}

// On every floor in turn: a residual that is not a number must not pass for converged because another one is small.
TEST(Failure, ALoadThatIsNotFinite) {
  const System system = assemble(stick_of(3, 1e5, 3, Bilinear{5e7, 5e5, 0.1}));
  const System linear = assemble(stick_of(3, 1e5, 3, Linear{5e7}));
  for (double bad : {std::nan(""), std::numeric_limits<double>::infinity()})
    for (int floor = 1; floor <= 3; ++floor)
      for (const auto& scheme : all_schemes()) {
        const System& which = scheme->traits().linear_only ? linear : system;
        const Load load(which, nullptr, 1, {{floor, {0, 0.05, 0.06, 1}, {0, 0, bad, bad}}});
        const Marched run = marched(which, load, *scheme, 0.001, 100);
        EXPECT_EQ(run.end.ending, MarchEnding::not_finite)
            << scheme->description() << ", floor " << floor << ", " << bad;
        EXPECT_LT(run.end.time, 0.0605);
      }
}

// An explicit march past its limit grows until numbers end; the run says so instead of going on.
TEST(Failure, AnUnstableMarchIsNotDone) {
  const System system = assemble(single(1, 4 * pi * pi, 0));
  const Load load(system, nullptr, 1, {{1, {0, 1000}, {1, 1}}});
  RunPlan plan = plan_of(scheme_of("newmark", {0, 0.5}), 0.5, 1000);
  EXPECT_EQ(run_once(system, load, plan).status, RunStatus::collapsed);
}

std::string message(const auto& action) {
  try {
    action();
  } catch (const Error& error) {
    EXPECT_EQ(error.kind(), ErrorKind::input);
    return error.what();
  }
  return "no error";
}

TEST(Refusal, LinearSchemesNameTheLawAndTheElement) {
  Stick stick = stick_of(3, 1e5, 3, Linear{5e7});
  stick.stories[1].spring = Bilinear{5e7, 5e5, 0.1};
  const System system = assemble(stick);
  for (const auto& scheme : all_schemes()) {
    if (!scheme->traits().linear_only) {
      EXPECT_NO_THROW(scheme->prepare(system, {0.01, 1e-6})) << scheme->description();
      continue;
    }
    const std::string said = message([&] { scheme->prepare(system, {0.01, 1e-6}); });
    EXPECT_NE(said.find("bilinear stands in element 2"), std::string::npos) << said;
    EXPECT_NE(said.find("linear buildings only"), std::string::npos) << said;
  }
}

TEST(Refusal, ModalNeedsClassicalDamping) {
  Stick stick = stick_of(3, 1e5, 3, Linear{5e7});
  stick.stories[0].dashpot = 1e6;
  const System system = assemble(stick);
  const std::string said = message([&] { scheme_of("modal", {0})->prepare(system, {0.01, 1e-6}); });
  EXPECT_NE(said.find("dashpots"), std::string::npos) << said;
  EXPECT_NE(message([&] {
              scheme_of("modal", {4})->prepare(assemble(stick_of(3, 1e5, 3, Linear{5e7})), {0.01, 1e-6});
            }).find("3 modes"),
            std::string::npos);
}

TEST(Refusal, UnknownNamesAndValuesOutOfRange) {
  EXPECT_NE(message([] { scheme_of("newmork", {0.25, 0.5}); }).find("newmark"), std::string::npos);
  EXPECT_NE(message([] { scheme_of("hht_alpha", {-0.4}); }).find("alpha"), std::string::npos);
  EXPECT_NE(message([] { scheme_of("hht_alpha", {0.1}); }).find("alpha"), std::string::npos);
  EXPECT_NE(message([] { scheme_of("newmark", {0.25, 0.4}); }).find("gamma"), std::string::npos);
  EXPECT_NE(message([] { scheme_of("modal", {1.5}); }).find("modes"), std::string::npos);
}

TEST(Step, AFixedStepPastTheStabilityLimitIsRefused) {
  const StepNeeds needs{modes_of(assemble(stick_of(3, 1e5, 3, Linear{5e7}))), 0.02, false};
  const Traits traits = scheme_of("newmark", {0, 0.5})->traits();
  const double limit = needs.modes.back().period / pi;  // closed form: central difference
  EXPECT_NO_THROW(check_step(traits, needs, 0.999 * limit, "newmark"));
  const std::string said = message([&] { check_step(traits, needs, 1.001 * limit, "newmark"); });
  EXPECT_NE(said.find("unstable in mode 3"), std::string::npos) << said;
  EXPECT_NE(said.find("march.step"), std::string::npos) << said;
}

TEST(Step, OneThatDoesNotDivideTheRecordsIsNoted) {
  const StepNeeds needs{modes_of(assemble(stick_of(3, 1e5, 3, Linear{5e7}))), 0.02, false};
  const Traits traits = scheme_of("average_acceleration")->traits();
  EXPECT_NE(check_step(traits, needs, 0.003, "").why.find("does not divide the record's 0.02 s"), std::string::npos);
  EXPECT_EQ(check_step(traits, needs, 0.0025, "").why.find("divide"), std::string::npos);
  EXPECT_NE(check_step(traits, needs, 0.02, "").why.find("rough"), std::string::npos);
}

// For any record: the step divides the record's, resolves what it must, is stable, is not needlessly small, and says
// why.
TEST(Step, AutoDividesTheRecordsStepAndSaysWhy) {
  std::mt19937 random(3);
  std::uniform_real_distribution<double> uniform(0, 1);
  for (int trial = 0; trial < 500; ++trial) {
    const int stories = 1 + static_cast<int>(12 * uniform(random));
    const StepNeeds needs{modes_of(assemble(stick_of(stories, 1e5, 3, Linear{std::pow(10, 6 + 3 * uniform(random))}))),
                          std::pow(10, -3.5 + 2 * uniform(random)), trial % 2 == 0};
    for (const auto& scheme : all_schemes()) {
      const Traits traits = scheme->traits();
      const StepChoice choice = choose_step(traits, needs);
      const double parts = needs.record_step / choice.step;
      EXPECT_NEAR(parts, std::round(parts), 1e-9 * parts);
      EXPECT_GE(parts, 1 - 1e-12);
      EXPECT_LT(choice.step, traits.stability_limit * needs.modes.back().period / (2 * pi));
      EXPECT_LE(choice.step, traits.accurate_omega_dt * needs.modes[0].period / (2 * pi) * (1 + 1e-9));
      if (needs.nonlinear) {
        EXPECT_LE(choice.step, needs.modes[0].period / 200 * (1 + 1e-9));
      }
      EXPECT_EQ(choice.why.rfind("auto: ", 0), 0u) << choice.why;
      EXPECT_NE(choice.why.find("the record's"), std::string::npos) << choice.why;
      EXPECT_NE(choice.why.find(" s"), std::string::npos) << choice.why;
      if (parts > 1.5) {
        EXPECT_TRUE(choice.why.find("modes 1-") != std::string::npos ||
                    choice.why.find("yielding") != std::string::npos ||
                    choice.why.find("stability") != std::string::npos)
            << choice.why;
      }
    }
  }
}

TEST(Step, WithoutARecordItIsARoundNumber) {
  const StepNeeds needs{modes_of(assemble(stick_of(3, 1e5, 3, Linear{5e7}))), 0, false};
  const StepChoice choice = choose_step(scheme_of("average_acceleration")->traits(), needs);
  const double head = choice.step / std::pow(10, std::floor(std::log10(choice.step * (1 + 1e-12))));
  EXPECT_TRUE(std::abs(head - 1) < 1e-9 || std::abs(head - 2) < 1e-9 || std::abs(head - 5) < 1e-9) << choice.step;
}

}  // namespace
}  // namespace pilotis::test
