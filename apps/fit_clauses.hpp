// What a building code asks of the motions that `pilotis fit` leaves: core/motion/target/*_suite.hpp on the command
// line.
#pragma once

#include <CLI/CLI.hpp>
#include <functional>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

#include "apps/target_option.hpp"
#include "apps/terminal.hpp"
#include "core/motion/target/suite_clauses.hpp"

namespace pilotis {

struct TypedCode {
  std::string code;                        // "", "en_1998" or "asce_7_16"
  std::vector<std::string> periods;        // first-mode periods: one, or one in each horizontal direction
  std::string mass_period;                 // of the last mode of 90 % of the mass; empty: not known
  std::string accelerograms = "recorded";  // or "artificial" (EN 1998-1)
  bool matched = false;                    // spectrally matched, not only scaled (ASCE 7-16)
};

// `matching`: the command itself matches, so that nothing is asked about it.
void add_code_options(CLI::App& command, TypedCode& typed, bool matching);

// Of the motions as they are to be used: 5 % damped spectra on the check's periods, peaks (m/s2).
using CodeFindings =
    std::function<std::vector<ClauseFinding>(const SuiteSpectra& suite, const std::vector<double>& peaks)>;

struct CodeCheck {
  std::vector<double> periods;  // s, rising, where it wants the spectra; empty: no code is asked for
  CodeFindings findings;
};

// Periods in equal ratios over a code's range. A fit takes as many where it is not told otherwise, so that over one and
// the same range a mean that is lifted to a share of the target is found there.
constexpr int checked_periods = 200;

// `from`, `to`: s, the range of the fit. `pairs`: motions are pairs of components. Throws Error (input) when what the
// code needs is missing: before anything is computed.
CodeCheck code_check(const TypedCode& typed, const TypedTarget& target, double from, double to, bool pairs,
                     const std::string& command);

// For the screen: a line or two a clause, marks in color, and what it must not be taken for.
std::string findings_text(const std::vector<ClauseFinding>& findings, const ScreenStyle& style);
nlohmann::ordered_json findings_json(const std::vector<ClauseFinding>& findings);
// True when a clause does not hold.
bool any_fails(const std::vector<ClauseFinding>& findings);

}  // namespace pilotis
