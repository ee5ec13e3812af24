#include "apps/engine.hpp"

#include <algorithm>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/load.hpp"
#include "core/system/summary.hpp"
#include "integrators/auto_step.hpp"
#include "integrators/catalogue.hpp"
#include "integrators/one_run.hpp"

namespace pilotis {

namespace {

MotionSummary summary_of(const Motion& motion) {
  return {motion.name,
          motion.file,
          motion.digest,
          motion.record.step,
          static_cast<long>(motion.record.samples.size()),
          peak_of(motion.record).value};
}

// What is the same for every run of a study.
struct Setting {
  const Study& study;
  System system;
  BuildingSummary building;
  RunPlan plan;  // without step and duration
};

Setting prepared(const Study& study) {
  Setting setting{study, assemble(study.building), {}, {}};
  setting.building = summary_of(study.building, setting.system, study.title);
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
  const StepNeeds needs{setting.building.modes, motion != nullptr ? motion->record.step : 0.0,
                        !setting.system.is_linear()};
  const Traits traits = setting.plan.scheme->traits();
  return setting.study.march.step
             ? check_step(traits, needs, *setting.study.march.step, setting.plan.scheme->description())
             : choose_step(traits, needs);
}

RunResult run(const Setting& setting, const Motion* motion, double factor) {
  const Load load(setting.system, motion != nullptr ? &motion->record : nullptr, factor, setting.study.forces);
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
  return study.motions.empty() ? 1 : static_cast<long>(study.motions.size() * study.factors.size());
}

StudyRun run_study(const Study& study, const RunWatch& watch) {
  const Setting setting = prepared(study);
  StudyRun done;
  done.results.buildings = {setting.building};
  for (const Motion& motion : study.motions) done.results.motions.push_back(summary_of(motion));
  const long all = run_count(study);
  const auto keep = [&](RunResult result) {
    done.results.runs.push_back(std::move(result));
    done.stopped = !watch(static_cast<long>(done.results.runs.size()), all);
    return !done.stopped;
  };
  if (study.motions.empty()) {
    keep(run(setting, nullptr, 1));
    return done;
  }
  for (double factor : study.factors)
    for (const Motion& motion : study.motions)
      if (!keep(run(setting, &motion, factor))) return done;
  return done;
}

}  // namespace pilotis
