#include "core/units/units.hpp"

#include <fmt/format.h>
#include <udunits2.h>

#include <array>
#include <cmath>
#include <mutex>
#include <optional>

#include "core/error.hpp"
#include "core/units/trade_names.hpp"

namespace pilotis {

namespace {

struct DimensionFacts {
  Dimension dimension;
  const char* si;         // as shown
  const char* si_parsed;  // as UDUNITS-2 reads it
  const char* name;
  const char* examples;  // for messages
};

constexpr std::array<DimensionFacts, 16> facts{{
    {Dimension::none, "1", "1", "a plain number", "1, %"},
    {Dimension::length, "m", "m", "length", "m, cm, mm, in, ft"},
    {Dimension::time, "s", "s", "time", "s, ms"},
    {Dimension::mass, "kg", "kg", "mass", "kg, t, Mg, kN s2/m, kip s2/in, slug"},
    {Dimension::force, "N", "N", "force", "N, kN, MN, kgf, tf, lbf, kip"},
    {Dimension::stiffness, "N/m", "N/m", "stiffness (force/length)", "N/m, kN/m, kN/mm, kip/in"},
    {Dimension::dashpot, "N s/m", "N s/m", "dashpot coefficient (force time/length)", "N s/m, kN s/m, kip s/in"},
    {Dimension::velocity, "m/s", "m/s", "velocity", "m/s, cm/s, mm/s, in/s"},
    {Dimension::acceleration, "m/s2", "m/s2", "acceleration", "g, m/s2, cm/s2, mm/s2, gal, in/s2"},
    {Dimension::moment, "N m", "N m", "moment (force length)", "N m, kN m, kip ft"},
    {Dimension::per_time, "1/s", "1/s", "rate (1/time)", "1/s"},
    {Dimension::frequency, "Hz", "Hz", "frequency", "Hz, mHz, kHz"},
    {Dimension::stress, "Pa", "Pa", "stress (force/area)", "Pa, kPa, MPa, bar"},
    {Dimension::density, "kg/m3", "kg/m3", "density (mass/volume)", "kg/m3, t/m3, g/cm3"},
    {Dimension::slowness, "s/m", "s/m", "time/distance", "s/km, s/m"},
    {Dimension::spectral_density, "m2/s3", "m2/s3", "spectral density of an acceleration, per rad/s", "m2/s3, cm2/s3"},
}};

const DimensionFacts& facts_of(Dimension dimension) { return facts[static_cast<std::size_t>(dimension)]; }

// The parsed unit database. UDUNITS-2 is not safe for threads: whoever touches it holds `mutex`. Never freed: units may
// be asked for until the very end of the program.
struct Database {
  std::mutex mutex;
  ut_system* system = nullptr;
};

void add_name(ut_system* system, const char* name, const char* meaning) {
  ut_unit* unit = ut_parse(system, meaning, UT_UTF8);
  if (unit == nullptr || ut_map_name_to_unit(name, UT_UTF8, unit) != UT_SUCCESS)
    throw outside_error("UDUNITS-2 unit database", fmt::format("it cannot express {} as {}", name, meaning),
                        "install the package libudunits2-data");
  ut_free(unit);
}

// The caller holds the mutex.
ut_system* opened(Database& database) {
  if (database.system != nullptr) return database.system;
  ut_set_error_message_handler(ut_ignore);
  ut_system* system = ut_read_xml(nullptr);
  if (system == nullptr)
    throw outside_error("UDUNITS-2 unit database", "it cannot be read",
                        "install the package libudunits2-data, or unset UDUNITS2_XML_PATH");
  for (const auto& [name, meaning] : added_names()) add_name(system, name, meaning);
  return database.system = system;
}

Database& the_database() {
  static Database* database = new Database;
  return *database;
}

// Factor of a converter that only scales; empty for offsets (temperatures), logarithms and reciprocals, all of which
// UDUNITS-2 counts as convertible.
std::optional<double> scale_of(const cv_converter* converter) {
  const double one = cv_convert_double(converter, 1.0);
  const bool scales = cv_convert_double(converter, 0.0) == 0.0 &&
                      std::abs(cv_convert_double(converter, 2.0) - 2 * one) <= 1e-12 * std::abs(one);
  return scales && std::isfinite(one) && one > 0 ? std::optional(one) : std::nullopt;
}

// UDUNITS-2 counts an angle as a plain number, so that rad/s would pass for Hz, wrong by 2 pi.
bool holds_an_angle(const ut_unit* unit) {
  std::array<char, 128> text{};
  const int length = ut_format(unit, text.data(), text.size(), UT_ASCII | UT_DEFINITION);
  return length < 0 || std::string_view(text.data()).find("rad") != std::string_view::npos;
}

enum class Answer { scales, other_dimension, unknown };

struct Reading {
  Answer answer = Answer::unknown;
  double factor = 0;
};

// Reads `text` as UDUNITS-2 does, trade names already replaced.
Reading read_plainly(const std::string& text, Dimension dimension) {
  Database& database = the_database();
  const std::lock_guard lock(database.mutex);
  ut_system* system = opened(database);
  ut_unit* unit = ut_parse(system, text.c_str(), UT_UTF8);
  if (unit == nullptr) return {};
  ut_unit* si = ut_parse(system, facts_of(dimension).si_parsed, UT_UTF8);
  Reading reading{Answer::other_dimension};
  const bool angular = dimension == Dimension::frequency && holds_an_angle(unit);
  if (!angular && ut_are_convertible(unit, si)) {
    cv_converter* converter = ut_get_converter(unit, si);
    if (const auto factor = scale_of(converter)) reading = {Answer::scales, *factor};
    cv_free(converter);
  }
  ut_free(unit);
  ut_free(si);
  return reading;
}

// A number in front would multiply silently ("2 kN"), and nothing at all would be 1.
bool starts_like_a_unit(std::string_view unit) {
  return !unit.empty() && std::string_view("0123456789+-.").find(unit.front()) == std::string_view::npos;
}

Reading read_unit(std::string_view unit, Dimension dimension) {
  const std::string_view bare = trimmed(unit);
  const bool per = bare.starts_with("1/") || (bare == "1" && dimension == Dimension::none);
  if (!per && !starts_like_a_unit(bare)) return {};
  if (!ambiguous_name(bare).empty()) return {};
  const Reading reading = read_plainly(with_trade_names(bare, dimension), dimension);
  if (reading.answer == Answer::scales) return reading;
  // "lb" stays a mass where a mass is meant, and is a force where only a force makes sense ("lb/in" of a spring).
  const std::string as_force = with_pound_as_force(bare);
  const Reading again = as_force == bare ? reading : read_plainly(as_force, dimension);
  return again.answer == Answer::scales ? again : reading;
}

}  // namespace

std::string_view si_unit(Dimension dimension) { return facts_of(dimension).si; }
std::string_view dimension_name(Dimension dimension) { return facts_of(dimension).name; }

double si_factor(std::string_view unit, Dimension dimension, const std::string& where) {
  const Reading reading = read_unit(unit, dimension);
  if (reading.answer == Answer::scales) return reading.factor;
  const DimensionFacts& wanted = facts_of(dimension);
  const std::string allowed = fmt::format("a unit of {} is needed, such as {}", wanted.name, wanted.examples);
  if (const auto advice = ambiguous_name(trimmed(unit)); !advice.empty())
    throw input_error(where,
                      fmt::format("found the unit \"{}\", which means different things to different people", unit),
                      fmt::format("{}; {}", advice, allowed));
  if (reading.answer == Answer::other_dimension)
    throw input_error(where, fmt::format("found the unit \"{}\", which is not a unit of {}", unit, wanted.name),
                      allowed);
  throw input_error(where, fmt::format("found the unknown unit \"{}\"", unit), allowed);
}

bool is_unit_of(std::string_view unit, Dimension dimension) {
  return read_unit(unit, dimension).answer == Answer::scales;
}

}  // namespace pilotis
