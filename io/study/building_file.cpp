#include "io/study/building_file.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"
#include "io/study/toml_tree.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

const char* const wanted = "the path of a building file (TOML) is needed";

// The keys that only a study has.
constexpr std::array<std::string_view, 7> study_keys{"buildings", "suite", "force", "initial",
                                                     "march",     "keep",  "limit"};

bool only_of_a_study(const Node::Entry& entry) {
  return std::find(study_keys.begin(), study_keys.end(), entry.key) != study_keys.end();
}

void refuse_a_study(const TableReader& root, const Node& tree) {
  const auto found = std::find_if(tree.entries.begin(), tree.entries.end(), only_of_a_study);
  if (found == tree.entries.end()) return;
  throw root.at(found->key, "")
      .wrong(fmt::format("found \"{}\": this is a whole study, and a building file is needed", found->key),
             "a building file has title, [units], [building] and [[story]], nothing else");
}

}  // namespace

StudyBuilding read_building_file(const fs::path& file, std::vector<std::string>& notes) {
  StudyBuilding building;
  building.file = file;
  building.text = read_whole(file, wanted);
  building.name = file.stem().string();
  StudySource source{file.string(), {}};
  const Node tree = parse_toml(building.text, source.file);
  TableReader root(source, tree, 1, "");
  refuse_a_study(root, tree);
  root.known_keys({"title", "units", "building", "story"});
  building.title = root.text_or("title", building.name);
  building.units = source.units = read_units(root, notes);
  building.stick = read_building(root);
  return building;
}

bool is_building_file(const fs::path& file) {
  const Node tree =
      parse_toml(read_whole(file, "the path of a study or building file (TOML) is needed"), file.string());
  const bool building = tree.find("building") != nullptr || tree.find("story") != nullptr;
  return building && std::none_of(tree.entries.begin(), tree.entries.end(), only_of_a_study);
}

}  // namespace pilotis
