// 20 bilinear stories under twice El Centro with varied factors, average acceleration at 0.005 s, all that a run always
// observes: story-steps per second in lanes; the general step against one written by hand for a chain; and SUNDIALS
// CVODE at a relative tolerance of 1e-6 on one such run. Each result is checked before it is timed.
#include <benchmark/benchmark.h>

#include <algorithm>
#include <cmath>
#include <memory>

#include "core/system/assemble_stick.hpp"
#include "integrators/march_lanes.hpp"
#include "tests/bench/chain_kernel.hpp"
#include "tests/bench/cvode_stiff.hpp"
#include "tests/integrators/twenty_stories.hpp"

namespace {

using namespace pilotis;

constexpr double dt = 0.005, duration = 31.2;  // s
constexpr long steps = 6240;
constexpr int stories = 20;

struct Suite {
  explicit Suite(int runs) : system(assemble(test::twenty_stories())), record(test::el_centro(standard_gravity)) {
    for (int i = 0; i < runs; ++i) {
      const double factor = 2 * (0.75 + 0.5 * i / runs);
      loads.push_back(std::make_unique<Load>(system, &record, factor, std::vector<FloorForce>{}));
      tasks.push_back({loads.back().get(), dt, steps, duration - 2, false});
    }
  }
  System system;
  Accelerogram record;
  std::vector<std::unique_ptr<Load>> loads;
  std::vector<MarchTask> tasks;
};

// m, [story].
std::vector<double> peak_drifts(const Marched& marched) {
  const std::size_t first = ResponseLayout(stories).offset(*find_quantity("drift"));
  std::vector<double> drifts;
  for (int i = 0; i < stories; ++i) drifts.push_back(std::abs(marched.peaks[first + i].value));
  return drifts;
}

bool close(const std::vector<double>& a, const std::vector<double>& b, double allowed) {
  for (std::size_t i = 0; i < a.size(); ++i)
    if (!(std::abs(a[i] / b[i] - 1) <= allowed)) return false;
  return a.size() == b.size();
}

// CVODE's error at this tolerance, and ours at this step, are well below this.
constexpr double agreement = 0.02;

void lanes(benchmark::State& bench, InstructionSet set) {
  const Suite suite(static_cast<int>(bench.range(0)));
  if (suite.record.samples.empty()) return bench.SkipWithError("the record is not there");
  std::vector<Marched> out(suite.tasks.size());
  const auto march = [&] { return march_lanes(set)(suite.system, {}, {}, suite.tasks, out.data(), nullptr, nullptr); };
  march();
  if (!close(peak_drifts(out[0]), bench::cvode_stiff_peaks(test::twenty_stories(), suite.record, 1.5, duration, 1e-6),
             agreement))
    return bench.SkipWithError("wrong peaks");
  for (auto _ : bench) benchmark::DoNotOptimize(march());
  const double runs = static_cast<double>(bench.range(0)) * static_cast<double>(bench.iterations());
  bench.counters["story_steps"] = benchmark::Counter(runs * steps * stories, benchmark::Counter::kIsRate);
  bench.counters["runs"] = benchmark::Counter(runs, benchmark::Counter::kIsRate);
}

void cvode(benchmark::State& bench) {
  const Accelerogram record = test::el_centro(standard_gravity);
  if (record.samples.empty()) return bench.SkipWithError("the record is not there");
  for (auto _ : bench)
    benchmark::DoNotOptimize(bench::cvode_stiff_peaks(test::twenty_stories(), record, 1.5, duration, 1e-6));
  bench.counters["runs"] = benchmark::Counter(static_cast<double>(bench.iterations()), benchmark::Counter::kIsRate);
}

bench::ChainJob chain_job(const Suite& suite, const std::vector<double>& ground, int lanes) {
  bench::ChainJob job{&suite.system, &ground, dt, 1e-9 * suite.loads[0]->largest(), {}, {}, 0};
  for (int i = 0; i < lanes; ++i) job.factors.push_back(2 * (0.75 + 0.5 * i / lanes));
  return job;
}

void one_pack(benchmark::State& bench, InstructionSet set, bool general) {
  const Suite suite(1);
  if (suite.record.samples.empty()) return bench.SkipWithError("the record is not there");
  const Load unit(suite.system, &suite.record, 1, {});
  std::vector<double> ground;
  for (long i = 0; i <= steps; ++i) ground.push_back(unit.ground(static_cast<double>(i) * dt));
  static constexpr auto chains = PILOTIS_KERNELS(chain_march);
  static constexpr auto generals = PILOTIS_KERNELS(general_march);
  const auto which = static_cast<std::size_t>(set);
  bench::ChainJob by_hand = chain_job(suite, ground, lanes_of(set)), by_step = by_hand;
  chains[which](by_hand);
  generals[which](by_step);
  // The same equations to the same tolerance: apart by rounding only, which yielding may carry a little further.
  if (!close(by_hand.peaks, by_step.peaks, 1e-6)) return bench.SkipWithError("the two do not agree");
  for (auto _ : bench) general ? generals[which](by_step) : chains[which](by_hand);
  const double marched = static_cast<double>(lanes_of(set)) * static_cast<double>(bench.iterations());
  bench.counters["story_steps"] = benchmark::Counter(marched * steps * stories, benchmark::Counter::kIsRate);
}

const int registered = [] {
  for (InstructionSet set : instruction_sets()) {
    const std::string name(name_of(set));
    benchmark::RegisterBenchmark(("lanes/" + name).c_str(), lanes, set)->Arg(256)->Unit(benchmark::kMillisecond);
    benchmark::RegisterBenchmark(("step/general/" + name).c_str(), one_pack, set, true)->Unit(benchmark::kMillisecond);
    benchmark::RegisterBenchmark(("step/by_hand/" + name).c_str(), one_pack, set, false)->Unit(benchmark::kMillisecond);
  }
  benchmark::RegisterBenchmark("cvode", cvode)->Unit(benchmark::kMillisecond);
  return 0;
}();

}  // namespace
