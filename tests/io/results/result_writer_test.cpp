#include "io/results/result_writer.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "core/verdict/memory_table.hpp"
#include "core/verdict/statistics.hpp"
#include "io/results/result_table.hpp"
#include "tests/support/large_study.hpp"
#include "tests/support/same_results.hpp"
#include "tests/support/temporary_folder.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

constexpr double on_disk = 1e12;  // so many bytes of histories are announced that it is not made in memory
const invented::Size three_blocks{3, 2, 20, 0};

class Writer : public TemporaryFolder {
 protected:
  // Adds the runs in pieces of 7, from the last to the first where `backward`.
  Verdict write(const fs::path& file, const invented::Size& size, bool backward, double history_bytes,
                int instants = 0) {
    ResultWriter writer(file, large_header(size), size.runs(), {}, history_bytes);
    std::vector<std::size_t> starts;
    for (std::size_t first = 0; first < size.runs(); first += 7) starts.push_back(first);
    if (backward) std::reverse(starts.begin(), starts.end());
    for (std::size_t first : starts)
      writer.add(first, large_runs(size, first, std::min<std::size_t>(7, size.runs() - first), instants));
    return writer.finish();
  }
};

void expect_same_runs(const ResultTable& table, const std::vector<RunResult>& runs) {
  const std::vector<RunResult> found = table.rows(0, table.runs(), RowParts::all);
  ASSERT_EQ(found.size(), runs.size());
  for (std::size_t i = 0; i < runs.size(); ++i) {
    expect_same(found[i], runs[i]);
    expect_same_histories(table.with_histories(i), runs[i]);
  }
}

void expect_same_outcome(const Outcome& a, const Outcome& b) {
  EXPECT_EQ(a.building, b.building);
  EXPECT_EQ(a.motion, b.motion);
  EXPECT_EQ(a.place, b.place);
  EXPECT_EQ(a.finding, b.finding);
  EXPECT_EQ(a.collapsed, b.collapsed);
  EXPECT_EQ(a.not_converged, b.not_converged);
  expect_same({a.factor, a.value, a.step_error, a.margin}, {b.factor, b.value, b.step_error, b.margin}, "outcome");
}

TEST_F(Writer, GivesBackRunsOfBuildingsOfDifferentHeights) {
  write(folder_ / "a.h5", three_blocks, false, 0, 30);
  const ResultTable table(folder_ / "a.h5");
  ASSERT_EQ(table.buildings().size(), 3u);
  EXPECT_EQ(table.buildings()[2].heights.size(), 10u);
  EXPECT_EQ(table.buildings()[1].labels.size(), 7u);
  ASSERT_EQ(table.sets().size(), 6u);
  EXPECT_EQ(table.sets()[3].building, 1);
  EXPECT_EQ(table.sets()[3].factor, 0.5);
  EXPECT_EQ(table.sets()[3].first, 60u);
  EXPECT_EQ(table.sets()[3].count, 20u);
  expect_same_runs(table, large_runs(three_blocks, 0, three_blocks.runs(), 30));
}

TEST_F(Writer, OrderOfAddingDoesNotMatter) {
  write(folder_ / "a.h5", three_blocks, true, 0, 30);
  expect_same_runs(ResultTable(folder_ / "a.h5"), large_runs(three_blocks, 0, three_blocks.runs(), 30));
}

TEST_F(Writer, SameOrderSameBytesInMemoryAndOnDisk) {
  write(folder_ / "a.h5", three_blocks, false, on_disk, 30);
  write(folder_ / "b.h5", three_blocks, false, on_disk, 30);
  EXPECT_EQ(bytes_of(folder_ / "a.h5"), bytes_of(folder_ / "b.h5"));
  EXPECT_EQ(entries(), 2u) << "nothing else is left";
  write(folder_ / "c.h5", three_blocks, false, 0, 30);
  expect_same_runs(ResultTable(folder_ / "a.h5"), large_runs(three_blocks, 0, three_blocks.runs(), 30));
  expect_same_runs(ResultTable(folder_ / "c.h5"), large_runs(three_blocks, 0, three_blocks.runs(), 30));
}

TEST_F(Writer, JudgesFromTheFileAsFromMemory) {
  for (double history_bytes : {0.0, on_disk}) {
    const Verdict found = write(folder_ / "a.h5", three_blocks, true, history_bytes);
    const StudyHeader header = large_header(three_blocks);
    const std::vector<RunResult> runs = large_runs(three_blocks, 0, three_blocks.runs());
    const Verdict expected = judge(MemoryTable(header.buildings, runs), header.limits);
    ASSERT_EQ(found.outcomes.size(), 6u);
    EXPECT_EQ(found.collapsed, expected.collapsed);
    for (std::size_t i = 0; i < 6; ++i) expect_same_outcome(found.outcomes[i], expected.outcomes[i]);
  }
}

// More runs in one set than a block of the file's table holds: columns are read a few places at a time.
TEST_F(Writer, ColumnsOfALargeSet) {
  const invented::Size large{1, 2, 5000, 20};
  ResultWriter writer(folder_ / "a.h5", large_header(large), large.runs(), {}, on_disk);
  const std::vector<RunResult> runs = large_runs(large, 0, large.runs());
  writer.add(0, runs);
  writer.finish();
  const ResultTable table(folder_ / "a.h5");
  const MemoryTable memory(table.buildings(), runs);
  for (const Quantity* quantity : {find_quantity("drift"), find_quantity("base_shear"), &residual_drift_ratio()})
    for (const RunSet& set : table.sets())
      for (int place = places_of(*quantity, table.buildings()[0]); place > 0; --place) {
        const auto found = table.column(set, *quantity, place);
        const auto expected = memory.column(set, *quantity, place);
        ASSERT_EQ(found.size(), expected.size());
        std::size_t different = 0;
        for (std::size_t i = 0; i < found.size(); ++i) {
          const bool both_unknown = std::isnan(found[i].value) && std::isnan(expected[i].value);
          different += !both_unknown && found[i].value != expected[i].value;
        }
        EXPECT_EQ(different, 0u) << quantity->name << " at " << place;
      }
}

TEST_F(Writer, RowsHoldThePartsAskedFor) {
  write(folder_ / "a.h5", three_blocks, false, 0);
  const ResultTable table(folder_ / "a.h5");
  const std::vector<RunResult> runs = large_runs(three_blocks, 0, three_blocks.runs());
  const MemoryTable memory(table.buildings(), runs);
  for (RowParts parts : {RowParts::heads, RowParts::residuals, RowParts::all}) {
    const auto found = table.rows(45, 10, parts), expected = memory.rows(45, 10, parts);
    ASSERT_EQ(found.size(), 10u);
    for (std::size_t i = 0; i < 10; ++i) expect_same(found[i], expected[i]);
    EXPECT_EQ(found[0].peaks.empty(), parts != RowParts::all);
    EXPECT_EQ(found[0].residual_drift.empty(), parts == RowParts::heads);
  }
}

TEST_F(Writer, NumbersOfRuns) {
  write(folder_ / "a.h5", three_blocks, false, 0);
  const ResultTable table(folder_ / "a.h5");
  std::vector<double> found(3);
  table.numbers(&RunResult::energy_error, 21, found);
  EXPECT_EQ(found, (std::vector<double>{2e-6, 3e-6, 4e-6}));  // motions 1, 2, 3 of the second set
}

TEST_F(Writer, SinglePrecisionHalvesAndRounds) {
  const invented::Size one{1, 1, 1, 5};
  for (bool single : {false, true}) {
    ResultWriter writer(folder_ / (single ? "single.h5" : "double.h5"), large_header(one), 1, {single, 0});
    writer.add(0, large_runs(one, 0, 1, 2000));
    writer.finish();
  }
  EXPECT_LT(fs::file_size(folder_ / "single.h5") + 4 * 2000 * 5, fs::file_size(folder_ / "double.h5"));
  const RunResult kept = large_runs(one, 0, 1, 2000)[0];
  const RunResult found = ResultTable(folder_ / "single.h5").with_histories(0);
  EXPECT_EQ(found.times, kept.times) << "times stay double";
  for (std::size_t i = 0; i < kept.histories[0].values.size(); ++i)
    ASSERT_EQ(found.histories[0].values[i], static_cast<double>(static_cast<float>(kept.histories[0].values[i])));
}

TEST_F(Writer, WithoutFinishNothingIsLeft) {
  {
    ResultWriter writer(folder_ / "a.h5", large_header(three_blocks), three_blocks.runs(), {}, on_disk);
    writer.add(0, large_runs(three_blocks, 0, 5));
    EXPECT_EQ(entries(), 1u);
    EXPECT_THROW(writer.finish(), std::logic_error) << "runs are missing";
    EXPECT_THROW(writer.add(4, large_runs(three_blocks, 4, 1)), std::logic_error) << "added twice";
  }
  EXPECT_EQ(entries(), 0u);
}

// A reader of HDF5 holds a lock on the file it reads.
TEST_F(Writer, TargetOpenElsewhereIsNotReplaced) {
  write(folder_ / "a.h5", three_blocks, false, 0);
  const std::string before = bytes_of(folder_ / "a.h5");
  {
    ResultWriter late(folder_ / "a.h5", large_header(three_blocks), three_blocks.runs());
    late.add(0, large_runs(three_blocks, 0, three_blocks.runs()));
    const ResultTable reader(folder_ / "a.h5");
    const auto told = message_of(ErrorKind::outside, [&] { late.finish(); });
    EXPECT_NE(told.find("open in another program"), std::string::npos) << told;
    message_of(ErrorKind::outside,
               [&] { const ResultWriter early(folder_ / "a.h5", large_header(three_blocks), three_blocks.runs()); });
  }
  EXPECT_EQ(bytes_of(folder_ / "a.h5"), before);
  EXPECT_EQ(entries(), 1u);
}

}  // namespace
}  // namespace pilotis
