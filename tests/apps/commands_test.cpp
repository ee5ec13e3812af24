// The commands as a shell sees them: exit status, standard output, standard error.
#include <gtest/gtest.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <array>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>

#include "tests/support/invented_results.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

struct Ran {
  int status = -1;
  std::string output;  // standard output and standard error together
};

class Commands : public testing::Test {
 protected:
  void SetUp() override {
    std::string pattern = (fs::temp_directory_path() / "pilotis-commands-XXXXXX").string();
    ASSERT_NE(mkdtemp(pattern.data()), nullptr);
    folder_ = pattern;
  }
  void TearDown() override { fs::remove_all(folder_); }

  std::string stored(const StoredStudy& study) {
    const fs::path file = folder_ / "results.h5";
    write_results(file, study);
    return file.string();
  }

  Ran run(const std::string& arguments) {
    const std::string command = std::string(PILOTIS_PROGRAM) + " " + arguments + " 2>&1";
    Ran ran;
    FILE* pipe = ::popen(command.c_str(), "r");
    std::array<char, 4096> buffer;
    for (std::size_t n; (n = std::fread(buffer.data(), 1, buffer.size(), pipe)) > 0;)
      ran.output.append(buffer.data(), n);
    ran.status = WEXITSTATUS(::pclose(pipe));
    return ran;
  }

  fs::path folder_;
};

bool has(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

TEST_F(Commands, VerdictStatuses) {
  EXPECT_EQ(run("verdict " + stored(invented::calm_study())).status, 0);
  EXPECT_EQ(run("verdict " + stored(invented::study_with_collapse())).status, 1);
  EXPECT_EQ(run("verdict " + stored(invented::study_with_open_run())).status, 3);
  EXPECT_EQ(run("verdict " + (folder_ / "none.h5").string()).status, 2);
}

TEST_F(Commands, VerdictHasNoColorInAPipe) {
  EXPECT_FALSE(has(run("verdict " + stored(invented::calm_study())).output, "\x1b"));
}

TEST_F(Commands, VerdictAsJson) {
  const Ran ran = run("verdict --json " + stored(invented::calm_study()));
  const auto json = nlohmann::json::parse(ran.output);
  EXPECT_EQ(json.at("exit_status"), ran.status);
  EXPECT_NEAR(json.at("verdict").at(1).at("value").get<double>(), 0.008, 1e-15);
}

TEST_F(Commands, VerdictWithTheLimitsOfAnotherStudy) {
  const auto study = [&](const std::string& value, const std::string& factors) {
    const fs::path file = folder_ / "stricter.toml";
    std::ofstream(folder_ / "flat.txt") << "0.1\n0.2\n0.1\n";
    std::ofstream(file)
        << "title = \"stricter\"\n[units]\nforce = \"kN\"\nlength = \"m\"\n[building]\nkind = \"stick\"\ndamping = { "
           "kind = \"none\" }\n"
           "[[story]]\nheight = 3\nweight = 1000\nspring = { law = \"linear\", stiffness = 1e5 }\n"
           "[suite]\nmotions = [{ file = \"flat.txt\", units = \"g\", step = 0.01 }]\n"
        << "factors = [" << factors << "]\n"
        << "[[limit]]\nquantity = \"drift_ratio\"\nstatistic = \"mean\"\nvalue = " << value
        << "\nsource = \"stricter\"\nfactors = [" << factors << "]\n";
    return file.string();
  };
  const std::string file = stored(invented::calm_study());
  const Ran stricter = run("verdict " + file + " --limits " + study("0.0079", "1"));
  EXPECT_EQ(stricter.status, 1) << stricter.output;
  const Ran absent = run("verdict " + file + " --limits " + study("0.0079", "7"));
  EXPECT_EQ(absent.status, 2);
  EXPECT_TRUE(has(absent.output, "factors with runs are 0.5, 1")) << absent.output;
}

TEST_F(Commands, ExportOfHistories) {
  const std::string file = stored(invented::calm_study());
  EXPECT_EQ(run("export " + file + " --histories --run 0").status, 0);
  const Ran none = run("export " + file + " --histories --run 1");
  EXPECT_EQ(none.status, 2);
  EXPECT_TRUE(has(none.output, "run 1 kept no histories")) << none.output;
  const Ran beyond = run("export " + file + " --peaks --run 10");
  EXPECT_EQ(beyond.status, 2);
  EXPECT_TRUE(has(beyond.output, "from 0 to 9")) << beyond.output;
}

TEST_F(Commands, ExportOfOneRun) {
  const Ran ran = run("export " + stored(invented::calm_study()) + " --runs --run 3");
  EXPECT_EQ(ran.status, 0);
  EXPECT_TRUE(has(ran.output, "\n3,Harbor clinic,Dunmarsh,0.5,done,")) << ran.output;
  EXPECT_EQ(std::count(ran.output.begin(), ran.output.end(), '\n'), 2);
}

TEST_F(Commands, ExportWritesTheFileWholeOrNotAtAll) {
  const std::string file = stored(invented::calm_study());
  const fs::path csv = folder_ / "out.csv";
  EXPECT_EQ(run("export " + file + " --histories --run 1 -o " + csv.string()).status, 2);
  EXPECT_FALSE(fs::exists(csv));
  EXPECT_EQ(run("export " + file + " --peaks -o " + csv.string()).status, 0);
  EXPECT_TRUE(fs::exists(csv));
  EXPECT_EQ(run("export " + file + " --peaks -o " + (folder_ / "none" / "out.csv").string()).status, 4);
  EXPECT_EQ(run("export " + file + " --peaks > /dev/full").status, 4);
  EXPECT_EQ(run("verdict " + file + " > /dev/full").status, 4);
  EXPECT_EQ(run("export " + file).status, 2) << "one part must be named";
}

}  // namespace
}  // namespace pilotis
