#include "io/digest.hpp"

#include <gtest/gtest.h>

namespace pilotis {
namespace {

// The 40 bytes of 0.02, 0.02, 1, -2.5, 0 as little-endian doubles, by sha256sum (GNU coreutils).
TEST(Digest, IsSha256OfLittleEndianDoubles) {
  EXPECT_EQ(digest_of({0.02, 0.02, {1, -2.5, 0}}), "45b5f9c169e23e66d5fbbdb7c03857c369d187ae9a1e2bcfd3d2e80dcdc1331e");
}

TEST(Digest, TellsEveryFieldApart) {
  const std::string digest = digest_of({0.02, 0, {1, 2}});
  EXPECT_NE(digest_of({0.02, 0.02, {1, 2}}), digest);
  EXPECT_NE(digest_of({0.01, 0, {1, 2}}), digest);
  EXPECT_NE(digest_of({0.02, 0, {2, 1}}), digest);
  EXPECT_NE(digest_of({0.02, 0, {1, 2, 0}}), digest);
}

// FIPS 180-4's example of one block, "abc" (value from memory; sha256sum of GNU coreutils gives the same).
TEST(Digest, OfText) {
  EXPECT_EQ(digest_of(std::string_view("abc")), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
}

}  // namespace
}  // namespace pilotis
