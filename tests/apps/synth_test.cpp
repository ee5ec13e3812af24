// The command as a user runs it, and its file as any study reads it.
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <cmath>
#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>

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
  const std::vector<double> values{0.35 * 9.80665, 0.4, 0.6, 2, 10, 4};
  const Accelerogram made = make_synthetic("kanai_tajimi", values, {7, 0.01, 20}, "test");
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
  for (const char* arguments :
       {"kanai_tajimi -o m.csv", "kanai_tajimi --pga -3 -o m.csv", "kanai_tajimi --pga '3 m' -o m.csv",
        "kanai_tajimi --pga much -o m.csv", "kanai_tajimi --pga 3 --step 0 -o m.csv", "kanai_tajimi --pga 3",
        "kanai_tajimi --pga 3 --seed -1 -o m.csv", "kanai_tajimi --pga 3 --duration 0.005 -o m.csv",
        "kanai_tajimi --pga 3 --speed 1 -o m.csv", "kanai_tajimi --pga 3 -o no/such/m.csv", "unknown -o m.csv", ""}) {
    EXPECT_EQ(synth(arguments), 2) << arguments << ": " << text_of("said");
    EXPECT_EQ(files(), 1u) << arguments;
  }
}

TEST_F(Synth, HelpHasAnExampleThatWorks) {
  ASSERT_EQ(synth("--help"), 0);
  const std::string help = text_of("said");
  const std::string mark = "pilotis synth kanai_tajimi";
  const std::size_t begin = help.find(mark);
  ASSERT_NE(begin, std::string::npos) << help;
  const std::size_t arguments = begin + std::string("pilotis synth ").size();
  EXPECT_EQ(synth(help.substr(arguments, help.find('\n', arguments) - arguments)), 0) << text_of("said");
}

}  // namespace
}  // namespace pilotis
