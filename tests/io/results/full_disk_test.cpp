// Disks that fill up while a result file is written. Each case runs in a process of its own, so that the library's
// closing at exit is part of the test.
#include <fmt/format.h>
#include <gtest/gtest.h>
#include <sys/mount.h>
#include <sys/resource.h>
#include <sys/vfs.h>

#include <csignal>

#include "io/results/result_table.hpp"
#include "io/results/result_writer.hpp"
#include "tests/support/large_study.hpp"
#include "tests/support/temporary_folder.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

const invented::Size size{1, 2, 300, 20};
constexpr int told_of_it = 42, wrote_it_all = 43;

class FullDisk : public TemporaryFolder {};

void write(const fs::path& file, int instants) {
  constexpr double on_disk = 1e12;
  ResultWriter writer(file, large_header(size), size.runs(), {false, 1}, on_disk);
  for (std::size_t first = 0; first < size.runs(); first += 50)
    writer.add(first, large_runs(size, first, 50, instants));
  writer.finish();
}

// Ends the process: told_of_it when the error is the one expected, wrote_it_all when there was none.
[[noreturn]] void write_and_exit(const fs::path& file, int instants, const std::string& reason) {
  ::alarm(60);  // a library that hangs is killed
  try {
    write(file, instants);
  } catch (const Error& error) {
    const bool said = std::string(error.what()).find(reason) != std::string::npos;
    std::exit(error.kind() == ErrorKind::outside && said ? told_of_it : 2);
  }
  std::exit(wrote_it_all);
}

// A file that may not grow past a size stands for a full disk: at each tenth of what the whole file takes.
TEST_F(FullDisk, WhereverItHappensNothingIsLeft) {
  const fs::path file = folder_ / "a.h5";
  write(file, 20);
  const std::string before = bytes_of(file);
  for (std::size_t tenth = 0; tenth < 10; ++tenth) {
    const auto limited = [&] {
      std::signal(SIGXFSZ, SIG_IGN);
      const rlimit small{before.size() * tenth / 10, RLIM_INFINITY};
      setrlimit(RLIMIT_FSIZE, &small);
      write_and_exit(file, 20, "File too large");
    };
    EXPECT_EXIT(limited(), testing::ExitedWithCode(told_of_it), "^$") << tenth << " tenths fit";
    EXPECT_TRUE(bytes_of(file) == before);
    EXPECT_EQ(entries(), 1u);
  }
  EXPECT_EXIT(write_and_exit(file, 20, ""), testing::ExitedWithCode(wrote_it_all), "^$");
}

TEST_F(FullDisk, RealOne) {
  if (::mount("tmpfs", folder_.c_str(), "tmpfs", 0, "size=2m") != 0) GTEST_SKIP() << "mounting is not permitted here";
  EXPECT_EXIT(write_and_exit(folder_ / "a.h5", 200, "No space left on device"), testing::ExitedWithCode(told_of_it),
              "^$");
  EXPECT_EQ(entries(), 0u);
  struct statfs room {};
  ASSERT_EQ(::statfs(folder_.c_str(), &room), 0);
  EXPECT_EQ(room.f_bfree, room.f_blocks) << "its room is given back";
  const StudyHeader header = large_header(size);
  const ShardFolder shards(folder_ / "a.h5", {std::string(64, 'c'), "0.1.0", size.runs(), 1}, header.buildings);
  const auto told = message_of(ErrorKind::outside, [&] { shards.write(0, 0, large_runs(size, 0, 500, 20)); });
  EXPECT_NE(told.find("No space left on device"), std::string::npos) << told;
  EXPECT_FALSE(shards.is_whole(0));
  EXPECT_EQ(::umount2(folder_.c_str(), MNT_DETACH), 0);
}

}  // namespace
}  // namespace pilotis
