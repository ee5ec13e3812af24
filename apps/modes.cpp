// `pilotis modes`: periods, shapes, participation and effective masses of a building.
#include <fmt/format.h>

#include <cstdio>
#include <memory>
#include <nlohmann/json.hpp>

#include "apps/buildings.hpp"
#include "apps/commands.hpp"
#include "apps/text_table.hpp"
#include "integrators/catalogue.hpp"
#include "io/study/building_file.hpp"
#include "io/study/study.hpp"

namespace pilotis {

namespace {

using Json = nlohmann::ordered_json;

struct Options {
  std::string file, building;
  int shapes = 5;
  bool json = false;
};

double total_mass(const BuildingSummary& building) {
  double total = 0;
  for (double mass : building.masses) total += mass;
  return total;
}

std::string modes_table(const BuildingSummary& building, const StudyUnits& units) {
  const double mass_unit = units.factor(Dimension::mass), total = total_mass(building);
  TextTable table({{"mode"},
                   {"period (s)"},
                   {"frequency (Hz)"},
                   {"participation (-)"},
                   {fmt::format("effective mass ({})", units.name(Dimension::mass))},
                   {"of total (%)"},
                   {"summed (%)"},
                   {"damping (%)"}});
  double sum = 0;
  for (std::size_t j = 0; j < building.modes.size(); ++j) {
    const Mode& mode = building.modes[j];
    sum += mode.effective_mass;
    table.add_row({fmt::format("{}", j + 1), fmt::format("{:.4f}", mode.period), fmt::format("{:.4f}", 1 / mode.period),
                   fmt::format("{:.4f}", mode.participation), fmt::format("{:.5g}", mode.effective_mass / mass_unit),
                   fmt::format("{:.2f}", 100 * mode.effective_mass / total), fmt::format("{:.2f}", 100 * sum / total),
                   fmt::format("{:.3f}", 100 * mode.damping_ratio)});
  }
  return table.text();
}

std::string shapes_table(const BuildingSummary& building, int shown) {
  const std::size_t count = std::min<std::size_t>(shown, building.modes.size());
  std::vector<TextTable::Column> columns{{"floor"}};
  for (std::size_t j = 0; j < count; ++j) columns.push_back({fmt::format("mode {}", j + 1)});
  TextTable table(columns);
  for (std::size_t floor = building.masses.size(); floor-- > 0;) {
    std::vector<std::string> row{fmt::format("{}", floor + 1)};
    for (std::size_t j = 0; j < count; ++j) row.push_back(fmt::format("{:.4f}", building.modes[j].shape[floor]));
    table.add_row(row);
  }
  return table.text();
}

// The building that is meant, and the units to show it in.
struct Chosen {
  StudyBuilding building;
  StudyUnits units;
};

void print_text(const Chosen& chosen, const BuildingSummary& building, int shapes) {
  const StudyUnits& units = chosen.units;
  fmt::print("{}: modes at the initial stiffness{}\n\n{}\n", building.title,
             chosen.building.stick.p_delta ? ", P-Delta included" : "", modes_table(building, units));
  fmt::print("total mass {:.5g} {}; shapes have the largest magnitude 1 and go with the participation factors\n\n{}",
             total_mass(building) / units.factor(Dimension::mass), units.name(Dimension::mass),
             shapes_table(building, shapes));
}

void print_json(const Chosen& chosen, const BuildingSummary& building) {
  Json json{{"title", building.title},
            {"building", chosen.building.name},
            {"p_delta", chosen.building.stick.p_delta},
            {"total_mass_kg", total_mass(building)},
            {"modes", Json::array()}};
  for (const Mode& mode : building.modes)
    json["modes"].push_back({{"period_s", mode.period},
                             {"participation", mode.participation},
                             {"effective_mass_kg", mode.effective_mass},
                             {"damping_ratio", mode.damping_ratio},
                             {"shape", mode.shape}});
  fmt::print("{}\n", json.dump(2));
}

Chosen chosen(const Options& options) {
  if (is_building_file(options.file)) {
    std::vector<std::string> notes;
    const StudyBuilding building = read_building_file(options.file, notes);
    return {building_called({building}, options.building, options.file), building.units};
  }
  const Study study = read_study(options.file, scheme_catalogue());
  return {building_called(study.buildings, options.building, options.file), study.units};
}

void show_modes(const Options& options) {
  const Chosen shown = chosen(options);
  const BuildingSummary building = assembled(shown.building).summary;
  if (options.json)
    print_json(shown, building);
  else
    print_text(shown, building, options.shapes);
}

}  // namespace

void add_modes(CLI::App& app, int& status) {
  const auto options = std::make_shared<Options>();
  CLI::App* command = app.add_subcommand("modes", "Periods, shapes, participation and effective modal masses");
  command->add_option("study", options->file, "study file or building file (TOML)")->required();
  command->add_option("--building", options->building, "which building, by name, of a study with several");
  command->add_option("--shapes", options->shapes, "how many shapes to print")
      ->capture_default_str()
      ->check(CLI::NonNegativeNumber);
  command->add_flag("--json", options->json, "the same facts for a script");
  command->footer("Example: pilotis modes data-demo/study.toml");
  command->callback([options, &status] {
    show_modes(*options);
    status = all_hold;
  });
}

}  // namespace pilotis
