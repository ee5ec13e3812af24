// What holds for every law of the list. None of the sources below gives numbers: the checks are the definitions
// themselves (a tangent is the derivative of the force; work = stored + dissipated) and the second law of
// thermodynamics (a loop from the virgin state gives no energy back: Il'yushin's postulate, 1961).
#include <gtest/gtest.h>
#include <rapidcheck.h>

#include <optional>

#include "tests/core/laws/legal_law.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double rounding = 64 * 2.3e-16;  // a few dozen operations in doubles

template <class L>
class EveryLaw : public ::testing::Test {};
TYPED_TEST_SUITE(EveryLaw, EveryLawType);

// The parts of a force may be far larger than their sum when they oppose each other (a negative post-yield slope).
template <class L>
double force_scale(const L& law, double force, double deformation) {
  return std::abs(force) + initial_stiffness(law) * (std::abs(deformation) + scale_of(law));
}

TYPED_TEST(EveryLaw, StartsWithItsInitialStiffness) {
  EXPECT_TRUE(rc::check("virgin tangent and secant are the initial stiffness", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::moderate);
    const Walker<TypeParam> virgin{law};
    const double k = initial_stiffness(law), parts = std::max(k, law.stiffness);
    RC_ASSERT(virgin.peek(0).force == 0.0);
    RC_ASSERT(std::abs(virgin.peek(0).tangent - k) <= rounding * parts);
    // The slope changes at most in proportion to the deformation: rates of a few per yield deformation.
    const double small = 1e-7 * scale_of(law);
    RC_ASSERT(std::abs(virgin.peek(small).force / small - k) <= 1e-5 * parts);
  }));
}

TYPED_TEST(EveryLaw, AnswersTheSameTwiceAndKeepsTheCommittedMemory) {
  EXPECT_TRUE(rc::check("reply is pure", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::all);
    Walker<TypeParam> walker{law};
    for (const double turn : drawn_path(law, 6)) {
      const auto committed = walker.memory;
      auto first = walker.memory, second = walker.memory;
      const Reply<double> one = reply<double>(law, turn, 0.0, walker.memory, first);
      reply<double>(law, -turn, 0.0, walker.memory, second);  // another trial in between
      const Reply<double> two = reply<double>(law, turn, 0.0, walker.memory, second);
      RC_ASSERT(same_bits(one, two));
      RC_ASSERT(same_bits(first, second));
      RC_ASSERT(same_bits(committed, walker.memory));
      walker.go(turn);
    }
  }));
}

TYPED_TEST(EveryLaw, GivesTheSameForceWhenAskedAgainWhereItStands) {
  EXPECT_TRUE(rc::check("replying at the committed state", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::all);
    Walker<TypeParam> walker{law};
    for (const double turn : drawn_path(law, 6)) {
      walker.go(turn);
      const double scale = force_scale(law, walker.force, turn);
      RC_ASSERT(std::abs(walker.peek(turn).force - walker.force) <= rounding * scale);
    }
  }));
}

TYPED_TEST(EveryLaw, RemainsFinite) {
  EXPECT_TRUE(rc::check("no legal parameters and no stride make it blow up", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::all);
    Walker<TypeParam> walker{law};
    for (double turn : drawn_path(law, 6)) {
      turn *= *rc::gen::element(0.01, 1.0, 100.0);
      const Reply<double> answer = walker.go(turn);
      RC_ASSERT(std::isfinite(answer.force));
      RC_ASSERT(std::isfinite(answer.tangent));
      // None of the rules is ever stiffer than its initial slope on the way out, so none carries more than this.
      RC_ASSERT(std::abs(answer.force) <= (1 + rounding) * 2 * std::max(initial_stiffness(law), law.stiffness) *
                                              (std::abs(turn) + 1e3 * scale_of(law)));
    }
  }));
}

// The tangent lies between the secants to both sides, and equals them where there is no corner. Tolerance: how much the
// central difference still changes between 2 h and h, and rounding over h.
TYPED_TEST(EveryLaw, HasTheSlopeOfItsForceAsTangent) {
  EXPECT_TRUE(rc::check("tangent is the derivative of the force along the path", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::all);
    Walker<TypeParam> walker{law};
    for (const double turn : drawn_path(law, 4)) walker.go(turn);
    const double h = 1e-6 * scale_of(law);
    const double to = walker.deformation + *thousandths(-3000, 3000) * scale_of(law);
    if (std::abs(to - walker.deformation) < 4 * h) return;  // the path would turn within the difference
    const Reply<double> here = walker.peek(to);
    const auto force = [&](double d) { return walker.peek(d).force; };
    const double left = (here.force - force(to - h)) / h, right = (force(to + h) - here.force) / h;
    const double wide = (force(to + 2 * h) - force(to - 2 * h)) / (4 * h);
    const double tolerance =
        2 * std::abs(wide - 0.5 * (left + right)) + rounding * force_scale(law, here.force, to) / h;
    RC_ASSERT(here.tangent >= std::min(left, right) - tolerance);
    RC_ASSERT(here.tangent <= std::max(left, right) + tolerance);
  }));
}

// Tolerance of both energy checks: the trapezoid rule's error falls by four when the parts are halved (at a corner,
// too, and always with the same sign), so twice the change covers what is left; and rounding of every term of the sum.
TYPED_TEST(EveryLaw, GivesNoEnergyBackAroundALoop) {
  EXPECT_TRUE(rc::check("work from the virgin state back to no deformation is at least 0", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::moderate);
    std::vector<double> turns = drawn_path(law, 6);
    turns.push_back(0.0);
    const PathWork coarse = walk(law, turns, 200), fine = walk(law, turns, 400);
    RC_ASSERT(fine.work >= -2 * std::abs(fine.work - coarse.work) - 1e-12 * fine.force * fine.travel);
    RC_ASSERT(fine.dissipated >= -1e-12 * fine.force * fine.travel);
  }));
}

TYPED_TEST(EveryLaw, StoresOrDissipatesAllWork) {
  EXPECT_TRUE(rc::check("stored + dissipated = work", [] {
    const TypeParam law = drawn_law<TypeParam>(Reach::moderate);
    const std::vector<double> turns = drawn_path(law, 5);
    const PathWork coarse = walk(law, turns, 200), fine = walk(law, turns, 400);
    const double counted = fine.stored + fine.dissipated, counted_coarse = coarse.stored + coarse.dissipated;
    const double change = std::abs(fine.work - coarse.work) + std::abs(counted - counted_coarse);
    RC_ASSERT(std::abs(counted - fine.work) <= 2 * change + 1e-12 * fine.force * fine.travel);
  }));
}

TYPED_TEST(EveryLaw, IsListedUnderItsName) {
  std::optional<TypeParam> drawn;
  rc::check("any law will do", [&] { drawn.emplace(drawn_law<TypeParam>(Reach::moderate)); });
  ASSERT_TRUE(drawn.has_value());
  const TypeParam law = *drawn;
  EXPECT_EQ(law_name(Law(law)), TypeParam::method.name);
  const auto catalogue = law_catalogue();
  EXPECT_EQ(std::count_if(catalogue.begin(), catalogue.end(),
                          [](const Method& method) { return method.name == TypeParam::method.name; }),
            1);
  EXPECT_EQ(initial_stiffness(Law(law)), initial_stiffness(law));
  EXPECT_EQ(yield_deformation(Law(law)), yield_deformation(law));
}

}  // namespace
}  // namespace pilotis
