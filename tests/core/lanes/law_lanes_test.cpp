// Every law over packs of 2, 4 and 8 lanes gives in each lane the very bits of the scalar reply. No source: it is what
// makes results independent of how runs are put together.
#include <gtest/gtest.h>
#include <rapidcheck.h>

#include "tests/core/laws/legal_law.hpp"

namespace pilotis {
namespace {

using namespace test;

template <class L>
class EveryLawInLanes : public ::testing::Test {};
TYPED_TEST_SUITE(EveryLawInLanes, EveryLawType);

bool same(double a, double b) { return std::memcmp(&a, &b, sizeof a) == 0; }

// Fields of a pack's memory stand one after the other, each with all its lanes.
template <class L, int W>
bool lane_remembers(const typename L::template Memory<Pack<W>>& pack, int i,
                    const typename L::template Memory<double>& one) {
  if constexpr (std::is_empty_v<typename L::template Memory<double>>) return true;
  constexpr std::size_t fields = sizeof(one) / sizeof(double);
  std::vector<double> wide(fields * W), narrow(fields);
  std::memcpy(wide.data(), &pack, sizeof pack);
  std::memcpy(narrow.data(), &one, sizeof one);
  for (std::size_t f = 0; f < fields; ++f)
    if (!same(wide[f * W + i], narrow[f])) return false;
  return true;
}

// One step of W runs, together and one by one; true when all agree to the bit.
template <class L, int W>
bool step_agrees(const L& law, const std::vector<double>& to, typename L::template Memory<Pack<W>>& pack,
                 std::vector<Walker<L>>& singles) {
  using R = Pack<W>;
  R deformation{}, rate{};
  for (int i = 0; i < W; ++i) set_lane(deformation, i, to[i]);
  auto trial = pack;
  const Reply<R> answer = reply<R>(law, deformation, rate, pack, trial);
  const R stored = stored_energy<R>(law, trial, deformation), lost = dissipated_energy<R>(law, pack, trial);
  pack = trial;
  for (int i = 0; i < W; ++i) {
    const auto before = singles[i].memory;
    const Reply<double> alone = singles[i].go(to[i]);
    const auto& after = singles[i].memory;
    if (!same(lane(answer.force, i), alone.force) || !same(lane(answer.tangent, i), alone.tangent)) return false;
    if (!same(lane(stored, i), stored_energy<double>(law, after, to[i]))) return false;
    if (!same(lane(lost, i), dissipated_energy<double>(law, before, after))) return false;
    if (!lane_remembers<L, W>(pack, i, after)) return false;
  }
  return true;
}

// Lanes of very different amplitude, so that some yield while others stay elastic.
template <class L, int W>
void check_width() {
  EXPECT_TRUE(rc::check("same bits over a pack", [] {
    const L law = drawn_law<L>(Reach::all);
    typename L::template Memory<Pack<W>> pack{};
    std::vector<Walker<L>> singles(W, Walker<L>{law});
    for (int step = 0; step < 8; ++step) {
      std::vector<double> to = drawn_path(law, W);
      for (int i = 0; i < W; ++i) to[i] *= std::pow(10, *rc::gen::inRange(-2, 2));
      RC_ASSERT((step_agrees<L, W>(law, to, pack, singles)));
    }
  }));
}

TYPED_TEST(EveryLawInLanes, TwoLanes) { check_width<TypeParam, 2>(); }
TYPED_TEST(EveryLawInLanes, FourLanes) { check_width<TypeParam, 4>(); }
TYPED_TEST(EveryLawInLanes, EightLanes) { check_width<TypeParam, 8>(); }

}  // namespace
}  // namespace pilotis
