#include "apps/fit_clauses.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "apps/text_layout.hpp"
#include "apps/typed_values.hpp"
#include "core/error.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "core/motion/target/asce_7_16.hpp"
#include "core/motion/target/asce_7_16_suite.hpp"
#include "core/motion/target/en_1998_suite.hpp"

namespace pilotis {

namespace {

constexpr double code_damping = 0.05;

double positive_period(const std::string& text, const std::string& where) {
  const double period = typed_quantity(text, Dimension::time, where);
  if (!(period > 0)) throw input_error(where, fmt::format("found {:g} s", period), "it must be greater than 0 s");
  return period;
}

CodeCheck en_1998_check(const TypedCode& typed, const TypedTarget& target, bool pairs, const std::string& command) {
  if (pairs)
    throw input_error(command + " --code", "found pairs of components",
                      "EN 1998-1:2004, 3.2.3.1.2 speaks of one horizontal component: give single records");
  const En1998Elastic code = En1998Elastic::make(target_values(En1998Elastic::method, target, code_damping, command));
  En1998Suite suite;
  suite.fundamental_period = positive_period(typed.periods.front(), command + " --period");
  suite.kind =
      typed.accelerograms == "artificial" ? AccelerogramKind::artificial : AccelerogramKind::recorded_or_simulated;
  const double T1 = suite.fundamental_period;
  return {period_grid(0.2 * T1, 2 * T1, checked_periods, command + " --period"),
          [code, suite, command](const SuiteSpectra& spectra, const std::vector<double>& peaks) mutable {
            suite.spectra = spectra;
            suite.peak_accelerations = peaks;
            std::vector<ClauseFinding> findings = check_en_1998_suite(suite, code, command);
            const auto count = static_cast<int>(peaks.size());
            findings.push_back({"EN 1998-1:2004, 4.3.3.4.3(3)", "at least 7 motions to use the mean of a response",
                                ClauseResult::cannot_be_judged,
                                fmt::format("{} motions: use {}", count,
                                            en_1998_mean_response_allowed(count) ? "the mean of each response"
                                                                                 : "the most unfavorable response")});
            return findings;
          }};
}

// 16.2.1 takes the MCE_R spectrum: the general one, or the user's own table.
TargetSpectrum mcer_of(const TypedTarget& target, const std::string& command) {
  if (!target.file.empty()) return target_of(target, code_damping, command);
  return Asce716Mcer::make(target_values(Asce716Mcer::method, target, code_damping, command)).spectrum();
}

CodeCheck asce_7_16_check(const TypedCode& typed, const TypedTarget& target, double from, double to, bool pairs,
                          const std::string& command) {
  if (!pairs)
    throw input_error(command + " --code", "found single records",
                      "ASCE/SEI 7-16, 16.2 takes the maximum direction of pairs of components: give each as A+B");
  Asce716Suite suite;
  suite.fit = typed.matched ? MotionFit::spectrally_matched : MotionFit::amplitude_scaled;
  suite.range_begin = from;
  suite.range_end = to;
  suite.first_period_x = positive_period(typed.periods.front(), command + " --period");
  suite.first_period_y = positive_period(typed.periods.back(), command + " --period");
  if (!typed.mass_period.empty())
    suite.period_of_90_percent_mass = positive_period(typed.mass_period, command + " --mass-period");
  return {period_grid(from, to, checked_periods, command + " --from"),
          [suite, code = mcer_of(target, command), command](const SuiteSpectra& spectra,
                                                            const std::vector<double>&) mutable {
            suite.maximum_direction = spectra;
            return check_asce_7_16_suite(suite, code, command);
          }};
}

std::string mark(ClauseResult result, const ScreenStyle& style) {
  const std::string word = left(std::string(clause_result_word(result)), 16);
  if (result == ClauseResult::holds) return painted(word, Tone::good, style);
  return painted(word, result == ClauseResult::does_not_hold ? Tone::bad : Tone::warning, style);
}

}  // namespace

void add_code_options(CLI::App& command, TypedCode& typed, bool matching) {
  command.add_option("--code", typed.code, "checks what a code asks of the motions: en_1998 or asce_7_16")
      ->check(CLI::IsMember({"en_1998", "asce_7_16"}));
  command
      .add_option("--period", typed.periods,
                  "first-mode period of the building, or two for its two directions; a bare number is in s")
      ->expected(1, 2);
  command.add_option("--mass-period", typed.mass_period,
                     "asce_7_16: period of the last mode needed for 90 % of the mass; a bare number is in s");
  command
      .add_option("--accelerograms", typed.accelerograms, "en_1998: recorded (or simulated), or artificial [recorded]")
      ->check(CLI::IsMember({"recorded", "artificial"}));
  typed.matched = matching;
  if (!matching)
    command.add_flag("--matched", typed.matched, "asce_7_16: the records given are spectrally matched (16.2.3.3)");
}

CodeCheck code_check(const TypedCode& typed, const TypedTarget& target, double from, double to, bool pairs,
                     const std::string& command) {
  if (typed.code.empty()) return {};
  if (typed.periods.empty())
    throw input_error(command + " --code", "--period is missing", "give the building's first-mode period");
  return typed.code == "en_1998" ? en_1998_check(typed, target, pairs, command)
                                 : asce_7_16_check(typed, target, from, to, pairs, command);
}

std::string findings_text(const std::vector<ClauseFinding>& findings, const ScreenStyle& style) {
  constexpr std::size_t indent = 20;
  const std::size_t width = static_cast<std::size_t>(style.width) - indent;
  std::string text;
  for (const ClauseFinding& finding : findings) {
    std::string begin = "  " + mark(finding.result, style) + "  ";
    for (const std::string& part : {finding.clause + ": " + finding.required, "found: " + finding.found})
      for (const std::string& line : wrapped(part, width)) {
        text += begin + line + "\n";
        begin = std::string(indent, ' ');
      }
  }
  const std::string caution =
      "The clauses stand here as remembered: compare them with your copy of the code, its edition, amendments and "
      "national annex. The site's numbers are yours. What must be checked, and whether it is met, a licensed engineer "
      "decides.";
  for (const std::string& line : wrapped(caution, static_cast<std::size_t>(style.width) - 2))
    text += "  " + painted(line, Tone::quiet, style) + "\n";
  return text;
}

nlohmann::ordered_json findings_json(const std::vector<ClauseFinding>& findings) {
  nlohmann::ordered_json list = nlohmann::ordered_json::array();
  for (const ClauseFinding& finding : findings)
    list.push_back({{"clause", finding.clause},
                    {"required", finding.required},
                    {"result", clause_result_word(finding.result)},
                    {"found", finding.found}});
  return list;
}

bool any_fails(const std::vector<ClauseFinding>& findings) {
  return std::any_of(findings.begin(), findings.end(),
                     [](const ClauseFinding& f) { return f.result == ClauseResult::does_not_hold; });
}

}  // namespace pilotis
