// The command as a user runs it, and its file as any study reads it.
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <cmath>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <vector>

#include "core/motion/synthetic/registry.hpp"
#include "io/digest.hpp"
#include "io/records/record.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

class Synth : public testing::Test {
 protected:
  Synth() : folder_(fs::path(testing::TempDir()) / ("pilotis-synth-" + name())) { fs::create_directories(folder_); }
  ~Synth() override { fs::remove_all(folder_); }

  static std::string name() { return testing::UnitTest::GetInstance()->current_test_info()->name(); }
  fs::path path(const std::string& file) const { return folder_ / file; }

  // Exit status of "pilotis synth <arguments>"; what it says goes to the file "said".
  int synth(const std::string& arguments) const {
    const std::string command =
        "cd '" + folder_.string() + "' && '" PILOTIS_PROGRAM "' synth " + arguments + " >said 2>&1";
    return WEXITSTATUS(std::system(command.c_str()));
  }
  std::string text_of(const std::string& file) const {
    std::ostringstream text;
    text << std::ifstream(path(file)).rdbuf();
    return text.str();
  }
  std::size_t files() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(folder_), fs::directory_iterator()));
  }

 private:
  fs::path folder_;
};

TEST_F(Synth, FileReadsBackToTheVeryMotion) {
  ASSERT_EQ(synth("kanai_tajimi --seed 7 --step 0.01 --duration 20 --pga '0.35 g' -o motion.csv"), 0)
      << text_of("said");
  const RecordFile read = read_record(path("motion.csv"));
  EXPECT_EQ(read.unit, "m/s^2");
  EXPECT_TRUE(read.notes.empty());
  const SyntheticKind& kind = synthetic_catalogue()[0];
  ASSERT_EQ(kind.method.name, "kanai_tajimi");
  std::vector<double> values;
  for (const Parameter& parameter : kind.method.parameters)
    values.push_back(parameter.key == "pga" ? 0.35 * 9.80665 : *parameter.otherwise);
  const Accelerogram made = make_synthetic("kanai_tajimi", values, {}, {7, 0.01, 20}, "test").record;
  EXPECT_EQ(digest_of(read.record), digest_of(made));
  EXPECT_NEAR(std::abs(peak_of(read.record).value), 0.35 * 9.80665, 0.5e-6);
  EXPECT_EQ(files(), 2u);  // the motion and "said": no temporary file is left
}

// 1/300 s has no end in decimals: the file states it beside the rounded times.
TEST_F(Synth, AnyStepReadsBackExactly) {
  ASSERT_EQ(synth("kanai_tajimi --step 0.0033333333333333335 --duration 20 --pga 3 -o motion.csv"), 0)
      << text_of("said");
  EXPECT_EQ(read_record(path("motion.csv")).record.step, 0.0033333333333333335);
}

TEST_F(Synth, FileSaysHowItWasMade) {
  ASSERT_EQ(synth("kanai_tajimi --seed 11 --pga '3 m/s2' --ground-period '300 ms' -o a.csv"), 0) << text_of("said");
  const std::string text = text_of("a.csv");
  for (const char* part : {"# pilotis 0", "--seed 11", "--pga \"3 m/s2\"", "--ground-period \"0.3 s\"",
                           "\ntime (s), acceleration (m/s^2)\n"})
    EXPECT_NE(text.find(part), std::string::npos) << part << " is not in\n" << text.substr(0, 600);
  // The command in the file makes the same file again.
  const std::string mark = "# pilotis synth ";
  const std::size_t begin = text.find(mark) + mark.size();
  ASSERT_EQ(synth(text.substr(begin, text.find('\n', begin) - begin) + " -o b.csv"), 0) << text_of("said");
  EXPECT_EQ(text_of("b.csv"), text);
}

TEST_F(Synth, WrongInputIsStatusTwoAndWritesNothing) {
  for (const char* arguments : {"kanai_tajimi -o m.csv",
                                "kanai_tajimi --pga -3 -o m.csv",
                                "kanai_tajimi --pga '3 m' -o m.csv",
                                "kanai_tajimi --pga much -o m.csv",
                                "kanai_tajimi --pga 3 --step 0 -o m.csv",
                                "kanai_tajimi --pga 3",
                                "kanai_tajimi --pga 3 --seed -1 -o m.csv",
                                "kanai_tajimi --pga 3 --seed 010 -o m.csv",
                                "kanai_tajimi --pga 3 --duration 0.005 -o m.csv",
                                "kanai_tajimi --pga 3 --speed 1 -o m.csv",
                                "kanai_tajimi --pga 3 --envelope round -o m.csv",
                                "kanai_tajimi --pga 3 --count 0 -o suite",
                                "kanai_tajimi --pga 3 --count x -o suite",
                                "ricker --amplitude 1 --frequency 1 --seed 2 -o m.csv",
                                "ricker --amplitude 1 --frequency 1 --count 2 -o suite",
                                "spectrum_compatible -o m.csv",
                                "spectrum_compatible --target said -o m.csv",
                                "spectrum_compatible --target-file said -o m.csv",
                                "spectrum_compatible --target-file none.csv -o m.csv",
                                "spectrum_compatible --target en_1998 --type 1 --ground B -o m.csv",
                                "spectrum_compatible --target en_1998 --ag 3 --type 1 --ground B --to 5 -o m.csv",
                                "kanai_tajimi --pga 3 -o no/such/m.csv",
                                "unknown -o m.csv",
                                ""}) {
    EXPECT_EQ(synth(arguments), 2) << arguments << ": " << text_of("said");
    EXPECT_EQ(files(), 1u) << arguments;
  }
}

// Each example of the help, as typed.
TEST_F(Synth, EveryExampleOfTheHelpWorks) {
  ASSERT_EQ(synth("--help"), 0);
  const std::string help = text_of("said"), mark = "\n  pilotis synth ";
  std::size_t examples = 0;
  for (std::size_t at = help.find(mark); at != std::string::npos; at = help.find(mark, at + 1), ++examples) {
    const std::size_t begin = at + mark.size();
    const std::string arguments = help.substr(begin, help.find('\n', begin) - begin);
    EXPECT_EQ(synth(arguments), 0) << arguments << "\n" << text_of("said");
  }
  EXPECT_EQ(examples, synthetic_catalogue().size() + 2);  // and --list, and a suite
}

TEST_F(Synth, ListShowsEveryKindWithItsParameters) {
  ASSERT_EQ(synth("--list"), 0);
  const std::string text = text_of("said");
  for (const SyntheticKind& kind : synthetic_catalogue()) {
    EXPECT_NE(text.find(std::string(kind.method.name) + ": "), std::string::npos) << kind.method.name;
    for (const Parameter& parameter : kind.method.parameters) {
      EXPECT_NE(text.find(parameter.meaning), std::string::npos) << parameter.key;
      EXPECT_NE(text.find(allowed_range(parameter)), std::string::npos) << parameter.key;
    }
    for (const CurveParameter& curve : kind.curves) EXPECT_NE(text.find(curve.meaning), std::string::npos) << curve.key;
  }
}

// Motion i of a suite is the motion of seed + i made alone, file for file.
TEST_F(Synth, SuiteIsItsMotionsMadeOneByOne) {
  ASSERT_EQ(synth("clough_penzien --pga '0.2 g' --seed 9 --count 3 -o suite"), 0) << text_of("said");
  EXPECT_EQ(std::distance(fs::directory_iterator(path("suite")), fs::directory_iterator()), 3);
  for (const char* seed : {"9", "10", "11"}) {
    ASSERT_EQ(synth(std::string("clough_penzien --pga '0.2 g' --seed ") + seed + " -o alone.csv"), 0);
    const std::string padded = std::string(seed).size() == 1 ? std::string("0") + seed : seed;
    EXPECT_EQ(text_of("suite/clough_penzien-" + padded + ".csv"), text_of("alone.csv"));
  }
  EXPECT_EQ(synth("clough_penzien --pga '0.2 g' --count 2 -o alone.csv"), 2);  // a file, not a folder
}

// "0.5 g" at "100 ms": units are those of the heading; the file repeats the table in SI.
TEST_F(Synth, TableIsReadInItsUnitsAndStandsInTheFile) {
  std::ofstream(path("site.csv")) << "# invented\nfrequency (kHz), amplification\n\n0.001; 1.5\n0.01 2\n";
  ASSERT_EQ(synth("stochastic --magnitude 5 --distance '20 km' --site site.csv -o m.csv"), 0) << text_of("said");
  EXPECT_NE(text_of("m.csv").find("# site: frequency (Hz), amplification\n#   1, 1.5\n#   10, 2\n"), std::string::npos)
      << text_of("m.csv").substr(0, 1500);
  EXPECT_TRUE(read_record(path("m.csv")).notes.empty());
}

// What is said of a table names its file and line.
TEST_F(Synth, WrongTablesAreRefusedByLine) {
  const auto said = [&](const std::string& table) {
    std::ofstream(path("site.csv")) << table;
    EXPECT_EQ(synth("stochastic --magnitude 5 --distance '20 km' --site site.csv -o m.csv"), 2);
    return text_of("said");
  };
  EXPECT_NE(said("1, 2\n2, 3\n").find("site.csv:1: found the column \"1\""), std::string::npos) << text_of("said");
  EXPECT_NE(said("frequency (m), amplification\n").find("site.csv:1: found the unit \"m\""), std::string::npos);
  EXPECT_NE(said("frequency, amplification\n").find("frequency (Hz)"), std::string::npos) << text_of("said");
  EXPECT_NE(said("frequency (Hz), amplification\n1, 2\n2, x\n").find("site.csv:3: found \"x\""), std::string::npos);
  EXPECT_NE(said("frequency (Hz), amplification\n1, 2\n2\n").find("site.csv:3"), std::string::npos);
  EXPECT_NE(said("frequency (Hz), amplification\n2, 2\n1, 2\n").find("row 2"), std::string::npos);
}

}  // namespace
}  // namespace pilotis
