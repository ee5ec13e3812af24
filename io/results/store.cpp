#include "io/results/store.hpp"

#include "io/results/result_table.hpp"
#include "io/results/result_writer.hpp"

namespace pilotis {

Verdict write_results(const std::filesystem::path& file, const StoredStudy& stored, HistoryFormat histories) {
  ResultWriter writer(file, stored, stored.runs.size(), histories);
  writer.add(0, stored.runs);
  return writer.finish();
}

StoredStudy read_results(const std::filesystem::path& file) {
  const ResultTable table(file);
  return {table.header(), table.rows(0, table.runs(), RowParts::all)};
}

}  // namespace pilotis
