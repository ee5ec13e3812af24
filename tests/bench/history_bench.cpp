// Writing histories: the whole writer against a bare H5Dwrite of the same chunks through the same filters, both into a
// file on disk, in the same run. What is asked for: at least 70 % of the bare rate.
#include <H5Cpp.h>
#include <benchmark/benchmark.h>
#include <fcntl.h>
#include <fmt/format.h>
#include <unistd.h>

#include <cmath>
#include <filesystem>

#include "io/results/result_table.hpp"
#include "io/results/result_writer.hpp"
#include "tests/support/large_study.hpp"

namespace {

namespace fs = std::filesystem;
using namespace pilotis;

constexpr int stories = 20, instants = 6000;
constexpr std::size_t runs = 24;
constexpr double on_disk = 1e12;  // bytes of histories announced: not made in memory
const invented::Size size{1, 1, runs, stories};

// As a march gives them: five quantities of every floor or story, oscillating with a slow growth and decay.
std::vector<RunResult> made_runs() {
  std::vector<RunResult> made = large_runs(size, 0, runs);
  for (RunResult& run : made) {
    for (int i = 0; i < instants; ++i) run.times.push_back(0.005 * i);
    for (const char* name :
         {"floor_displacement", "floor_acceleration", "drift", "story_shear", "overturning_moment"}) {
      History history{find_quantity(name), {}};
      for (int i = 0; i < instants; ++i)
        for (int story = 1; story <= stories; ++story)
          history.values.push_back(0.01 * story * std::sin(0.021 * i + 0.3 * story) * std::sin(5e-4 * i));
      run.histories.push_back(std::move(history));
    }
  }
  return made;
}

std::size_t bytes_of(const std::vector<RunResult>& made) {
  std::size_t values = 0;
  for (const RunResult& run : made)
    for (const History& history : run.histories) values += history.values.size();
  return 8 * values;
}

fs::path file_of(const char* what) {
  return fs::temp_directory_path() / fmt::format("pilotis-bench-{}-{}.h5", what, ::getpid());
}

void write_ours(const fs::path& file, const std::vector<RunResult>& made, HistoryFormat format) {
  ResultWriter writer(file, large_header(size), runs, format, on_disk);
  writer.add(0, made);
  writer.finish();
}

H5::DSetCreatPropList packed(hsize_t rows, HistoryFormat format) {
  const hsize_t chunk[2] = {rows, stories};
  H5::DSetCreatPropList properties;
  properties.setChunk(2, chunk);
  if (format.compression == 0) return properties;
  properties.setShuffle();
  properties.setDeflate(static_cast<unsigned>(format.compression));
  return properties;
}

// The arrays alone, in chunks of the writer's size; synced as the writer's file is.
void write_bare(const fs::path& file, const std::vector<RunResult>& made, HistoryFormat format) {
  const hsize_t lengths[2] = {instants, stories};
  const H5::DSetCreatPropList properties = packed(16384 / stories, format);
  {
    H5::H5File out(file.string(), H5F_ACC_TRUNC);
    int number = 0;
    for (const RunResult& run : made)
      for (const History& history : run.histories)
        out.createDataSet(std::to_string(number++), H5::PredType::IEEE_F64LE, H5::DataSpace(2, lengths), properties)
            .write(history.values.data(), H5::PredType::NATIVE_DOUBLE);
  }
  const int opened = ::open(file.c_str(), O_RDONLY);
  ::fsync(opened);
  ::close(opened);
}

// What is read back is what was written, and the chunks are of the same size; empty when it is so.
std::string fault(const std::vector<RunResult>& made, HistoryFormat format) {
  const fs::path ours = file_of("ours"), bare = file_of("bare");
  write_ours(ours, made, format);
  write_bare(bare, made, format);
  for (std::size_t i = 0; i < runs; ++i) {
    const RunResult found = ResultTable(ours).with_histories(i);
    if (found.histories.size() != 5) return "histories are missing";
    for (const History& history : made[i].histories)
      for (const History& one : found.histories)
        if (one.quantity == history.quantity && one.values != history.values) return "histories differ";
  }
  hsize_t chunk_of_ours[2] = {0, 0}, chunk_of_bare[2] = {1, 1};
  H5::H5File(ours.string(), H5F_ACC_RDONLY)
      .openDataSet("/histories/0/drift")
      .getCreatePlist()
      .getChunk(2, chunk_of_ours);
  H5::H5File(bare.string(), H5F_ACC_RDONLY).openDataSet("0").getCreatePlist().getChunk(2, chunk_of_bare);
  return chunk_of_ours[0] == chunk_of_bare[0] && chunk_of_ours[1] == chunk_of_bare[1] ? "" : "chunks differ";
}

using Write = void (*)(const fs::path&, const std::vector<RunResult>&, HistoryFormat);

void histories(benchmark::State& state, Write write) {
  const HistoryFormat format{false, static_cast<int>(state.range(0))};
  const std::vector<RunResult> made = made_runs();
  if (const std::string wrong = fault(made, format); !wrong.empty()) state.SkipWithError(wrong.c_str());
  const fs::path file = file_of("timed");
  for (auto _ : state) write(file, made, format);
  state.SetBytesProcessed(static_cast<std::int64_t>(state.iterations() * bytes_of(made)));
  for (const char* what : {"ours", "bare", "timed"}) fs::remove(file_of(what));
}
BENCHMARK_CAPTURE(histories, writer, write_ours)->Arg(4)->Arg(0)->Unit(benchmark::kMillisecond)->UseRealTime();
BENCHMARK_CAPTURE(histories, bare_H5Dwrite, write_bare)->Arg(4)->Arg(0)->Unit(benchmark::kMillisecond)->UseRealTime();

}  // namespace
