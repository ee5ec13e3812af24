// The march of 20 stories under twice El Centro by every scheme, in story-steps per second: yielding where the scheme
// takes it, linear where it does not. Each is checked against a tight march before it is timed.
#include <benchmark/benchmark.h>

#include <cmath>
#include <map>

#include "core/response/peaks.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/load.hpp"
#include "integrators/catalogue.hpp"
#include "integrators/march.hpp"
#include "tests/integrators/twenty_stories.hpp"

namespace {

using namespace pilotis;

constexpr double duration = 31.2;  // s, the record
constexpr int stories = 20;

struct Building {
  explicit Building(bool yields)
      : system(assemble(test::twenty_stories(yields))),
        record(test::el_centro(standard_gravity)),
        load(system, &record, 2, {}) {}
  System system;
  Accelerogram record;
  Load load;
};

// Peak drifts, m, [story], and how many states were accepted.
struct Outcome {
  std::vector<double> peaks;
  double end = 0;
};

class Counter : public Observer {
 public:
  bool see(const Instant&) noexcept override { return ++states, true; }
  long states = 0;
};

// Builds nothing anew but the state: what a run of a study pays per march, peaks kept.
Outcome march_once(const Building& building, Stepper& stepper, double dt, Counter& counter) {
  State<double> state = state_at_rest<double>(building.system);
  start(building.system, building.load, state);
  PeakWatch peaks{ResponseLayout(stories)};
  Observer* watch[] = {&peaks, &counter};
  Outcome out;
  out.end = march(building.system, building.load, stepper, {dt, std::lround(duration / dt)}, state, watch).time;
  const std::size_t first = ResponseLayout(stories).offset(*find_quantity("drift"));
  for (int i = 0; i < stories; ++i) out.peaks.push_back(std::abs(peaks.peaks()[first + i].value));
  return out;
}

std::unique_ptr<Stepper> prepared(const Building& building, const char* name, const std::vector<double>& values,
                                  double dt) {
  return make_scheme(name, values, "bench")->prepare(building.system, {dt, 1e-9 * building.load.largest()});
}

const std::vector<double>& tight_peaks(const Building& building, bool yields) {
  static std::map<bool, std::vector<double>> known;
  if (known[yields].empty()) {
    Counter counter;
    known[yields] = march_once(building, *prepared(building, "fehlberg", {1e-9, 1e-12}, 0.002), 0.002, counter).peaks;
  }
  return known[yields];
}

// One scheme at a step that leaves its peaks within `allowed` of the tight ones.
void march_bench(benchmark::State& bench, const char* name, std::vector<double> values, double dt, bool yields,
                 double allowed) {
  const Building building(yields);
  if (building.record.samples.empty()) return bench.SkipWithError("the record is not there");
  const auto stepper = prepared(building, name, values, dt);
  Counter counter;
  const Outcome once = march_once(building, *stepper, dt, counter);
  for (int i = 0; i < stories; ++i)
    if (!(std::abs(once.peaks[i] / tight_peaks(building, yields)[i] - 1) <= allowed))
      return bench.SkipWithError("wrong peaks");
  counter.states = 0;
  for (auto _ : bench) benchmark::DoNotOptimize(march_once(building, *stepper, dt, counter));
  bench.counters["story_steps"] =
      benchmark::Counter(static_cast<double>(counter.states) * stories, benchmark::Counter::kIsRate);
  bench.counters["steps_a_march"] = static_cast<double>(counter.states) / static_cast<double>(bench.iterations());
}

#define MARCH(label, ...) BENCHMARK_CAPTURE(march_bench, label, __VA_ARGS__)->Unit(benchmark::kMillisecond)

// 0.001 s: second-order schemes stay within 1 % there.
MARCH(average_acceleration_yielding, "average_acceleration", {}, 0.001, true, 0.01);
MARCH(linear_acceleration_yielding, "linear_acceleration", {}, 0.001, true, 0.01);
MARCH(central_difference_yielding, "newmark", {0, 0.5}, 0.001, true, 0.01);
MARCH(hht_alpha_yielding, "hht_alpha", {-0.05}, 0.001, true, 0.01);
MARCH(dormand_prince_yielding, "dormand_prince", {1e-6, 1e-9}, 0.005, true, 0.01);
MARCH(fehlberg_yielding, "fehlberg", {1e-6, 1e-9}, 0.005, true, 0.01);
MARCH(average_acceleration_linear, "average_acceleration", {}, 0.001, false, 0.01);
MARCH(hht_alpha_linear, "hht_alpha", {-0.05}, 0.001, false, 0.01);
MARCH(piecewise_exact_linear, "piecewise_exact", {}, 0.005, false, 0.01);
MARCH(modal_linear, "modal", {0}, 0.005, false, 0.01);
MARCH(dormand_prince_linear, "dormand_prince", {1e-6, 1e-9}, 0.005, false, 0.01);

}  // namespace
