// How much memory a study of many runs takes, from the first run to the verdict on the screen: invented runs of a
// 20-story building go into shards of 500 runs, the shards into the result file, which is judged, then opened and
// shown. Prints the time of each part and the peak of the process's memory. One process measures one number of runs:
//
//   build/tests/bench/many_runs 1000; build/tests/bench/many_runs 100000
#include <fmt/format.h>
#include <sys/resource.h>

#include <chrono>
#include <cstdlib>
#include <filesystem>

#include "apps/profile.hpp"
#include "apps/report_json.hpp"
#include "io/results/result_table.hpp"
#include "io/results/result_writer.hpp"
#include "tests/support/large_study.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;

constexpr std::size_t per_shard = 500;

// Prints how long `act` took and the peak of memory so far.
template <class Act>
void timed(const char* name, Act act) {
  const auto from = std::chrono::steady_clock::now();
  act();
  const std::chrono::duration<double> took = std::chrono::steady_clock::now() - from;
  rusage used{};
  getrusage(RUSAGE_SELF, &used);
  fmt::print("{:<28}{:8.2f} s   peak {:7.1f} MiB\n", name, took.count(), static_cast<double>(used.ru_maxrss) / 1024);
}

void require(bool holds, const char* what) {
  if (holds) return;
  fmt::print(stderr, "many_runs: {}\n", what);
  std::exit(1);
}

void show(const fs::path& file, const Verdict& verdict, std::size_t runs) {
  const ResultTable table(file);
  require(table.runs() == runs, "runs are missing");
  timed("judged again from the file", [&] {
    const Verdict again = judge(table, table.header().limits);
    require(again.outcomes.size() == verdict.outcomes.size(), "outcomes are missing");
    require(again.outcomes[0].value == verdict.outcomes[0].value, "the verdict differs");
  });
  timed("shown on a screen", [&] {
    require(profile_text(table.header(), table, verdict, {100, false, true}).size() > 1000, "nothing was shown");
  });
  std::size_t bytes = 0;
  timed("told as JSON", [&] {
    write_report_json(table.header(), table, verdict, [&](std::string_view part) { bytes += part.size(); });
  });
  require(bytes > 1000, "nothing was told");
}

void measure(const invented::Size& size, int instants) {
  const fs::path file = fs::temp_directory_path() / fmt::format("pilotis-many-{}.h5", size.runs());
  const StudyHeader header = large_header(size);
  const std::size_t shards = (size.runs() + per_shard - 1) / per_shard;
  const double history_bytes = 8.0 * (1 + size.stories) * instants * static_cast<double>(size.runs());
  ShardFolder folder(file, {std::string(64, 'c'), "0.1.0", size.runs(), shards}, header.buildings);
  timed("shards", [&] {
    for (std::size_t shard = 0; shard < shards; ++shard) {
      const std::size_t first = shard * per_shard;
      folder.write(shard, first, large_runs(size, first, std::min(per_shard, size.runs() - first), instants));
    }
  });
  ResultWriter writer(file, header, size.runs(), {}, history_bytes);
  timed("merged", [&] {
    for (std::size_t shard = 0; shard < shards; ++shard) writer.add_shard(folder, shard);
  });
  Verdict verdict;
  timed("judged, synced, in place", [&] { verdict = writer.finish(); });
  folder.remove();
  fmt::print("{} runs, {:.0f} MB\n", size.runs(), static_cast<double>(fs::file_size(file)) / 1e6);
  show(file, verdict, size.runs());
  fs::remove(file);
}

}  // namespace
}  // namespace pilotis

int main(int argc, char** argv) {
  const int runs = argc > 1 ? std::atoi(argv[1]) : 1000, motions = argc > 2 ? std::atoi(argv[2]) : runs / 2;
  const int instants = argc > 3 ? std::atoi(argv[3]) : 0;
  if (runs < 2 || motions < 1) return 2;
  pilotis::measure({1, runs / motions, motions, 20}, instants);
}
