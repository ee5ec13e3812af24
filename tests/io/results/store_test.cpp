#include "io/results/store.hpp"

#include <gtest/gtest.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <unistd.h>

#include <chrono>
#include <csignal>
#include <thread>

#include "io/results/result_table.hpp"
#include "tests/support/invented_results.hpp"
#include "tests/support/same_results.hpp"
#include "tests/support/temporary_folder.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

class Store : public TemporaryFolder {};

void write(const fs::path& file, const StoredStudy& stored) { write_results(file, stored); }

// All but the matrices, which stay in the file.
void expect_same(const BuildingSummary& a, const BuildingSummary& b) {
  EXPECT_EQ(a.name, b.name);
  EXPECT_EQ(a.title, b.title);
  EXPECT_EQ(a.labels, b.labels);
  EXPECT_EQ(a.heights, b.heights);
  EXPECT_EQ(a.masses, b.masses);
  ASSERT_EQ(a.modes.size(), b.modes.size());
  for (std::size_t i = 0; i < a.modes.size(); ++i) {
    EXPECT_EQ(a.modes[i].shape, b.modes[i].shape);
    EXPECT_EQ(a.modes[i].period, b.modes[i].period);
    EXPECT_EQ(a.modes[i].participation, b.modes[i].participation);
    EXPECT_EQ(a.modes[i].effective_mass, b.modes[i].effective_mass);
    EXPECT_EQ(a.modes[i].damping_ratio, b.modes[i].damping_ratio);
  }
}

void expect_same(const Limit& a, const Limit& b) {
  EXPECT_EQ(a.quantity, b.quantity);
  EXPECT_EQ(a.statistic, b.statistic);
  EXPECT_EQ(a.percentile, b.percentile);
  EXPECT_EQ(a.value, b.value);
  EXPECT_EQ(a.source, b.source);
  EXPECT_EQ(a.factors, b.factors);
}

StoredStudy many_limits() {
  StoredStudy stored = invented::study_with_open_run();
  stored.limits.push_back({find_quantity("base_shear"), Statistic::percentile, 84, 3.2e6, "", {0.5, 1.5}});
  stored.limits.push_back({&residual_drift_ratio(), Statistic::max, 0, 0.005, "owner's wish, “no doors stuck”", {1.0}});
  stored.limits.push_back({find_quantity("floor_acceleration"), Statistic::median, 0, 6, "equipment, sheet 3", {}});
  return stored;
}

TEST_F(Store, GivesBackWhatWasWritten) {
  const StoredStudy stored = many_limits();
  write(folder_ / "a.h5", stored);
  const StoredStudy found = read_results(folder_ / "a.h5");
  EXPECT_EQ(found.title, stored.title);
  EXPECT_EQ(found.study_text, stored.study_text);
  EXPECT_EQ(found.study_file, stored.study_file);
  EXPECT_EQ(found.program_version, stored.program_version);
  EXPECT_EQ(found.created, stored.created);
  EXPECT_EQ(found.units.force, "kN");
  EXPECT_EQ(found.units.mass, "");
  ASSERT_EQ(found.buildings.size(), 1u);
  expect_same(found.buildings[0], stored.buildings[0]);
  ASSERT_EQ(found.motions.size(), stored.motions.size());
  EXPECT_EQ(found.motions[3].digest, stored.motions[3].digest);
  EXPECT_EQ(found.motions[3].samples, 3200);
  ASSERT_EQ(found.runs.size(), stored.runs.size());
  for (std::size_t i = 0; i < found.runs.size(); ++i) expect_same(found.runs[i], stored.runs[i]);
  ASSERT_EQ(found.limits.size(), stored.limits.size());
  for (std::size_t i = 0; i < found.limits.size(); ++i) expect_same(found.limits[i], stored.limits[i]);
}

TEST_F(Store, GivesBackHistoriesOfOneRun) {
  const StoredStudy stored = invented::calm_study();
  write(folder_ / "a.h5", stored);
  const ResultTable table(folder_ / "a.h5");
  expect_same_histories(table.with_histories(0), stored.runs[0]);
  EXPECT_TRUE(table.keeps_histories(0));
  EXPECT_FALSE(table.keeps_histories(1));
  EXPECT_TRUE(table.with_histories(1).times.empty());
  EXPECT_THROW(table.with_histories(10), Error);
}

TEST_F(Store, StudyWithoutMotionsModesOrLimits) {
  StoredStudy stored = invented::calm_study();
  stored.limits.clear();
  stored.motions.clear();
  stored.buildings[0].modes.clear();
  write(folder_ / "a.h5", stored);
  const StoredStudy found = read_results(folder_ / "a.h5");
  EXPECT_TRUE(found.limits.empty());
  EXPECT_TRUE(found.motions.empty());
  EXPECT_TRUE(found.buildings[0].modes.empty());
}

TEST_F(Store, LongStudyText) {
  StoredStudy stored = invented::calm_study();
  stored.study_text.assign(300'000, 'x');
  write(folder_ / "a.h5", stored);
  EXPECT_EQ(read_results(folder_ / "a.h5").study_text.size(), 300'000u);
}

TEST_F(Store, SameResultsSameBytes) {
  write(folder_ / "a.h5", many_limits());
  std::this_thread::sleep_for(std::chrono::milliseconds(1100));  // HDF5 stamps objects by the second unless told not to
  write(folder_ / "b.h5", many_limits());
  EXPECT_EQ(bytes_of(folder_ / "a.h5"), bytes_of(folder_ / "b.h5"));
}

TEST_F(Store, MissingFolder) {
  const auto message =
      message_of(ErrorKind::outside, [&] { write(folder_ / "none" / "a.h5", invented::calm_study()); });
  EXPECT_NE(message.find("none/a.h5"), std::string::npos) << message;
  EXPECT_NE(message.find("No such file or directory"), std::string::npos) << message;
}

TEST_F(Store, TargetIsAFolder) {
  fs::create_directory(folder_ / "a.h5");
  const auto message = message_of(ErrorKind::outside, [&] { write(folder_ / "a.h5", invented::calm_study()); });
  EXPECT_NE(message.find("Is a directory"), std::string::npos) << message;
  EXPECT_EQ(entries(), 1u);
}

TEST_F(Store, FolderThatMayNotBeWritten) {
  ASSERT_EQ(::chmod(folder_.c_str(), 0555), 0);
  const bool root = ::geteuid() == 0;
  ASSERT_TRUE(!root || ::seteuid(65534) == 0);  // root may write anywhere: be nobody for a moment
  const auto message = message_of(ErrorKind::outside, [&] { write(folder_ / "a.h5", invented::calm_study()); });
  ASSERT_TRUE(!root || ::seteuid(0) == 0);
  ASSERT_EQ(::chmod(folder_.c_str(), 0755), 0);
  EXPECT_NE(message.find("Permission denied"), std::string::npos) << message;
  EXPECT_EQ(entries(), 0u);
}

// A file that may not grow past 20 kB stands for a full disk; in a process of its own, because of the limit.
TEST_F(Store, FullDiskLeavesTheFormerFileAndNothingElse) {
  const fs::path file = folder_ / "a.h5";
  write(file, invented::calm_study());
  const std::string before = bytes_of(file);
  const auto in_a_full_disk = [&] {
    std::signal(SIGXFSZ, SIG_IGN);
    const rlimit small{20'000, 20'000};
    setrlimit(RLIMIT_FSIZE, &small);
    try {
      write(file, many_limits());
    } catch (const Error& error) {
      const bool said = std::string(error.what()).find("File too large") != std::string::npos;
      std::_Exit(error.kind() == ErrorKind::outside && said ? 42 : 2);
    }
    std::_Exit(1);
  };
  EXPECT_EXIT(in_a_full_disk(), testing::ExitedWithCode(42), "^$") << "and the HDF5 library prints nothing";
  EXPECT_EQ(bytes_of(file), before);
  EXPECT_EQ(entries(), 1u);
}

TEST_F(Store, NotAResultFile) {
  std::ofstream(folder_ / "a.h5") << "time,acceleration\n0,0\n";
  const auto message = message_of(ErrorKind::input, [&] { read_results(folder_ / "a.h5"); });
  EXPECT_NE(message.find("not an HDF5 file"), std::string::npos) << message;
  message_of(ErrorKind::input, [&] { read_results(folder_ / "none.h5"); });
  message_of(ErrorKind::input, [&] { read_results(folder_); });
}

TEST_F(Store, DamagedFileIsAnErrorNotACrash) {
  write(folder_ / "a.h5", invented::calm_study());
  const std::string whole = bytes_of(folder_ / "a.h5");
  for (std::size_t part = 1; part < 8; ++part) {
    std::ofstream(folder_ / "b.h5", std::ios::binary) << whole.substr(0, whole.size() * part / 8);
    message_of(ErrorKind::input, [&] { read_results(folder_ / "b.h5"); });
  }
}

}  // namespace
}  // namespace pilotis
