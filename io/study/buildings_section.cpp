// The buildings of a study: its own, or those of the building files it lists.
#include <fmt/format.h>

#include <optional>

#include "io/study/building_file.hpp"
#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"
#include "io/study/unique_names.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

// A building file to be read.
struct Wanted {
  fs::path file;
  std::string name;   // empty: from the file name
  ValueReader place;  // for messages

  std::string full_name() const { return file.filename().string(); }
};

void add_table(TableReader table, const ValueReader& place, const fs::path& folder, std::vector<Wanted>& wanted) {
  table.known_keys({"file", "name"});
  const ValueReader file = table.at("file", "name the building file");
  const std::string name = table.text_or("name", "");
  const std::vector<fs::path> files = files_named(file, folder);
  if (!name.empty() && files.size() > 1)
    throw table.at("name", "")
        .wrong(fmt::format("found one name for {} files", files.size()), "a name is for one file");
  for (const fs::path& one : files) wanted.push_back({one, name, place});
}

std::vector<Wanted> wanted_buildings(const ValueReader& value, const fs::path& folder) {
  std::vector<Wanted> wanted;
  for (const ValueReader& item : value.items()) {
    if (item.node().kind == NodeKind::table)
      add_table(TableReader(item), item, folder, wanted);
    else if (item.node().kind == NodeKind::text)
      for (const fs::path& file : files_named(item, folder)) wanted.push_back({file, "", item});
    else
      throw item.wrong_type("a path, a pattern or a table { file = \"...\", name = \"...\" } is needed");
  }
  if (wanted.empty())
    throw value.wrong("found an empty list", "list at least one building file, or give [building] and [[story]]");
  name_by_file(wanted, "building");
  return wanted;
}

void refuse_a_building_of_its_own(const TableReader& root) {
  for (const char* key : {"building", "story"})
    if (const auto own = root.find(key))
      throw own->wrong("found a building in a study that lists building files under \"buildings\"",
                       "give one or the other");
}

StudyBuilding own_building(const TableReader& root, const Study& study) {
  return {root.text_or("title", "building"), {}, {}, study.title, study.units, read_building(root)};
}

}  // namespace

std::vector<StudyBuilding> read_buildings(const TableReader& root, const Study& study,
                                          std::vector<std::string>& notes) {
  const auto list = root.find("buildings");
  if (!list) return {own_building(root, study)};
  refuse_a_building_of_its_own(root);
  std::vector<StudyBuilding> buildings;
  for (const Wanted& wanted : wanted_buildings(*list, study.file.parent_path())) {
    buildings.push_back(read_building_file(wanted.file, notes));
    buildings.back().name = wanted.name;
  }
  return buildings;
}

}  // namespace pilotis
