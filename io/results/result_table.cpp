#include "io/results/result_table.hpp"

#include <fmt/format.h>

#include <optional>
#include <system_error>

#include "core/error.hpp"
#include "io/results/file_runs.hpp"
#include "io/results/hdf5_file.hpp"

namespace pilotis {

namespace {

constexpr const char* remedy = "give a result file that `pilotis run` wrote";

ResultFile opened(const std::filesystem::path& path) {
  std::error_code ignored;
  const std::string name = path.string();
  if (!std::filesystem::exists(path, ignored)) throw input_error(name, "there is no such file", remedy);
  try {
    return {open_hdf5(path), name};
  } catch (const H5::Exception&) {
    throw input_error(name, "is not an HDF5 file, or cannot be read", remedy);
  }
}

StudyHeader header_of(const ResultFile& from) {
  StudyHeader header = read_root(from);
  header.buildings = read_buildings(from);
  header.motions = read_motions(from);
  header.limits = read_limits(from);
  return header;
}

}  // namespace

struct ResultTable::Parts {
  explicit Parts(std::filesystem::path file) : path(std::move(file)) {
    reading(path, [&] {
      const ResultFile from = opened(path);
      header = header_of(from);
      runs.emplace(from, header.buildings);
    });
  }

  std::filesystem::path path;
  StudyHeader header;
  std::optional<FileRuns> runs;
};

ResultTable::ResultTable(const std::filesystem::path& file) : parts_(std::make_unique<Parts>(file)) {}
ResultTable::~ResultTable() = default;

const StudyHeader& ResultTable::header() const { return parts_->header; }
const std::vector<RunSet>& ResultTable::sets() const { return parts_->runs->sets(); }
std::span<const RunStatus> ResultTable::statuses() const { return parts_->runs->statuses(); }
const std::string& ResultTable::motion(std::size_t run) const { return parts_->runs->motion(run); }

std::span<const PlaceValue> ResultTable::column(const RunSet& set, const Quantity& quantity, int place) const {
  std::span<const PlaceValue> found;
  reading(parts_->path, [&] { found = parts_->runs->column(set, quantity, place); });
  return found;
}

void ResultTable::numbers(double RunResult::*member, std::size_t first, std::span<double> into) const {
  reading(parts_->path, [&] { parts_->runs->numbers(member, first, into); });
}

std::vector<RunResult> ResultTable::rows(std::size_t first, std::size_t count, RowParts parts) const {
  std::vector<RunResult> found;
  reading(parts_->path, [&] { found = parts_->runs->rows(first, count, parts); });
  return found;
}

bool ResultTable::keeps_histories(std::size_t run) const {
  bool found = false;
  reading(parts_->path, [&] { found = has_history(parts_->runs->file(), run); });
  return found;
}

RunResult ResultTable::with_histories(std::size_t run) const {
  if (run >= runs())
    throw input_error(parts_->path.string(), fmt::format("there is no run {}", run),
                      fmt::format("runs are counted from 0 to {}", static_cast<long>(runs()) - 1));
  RunResult found = std::move(rows(run, 1, RowParts::all).at(0));
  reading(parts_->path, [&] { read_history(parts_->runs->file(), run, found); });
  return found;
}

}  // namespace pilotis
