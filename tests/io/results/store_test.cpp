#include "io/results/store.hpp"

#include <gtest/gtest.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <unistd.h>

#include <chrono>
#include <cmath>
#include <csignal>
#include <fstream>
#include <thread>

#include "core/error.hpp"
#include "tests/support/invented_results.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

// A folder of its own, removed afterwards.
class Store : public testing::Test {
 protected:
  void SetUp() override {
    std::string pattern = (fs::temp_directory_path() / "pilotis-store-XXXXXX").string();
    ASSERT_NE(mkdtemp(pattern.data()), nullptr);
    folder_ = pattern;
  }
  void TearDown() override { fs::remove_all(folder_); }

  std::size_t entries() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(folder_), fs::directory_iterator()));
  }

  fs::path folder_;
};

void write(const fs::path& file, const StoredStudy& stored) {
  write_results(file, stored, judge(stored.results, stored.limits));
}

// Equal, where NaN equals NaN.
void expect_same(const std::vector<double>& a, const std::vector<double>& b, const std::string& what) {
  ASSERT_EQ(a.size(), b.size()) << what;
  for (std::size_t i = 0; i < a.size(); ++i)
    EXPECT_TRUE(a[i] == b[i] || (std::isnan(a[i]) && std::isnan(b[i]))) << what << "[" << i << "]";
}

void expect_same(const RunResult& a, const RunResult& b) {
  EXPECT_EQ(a.motion, b.motion);
  EXPECT_EQ(a.scheme, b.scheme);
  EXPECT_EQ(a.step_choice, b.step_choice);
  EXPECT_EQ(a.status, b.status);
  EXPECT_EQ(a.status_note, b.status_note);
  expect_same({a.factor, a.step, a.time_reached, a.energy_error, a.energy_input, a.energy_damping, a.energy_absorbed,
               a.wall_time},
              {b.factor, b.step, b.time_reached, b.energy_error, b.energy_input, b.energy_damping, b.energy_absorbed,
               b.wall_time},
              "numbers of the run");
  expect_same(a.residual_drift, b.residual_drift, "residual drift");
  expect_same(a.residual_swing, b.residual_swing, "residual swing");
  expect_same(a.residual_error, b.residual_error, "residual error");
  ASSERT_EQ(a.peaks.size(), b.peaks.size());
  for (std::size_t i = 0; i < a.peaks.size(); ++i)
    expect_same({a.peaks[i].value, a.peaks[i].time, a.peaks[i].step_error},
                {b.peaks[i].value, b.peaks[i].time, b.peaks[i].step_error}, "peak");
}

void expect_same(const BuildingSummary& a, const BuildingSummary& b) {
  EXPECT_EQ(a.title, b.title);
  EXPECT_EQ(a.labels, b.labels);
  EXPECT_EQ(a.heights, b.heights);
  EXPECT_EQ(a.masses, b.masses);
  EXPECT_EQ(a.mass_matrix, b.mass_matrix);
  EXPECT_EQ(a.damping_matrix, b.damping_matrix);
  EXPECT_EQ(a.stiffness_matrix, b.stiffness_matrix);
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
  expect_same(found.results.building, stored.results.building);
  ASSERT_EQ(found.results.motions.size(), stored.results.motions.size());
  EXPECT_EQ(found.results.motions[3].digest, stored.results.motions[3].digest);
  EXPECT_EQ(found.results.motions[3].samples, 3200);
  ASSERT_EQ(found.results.runs.size(), stored.results.runs.size());
  for (std::size_t i = 0; i < found.results.runs.size(); ++i)
    expect_same(found.results.runs[i], stored.results.runs[i]);
  ASSERT_EQ(found.limits.size(), stored.limits.size());
  for (std::size_t i = 0; i < found.limits.size(); ++i) expect_same(found.limits[i], stored.limits[i]);
}

TEST_F(Store, GivesBackHistoriesOfOneRun) {
  const StoredStudy stored = invented::calm_study();
  write(folder_ / "a.h5", stored);
  const RunResult run = read_run(folder_ / "a.h5", 0);
  EXPECT_EQ(run.times, stored.results.runs[0].times);
  ASSERT_EQ(run.histories.size(), 3u);
  for (std::size_t i = 0; i < 3; ++i) {
    EXPECT_EQ(run.histories[i].quantity, stored.results.runs[0].histories[i].quantity);
    EXPECT_EQ(run.histories[i].values, stored.results.runs[0].histories[i].values);
  }
  EXPECT_TRUE(read_run(folder_ / "a.h5", 1).times.empty());
  EXPECT_THROW(read_run(folder_ / "a.h5", 10), Error);
  EXPECT_THROW(read_run(folder_ / "a.h5", -1), Error);
}

TEST_F(Store, StudyWithoutMotionsModesOrLimits) {
  StoredStudy stored = invented::calm_study();
  stored.limits.clear();
  stored.results.motions.clear();
  stored.results.building.modes.clear();
  write(folder_ / "a.h5", stored);
  const StoredStudy found = read_results(folder_ / "a.h5");
  EXPECT_TRUE(found.limits.empty());
  EXPECT_TRUE(found.results.motions.empty());
  EXPECT_TRUE(found.results.building.modes.empty());
}

TEST_F(Store, LongStudyText) {
  StoredStudy stored = invented::calm_study();
  stored.study_text.assign(300'000, 'x');
  write(folder_ / "a.h5", stored);
  EXPECT_EQ(read_results(folder_ / "a.h5").study_text.size(), 300'000u);
}

std::string bytes(const fs::path& file) {
  std::ifstream in(file, std::ios::binary);
  return {std::istreambuf_iterator<char>(in), {}};
}

TEST_F(Store, SameResultsSameBytes) {
  write(folder_ / "a.h5", many_limits());
  std::this_thread::sleep_for(std::chrono::milliseconds(1100));  // HDF5 stamps objects by the second unless told not to
  write(folder_ / "b.h5", many_limits());
  EXPECT_EQ(bytes(folder_ / "a.h5"), bytes(folder_ / "b.h5"));
}

// The message of the Error that `act` throws; its kind must be `kind`.
template <class Act>
std::string message_of(ErrorKind kind, Act act) {
  try {
    act();
  } catch (const Error& error) {
    EXPECT_EQ(error.kind(), kind) << error.what();
    return error.what();
  }
  ADD_FAILURE() << "nothing was thrown";
  return {};
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
  const std::string before = bytes(file);
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
  EXPECT_EQ(bytes(file), before);
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
  const std::string whole = bytes(folder_ / "a.h5");
  for (std::size_t part = 1; part < 8; ++part) {
    std::ofstream(folder_ / "b.h5", std::ios::binary) << whole.substr(0, whole.size() * part / 8);
    message_of(ErrorKind::input, [&] { read_results(folder_ / "b.h5"); });
  }
}

}  // namespace
}  // namespace pilotis
