#include <fmt/format.h>

#include "io/records/record.hpp"
#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"
#include "io/study/unique_names.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

constexpr Parameter step{"step", Dimension::time, "the time step of the record", {}, 0.0, 1e300, false};
constexpr Parameter first_sample_at{"first_sample_at", Dimension::time, "the time of the first sample", {}, 0.0};
constexpr Parameter motion_factor{"factor", Dimension::none, "the factor of this motion", 1.0};

// A motion to be loaded.
struct Wanted {
  fs::path file;
  std::string name;  // empty: from the file name
  double factor = 1;
  RecordHints hints;
  ValueReader place;  // for messages

  // The file name, and the component where the study names one.
  std::string full_name() const {
    const std::string plain = file.filename().string();
    return hints.component ? fmt::format("{} {}", plain, *hints.component) : plain;
  }
};

std::optional<std::string> unit_given(const TableReader& table) {
  const auto value = table.find("units");
  if (!value) return std::nullopt;
  const std::string unit = value->text();
  si_factor(unit, Dimension::acceleration, value->where());
  return unit;
}

// What the table says over what holds for the whole suite.
RecordHints hints_of(const TableReader& table, RecordHints otherwise) {
  if (const auto unit = unit_given(table)) otherwise.unit = unit;
  if (const auto given = table.quantity_if_given(step)) otherwise.step = given;
  return otherwise;
}

double factor_of(const TableReader& table) {
  const double factor = table.quantity(motion_factor);
  if (factor == 0) throw table.at("factor", "").wrong("found 0", "a motion with the factor 0 is no motion");
  return factor;
}

// A motion is one component so far: core/motion/accelerogram.hpp.
void refuse_several(const TableReader& table) {
  for (const char* key : {"files", "components"})
    if (const auto several = table.find(key))
      throw several->wrong(fmt::format("found {}: two components that shake the building together", key),
                           "a motion has one component for now; give its file, and its component where the file holds "
                           "several: { file = \"...\", component = \"...\" }");
}

void add_table(TableReader table, const ValueReader& place, const fs::path& folder, const RecordHints& suite,
               std::vector<Wanted>& wanted) {
  table.known_keys({"file", "component", "units", "step", "factor", "first_sample_at", "name", "files", "components"});
  refuse_several(table);
  const ValueReader file = table.at("file", "name the file of the motion");
  RecordHints hints = hints_of(table, suite);
  hints.first_sample_at = table.quantity_if_given(first_sample_at);
  if (const auto component = table.find("component")) hints.component = component->text();
  const std::string name = table.text_or("name", "");
  const std::vector<fs::path> files = files_named(file, folder);
  if (!name.empty() && files.size() > 1)
    throw table.at("name", "")
        .wrong(fmt::format("found one name for {} files", files.size()), "a name is for one file");
  for (const fs::path& one : files) wanted.push_back({one, name, factor_of(table), hints, place});
}

std::vector<Wanted> wanted_motions(const TableReader& suite, const fs::path& folder) {
  const ValueReader value = suite.at("motions", "list the files of the motions, such as [\"motions/*.csv\"]");
  const RecordHints hints = hints_of(suite, {});
  std::vector<Wanted> wanted;
  for (const ValueReader& item : value.items()) {
    if (item.node().kind == NodeKind::table)
      add_table(TableReader(item), item, folder, hints, wanted);
    else if (item.node().kind == NodeKind::text)
      for (const fs::path& file : files_named(item, folder)) wanted.push_back({file, "", 1, hints, item});
    else
      throw item.wrong_type("a path, a pattern or a table { file = \"...\", units = \"g\" } is needed");
  }
  if (wanted.empty()) throw value.wrong("found an empty list", "list at least one motion, or leave [suite] out");
  return wanted;
}

}  // namespace

TableReader suite_table(const ValueReader& value) {
  TableReader table(value);
  table.known_keys({"motions", "units", "step", "factors"});
  return table;
}

std::vector<MotionSource> read_suite(const TableReader& suite, const fs::path& folder) {
  std::vector<Wanted> wanted = wanted_motions(suite, folder);
  name_by_file(wanted, "motion");
  std::vector<MotionSource> sources;
  for (const Wanted& motion : wanted) sources.push_back({motion.file, motion.name, motion.factor, motion.hints});
  return sources;
}

}  // namespace pilotis
