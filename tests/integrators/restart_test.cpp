// A march chopped in pieces gives the same bits: the State alone restarts it, with a fresh stepper.
#include <cstring>
#include <random>

#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

std::vector<std::pair<const char*, Law>> laws() {
  return {{"linear", Linear{5e7}},
          {"bilinear", Bilinear{5e7, 4e5, 0.05}},
          {"trilinear", Trilinear{5e7, 1.5e5, 0.4, 4e5, 0.02}},
          {"bouc_wen", smooth_law(5e7, 4e5, 0.05, 1.5)}};
}

Accelerogram shaking() {
  std::mt19937 random(7);
  std::normal_distribution<double> normal(0, 3);
  Accelerogram record{0.02, 0, {}};
  for (int i = 0; i < 200; ++i) record.samples.push_back(normal(random));
  return record;
}

template <class T>
bool same_bits(const std::vector<T>& a, const std::vector<T>& b) {
  if (std::is_empty_v<T>) return a.size() == b.size();  // a law without memory: its bytes mean nothing
  return a.size() == b.size() && (a.empty() || std::memcmp(a.data(), b.data(), a.size() * sizeof(T)) == 0);
}

bool same_bits(const State<double>& a, const State<double>& b) {
  bool same = same_bits(a.u, b.u) && same_bits(a.v, b.v) && same_bits(a.a, b.a) && a.clock[0].step == b.clock[0].step &&
              a.clock[0].fraction == b.clock[0].fraction && a.inner_step == b.inner_step;
  [&]<std::size_t... I>(std::index_sequence<I...>) {
    ((same = same && same_bits(std::get<I>(a.memory), std::get<I>(b.memory))), ...);
  }
  (std::make_index_sequence<std::tuple_size_v<Memories<double>>>{});
  return same;
}

// The numbers alone, byte for byte, into a state made anew: nothing hidden travels along.
template <class T>
void pour(const std::vector<T>& from, std::vector<T>& into) {
  std::vector<unsigned char> bytes(from.size() * sizeof(T));
  if (from.empty()) return;
  std::memcpy(bytes.data(), from.data(), bytes.size());
  std::memcpy(static_cast<void*>(into.data()), bytes.data(), bytes.size());
}

State<double> through_plain_numbers(const System& system, const State<double>& state) {
  State<double> copy = state_at_rest<double>(system);
  pour(state.u, copy.u), pour(state.v, copy.v), pour(state.a, copy.a);
  [&]<std::size_t... I>(std::index_sequence<I...>) { (pour(std::get<I>(state.memory), std::get<I>(copy.memory)), ...); }
  (std::make_index_sequence<std::tuple_size_v<Memories<double>>>{});
  copy.clock = state.clock, copy.inner_step = state.inner_step;
  return copy;
}

State<double> march_on(const System& system, const Load& load, const Scheme& scheme, State<double> state, long end) {
  const double dt = 0.01;
  const auto stepper = scheme.prepare(system, {dt, 1e-6});
  EXPECT_EQ(march(system, load, *stepper, {dt, end}, state, {}).ending, MarchEnding::done);
  return state;
}

TEST(Restart, GivesTheSameBits) {
  std::mt19937 random(11);
  const long end = 400;
  for (const auto& scheme : all_schemes())
    for (const auto& [name, law] : laws()) {
      Stick stick = stick_of(4, 1e5, 3, law);
      stick.damping = RayleighByModes{0.03, 0.03, 1, 3};
      const System system = assemble(stick);
      if (scheme->traits().linear_only && !system.is_linear()) continue;
      if (scheme->traits().stability_limit * modes_of(system).back().period / (2 * pi) < 0.01) continue;
      const Accelerogram record = shaking();
      const Load load(system, &record, 1, {});
      const State<double> whole = march_on(system, load, *scheme, started(system, load, {}), end);
      State<double> chopped = started(system, load, {});
      for (long cut : {long(1 + random() % 99), long(100 + random() % 100), long(200 + random() % 199), end})
        chopped = through_plain_numbers(system, march_on(system, load, *scheme, chopped, cut));
      EXPECT_TRUE(same_bits(whole, chopped)) << scheme->description() << ", " << name;
    }
}

}  // namespace
}  // namespace pilotis::test
