#include "io/results/file_runs.hpp"

#include <algorithm>

#include "io/results/group_reader.hpp"

namespace pilotis {

namespace {

constexpr std::size_t block_values = 65536;  // 1 MiB of PlaceValue, unless one set needs more
constexpr std::size_t read_values = 16384;   // of one array at a time: 128 KiB
constexpr std::size_t heads_at_once = 4096;  // runs

}  // namespace

FileRuns::FileRuns(ResultFile from, const Buildings& buildings) : from_(std::move(from)), buildings_(buildings) {
  count_ = GroupReader(from_.file, from_.where, "/runs").length("run");
  stories_ = most_stories(buildings);
  statuses_.reserve(count_);
  motions_.reserve(count_);
  if (count_ > 0) read_heads();
}

void FileRuns::read_heads() {
  const GroupReader group(from_.file, from_.where, "/runs");
  const H5::DataSet building = group.text_array("building", count_), status = group.text_array("status", count_),
                    motion = group.text_array("motion", count_), factor = group.number_array("factor", count_);
  const BuildingIndex index(buildings_, from_.where);
  std::unordered_map<std::string, std::uint32_t> known;
  for (std::size_t first = 0; first < count_; first += heads_at_once) {
    const std::size_t rows = std::min(heads_at_once, count_ - first);
    const auto buildings = read_texts(building, first, rows), statuses = read_texts(status, first, rows),
               motions = read_texts(motion, first, rows);
    std::vector<double> factors(rows);
    read_rows(factor, first, factors);
    for (std::size_t i = 0; i < rows; ++i) {
      add_to_sets(sets_, index.of(buildings[i]), factors[i], first + i);
      statuses_.push_back(status_from(statuses[i], from_.where));
      const auto [entry, is_new] = known.emplace(motions[i], static_cast<std::uint32_t>(motion_names_.size()));
      if (is_new) motion_names_.push_back(motions[i]);
      motions_.push_back(entry->second);
    }
  }
}

const H5::DataSet& FileRuns::array(const std::string& group, const std::string& name, std::size_t width) const {
  const std::string path = group + "/" + name;
  auto found = arrays_.find(path);
  if (found == arrays_.end()) {
    const GroupReader reader(from_.file, from_.where, group);
    found = arrays_.emplace(path, reader.number_array(name, count_ * width)).first;
  }
  return found->second;
}

// All places of the set and of the sets after it as far as the block goes; of a large set some places only.
void FileRuns::choose_block(const RunSet& set, const Quantity& quantity, std::size_t place) const {
  const std::size_t width = quantity.per == Per::run ? 1 : stories_;
  block_.quantity = &quantity;
  block_.first_run = set.first;
  if (set.count * width <= block_values) {
    block_.first_place = 0;
    block_.places = width;
    block_.runs = std::clamp(block_values / width, set.count, count_ - set.first);
  } else {
    block_.first_place = place;
    block_.places = std::clamp<std::size_t>(block_values / set.count, 1, width - place);
    block_.runs = set.count;
  }
}

void FileRuns::read_block() const {
  const bool residual = block_.quantity == &residual_drift_ratio();
  const std::size_t width = block_.quantity->per == Per::run ? 1 : stories_;
  const std::string name = residual ? "drift_ratio" : std::string(block_.quantity->name);
  const std::string group = residual ? "/residual" : "/peaks";
  const H5::DataSet &values = array(group, name, width), &errors = array(group, name + "_step_error", width);
  block_.values.resize(block_.runs * block_.places);
  const std::size_t step = std::max<std::size_t>(read_values / width, 1);
  std::vector<double> value, error;
  for (std::size_t row = 0; row < block_.runs; row += step) {
    const std::size_t rows = std::min(step, block_.runs - row);
    value.resize(rows * width);
    error.resize(rows * width);
    read_rows(values, block_.first_run + row, value);
    read_rows(errors, block_.first_run + row, error);
    for (std::size_t place = 0; place < block_.places; ++place)
      for (std::size_t i = 0; i < rows; ++i) {
        const std::size_t at = i * width + block_.first_place + place;
        block_.values[place * block_.runs + row + i] = {value[at], error[at]};
      }
  }
}

std::span<const PlaceValue> FileRuns::column(const RunSet& set, const Quantity& quantity, int place) const {
  if (set.count == 0) return {};
  const std::size_t index = static_cast<std::size_t>(place) - 1;
  const bool has_runs = set.first >= block_.first_run && set.first + set.count <= block_.first_run + block_.runs;
  const bool has_place = index >= block_.first_place && index < block_.first_place + block_.places;
  if (block_.quantity != &quantity || !has_runs || !has_place) {
    choose_block(set, quantity, index);
    read_block();
  }
  const std::size_t at = (index - block_.first_place) * block_.runs + set.first - block_.first_run;
  return {block_.values.data() + at, set.count};
}

void FileRuns::numbers(double RunResult::*member, std::size_t first, std::span<double> into) const {
  if (!into.empty()) read_rows(array("/runs", number_column(member), 1), first, into);
}

std::vector<RunResult> FileRuns::rows(std::size_t first, std::size_t count, RowParts parts) const {
  std::vector<RunResult> found(count);
  if (count == 0) return found;
  const RunRange all{0, count_};
  read_runs(from_, all, first, buildings_, found);
  if (parts == RowParts::all) read_peaks(from_, all, first, buildings_, found);
  if (parts != RowParts::heads) read_residuals(from_, all, first, buildings_, found);
  return found;
}

}  // namespace pilotis
