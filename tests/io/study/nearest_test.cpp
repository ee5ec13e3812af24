// Distances are those printed in textbooks: "kitten"/"sitting" is 3 (Levenshtein), a swap of neighbors is 1 (Damerau).
#include "io/study/nearest.hpp"

#include <gtest/gtest.h>

#include <array>

namespace pilotis {
namespace {

TEST(Nearest, EditDistance) {
  EXPECT_EQ(edit_distance("kitten", "sitting"), 3);
  EXPECT_EQ(edit_distance("hieght", "height"), 1);
  EXPECT_EQ(edit_distance("", "abc"), 3);
  EXPECT_EQ(edit_distance("abc", ""), 3);
  EXPECT_EQ(edit_distance("same", "same"), 0);
  EXPECT_EQ(edit_distance("ca", "abc"), 3);  // optimal string alignment: no letter is edited twice
}

TEST(Nearest, NamesOnlyWhatIsAlike) {
  constexpr std::array<std::string_view, 3> known{"height", "weight", "mass"};
  EXPECT_EQ(nearest("heigth", known), "height");
  EXPECT_EQ(nearest("masses", known), "mass");
  EXPECT_EQ(nearest("wei", known), "weight");
  EXPECT_EQ(nearest("zzzzzz", known), "");
  EXPECT_EQ(did_you_mean("zzzzzz", known), "allowed: height, weight, mass");
}

}  // namespace
}  // namespace pilotis
