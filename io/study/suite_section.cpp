#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <set>

#include "io/digest.hpp"
#include "io/records/record.hpp"
#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

constexpr Parameter step{"step", Dimension::time, "the time step of the record", {}, 0.0, 1e300, false};
constexpr Parameter first_sample_at{"first_sample_at", Dimension::time, "the time of the first sample", {}, 0.0};
constexpr Parameter motion_factor{"factor", Dimension::none, "the factor of this motion", 1.0};
constexpr Parameter suite_factor{"factors", Dimension::none, "a factor of the suite", {}, 0.0, 1e300, false};

// A motion to be loaded.
struct Wanted {
  fs::path file;
  std::string name;  // empty: from the file name
  double factor = 1;
  RecordHints hints;
  ValueReader place;  // for messages
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

// The file name, and the component where the study names one.
std::string full_name(const Wanted& motion) {
  const std::string file = motion.file.filename().string();
  return motion.hints.component ? fmt::format("{} {}", file, *motion.hints.component) : file;
}

// File names without extension; full names where two would be called alike.
void name_motions(std::vector<Wanted>& wanted) {
  std::map<std::string, int> stems;
  for (const Wanted& motion : wanted) ++stems[motion.name.empty() ? motion.file.stem().string() : motion.name];
  for (Wanted& motion : wanted) {
    const std::string stem = motion.file.stem().string();
    if (motion.name.empty()) motion.name = stems[stem] == 1 ? stem : full_name(motion);
  }
  std::set<std::string> taken;
  for (const Wanted& motion : wanted)
    if (!taken.insert(motion.name).second)
      throw motion.place.wrong(fmt::format("a second motion is called \"{}\" ({})", motion.name, motion.file.string()),
                               "name it differently with { file = \"...\", name = \"...\" }, or list it once");
}

Motion loaded(const Wanted& wanted, std::vector<std::string>& notes) {
  RecordFile file = read_record(wanted.file, wanted.hints);
  for (double& sample : file.record.samples) sample *= wanted.factor;
  for (const std::string& note : file.notes) notes.push_back(fmt::format("{}: {}", wanted.file.string(), note));
  Motion motion{wanted.name, wanted.file.string(), file.format, file.unit, "", wanted.factor, std::move(file.record)};
  motion.digest = digest_of(motion.record);
  return motion;
}

}  // namespace

TableReader suite_table(const ValueReader& value) {
  TableReader table(value);
  table.known_keys({"motions", "units", "step", "factors"});
  return table;
}

std::vector<Motion> read_motions(const TableReader& suite, const fs::path& folder, std::vector<std::string>& notes) {
  std::vector<Wanted> wanted = wanted_motions(suite, folder);
  name_motions(wanted);
  std::vector<Motion> motions;
  for (const Wanted& motion : wanted) motions.push_back(loaded(motion, notes));
  return motions;
}

std::vector<double> read_factors(const TableReader& suite) {
  const auto value = suite.find("factors");
  if (!value) return {1.0};
  std::vector<double> factors;
  for (const ValueReader& item : value->items()) {
    factors.push_back(item.quantity(suite_factor));
    if (std::count(factors.begin(), factors.end(), factors.back()) > 1)
      throw item.wrong(fmt::format("found the factor {:g} a second time", factors.back()), "give each factor once");
  }
  if (factors.empty()) throw value->wrong("found an empty list", "give a factor, or leave the key out for [1.0]");
  return factors;
}

}  // namespace pilotis
