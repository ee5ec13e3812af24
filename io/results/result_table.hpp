// A result file open for reading: its header, its runs as a RunTable, its histories.
#pragma once

#include <filesystem>
#include <memory>

#include "core/verdict/run_table.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

// Holds 5 bytes a run and one column; the rest is read when it is asked for. One thread at a time, as for ResultWriter.
// Every member throws Error (input), naming the file, where it is damaged.
class ResultTable : public RunTable {
 public:
  // Throws Error naming the file and what is missing when it is not a result file of this program.
  explicit ResultTable(const std::filesystem::path& file);
  ~ResultTable() override;
  ResultTable(const ResultTable&) = delete;
  ResultTable& operator=(const ResultTable&) = delete;

  const StudyHeader& header() const;

  const std::vector<BuildingSummary>& buildings() const override { return header().buildings; }
  const std::vector<RunSet>& sets() const override;
  std::span<const RunStatus> statuses() const override;
  const std::string& motion(std::size_t run) const override;
  std::span<const PlaceValue> column(const RunSet& set, const Quantity& quantity, int place) const override;
  void numbers(double RunResult::*member, std::size_t first, std::span<double> into) const override;
  std::vector<RunResult> rows(std::size_t first, std::size_t count, RowParts parts) const override;

  bool keeps_histories(std::size_t run) const;
  // One run with times and histories, empty where it kept none. Throws Error (input) when there is no such run.
  RunResult with_histories(std::size_t run) const;

 private:
  struct Parts;
  std::unique_ptr<Parts> parts_;
};

}  // namespace pilotis
