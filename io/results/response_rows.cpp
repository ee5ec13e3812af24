#include "io/results/response_rows.hpp"

#include <stdexcept>

namespace pilotis {

ResponseRows::ResponseRows(H5::H5File& file, RunRange runs, const Buildings& buildings, HistoryFormat histories)
    : runs_(runs),
      buildings_(buildings),
      histories_(histories),
      heads_(make_runs(file, runs)),
      peaks_(make_peaks(file, runs, most_stories(buildings))),
      residuals_(make_residuals(file, runs, most_stories(buildings))) {
  make_histories(file);
}

void ResponseRows::add(H5::H5File& file, std::size_t first, std::span<const RunResult> results) {
  if (results.empty()) return;
  if (first < runs_.first || first + results.size() > runs_.first + runs_.count)
    throw std::logic_error("runs outside those of the file");
  const std::size_t row = first - runs_.first;
  write_runs(heads_, row, results, buildings_);
  write_peaks(peaks_, row, results, buildings_);
  write_residuals(residuals_, row, results, buildings_);
  write_histories(file, first, results, buildings_, histories_);
}

void ResponseRows::copy(H5::H5File& file, const ResultFile& from, RunRange theirs) {
  if (theirs.first < runs_.first || theirs.first + theirs.count > runs_.first + runs_.count)
    throw std::logic_error("runs outside those of the file");
  const std::size_t row = theirs.first - runs_.first;
  heads_.copy(from.file.openGroup("/runs"), row, theirs.count);
  peaks_.copy(from.file.openGroup("/peaks"), row, theirs.count);
  residuals_.copy(from.file.openGroup("/residual"), row, theirs.count);
  copy_histories(file, from, theirs);
}

}  // namespace pilotis
