// The limits and what became of them, the runs that did not last, and the overall statement.
#include <fmt/format.h>

#include <cmath>

#include "apps/profile.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

// Text on as many lines as it takes, each behind `indent` blanks.
std::string quiet_lines(const std::string& text, std::size_t indent, const ScreenStyle& style) {
  std::string lines;
  for (const std::string& line : wrapped(text, static_cast<std::size_t>(style.width) - indent))
    lines += std::string(indent, ' ') + painted(line, Tone::quiet, style) + "\n";
  return lines;
}

constexpr const char* caution = "Results rest on the model; local codes and licensed practice decide.";

struct Word {
  const char* text;
  Tone tone;
};

Word word_of(const Outcome& outcome) {
  switch (outcome.finding) {
    case Finding::holds:
      return {"HOLDS", Tone::good};
    case Finding::exceeded:
      return {"EXCEEDED", Tone::bad};
    case Finding::too_close:
      return {"TOO CLOSE", Tone::warning};
    case Finding::undetermined:
      return {"UNDETERMINED", Tone::warning};
  }
  return {"", Tone::plain};
}

// "0.80 ± 0.01 %", or what stands for it when there is no such number.
std::string value_text(const Outcome& outcome, const ShownUnit& shown, int decimals, const Signs& signs) {
  if (std::isnan(outcome.value)) return "no value";
  if (std::isinf(outcome.value)) return "beyond (collapse)";
  return fmt::format("{} {} {} {}", number_text(outcome.value / shown.factor, decimals, signs), signs.plus_minus,
                     error_text(outcome.step_error / shown.factor, decimals + (shown.unit == "%")), shown.unit);
}

std::string place_text(const Outcome& outcome, const Limit& limit) {
  if (outcome.place == 0) return "";
  return fmt::format("{} {}", limit.quantity->per == Per::story ? "story" : "floor", outcome.place);
}

// Why the outcome is not plain; empty when it is.
std::string reason_text(const Outcome& outcome) {
  if (outcome.runs == 0) return "no run at this factor";
  std::string text;
  const auto add = [&text](const std::string& part) { text += (text.empty() ? "" : "; ") + part; };
  if (outcome.collapsed > 0)
    add(fmt::format("{} of {} runs collapsed (beyond any limit)", outcome.collapsed, outcome.runs));
  if (outcome.not_converged > 0) add(fmt::format("{} not converged (left out)", outcome.not_converged));
  if (outcome.finding == Finding::too_close)
    add(fmt::format("{} the limit by less than the step error: take a smaller step",
                    outcome.exceeded ? "above" : "below"));
  return text;
}

int decimals_of(const Limit& limit, const ShownUnit& shown) {
  return shown.unit == "%" ? (limit.value < 0.001 ? 4 : 2) : decimals_for(limit.value / shown.factor);
}

std::string outcome_line(const Outcome& outcome, const Limit& limit, const StudyUnits& units,
                         const ScreenStyle& style) {
  const Signs signs(style);
  const ShownUnit shown = shown_unit(*limit.quantity, units);
  const Word word = word_of(outcome);
  const bool has_margin = std::isfinite(outcome.margin);
  const std::string margin = has_margin ? fmt::format("margin {:.0f} %", outcome.margin * 100) : "";
  std::string rest = left(fmt::format("{} {:g} ", signs.times, outcome.factor), 7);
  rest += left(value_text(outcome, shown, decimals_of(limit, shown), signs) + "  ", 20) + left(margin + " ", 13);
  rest += left(place_text(outcome, limit), 9) + outcome.motion;
  const std::string word_cell = left(word.text, 13);
  const std::size_t room = static_cast<std::size_t>(style.width) - 4 - columns_of(word_cell);
  std::string line = "    " + painted(word_cell, word.tone, style) + clipped(rest, room, style) + "\n";
  const std::string reason = reason_text(outcome);
  return line + quiet_lines(reason, 6, style);
}

std::string limit_line(const Limit& limit, const StudyUnits& units, const ScreenStyle& style) {
  const Signs signs(style);
  const ShownUnit shown = shown_unit(*limit.quantity, units);
  const std::string what =
      fmt::format("  {} {} {} {} {}", shown_statistic(limit), shown_name(*limit.quantity), signs.at_most,
                  number_text(limit.value / shown.factor, decimals_of(limit, shown), signs), shown.unit);
  const std::string source = limit.source.empty() ? "(no source stated)" : "(" + limit.source + ")";
  const auto width = static_cast<std::size_t>(style.width);
  if (columns_of(what) + 2 + columns_of(source) <= width)
    return painted(what, Tone::strong, style) + "  " + painted(source, Tone::quiet, style) + "\n";
  return painted(what, Tone::strong, style) + "\n" + quiet_lines(source, 4, style);
}

// On one line where that is wide enough, the note on a second where not.
std::string run_text(std::size_t number, const RunResult& run, const ScreenStyle& style) {
  const Signs signs(style);
  const auto width = static_cast<std::size_t>(style.width);
  const std::string who = fmt::format("  run {}  {} {} {:g}", number, run.motion, signs.times, run.factor);
  if (columns_of(who) + 2 + columns_of(run.status_note) <= width) return who + "  " + run.status_note + "\n";
  return clipped(who, width, style) + "\n" + quiet_lines(run.status_note, 6, style);
}

// The first of them by name; how many more there are.
std::string runs_with(const StudyResults& results, RunStatus status, const std::string& title,
                      const ScreenStyle& style) {
  constexpr int most = 20;
  std::string text;
  int found = 0;
  for (std::size_t i = 0; i < results.runs.size(); ++i)
    if (results.runs[i].status == status && ++found <= most) text += run_text(i, results.runs[i], style);
  if (found == 0) return "";
  if (found > most) text += fmt::format("  and {} more: `pilotis export FILE.h5 --runs` lists all\n", found - most);
  return painted(title, Tone::bad, style) + "\n" + text + "\n";
}

std::string counted(int number, const char* one, const char* several) {
  return fmt::format("{} {}", number, number == 1 ? one : several);
}

int count_of(const Verdict& verdict, Finding finding) {
  int count = 0;
  for (const Outcome& outcome : verdict.outcomes) count += outcome.finding == finding;
  return count;
}

std::string checks_statement(const Verdict& verdict) {
  if (verdict.outcomes.empty()) return "No limit was set, so nothing was judged.";
  const int all = static_cast<int>(verdict.outcomes.size()), hold = count_of(verdict, Finding::holds);
  if (hold == all) return all == 1 ? "The one check holds." : fmt::format("All {} checks hold.", all);
  std::string text = fmt::format("Of {}: {}", counted(all, "check", "checks"), counted(hold, "holds", "hold"));
  if (int n = count_of(verdict, Finding::exceeded)) text += fmt::format(", {} exceeded", n);
  if (int n = count_of(verdict, Finding::too_close)) text += fmt::format(", {} too close to call", n);
  if (int n = count_of(verdict, Finding::undetermined)) text += fmt::format(", {} undetermined", n);
  return text + ".";
}

std::string runs_statement(const Verdict& verdict) {
  std::string text;
  if (verdict.collapsed > 0) text += " " + counted(verdict.collapsed, "run", "runs") + " collapsed.";
  if (verdict.not_converged > 0) text += " " + counted(verdict.not_converged, "run", "runs") + " did not converge.";
  return text;
}

Tone overall_tone(const Verdict& verdict) {
  const int status = exit_status(verdict);
  if (status == 1) return Tone::bad;
  if (status == 3 || count_of(verdict, Finding::too_close) > 0) return Tone::warning;
  return verdict.outcomes.empty() ? Tone::plain : Tone::good;
}

}  // namespace

std::string verdict_text(const StoredStudy& stored, const Verdict& verdict, const ScreenStyle& style) {
  std::string text = painted("Verdict", Tone::strong, style) + "\n";
  if (stored.limits.empty()) text += "  no limit in the study: add [[limit]] to have one judged\n";
  for (std::size_t i = 0; i < stored.limits.size(); ++i) {
    text += limit_line(stored.limits[i], stored.units, style);
    for (const Outcome& outcome : verdict.outcomes)
      if (static_cast<std::size_t>(outcome.limit) == i)
        text += outcome_line(outcome, stored.limits[i], stored.units, style);
  }
  text += "\n" + runs_with(stored.results, RunStatus::collapsed, "Collapsed", style);
  text += runs_with(stored.results, RunStatus::not_converged, "Not converged", style);
  text += painted(checks_statement(verdict) + runs_statement(verdict), overall_tone(verdict), style) + "\n";
  return text + painted(caution, Tone::quiet, style) + "\n";
}

}  // namespace pilotis
