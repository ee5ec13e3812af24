#include <fmt/format.h>

#include "io/records/record.hpp"
#include "io/study/motion_files.hpp"
#include "io/study/process_section.hpp"
#include "io/study/sections.hpp"
#include "io/study/unique_names.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

constexpr Parameter step{"step", Dimension::time, "the time step of the record", {}, 0.0, 1e300, false};
constexpr Parameter first_sample_at{"first_sample_at", Dimension::time, "the time of the first sample", {}, 0.0};
constexpr Parameter motion_factor{"factor", Dimension::none, "the factor of this motion", 1.0};
constexpr Parameter pair_angle{"angle", Dimension::none,     "the angle from the first component towards the second",
                               {},      -6.2831853071795865, 6.2831853071795865};

// A motion to be loaded.
struct Wanted {
  fs::path file;
  std::string name;  // empty: from the file name
  double factor = 1;
  RecordHints hints;
  std::vector<ProcessStep> process;
  std::optional<PairedComponent> pair;
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

// Two texts of a key that names a pair of components.
std::vector<ValueReader> two_of(const ValueReader& value) {
  std::vector<ValueReader> items = value.items();
  if (items.size() != 2)
    throw value.wrong(fmt::format("found {} of them", items.size()), "a pair of horizontal components is needed");
  return items;
}

void require_angle(const TableReader& table, const ValueReader& pair) {
  if (!table.find("angle"))
    throw pair.wrong("found two components and no angle",
                     "a building here takes one horizontal component: give `angle`, from the first component towards "
                     "the second, such as angle = \"30 degree\"");
}

// Two components of one file, or one of each of two files, turned by an angle into the one that the building feels.
Wanted pair_of(const TableReader& table, const ValueReader& place, const fs::path& folder, Wanted made) {
  made.place = place;
  made.pair.emplace();
  made.pair->hints = made.hints;
  if (const auto files = table.find("files")) {
    require_angle(table, *files);
    const std::vector<ValueReader> both = two_of(*files);
    made.file = files_named(both[0], folder).at(0);
    made.pair->file = files_named(both[1], folder).at(0);
  } else {
    made.file = made.pair->file = files_named(table.at("file", "name the file of the motion"), folder).at(0);
  }
  if (const auto components = table.find("components")) {
    require_angle(table, *components);
    const std::vector<ValueReader> both = two_of(*components);
    made.hints.component = both[0].text();
    made.pair->hints.component = both[1].text();
  }
  made.pair->angle = table.quantity(pair_angle);
  return made;
}

void add_table(TableReader table, const ValueReader& place, const fs::path& folder, const Wanted& suite,
               std::vector<Wanted>& wanted) {
  table.known_keys({"file", "component", "units", "step", "factor", "first_sample_at", "name", "files", "components",
                    "angle", "process"});
  Wanted made = suite;
  made.place = place;
  made.hints = hints_of(table, suite.hints);
  made.hints.first_sample_at = table.quantity_if_given(first_sample_at);
  if (const auto component = table.find("component")) made.hints.component = component->text();
  made.name = table.text_or("name", "");
  made.factor = factor_of(table);
  if (const auto steps = table.find("process")) made.process = read_process(*steps);
  if (table.find("files") || table.find("components")) {
    wanted.push_back(pair_of(table, place, folder, std::move(made)));
    return;
  }
  const std::vector<fs::path> files = files_named(table.at("file", "name the file of the motion"), folder);
  if (!made.name.empty() && files.size() > 1)
    throw table.at("name", "")
        .wrong(fmt::format("found one name for {} files", files.size()), "a name is for one file");
  for (const fs::path& one : files) {
    made.file = one;
    wanted.push_back(made);
  }
}

std::vector<Wanted> wanted_motions(const TableReader& suite, const fs::path& folder) {
  const ValueReader value = suite.at("motions", "list the files of the motions, such as [\"motions/*.csv\"]");
  Wanted common{{}, "", 1, hints_of(suite, {}), {}, {}, value};
  if (const auto steps = suite.find("process")) common.process = read_process(*steps);
  std::vector<Wanted> wanted;
  for (const ValueReader& item : value.items()) {
    if (item.node().kind == NodeKind::table)
      add_table(TableReader(item), item, folder, common, wanted);
    else if (item.node().kind == NodeKind::text)
      for (const fs::path& file : files_named(item, folder)) {
        wanted.push_back(common);
        wanted.back().file = file;
        wanted.back().place = item;
      }
    else
      throw item.wrong_type("a path, a pattern or a table { file = \"...\", units = \"g\" } is needed");
  }
  if (wanted.empty()) throw value.wrong("found an empty list", "list at least one motion, or leave [suite] out");
  return wanted;
}

}  // namespace

TableReader suite_table(const ValueReader& value) {
  TableReader table(value);
  table.known_keys({"motions", "units", "step", "factors", "process"});
  return table;
}

std::vector<MotionSource> read_suite(const TableReader& suite, const fs::path& folder) {
  std::vector<Wanted> wanted = wanted_motions(suite, folder);
  name_by_file(wanted, "motion");
  std::vector<MotionSource> sources;
  for (const Wanted& motion : wanted)
    sources.push_back({motion.file, motion.name, motion.factor, motion.hints, motion.process, motion.pair});
  return sources;
}

}  // namespace pilotis
