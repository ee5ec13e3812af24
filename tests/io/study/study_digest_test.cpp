// The digest of a study: the same for the same question, another for every other question.
#include "io/study/study_digest.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <set>

#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;
using test::with_line;

const std::string building = R"([building]
kind = "stick"
damping = { kind = "none" }
[[story]]
height = 3
mass = 1000
spring = { law = "linear", stiffness = 1e6 }
)";

const std::string study = R"(buildings = ["buildings/*.toml"]
[suite]
motions = ["motions/*.txt"]
units = "g"
step = 0.01
[[force]]
floor = 1
file = "push.txt"
units = "kN"
)";

void write_all(const Folder& folder) {
  folder.write("buildings/a.toml", building);
  folder.write("buildings/b.toml", building);
  folder.write("motions/m.txt", "0.1\n0.2\n");
  folder.write("motions/n.txt", "0.1\n0.3\n");
  folder.write("push.txt", "0 1\n1 2\n");
  folder.write("study.toml", study);
}

std::string digest_in(const Folder& folder, const std::string& name = "study.toml",
                      const std::string& version = "1.2.3") {
  return study_digest(read_study(folder.path() / name, test::schemes), version);
}

TEST(StudyDigest, SameWhereverTheFolderStandsAndWheneverItWasWritten) {
  const Folder here, there;
  write_all(here);
  write_all(there);
  const std::string digest = digest_in(here);
  EXPECT_EQ(digest.size(), 64u);
  EXPECT_TRUE(std::all_of(digest.begin(), digest.end(),
                          [](char c) { return std::string("0123456789abcdef").find(c) != std::string::npos; }));
  EXPECT_EQ(digest_in(there), digest);
  using namespace std::chrono_literals;
  for (const char* file : {"study.toml", "buildings/a.toml", "motions/m.txt", "push.txt"})
    std::filesystem::last_write_time(here.path() / file, std::filesystem::file_time_type::clock::now() - 48h);
  EXPECT_EQ(digest_in(here), digest);
  std::filesystem::rename(here.path() / "study.toml", here.path() / "renamed.toml");
  EXPECT_EQ(digest_in(here, "renamed.toml"), digest);
}

TEST(StudyDigest, AnotherForEveryChangeOfTheQuestion) {
  const auto after = [](const std::string& file, const std::string& content) {
    const Folder folder;
    write_all(folder);
    folder.write(file, content);
    return digest_in(folder);
  };
  std::vector<std::string> digests{
      after("study.toml", study),  // no change
      after("study.toml", with_line(study, "units = \"kN\"", "units = \"N\"")),
      after("study.toml", with_line(study, "motions", "motions = [\"motions/n.txt\", \"motions/m.txt\"]")),
      after("study.toml", with_line(study, "motions", "motions = [{ file = \"motions/*.txt\", factor = 2 }]")),
      after("study.toml", with_line(study, "buildings", "buildings = [\"buildings/a.toml\"]")),
      after("study.toml", study + "[march]\nerror_check = false\n"),
      after("study.toml", study + "[keep]\nhistories = \"all\"\n"),
      after("buildings/b.toml", with_line(building, "height", "height = 3.1")),
      after("buildings/b.toml", with_line(building, "mass", "mass = 1001")),
      after("buildings/a.toml", with_line(building, "mass", "mass = 1001")),
      after("buildings/c.toml", building),
      after("motions/m.txt", "0.1\n0.2000000001\n"),
      after("motions/m.txt", "0.1\n0.2\n0\n"),
      after("motions/o.txt", "0.1\n0.2\n"),
      after("push.txt", "0 1\n1 2.5\n"),
      after("push.txt", "0 1\n1.5 2\n"),
  };
  const Folder folder;
  write_all(folder);
  digests.push_back(digest_in(folder, "study.toml", "1.2.4"));
  std::filesystem::rename(folder.path() / "motions/m.txt", folder.path() / "motions/a.txt");
  digests.push_back(digest_in(folder));
  std::filesystem::rename(folder.path() / "buildings/a.toml", folder.path() / "buildings/other.toml");
  digests.push_back(digest_in(folder));
  EXPECT_EQ(std::set<std::string>(digests.begin(), digests.end()).size(), digests.size());
}

// Text that moves from one field into the next is another question.
TEST(StudyDigest, FieldsDoNotRunTogether) {
  Study one, other;
  one.buildings = {{"ab", {}, "c", {}, {}, {}}};
  other.buildings = {{"a", {}, "bc", {}, {}, {}}};
  EXPECT_NE(study_digest(one, "1"), study_digest(other, "1"));
  one.forces = {{1, {0, 1}, {2, 3}}};
  other = one;
  other.forces = {{1, {0, 1, 2}, {3}}};
  EXPECT_NE(study_digest(one, "1"), study_digest(other, "1"));
}

}  // namespace
}  // namespace pilotis
