#include "io/results/shard_folder.hpp"

#include <fmt/format.h>
#include <gtest/gtest.h>
#include <sys/wait.h>

#include "io/results/result_table.hpp"
#include "io/results/result_writer.hpp"
#include "tests/support/large_study.hpp"
#include "tests/support/same_results.hpp"
#include "tests/support/temporary_folder.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

const invented::Size size{2, 2, 10, 0};
constexpr std::size_t per_shard = 9, shards = 5;  // 40 runs: the last shard has four
constexpr int instants = 40;

class Shards : public TemporaryFolder {
 protected:
  ShardKey key() const { return {std::string(64, 'c'), "0.1.0", size.runs(), shards}; }
  fs::path result() const { return folder_ / "a.h5"; }

  std::vector<RunResult> runs_of(std::size_t shard) const {
    const std::size_t first = shard * per_shard;
    return large_runs(size, first, std::min(per_shard, size.runs() - first), instants);
  }
  void write_all(const ShardFolder& folder) const {
    for (std::size_t shard = 0; shard < shards; ++shard) folder.write(shard, shard * per_shard, runs_of(shard));
  }
  // The message of what opening the folder with `other` throws.
  std::string refusal(const ShardKey& other) const {
    return message_of(ErrorKind::input, [&] { const ShardFolder folder(result(), other, header_.buildings); });
  }

  StudyHeader header_ = large_header(size);
};

TEST_F(Shards, GiveBackWhatWasWritten) {
  const ShardFolder folder(result(), key(), header_.buildings);
  EXPECT_FALSE(folder.is_whole(1));
  folder.write(1, per_shard, runs_of(1));
  EXPECT_TRUE(folder.is_whole(1));
  EXPECT_FALSE(folder.is_whole(0));
  const std::vector<RunResult> found = folder.read(1), expected = runs_of(1);
  ASSERT_EQ(found.size(), expected.size());
  for (std::size_t i = 0; i < found.size(); ++i) {
    expect_same(found[i], expected[i]);
    expect_same_histories(found[i], expected[i]);
  }
  EXPECT_EQ(folder.whole(1).first_run, per_shard);
}

// Of shards or of runs, the file is the same to the last bit.
TEST_F(Shards, MergedGiveTheFileThatAddedRunsGive) {
  for (const HistoryFormat format : {HistoryFormat{false, 4}, HistoryFormat{true, 9}, HistoryFormat{false, 0}}) {
    ShardFolder folder(result(), key(), header_.buildings, format);
    write_all(folder);
    ResultWriter merged(result(), header_, size.runs(), format),
        plain(folder_ / "plain.h5", header_, size.runs(), format);
    for (std::size_t shard = 0; shard < shards; ++shard) {
      merged.add_shard(folder, shard);
      plain.add(shard * per_shard, runs_of(shard));
    }
    const Verdict of_merged = merged.finish(), of_plain = plain.finish();
    EXPECT_EQ(of_merged.outcomes.size(), of_plain.outcomes.size());
    folder.remove();
    EXPECT_FALSE(fs::exists(folder.path()));
    EXPECT_TRUE(bytes_of(result()) == bytes_of(folder_ / "plain.h5"));
    const ResultTable table(result());
    const std::vector<RunResult> runs = large_runs(size, 0, size.runs(), instants);
    for (std::size_t i = 0; i < size.runs(); ++i) {
      const RunResult found = table.with_histories(i);
      expect_same(found, runs[i]);
      if (!format.single) expect_same_histories(found, runs[i]);
    }
  }
}

// Every 64th bit and every length that is cut short: never taken for whole, never merged.
TEST_F(Shards, DamageIsNoticed) {
  const ShardFolder folder(result(), key(), header_.buildings);
  folder.write(0, 0, runs_of(0));
  const std::string whole = bytes_of(folder.file(0));
  const auto put = [&](const std::string& content) { std::ofstream(folder.file(0), std::ios::binary) << content; };
  for (std::size_t at = 0; at < whole.size(); at += whole.size() / 97) {
    std::string flipped = whole;
    flipped[at] ^= 1;
    put(flipped);
    EXPECT_FALSE(folder.is_whole(0)) << "bit flipped at " << at;
    put(whole.substr(0, at));
    std::string note;
    EXPECT_FALSE(folder.is_whole(0, &note)) << "cut at " << at;
    EXPECT_NE(note.find("shard-000000.h5: it"), std::string::npos) << note;
  }
  ResultWriter writer(result(), header_, size.runs());
  const auto told = message_of(ErrorKind::outside, [&] { writer.add_shard(folder, 0); });
  EXPECT_NE(told.find("damaged"), std::string::npos) << told;
  EXPECT_NE(message_of(ErrorKind::outside, [&] { writer.add_shard(folder, 1); }).find("missing"), std::string::npos);
  put(whole);
  EXPECT_TRUE(folder.is_whole(0));
  writer.add_shard(folder, 0);  // nothing of it had been taken
}

TEST_F(Shards, UnderAnotherNameIsNotWhole) {
  const ShardFolder folder(result(), key(), header_.buildings);
  folder.write(0, 0, runs_of(0));
  fs::copy_file(folder.file(0), folder.file(3));
  std::string note;
  EXPECT_FALSE(folder.is_whole(3, &note));
  EXPECT_NE(note.find("shard 0 under another name"), std::string::npos) << note;
}

TEST_F(Shards, OfAChangedStudyAreRefused) {
  { ShardFolder(result(), key(), header_.buildings).write(0, 0, runs_of(0)); }
  ShardKey changed = key();
  changed.study_digest.back() = 'd';
  EXPECT_NE(refusal(changed).find("holds 1 finished shards of a study that has changed since"), std::string::npos);
  EXPECT_NE(refusal(changed).find("remove that folder"), std::string::npos);
  ShardKey newer = key();
  newer.program_version = "0.2.0";
  EXPECT_NE(refusal(newer).find("of program version 0.1.0, and this is version 0.2.0"), std::string::npos);
  ShardKey more = key();
  more.shards = 6;
  EXPECT_NE(refusal(more).find("40 runs in 5 shards"), std::string::npos);
  const ShardFolder again(result(), key(), header_.buildings);
  EXPECT_TRUE(again.is_whole(0)) << "the folder is as it was";
}

TEST_F(Shards, FolderWithoutShardsIsTakenOver) {
  { const ShardFolder folder(result(), key(), header_.buildings); }
  ShardKey changed = key();
  changed.study_digest.back() = 'd';
  { ShardFolder(result(), changed, header_.buildings).write(0, 0, runs_of(0)); }
  EXPECT_NE(refusal(key()).find("changed"), std::string::npos) << "it is the other study's now";
}

TEST_F(Shards, OneJobAtATime) {
  auto first = std::make_unique<ShardFolder>(result(), key(), header_.buildings);
  const auto told =
      message_of(ErrorKind::outside, [&] { const ShardFolder second(result(), key(), header_.buildings); });
  EXPECT_NE(told.find("another process is at work"), std::string::npos) << told;
  const ShardFolder rank(result(), key(), header_.buildings, {}, FolderLock::held_by_the_job);
  rank.write(2, 2 * per_shard, runs_of(2));
  EXPECT_TRUE(first->is_whole(2));
  first.reset();
  const ShardFolder next(result(), key(), header_.buildings);
  EXPECT_TRUE(next.is_whole(2));
}

// The number of a process that has ended.
pid_t ended_process() {
  const pid_t child = ::fork();
  if (child == 0) ::_exit(0);
  ::waitpid(child, nullptr, 0);
  return child;
}

TEST_F(Shards, LeftOversOfKilledProcessesGo) {
  { const ShardFolder folder(result(), key(), header_.buildings); }
  const fs::path inside = ShardFolder::beside(result());
  const auto make = [](const fs::path& file) { std::ofstream(file) << "half"; };
  const std::string dead = fmt::format(".partial-{}-0", ended_process()),
                    alive = fmt::format(".partial-{}-0", ::getpid());
  make(inside / ("shard-000001.h5" + dead));
  make(folder_ / ("a.h5" + dead));
  make(folder_ / ("a.h5" + alive));
  make(folder_ / ("b.h5" + dead));
  const ShardFolder folder(result(), key(), header_.buildings);
  EXPECT_EQ(entries_of(inside), 2u) << "about.txt and lock";
  EXPECT_FALSE(fs::exists(folder_ / ("a.h5" + dead)));
  EXPECT_TRUE(fs::exists(folder_ / ("a.h5" + alive)));
  EXPECT_TRUE(fs::exists(folder_ / ("b.h5" + dead))) << "of another result";
}

TEST_F(Shards, RemoveLeavesWhatIsNotOurs) {
  ShardFolder folder(result(), key(), header_.buildings);
  write_all(folder);
  std::ofstream(folder.path() / "my-notes.txt") << "keep";
  folder.remove();
  EXPECT_EQ(entries_of(folder.path()), 1u);
}

}  // namespace
}  // namespace pilotis
