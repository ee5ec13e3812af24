// What must hold for any building and any motion.
#include <gtest/gtest.h>
// after gtest, which it needs
#include <rapidcheck/gtest.h>

#include "integrators/runs.hpp"
#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

// A number of the range in steps of a hundredth.
rc::Gen<double> between(double least, double most) {
  return rc::gen::map(rc::gen::inRange(0, 101), [=](int share) { return least + (most - least) * share / 100; });
}

Accelerogram motion() {
  Accelerogram record{0.02, 0, {}};
  for (int value : *rc::gen::container<std::vector<int>>(150, rc::gen::inRange(-300, 301)))
    record.samples.push_back(0.02 * value);
  return record;
}

FloorForce push(int stories) {
  return {*rc::gen::inRange(1, stories + 1),
          {0, 0.5, 1.5, 3},
          {*between(-2e5, 2e5), *between(-2e5, 2e5), *between(-2e5, 2e5), 0}};
}

Stick stick(bool yields) {
  const int stories = *rc::gen::inRange(1, 7);
  const double k = *between(2e7, 1e8), yield = *between(2e5, 6e5), r = *between(0, 0.2);
  const bool smooth = *rc::gen::arbitrary<bool>();
  const Law law = !yields ? Law(Linear{k}) : smooth ? smooth_law(k, yield, r, 1) : Law(Bilinear{k, yield, r});
  Stick made = stick_of(stories, *between(5e4, 2e5), 3, law);
  made.damping = RayleighByFactors{*between(0, 0.5), *between(0, 0.004)};
  return made;
}

RunResult run(const Stick& stick, const Scheme& scheme, const Accelerogram& record, double factor,
              std::vector<FloorForce> forces) {
  const System system = assemble(stick);
  RunPlan plan;
  plan.scheme = std::shared_ptr<const Scheme>(&scheme, [](const Scheme*) {});
  plan.step = 0.01, plan.duration = 4, plan.fundamental_period = 0.5, plan.error_check = false,
  plan.collapse_drift_ratio = 1e6;
  plan.histories = {find_quantity("drift"), find_quantity("story_shear"), find_quantity("floor_acceleration")};
  return run_once(system, Load(system, &record, factor, forces), plan);
}

// b = factor a, history by history, to `tolerance` of the largest value.
void require_proportional(const RunResult& a, const RunResult& b, const std::vector<double>& factors,
                          double tolerance) {
  for (std::size_t h = 0; h < a.histories.size(); ++h) {
    double size = 0;
    for (double value : a.histories[h].values) size = std::max(size, std::abs(value));
    for (std::size_t i = 0; i < a.histories[h].values.size(); ++i)
      RC_ASSERT(std::abs(b.histories[h].values[i] - factors[h] * a.histories[h].values[i]) <=
                tolerance * std::abs(factors[h]) * size);
  }
}

// Schemes whose parameters carry no units (the tolerances of the adaptive ones do) and that are stable here.
std::vector<std::shared_ptr<const Scheme>> schemes_without_units(bool yields) {
  std::vector<std::shared_ptr<const Scheme>> list;
  for (const auto& scheme : all_schemes()) {
    const Traits traits = scheme->traits();
    if (!traits.adaptive && !std::isfinite(traits.stability_limit) && !(yields && traits.linear_only))
      list.push_back(scheme);
  }
  return list;
}

std::vector<std::shared_ptr<const Scheme>> stable_schemes(bool yields) {
  std::vector<std::shared_ptr<const Scheme>> list = schemes_without_units(yields);
  for (const auto& scheme : all_schemes())
    if (scheme->traits().adaptive) list.push_back(scheme);
  return list;
}

Stick in_other_units(Stick stick, double length, double force) {
  for (Story& story : stick.stories) {
    story.height *= length;
    story.mass *= force / length;
    if (auto* law = std::get_if<Linear>(&story.spring)) law->stiffness *= force / length;
    if (auto* law = std::get_if<Bilinear>(&story.spring))
      *law = {law->stiffness * force / length, law->yield_shear * force, law->post_yield_ratio};
    if (auto* law = std::get_if<BoucWen>(&story.spring)) law->stiffness *= force / length, law->yield_shear *= force;
  }
  return stick;
}

// Newton stops at 1e-9 of the load in either set of units; yielding may carry such a difference on a little larger.
RC_GTEST_PROP(Properties, UnitsChangeNothingButTheScale, ()) {
  const bool yields = *rc::gen::arbitrary<bool>();
  const Stick metric = stick(yields);
  const double length = *rc::gen::element(1000.0, 1 / 0.0254, 1.0),
               force = *rc::gen::element(0.001, 1000.0, 1 / 4.4482216);
  const auto scheme = *rc::gen::elementOf(schemes_without_units(yields));
  const Accelerogram record = motion();
  Accelerogram scaled = record;
  for (double& a : scaled.samples) a *= length;
  const FloorForce pushed = push(static_cast<int>(metric.stories.size()));
  FloorForce pushed_scaled = pushed;
  for (double& p : pushed_scaled.forces) p *= force;
  const RunResult one = run(metric, *scheme, record, 1, {pushed});
  const RunResult other = run(in_other_units(metric, length, force), *scheme, scaled, 1, {pushed_scaled});
  require_proportional(one, other, {length, force, length}, 1e-6);
}

RC_GTEST_PROP(Properties, AMirroredMotionGivesTheMirroredResponseExactly, ()) {
  const bool yields = *rc::gen::arbitrary<bool>();
  const Stick building = stick(yields);
  const auto scheme = *rc::gen::elementOf(stable_schemes(yields));
  const Accelerogram record = motion();
  FloorForce there = push(static_cast<int>(building.stories.size())), back = there;
  for (double& p : back.forces) p = -p;
  require_proportional(run(building, *scheme, record, 1, {there}), run(building, *scheme, record, -1, {back}),
                       {-1, -1, -1}, 0);
}

// 1e-8: an implicit scheme's 1e-9 of the load; adaptive ones by their own tolerance.
RC_GTEST_PROP(Properties, ALinearBuildingIsProportionalToTheFactor, ()) {
  const Stick building = stick(false);
  const auto scheme = *rc::gen::elementOf(stable_schemes(false));
  const Accelerogram record = motion();
  const double factor = *between(0.1, 10);
  const double tolerance = scheme->traits().adaptive ? 1e-3 : 1e-8;
  require_proportional(run(building, *scheme, record, 1, {}), run(building, *scheme, record, factor, {}),
                       {factor, factor, factor}, tolerance);
}

RC_GTEST_PROP(Properties, MotionAndForceSuperposeOnALinearBuilding, ()) {
  const Stick building = stick(false);
  const auto scheme = *rc::gen::elementOf(stable_schemes(false));
  const Accelerogram record = motion();
  const FloorForce pushed = push(static_cast<int>(building.stories.size()));
  const RunResult shaken = run(building, *scheme, record, 1, {}), forced = run(building, *scheme, record, 0, {pushed});
  RunResult sum = shaken;
  for (std::size_t h = 0; h < sum.histories.size(); ++h)
    for (std::size_t i = 0; i < sum.histories[h].values.size(); ++i)
      sum.histories[h].values[i] += forced.histories[h].values[i];
  const double tolerance = scheme->traits().adaptive ? 1e-3 : 1e-8;
  RC_PRE(std::abs(pushed.forces[0]) + std::abs(pushed.forces[1]) + std::abs(pushed.forces[2]) > 0);
  require_proportional(sum, run(building, *scheme, record, 1, {pushed}), {1, 1, 1}, tolerance);
}

}  // namespace
}  // namespace pilotis::test
