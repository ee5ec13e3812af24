// The store of motions: what it keeps, what it reads again, and what it says when a record is no longer the same.
#include "io/study/motion_store.hpp"

#include <gtest/gtest.h>

#include <thread>

#include "core/error.hpp"
#include "io/digest.hpp"
#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;

constexpr int count = 6;
constexpr int samples_each = 100;
constexpr std::size_t bytes_each = samples_each * sizeof(double);

// Sample j of motion i in the file, in m/s2.
double in_file(int i, int j) { return (j % 2 == 0 ? 1 : -1) * (0.5 * i + 0.25 * j); }

class Store : public testing::Test {
 protected:
  Store() {
    for (int i = 0; i < count; ++i) {
      write(i, samples_each);
      sources_.push_back({path(i), "motion " + std::to_string(i), i == 1 ? -2.0 : 1.0, {"m/s2", 0.01, 0.0}});
    }
  }
  std::filesystem::path path(int i) const { return folder_.path() / (std::to_string(i) + ".txt"); }
  void write(int i, int samples) const {
    std::string text;
    for (int j = 0; j < samples; ++j) text += std::to_string(in_file(i, j)) + "\n";
    folder_.write(std::to_string(i) + ".txt", text);
  }

  Folder folder_;
  std::vector<MotionSource> sources_;
};

TEST_F(Store, SummariesNeedNoSamples) {
  const MotionStore store(sources_, 0);
  ASSERT_EQ(store.size(), static_cast<std::size_t>(count));
  const Motion& second = store[1];
  EXPECT_EQ(second.name, "motion 1");
  EXPECT_EQ(second.file, path(1).string());
  EXPECT_EQ(second.unit, "m/s2");
  EXPECT_EQ(second.factor, -2);
  EXPECT_EQ(second.samples, samples_each);
  EXPECT_EQ(second.step, 0.01);
  EXPECT_DOUBLE_EQ(second.duration(), 0.99);
  EXPECT_EQ(second.peak.value, -2 * in_file(1, 99));  // the last is the largest
  EXPECT_DOUBLE_EQ(second.peak.time, 0.99);
  EXPECT_EQ(second.digest, digest_of(*store.samples(1)));
  int seen = 0;
  for (const Motion& motion : store) EXPECT_EQ(motion.name, "motion " + std::to_string(seen++));
  EXPECT_EQ(seen, count);
  EXPECT_TRUE(MotionStore().empty());
}

TEST_F(Store, TheSameSamplesWhateverItKeeps) {
  for (const std::size_t keep : {std::size_t{0}, 2 * bytes_each, 8 * bytes_each, MotionStore::default_keep_bytes}) {
    const MotionStore store(sources_, keep);
    for (int turn = 0; turn < 2; ++turn)
      for (int i = 0; i < count; ++i) {
        const auto samples = store.samples(i);
        ASSERT_EQ(samples->samples.size(), static_cast<std::size_t>(samples_each));
        for (int j = 0; j < samples_each; ++j) EXPECT_EQ(samples->samples[j], (i == 1 ? -2 : 1) * in_file(i, j));
      }
  }
}

// Which are in memory shows when the files are gone.
TEST_F(Store, KeepsWhatStaysWithinTheLimit) {
  const MotionStore all(sources_, count * bytes_each), four(sources_, count * bytes_each - 1 - bytes_each);
  std::filesystem::remove_all(folder_.path());
  for (int i = 0; i < count; ++i) EXPECT_NO_THROW(all.samples(i)) << i;
  for (int i = 0; i < count; ++i)
    if (i < 4)
      EXPECT_NO_THROW(four.samples(i)) << i;
    else
      EXPECT_THROW(four.samples(i), Error) << i;
}

TEST_F(Store, LetsGoOfWhatIsNoLongerHeld) {
  const MotionStore store(sources_, 0);
  auto held = store.samples(0);
  EXPECT_EQ(store.samples(0), held);  // shared while anyone holds it
  const std::weak_ptr<const Accelerogram> watched = held;
  held.reset();
  EXPECT_TRUE(watched.expired());
}

// Sixteen records may be kept; of those beyond them, which are four, an eighth as much: two.
TEST_F(Store, KeepsTheLastReadWithinAnEighth) {
  std::vector<MotionSource> sources;
  for (int i = 0; i < 20; ++i) {
    sources.push_back(sources_[i % count]);
    sources.back().name = std::to_string(i);
  }
  const MotionStore store(sources, 16 * bytes_each);
  std::vector<std::weak_ptr<const Accelerogram>> seen;
  for (int i = 16; i < 20; ++i) seen.push_back(store.samples(i));
  EXPECT_TRUE(seen[0].expired());
  EXPECT_TRUE(seen[1].expired());
  EXPECT_FALSE(seen[2].expired());
  EXPECT_FALSE(seen[3].expired());
}

TEST_F(Store, CopiesShareOneStore) {
  const MotionStore store(sources_, 0);
  const MotionStore copy = store;
  EXPECT_EQ(store.samples(3), copy.samples(3));
}

class ChangedRecord : public Store {
 protected:
  Error error() const {
    try {
      store_.samples(2);
    } catch (const Error& error) {
      EXPECT_EQ(error.kind(), ErrorKind::outside);
      EXPECT_EQ(error.where(), path(2).string());
      EXPECT_NE(error.problem().find("\"motion 2\""), std::string::npos) << error.what();
      EXPECT_NE(error.remedy().find("while a study runs"), std::string::npos) << error.what();
      return error;
    }
    ADD_FAILURE() << "accepted";
    return input_error("", "", "");
  }
  MotionStore store_{sources_, 0};
};

TEST_F(ChangedRecord, Vanished) {
  std::filesystem::remove(path(2));
  EXPECT_NE(error().problem().find("there is no such file"), std::string::npos);
}

TEST_F(ChangedRecord, OtherSamples) {
  write(2, samples_each + 1);
  const std::string problem = error().problem();
  EXPECT_NE(problem.find("has changed"), std::string::npos) << problem;
  EXPECT_NE(problem.find(store_[2].digest), std::string::npos) << problem;
}

TEST_F(ChangedRecord, NoRecordAnyMore) {
  folder_.write("2.txt", "0.1\nnonsense here\n");
  EXPECT_NE(error().problem().find("cannot be read again"), std::string::npos);
}

TEST_F(ChangedRecord, PutBackAsItWas) {
  const std::string digest = store_[2].digest;
  write(2, samples_each + 1);
  error();
  write(2, samples_each);
  EXPECT_EQ(digest_of(*store_.samples(2)), digest);
}

// Every thread takes all motions in an order of its own, often at once with another.
TEST_F(Store, ManyThreads) {
  const MotionStore store(sources_, 2 * bytes_each);
  std::vector<int> wrong(4, 0);
  std::vector<std::thread> threads;
  for (int t = 0; t < 4; ++t)
    threads.emplace_back([&, t] {
      for (int n = 0; n < 300; ++n) {
        const int i = (n * (t + 1) + t) % count;
        const auto samples = store.samples(i);
        if (samples->samples.size() != samples_each || samples->samples[7] != (i == 1 ? -2 : 1) * in_file(i, 7))
          ++wrong[t];
      }
    });
  for (std::thread& thread : threads) thread.join();
  EXPECT_EQ(wrong, std::vector<int>(4, 0));
}

TEST_F(Store, ReadingOneMotionNeedsNothingElse) {
  const MotionRead read = read_motion(sources_[1]);
  EXPECT_EQ(read.motion.digest, digest_of(read.record));
  EXPECT_EQ(read.motion.peak.value, peak_of(read.record).value);
}

}  // namespace
}  // namespace pilotis
