// One reader for each section of a study file; study.cpp calls them in order. Each throws Error (input) that names
// file, line, key, what was found and what is allowed.
#pragma once

#include <filesystem>
#include <span>
#include <string>
#include <vector>

#include "io/study/study.hpp"
#include "io/study/table_reader.hpp"

namespace pilotis {

// [units]: force and length, mass if another than force s2/length. Without it SI, which is added to `notes`.
StudyUnits read_units(const TableReader& root, std::vector<std::string>& notes);

// [building] and the [[story]] tables; validated as a whole.
Stick read_building(const TableReader& root);

// `kind` and what goes with it, for a building with this many floors.
Damping read_damping(const ValueReader& value, int floors);

// The spring of a story: a law of law_catalogue() and its parameters.
Law read_spring(const ValueReader& value);

// The buildings of the study: its own, or those of the files under `buildings`. `units` and `title` are the study's.
// Adds what was assumed to `notes`.
std::vector<StudyBuilding> read_buildings(const TableReader& root, const Study& study, std::vector<std::string>& notes);

TableReader suite_table(const ValueReader& value);
// What [suite] asks for, its files found but not read.
std::vector<MotionSource> read_suite(const TableReader& suite, const std::filesystem::path& folder);
// The factors of [suite]; {1} when not given.
std::vector<double> read_factors(const TableReader& suite);

// The [[force]] tables; every building must have their floors.
std::vector<FloorForce> read_forces(const TableReader& root, std::span<const StudyBuilding> buildings,
                                    const std::filesystem::path& folder);

// Times (s) and forces (N, with `factor_to_si`) from two columns of numbers; blank lines and lines that start with #
// are passed over. Throws Error with the file and its line.
FloorForce read_force_file(const std::filesystem::path& file, double factor_to_si);
// Times not negative and rising, at least two; throws Error at `where`.
void require_rising(const FloorForce& force, const std::string& where);

struct InitialState {
  std::vector<double> displacement, velocity;  // m, m/s, [floor]
};
// [initial]; every building must have as many floors.
InitialState read_initial(TableReader table, std::span<const StudyBuilding> buildings);

// [march]
MarchSettings read_march(TableReader table, std::span<const Method> schemes);
// What holds without [march]: the first scheme of the catalogue with its defaults.
MarchSettings default_march(std::span<const Method> schemes);

// The quantities that can be kept, by name.
std::vector<std::string_view> quantity_names();

// [keep]
KeepSettings read_keep(TableReader table);

// The [[limit]] tables; `factors` are those of the study.
std::vector<Limit> read_limits(const TableReader& root, const std::vector<double>& factors);

// The values of a method's parameters, in their order, from a table that may also have the key `name_key`.
std::vector<double> read_parameters(TableReader& table, const Method& method, std::string_view name_key);

// A whole number parameter without dimension.
Parameter whole_number(std::string_view key, std::string_view meaning, double least, double most,
                       std::optional<double> otherwise = {});

}  // namespace pilotis
