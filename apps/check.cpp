// `pilotis check`: what the program understood of a study, a building file or a record, before anything is run.
#include <fmt/format.h>

#include <cstdio>
#include <memory>

#include "apps/check_show.hpp"
#include "apps/commands.hpp"
#include "core/error.hpp"
#include "integrators/catalogue.hpp"
#include "io/records/components.hpp"
#include "io/records/file.hpp"
#include "io/study/building_file.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;

struct Options {
  std::vector<std::string> files;
  std::string unit;
  std::string step, first_sample_at;  // as typed: a number of seconds
  bool json = false;
};

// What is told of one file; whole, or an error.
struct Told {
  std::string text;
  nlohmann::ordered_json json;
  std::vector<std::string> notes;
};

// A study or a building file by its name, or by a [building] or [[story]] line.
bool is_toml(const fs::path& file) {
  if (file.extension() == ".toml") return true;
  const std::string content = content_of(file);
  return content.starts_with("[building]") || content.starts_with("[[story]]") ||
         content.find("\n[building]") != std::string::npos || content.find("\n[[story]]") != std::string::npos;
}

double seconds(const std::string& text, const char* option, bool zero_allowed) {
  const Parameter parameter{option, Dimension::time, "the time", {}, 0.0, 1e300, zero_allowed};
  std::size_t used = 0;
  double value = 0;
  try {
    value = std::stod(text, &used);
  } catch (const std::exception&) {
  }
  if (used == 0 || used != text.size())
    throw input_error(option, fmt::format("found \"{}\"", text), "a number of seconds is needed, such as 0.01");
  require_allowed(parameter, value, option);
  return value;
}

RecordHints hints_of(const Options& options) {
  RecordHints hints;
  if (!options.unit.empty()) {
    si_factor(options.unit, Dimension::acceleration, "--units");
    hints.unit = options.unit;
  }
  if (!options.step.empty()) hints.step = seconds(options.step, "--step", false);
  if (!options.first_sample_at.empty())
    hints.first_sample_at = seconds(options.first_sample_at, "--first-sample-at", true);
  return hints;
}

Told told_of_building_file(const fs::path& file) {
  Told told;
  const StudyBuilding building = read_building_file(file, told.notes);
  told.text = building_file_text(building);
  told.json = building_file_json(building);
  told.json["notes"] = told.notes;
  return told;
}

Told told_of_toml(const fs::path& file, const RecordHints& hints) {
  if (hints.unit || hints.step || hints.first_sample_at)
    throw input_error(file.string(), "--units, --step and --first-sample-at are for records, and this is none",
                      "state them in the [suite] of the study");
  if (is_building_file(file)) return told_of_building_file(file);
  const Study study = read_study(file, scheme_catalogue());
  return {study_text(study), study_json(study), study.notes};
}

Told told_of_record(const fs::path& path, const RecordHints& hints) {
  const FileOfRecords file = read_record_file(path, hints);
  Told told{record_text(path.string(), file), record_json(path.string(), file), {}};
  for (const std::string& note : file.notes) told.notes.push_back(fmt::format("{}: {}", path.string(), note));
  for (const RecordComponent& component : file.components)
    for (const std::string& note : component.notes)
      told.notes.push_back(fmt::format("{}: {}: {}", path.string(), component_label(component), note));
  return told;
}

nlohmann::ordered_json error_json(const std::string& file, const Error& error) {
  return {{"file", file},
          {"kind", "error"},
          {"where", error.where()},
          {"found", error.problem()},
          {"allowed", error.remedy()}};
}

// Tells of each file in turn; a bad one does not keep the others from being told.
int check(const Options& options) {
  const RecordHints hints = hints_of(options);
  int status = all_hold;
  std::string text;
  nlohmann::ordered_json list = nlohmann::ordered_json::array();
  for (const std::string& file : options.files) {
    try {
      const Told told = is_toml(file) ? told_of_toml(file, hints) : told_of_record(file, hints);
      text += (text.empty() ? "" : "\n") + told.text;
      list.push_back(told.json);
      for (const std::string& note : told.notes) fmt::print(stderr, "note: {}\n", note);
    } catch (const Error& error) {
      fmt::print(stderr, "pilotis: {}\n", error.what());
      list.push_back(error_json(file, error));
      status = std::max<int>(status, error.kind() == ErrorKind::input ? wrong_input : outside_failed);
    }
  }
  fmt::print("{}", options.json ? list.dump(2, ' ', false, nlohmann::json::error_handler_t::replace) + "\n" : text);
  return status;
}

}  // namespace

void add_check(CLI::App& app, int& status) {
  CLI::App* command = app.add_subcommand(
      "check", "tell what is understood of a study, a building file or a record, without running it");
  auto options = std::make_shared<Options>();
  command->add_option("FILE", options->files, "study files and building files (TOML), records of ground motion")
      ->required();
  command->add_option("--units", options->unit,
                      "acceleration unit of a record that does not state it: g, m/s2, cm/s2, gal, ...");
  command->add_option("--step", options->step, "time step in s of a record that does not state it");
  command->add_option("--first-sample-at", options->first_sample_at, "time in s of the first sample of a record");
  command->add_flag("--json", options->json, "print a JSON list, one entry a file, numbers in SI");
  command->footer("Example:\n  pilotis check data-demo/clinic.toml\n  pilotis check --units g --step 0.01 motion.txt");
  command->callback([options, &status] { status = check(*options); });
}

}  // namespace pilotis
