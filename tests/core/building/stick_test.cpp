// The ranges are those stated in core/building/stick.hpp.
#include "core/building/stick.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <functional>

#include "core/error.hpp"

namespace pilotis {
namespace {

Stick two_stories() {
  const Story story{"", 3, 1000, Linear{1e6}, 0};
  return {{story, story}, RayleighByModes{0.05, 0.05, 1, 2}, false, standard_gravity};
}

struct Wrong {
  std::function<void(Stick&)> change;
  const char* where;
  const char* said;  // somewhere in the message
};

TEST(Stick, GoodOnesPass) {
  Stick stick = two_stories();
  EXPECT_NO_THROW(validate(stick, "here"));
  for (const Damping& damping : std::initializer_list<Damping>{NoDamping{}, RayleighByFactors{0.1, 0.001},
                                                               ModalDamping{{0.05}}, ModalDamping{{0.05, 0.02}}}) {
    stick.damping = damping;
    EXPECT_NO_THROW(validate(stick, "here"));
  }
}

TEST(Stick, BadOnesNameTheField) {
  const std::vector<Wrong> wrong{
      {[](Stick& s) { s.stories.clear(); }, "here: story", "no story"},
      {[](Stick& s) { s.stories[1].height = 0; }, "here: story[2].height", "greater than 0 m"},
      {[](Stick& s) { s.stories[0].height = std::nan(""); }, "here: story[1].height", "nan"},
      {[](Stick& s) { s.stories[1].mass = 0; }, "here: story[2].mass", "every floor needs a mass"},
      {[](Stick& s) { s.stories[0].mass = INFINITY; }, "here: story[1].mass", "inf"},
      {[](Stick& s) { s.stories[0].spring = Linear{0}; }, "here: story[1].spring", "greater than 0 N/m"},
      {[](Stick& s) { s.stories[0].dashpot = -1; }, "here: story[1].dashpot", "at least 0 N s/m"},
      {[](Stick& s) { s.gravity = 0; }, "here: building.gravity", "greater than 0 m/s2"},
      {[](Stick& s) {
         s.damping = RayleighByModes{-0.1, 0.05, 1, 2};
       },
       "here: building.damping.ratio", "at least 0"},
      {[](Stick& s) {
         s.damping = RayleighByModes{0.05, -0.1, 1, 2};
       },
       "here: building.damping.ratio", "at least 0"},
      {[](Stick& s) {
         s.damping = RayleighByModes{0.05, 0.05, 0, 2};
       },
       "here: building.damping.modes", "from 1 to 2"},
      {[](Stick& s) {
         s.damping = RayleighByModes{0.05, 0.05, 2, 2};
       },
       "here: building.damping.modes", "from 1 to 2"},
      {[](Stick& s) {
         s.damping = RayleighByModes{0.05, 0.05, 1, 3};
       },
       "here: building.damping.modes", "from 1 to 2"},
      {[](Stick& s) { s.stories.pop_back(); }, "here: building.damping.modes", "one floor has one mode"},
      {[](Stick& s) {
         s.damping = RayleighByFactors{-1, 0};
       },
       "here: building.damping.mass_factor", "at least 0"},
      {[](Stick& s) {
         s.damping = RayleighByFactors{0, -1};
       },
       "here: building.damping.stiffness_factor", "at least 0"},
      {[](Stick& s) { s.damping = ModalDamping{}; }, "here: building.damping.ratio", "0 ratios"},
      {[](Stick& s) {
         s.damping = ModalDamping{{0.1, 0.1, 0.1}};
       },
       "here: building.damping.ratio", "3 ratios"},
      {[](Stick& s) { s.damping = ModalDamping{{-0.1}}; }, "here: building.damping.ratio", "at least 0"},
  };
  for (const Wrong& w : wrong) {
    Stick stick = two_stories();
    w.change(stick);
    try {
      validate(stick, "here");
      ADD_FAILURE() << w.where;
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_EQ(e.where(), w.where);
      EXPECT_NE(std::string(e.what()).find(w.said), std::string::npos) << e.what();
    }
  }
}

}  // namespace
}  // namespace pilotis
