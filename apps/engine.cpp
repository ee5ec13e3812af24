#include "apps/engine.hpp"

#include <algorithm>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/load.hpp"
#include "core/system/summary.hpp"
#include "integrators/auto_step.hpp"
#include "integrators/catalogue.hpp"
#include "integrators/runs.hpp"

namespace pilotis {

namespace {

MotionSummary summary_of(const Motion& motion) {
  return {motion.name, motion.file, motion.digest, motion.step, motion.samples, motion.peak.value};
}

// What is the same for every run of a study.
struct Setting {
  const Study& study;
  System system;
  BuildingSummary building;
  RunPlan plan;  // without step and duration
};

Setting prepared(const Study& study) {
  if (study.buildings.size() > 1)
    throw input_error(study.file.string(), "several buildings cannot be run yet", "give one");
  const Stick& stick = study.buildings[0].stick;
  Setting setting{study, assemble(stick), {}, {}};
  setting.building = summary_of(stick, setting.system, study.title);
  const MarchSettings& march = study.march;
  RunPlan& plan = setting.plan;
  plan.scheme = make_scheme(march.scheme.name, march.scheme.values, "march.scheme");
  plan.fundamental_period = setting.building.modes[0].period;
  plan.error_check = march.error_check;
  plan.collapse_drift_ratio = march.collapse_drift_ratio;
  plan.tolerance = march.tolerance;
  plan.halvings = march.halvings;
  plan.histories = study.keep.histories;
  plan.every = study.keep.every;
  plan.initial_displacement = study.initial_displacement;
  plan.initial_velocity = study.initial_velocity;
  return setting;
}

StepChoice step_for(const Setting& setting, const Motion* motion) {
  const StepNeeds needs{setting.building.modes, motion != nullptr ? motion->step : 0.0, !setting.system.is_linear()};
  const Traits traits = setting.plan.scheme->traits();
  return setting.study.march.step
             ? check_step(traits, needs, *setting.study.march.step, setting.plan.scheme->description())
             : choose_step(traits, needs);
}

// `record` holds the samples of `motion`; both null without ground motion.
RunResult run(const Setting& setting, const Motion* motion, const Accelerogram* record, double factor) {
  const Load load(setting.system, record, factor, setting.study.forces);
  const StepChoice choice = step_for(setting, motion);
  RunPlan plan = setting.plan;
  plan.step = choice.step;
  plan.duration = setting.study.march.duration.value_or(load.end() + setting.study.march.tail);
  plan.tail = std::max(0.0, plan.duration - load.end());  // none when the study ends the run while the load goes on
  RunResult result = run_once(setting.system, load, plan);
  result.motion = motion != nullptr ? motion->name : "none";
  result.factor = factor;
  result.step_choice = choice.why;
  return result;
}

}  // namespace

long run_count(const Study& study) {
  const std::size_t of_each = study.motions.empty() ? 1 : study.motions.size() * study.factors.size();
  return static_cast<long>(study.buildings.size() * of_each);
}

StudyRun run_study(const Study& study, const RunWatch& watch) {
  const Setting setting = prepared(study);
  StudyRun done;
  done.results.building = setting.building;
  for (const Motion& motion : study.motions) done.results.motions.push_back(summary_of(motion));
  const long all = run_count(study);
  const auto keep = [&](RunResult result) {
    done.results.runs.push_back(std::move(result));
    done.stopped = !watch(static_cast<long>(done.results.runs.size()), all);
    return !done.stopped;
  };
  if (study.motions.empty()) {
    keep(run(setting, nullptr, nullptr, 1));
    return done;
  }
  for (double factor : study.factors)
    for (std::size_t i = 0; i < study.motions.size(); ++i)
      if (!keep(run(setting, &study.motions[i], study.motions.samples(i).get(), factor))) return done;
  return done;
}

}  // namespace pilotis
