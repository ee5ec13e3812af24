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

// `building` stands before the factor; empty where there is one building only.
std::string outcome_line(const Outcome& outcome, const Limit& limit, const std::string& building,
                         const StudyUnits& units, const ScreenStyle& style) {
  const Signs signs(style);
  const ShownUnit shown = shown_unit(*limit.quantity, units);
  const Word word = word_of(outcome);
  const bool has_margin = std::isfinite(outcome.margin);
  const std::string margin = has_margin ? fmt::format("margin {:.0f} %", outcome.margin * 100) : "";
  std::string rest = building.empty() ? "" : left(clipped(building, 15, style), 16);
  rest += left(fmt::format("{} {:g} ", signs.times, outcome.factor), 7);
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
std::string run_text(std::size_t number, const RunResult& run, const std::string& building, const ScreenStyle& style) {
  const Signs signs(style);
  const auto width = static_cast<std::size_t>(style.width);
  const std::string where = building.empty() ? "" : building + "  ";
  const std::string who = fmt::format("  run {}  {}{} {} {:g}", number, where, run.motion, signs.times, run.factor);
  if (columns_of(who) + 2 + columns_of(run.status_note) <= width) return who + "  " + run.status_note + "\n";
  return clipped(who, width, style) + "\n" + quiet_lines(run.status_note, 6, style);
}

std::string name_among(const RunTable& table, int building) {
  return table.buildings().size() == 1 ? "" : table.buildings().at(static_cast<std::size_t>(building)).name;
}

// The first of them by name; how many more there are.
std::string runs_with(const RunTable& table, RunStatus status, const std::string& title, const ScreenStyle& style) {
  constexpr int most = 20;
  std::string text;
  int found = 0;
  for (std::size_t i = 0; i < table.runs(); ++i) {
    if (table.statuses()[i] != status || ++found > most) continue;
    const RunResult run = table.rows(i, 1, RowParts::heads).at(0);
    text += run_text(i, run, name_among(table, run.building), style);
  }
  if (found == 0) return "";
  if (found > most) text += fmt::format("  and {} more: `pilotis export FILE.h5 --runs` lists all\n", found - most);
  return painted(title, Tone::bad, style) + "\n" + text + "\n";
}

std::string counted(int number, const char* one, const char* several) {
  return fmt::format("{} {}", number, number == 1 ? one : several);
}

// Of all outcomes, or of those of one limit.
int count_of(const Verdict& verdict, Finding finding, int limit = -1) {
  int count = 0;
  for (const Outcome& outcome : verdict.outcomes)
    count += outcome.finding == finding && (limit < 0 || outcome.limit == limit);
  return count;
}

std::string findings_text(const Verdict& verdict, int limit = -1) {
  const int hold = count_of(verdict, Finding::holds, limit);
  std::string text = counted(hold, "holds", "hold");
  if (int n = count_of(verdict, Finding::exceeded, limit)) text += fmt::format(", {} exceeded", n);
  if (int n = count_of(verdict, Finding::too_close, limit)) text += fmt::format(", {} too close to call", n);
  if (int n = count_of(verdict, Finding::undetermined, limit)) text += fmt::format(", {} undetermined", n);
  return text;
}

std::string checks_statement(const Verdict& verdict) {
  if (verdict.outcomes.empty()) return "No limit was set, so nothing was judged.";
  const int all = static_cast<int>(verdict.outcomes.size()), hold = count_of(verdict, Finding::holds);
  if (hold == all) return all == 1 ? "The one check holds." : fmt::format("All {} checks hold.", all);
  return fmt::format("Of {}: {}.", counted(all, "check", "checks"), findings_text(verdict));
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

// Where there are many sets: how many outcomes of each kind, and the one with the least margin.
std::string outcomes_in_short(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                              std::size_t limit, const ScreenStyle& style) {
  const Outcome* worst = nullptr;
  int all = 0;
  for (const Outcome& outcome : verdict.outcomes) {
    if (static_cast<std::size_t>(outcome.limit) != limit) continue;
    ++all;
    const bool first_number = worst != nullptr && std::isnan(worst->margin) && !std::isnan(outcome.margin);
    if (worst == nullptr || first_number || outcome.margin < worst->margin) worst = &outcome;
  }
  if (worst == nullptr) return "";
  const std::string counts = findings_text(verdict, static_cast<int>(limit));
  return fmt::format("    of {}: {}\n    least margin:\n", counted(all, "check", "checks"), counts) +
         outcome_line(*worst, header.limits[limit], name_among(table, worst->building), header.units, style);
}

std::string outcomes_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict, std::size_t limit,
                          const ScreenStyle& style) {
  if (table.sets().size() > most_sets_whole) return outcomes_in_short(header, table, verdict, limit, style);
  std::string text;
  for (const Outcome& outcome : verdict.outcomes)
    if (static_cast<std::size_t>(outcome.limit) == limit)
      text += outcome_line(outcome, header.limits[limit], name_among(table, outcome.building), header.units, style);
  return text;
}

}  // namespace

std::string verdict_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                         const ScreenStyle& style) {
  std::string text = painted("Verdict", Tone::strong, style) + "\n";
  if (header.limits.empty()) text += "  no limit in the study: add [[limit]] to have one judged\n";
  for (std::size_t i = 0; i < header.limits.size(); ++i)
    text += limit_line(header.limits[i], header.units, style) + outcomes_text(header, table, verdict, i, style);
  text += "\n" + runs_with(table, RunStatus::collapsed, "Collapsed", style);
  text += runs_with(table, RunStatus::not_converged, "Not converged", style);
  const std::string statement = checks_statement(verdict) + runs_statement(verdict);
  for (const std::string& line : wrapped(statement, static_cast<std::size_t>(style.width)))
    text += painted(line, overall_tone(verdict), style) + "\n";
  return text + painted(caution, Tone::quiet, style) + "\n";
}

}  // namespace pilotis
