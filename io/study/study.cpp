#include "io/study/study.hpp"

#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"
#include "io/study/toml_tree.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

// The suite is read in two parts: its factors with the study itself, its files when all else has been found good.
std::optional<TableReader> suite_of(const TableReader& root) {
  const auto value = root.find("suite");
  return value ? std::optional(suite_table(*value)) : std::nullopt;
}

void read_loads(const TableReader& root, const fs::path& folder, Study& study) {
  study.forces = read_forces(root, study.buildings, folder);
  if (const auto value = root.find("initial")) {
    const InitialState state = read_initial(TableReader(*value), study.buildings);
    study.initial_displacement = state.displacement;
    study.initial_velocity = state.velocity;
  }
}

// Before the motions are loaded: a study without anything to do should say so at once.
void require_something_to_do(const TableReader& root) {
  if (!root.has("suite") && !root.has("force") && !root.has("initial"))
    throw root.wrong("the study has no motion, no floor force and no initial state: nothing would move",
                     "give [suite], [[force]] or [initial]");
}

void require_an_end(const TableReader& root, const Study& study) {
  if (study.motions.empty() && study.forces.empty() && !study.march.duration)
    throw root.wrong("the study has an initial state only, so nothing tells when a run ends",
                     "give [march] duration = \"20 s\"");
}

// Motions last: loading them takes longest, and what is wrong in the study itself should be told first.
void read_sections(const TableReader& root, std::span<const Method> schemes, StudySource& source, Study& study) {
  study.title = root.text_or("title", study.file.stem().string());
  study.units = source.units = read_units(root, study.notes);
  study.buildings = read_buildings(root, study, study.notes);
  require_something_to_do(root);
  const auto march = root.find("march");
  study.march = march ? read_march(TableReader(*march), schemes) : default_march(schemes);
  if (const auto keep = root.find("keep")) study.keep = read_keep(TableReader(*keep));
  const fs::path folder = study.file.parent_path();
  read_loads(root, folder, study);
  const auto suite = suite_of(root);
  study.factors = suite ? read_factors(*suite) : std::vector<double>{1.0};
  study.limits = read_limits(root, study.factors);
  if (suite) study.motions = MotionStore(read_suite(*suite, folder));
  study.notes.insert(study.notes.end(), study.motions.notes().begin(), study.motions.notes().end());
  require_an_end(root, study);
}

}  // namespace

Study read_study(const fs::path& file, std::span<const Method> schemes) {
  Study study;
  study.file = file;
  study.text = read_whole(file, "the path of a study file (TOML) is needed");
  StudySource source{file.string(), {}};
  const Node tree = parse_toml(study.text, source.file);
  TableReader root(source, tree, 1, "");
  root.known_keys(
      {"title", "units", "buildings", "building", "story", "suite", "force", "initial", "march", "keep", "limit"});
  read_sections(root, schemes, source, study);
  return study;
}

}  // namespace pilotis
