#include "io/records/stated.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr double relative_doubt = 1e-9;
constexpr const char* say_it_once = "correct one of them";

bool same_unit(const std::string& a, const std::string& b, const std::string& where) {
  const double factor_a = si_factor(a, Dimension::acceleration, where);
  const double factor_b = si_factor(b, Dimension::acceleration, where);
  return std::abs(factor_a - factor_b) <= relative_doubt * factor_a;
}

void require_same_time(double hint, const StatedTime& stated, const std::string& what, const std::string& file) {
  if (same_time(hint, stated.seconds)) return;
  throw input_error(at_line(file, stated.line),
                    fmt::format("the file says {} is {} s, the study says {} s", what, stated.seconds, hint),
                    say_it_once);
}

}  // namespace

bool same_time(double a, double b) { return std::abs(a - b) <= relative_doubt * std::max(std::abs(a), std::abs(b)); }

void state_unit(Statements& statements, StatedUnit found, const std::string& file) {
  const std::string where = at_line(file, found.line);
  si_factor(found.unit, Dimension::acceleration, where);
  if (statements.unit && !same_unit(statements.unit->unit, found.unit, where))
    throw input_error(where,
                      fmt::format("found the unit {}, but line {} says {}", in_quotes(found.unit),
                                  statements.unit->line, in_quotes(statements.unit->unit)),
                      say_it_once);
  if (!statements.unit) statements.unit = std::move(found);
}

void state_time(std::optional<StatedTime>& stated, StatedTime found, const std::string& what, const std::string& file) {
  if (stated && !same_time(stated->seconds, found.seconds))
    throw input_error(
        at_line(file, found.line),
        fmt::format("found {} s for {}, but line {} says {} s", found.seconds, what, stated->line, stated->seconds),
        say_it_once);
  if (!stated) stated = found;
}

std::string agreed_unit(const Statements& file_says, const RecordHints& study_says, const std::string& file) {
  const auto& stated = file_says.unit;
  if (!stated && !study_says.unit)
    throw input_error(file, "neither the file nor the study says the unit of the acceleration",
                      "write e.g. the line \"# units: g\" above the numbers, or units = \"g\" beside the file in the "
                      "study");
  if (!stated) {
    si_factor(*study_says.unit, Dimension::acceleration, file);
    return *study_says.unit;
  }
  if (study_says.unit && !same_unit(*study_says.unit, stated->unit, file))
    throw input_error(at_line(file, stated->line),
                      fmt::format("the file says the unit is {}, the study says {}", in_quotes(stated->unit),
                                  in_quotes(*study_says.unit)),
                      say_it_once);
  return stated->unit;
}

double agreed_step(const Statements& file_says, const RecordHints& study_says, const std::string& file) {
  const auto& stated = file_says.step;
  if (stated && study_says.step) require_same_time(*study_says.step, *stated, "the step", file);
  if (!stated && !study_says.step)
    throw input_error(file, "neither the file nor the study says the time step",
                      "write e.g. the line \"# step: 0.02 s\" above the numbers, or step = 0.02 beside the file in the "
                      "study");
  const double step = stated ? stated->seconds : *study_says.step;
  if (!std::isfinite(step) || step <= 0)
    throw input_error(stated ? at_line(file, stated->line) : file, fmt::format("found a time step of {} s", step),
                      "it must be finite and greater than 0 s");
  return step;
}

double agreed_first_sample(const Statements& file_says, const RecordHints& study_says, double step,
                           const std::string& file, std::vector<std::string>& notes) {
  const auto& stated = file_says.first_sample_at;
  const auto& hint = study_says.first_sample_at;
  if (stated && hint) require_same_time(*hint, *stated, "the time of the first sample", file);
  if (!stated && !hint) {
    notes.push_back("nothing says when the first sample is: taken at 0 s");
    return 0;
  }
  const double at = stated ? stated->seconds : *hint;
  if (at == 0) return 0;
  if (same_time(at, step)) return step;
  throw input_error(stated ? at_line(file, stated->line) : file, fmt::format("found the first sample at {} s", at),
                    fmt::format("it must be at 0 s or at one step, {} s", step));
}

}  // namespace pilotis
