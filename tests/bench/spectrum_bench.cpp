// The spectrum kernel: periods per second, floating-point operations per second and its share of the peak of fused
// multiply-adds that the same core reaches in the same run; and a plain loop over one period at a time as rival.
//
// Counted per oscillator and step, 23 operations: 7 each for u and v (four products, three sums), 3 for the absolute
// acceleration, 6 comparisons for the extremes of the three. Loads, coefficients, the broadcast of the ground and
// padding lanes are not counted. The peak counts 2 operations per fused multiply-add.
#include <benchmark/benchmark.h>

#include <chrono>
#include <cmath>
#include <cstdint>
#include <string>

#include "core/motion/spectra/recurrence.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace {

using namespace pilotis;

constexpr double operations = 23;
constexpr double step = 0.005;  // s
constexpr int samples = 20000;

// Invented: noise of a linear congruence under a slow swell.
const std::vector<double>& ground() {
  static const std::vector<double> made = [] {
    std::vector<double> a;
    std::uint64_t state = 1;
    for (int i = 0; i < samples; ++i) {
      state = state * 6364136223846793005u + 1442695040888963407u;
      a.push_back(std::sin(M_PI * i / samples) * (static_cast<double>(state >> 11) / 9007199254740992.0 - 0.5));
    }
    return a;
  }();
  return made;
}

// `count` periods that need no subdivision at 10 steps a period, or the whole range that does.
std::vector<Oscillator> oscillators(int count, double shortest) {
  return oscillators_of(period_grid(shortest, 10, count, "bench"), std::vector{0.05});
}

double steps_of(std::span<const Oscillator> all, const StepRule& rule) {
  double sum = 0;
  for (const Oscillator& o : all) sum += subdivision(o.period, step, rule);
  return sum * samples;
}

// The rival: the same recurrence as anyone writes it, one period after the other.
[[gnu::noinline]] OscillatorExtremes plain_loop(const Oscillator& oscillator) {
  const Recurrence r = recurrence(oscillator, step);
  const double damping = -2 * oscillator.damping_ratio * r.omega, stiffness = -r.omega * r.omega;
  OscillatorExtremes seen;
  const auto widen = [](Extremes& e, double x) {
    e.low = std::min(e.low, x);
    e.high = std::max(e.high, x);
  };
  double u = 0, v = 0;
  for (int i = 1; i < samples; ++i) {
    const double p0 = ground()[i - 1], p1 = ground()[i];
    const double next = r.a_uu * u + r.a_uv * v + r.b_u0 * p0 + r.b_u1 * p1;
    v = r.a_vu * u + r.a_vv * v + r.b_v0 * p0 + r.b_v1 * p1;
    u = next;
    widen(seen.displacement, u);
    widen(seen.velocity, v);
    widen(seen.acceleration, damping * v + stiffness * u);
  }
  return seen;
}

bool agree(const OscillatorExtremes& a, const OscillatorExtremes& b) {
  const auto close = [](const Extremes& x, const Extremes& y) {
    return std::abs(x.largest() - y.largest()) <= 1e-9 * y.largest();
  };
  return close(a.displacement, b.displacement) && close(a.velocity, b.velocity) &&
         close(a.acceleration, b.acceleration);
}

#if defined(__x86_64__)
// Twelve independent chains in registers, nothing else: what the core can do at most with packs of four (AVX2, FMA).
[[gnu::noinline, gnu::target("avx2,fma")]] double fused_chains(long rounds) {
  using Four [[gnu::vector_size(32)]] = double;
  const Four x = Four{} + 0.999999, y = Four{} + 1e-6;
  Four a = x, b = x, c = x, d = x, e = x, f = x, g = x, h = x, i = x, j = x, k = x, l = x;
#define PILOTIS_FUSED(z) asm volatile("vfmadd213pd %2, %1, %0" : "+x"(z) : "x"(x), "x"(y))
  for (long n = 0; n < rounds; ++n) {
    PILOTIS_FUSED(a);
    PILOTIS_FUSED(b);
    PILOTIS_FUSED(c);
    PILOTIS_FUSED(d);
    PILOTIS_FUSED(e);
    PILOTIS_FUSED(f);
    PILOTIS_FUSED(g);
    PILOTIS_FUSED(h);
    PILOTIS_FUSED(i);
    PILOTIS_FUSED(j);
    PILOTIS_FUSED(k);
    PILOTIS_FUSED(l);
  }
#undef PILOTIS_FUSED
  const Four sum = a + b + c + d + e + f + g + h + i + j + k + l;
  return sum[0] + sum[1] + sum[2] + sum[3];
}

// In operations per second, the best of many short bursts; once a run.
double peak() {
  if (!__builtin_cpu_supports("avx2") || !__builtin_cpu_supports("fma")) return NAN;
  static const double best = [] {
    constexpr long rounds = 100000;
    double seconds = 1;
    for (int burst = 0; burst < 50; ++burst) {
      const auto start = std::chrono::steady_clock::now();
      benchmark::DoNotOptimize(fused_chains(rounds));
      seconds = std::min(seconds, std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count());
    }
    return rounds * 12.0 * 4 * 2 / seconds;
  }();
  return best;
}
#else
double peak() { return NAN; }
#endif

void count_rates(benchmark::State& bench, double steps, std::size_t periods) {
  using benchmark::Counter;
  const double rounds = static_cast<double>(bench.iterations());
  bench.counters["flop/s"] = Counter(rounds * steps * operations, Counter::kIsRate);
  bench.counters["of_peak"] = Counter(rounds * steps * operations / peak(), Counter::kIsRate);
  bench.counters["periods/s"] = Counter(rounds * static_cast<double>(periods), Counter::kIsRate);
}

void plain(benchmark::State& bench) {
  const auto all = oscillators(200, 10 * step);
  for (auto _ : bench)
    for (const Oscillator& o : all) benchmark::DoNotOptimize(plain_loop(o));
  count_rates(bench, steps_of(all, archive_rule), all.size());
}

void kernel(benchmark::State& bench, InstructionSet set, double shortest, StepRule rule) {
  const auto all = oscillators(200, shortest);
  std::vector<OscillatorExtremes> found(all.size());
  const auto once = [&] { oscillator_extremes({ground(), step}, all, rule, found, "bench", set); };
  once();
  for (std::size_t i = 0; i < all.size(); ++i)
    if (subdivision(all[i].period, step, rule) == 1 && !agree(found[i], plain_loop(all[i])))
      return bench.SkipWithError("wrong extremes");
  for (auto _ : bench) once();
  count_rates(bench, steps_of(all, rule), all.size());
}

}  // namespace

int main(int argc, char** argv) {
  benchmark::Initialize(&argc, argv);
  benchmark::RegisterBenchmark("plain_loop/200_periods", plain);
  for (const InstructionSet set : instruction_sets()) {
    const std::string name(name_of(set));
    benchmark::RegisterBenchmark(("kernel/200_periods/" + name).c_str(), kernel, set, 10 * step, archive_rule);
    benchmark::RegisterBenchmark(("whole_spectrum_from_0.01_s/10_steps_a_period/" + name).c_str(), kernel, set, 0.01,
                                 archive_rule);
    benchmark::RegisterBenchmark(("whole_spectrum_from_0.01_s/40_steps_a_period/" + name).c_str(), kernel, set, 0.01,
                                 StepRule{40});
  }
  benchmark::RunSpecifiedBenchmarks();
}
