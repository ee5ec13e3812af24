#include "apps/profile_sets.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>
#include <numeric>

#include "apps/profile_facts.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

using Judged = RankedSets::Judged;

// Findings from the mildest to the worst, as words of the line of counts and of a set's line.
struct Grade {
  Finding finding;
  const char* counted;
  const char* word;
  Tone tone;
};
constexpr Grade grades[] = {{Finding::holds, "hold", "holds", Tone::good},
                            {Finding::too_close, "too close to call", "TOO CLOSE", Tone::warning},
                            {Finding::undetermined, "undetermined", "UNDETERMINED", Tone::warning},
                            {Finding::exceeded, "exceed a limit", "EXCEEDED", Tone::bad}};

std::size_t grade_of(Finding finding) {
  std::size_t grade = 0;
  while (grades[grade].finding != finding) ++grade;
  return grade;
}

void take(Judged& judged, const Outcome& outcome) {
  judged.any = true;
  if (grade_of(outcome.finding) > grade_of(judged.worst)) judged.worst = outcome.finding;
  judged.margin = std::fmin(judged.margin, outcome.margin);
}

Judged counted(const RunTable& table, const RunSet& set) {
  Judged judged;
  judged.margin = INFINITY;
  for (RunStatus status : table.statuses().subspan(set.first, set.count)) {
    judged.collapsed += status == RunStatus::collapsed;
    judged.not_converged += status == RunStatus::not_converged;
  }
  return judged;
}

bool governs(const Judged& a, const Judged& b) {
  if (a.worst != b.worst) return grade_of(a.worst) > grade_of(b.worst);
  if (a.margin != b.margin) return a.margin < b.margin;
  if (a.collapsed != b.collapsed) return a.collapsed > b.collapsed;
  if (a.not_converged != b.not_converged) return a.not_converged > b.not_converged;
  return a.drift_ratio > b.drift_ratio;
}

std::string counts_line(const std::vector<Judged>& judged, bool several_buildings) {
  std::size_t counts[std::size(grades)] = {}, unjudged = 0;
  for (const Judged& one : judged) ++(one.any ? counts[grade_of(one.worst)] : unjudged);
  std::string parts;
  const auto add = [&parts](std::size_t count, const char* what) {
    if (count > 0) parts += fmt::format("{} {} {}", parts.empty() ? "" : ",", count, what);
  };
  for (std::size_t grade = std::size(grades); grade-- > 0;) add(counts[grade], grades[grade].counted);
  add(unjudged, "not judged");
  return fmt::format("{} {}:{}", judged.size(), several_buildings ? "sets of building and factor" : "factors", parts);
}

// Widths in columns.
constexpr std::size_t factor_width = 9, count_width = 7, drift_width = 10, margin_width = 11, word_width = 15;
constexpr std::size_t numbers_width = factor_width + 3 * count_width + drift_width + margin_width + word_width;

// 0: one building, not named.
std::size_t name_width(const RunTable& table, const ScreenStyle& style) {
  if (table.buildings().size() == 1) return 0;
  std::size_t width = 12;
  for (const BuildingSummary& building : table.buildings()) width = std::max(width, columns_of(building.name) + 3);
  return std::min(width, static_cast<std::size_t>(std::max(style.width, 80)) - numbers_width);
}

std::string heading(std::size_t name, const ScreenStyle& style) {
  const std::string text = left(name > 0 ? "  building" : "", name) + right("factor", factor_width) +
                           right("runs", count_width) + right("coll.", count_width) + right("open", count_width) +
                           right("drift, %", drift_width) + right("margin, %", margin_width) + "   verdict";
  return painted(text, Tone::quiet, style) + "\n";
}

// "none" where collapsed runs decide; "-" where no limit gave a margin.
std::string margin_text(double margin, const Signs& signs) {
  if (std::isinf(margin)) return margin < 0 ? "none" : "-";
  return number_text(std::round(margin * 100), 0, signs);
}

std::string set_line(const RunTable& table, const RunSet& set, const Judged& judged, std::size_t name,
                     const ScreenStyle& style) {
  const Signs signs(style);
  const std::string& building = table.buildings().at(static_cast<std::size_t>(set.building)).name;
  std::string line = name > 0 ? left(clipped("  " + building, name - 1, style), name) : "";
  line += right(fmt::format("{:g}", set.factor), factor_width) + right(fmt::format("{}", set.count), count_width);
  line += right(fmt::format("{}", judged.collapsed), count_width);
  line += right(fmt::format("{}", judged.not_converged), count_width);
  line += right(number_text(largest_drift_ratio(table, set).value / 0.01, 2, signs), drift_width);
  line += right(margin_text(judged.margin, signs), margin_width);
  const Grade& grade = grades[grade_of(judged.worst)];
  return line + "   " + (judged.any ? painted(grade.word, grade.tone, style) : "not judged") + "\n";
}

}  // namespace

RankedSets::RankedSets(const RunTable& table, const Verdict& verdict) : order_(table.sets().size()) {
  std::map<std::pair<int, double>, std::size_t> index;
  for (const RunSet& set : table.sets()) {
    index.emplace(std::pair(set.building, set.factor), judged_.size());
    judged_.push_back(counted(table, set));
    if (verdict.outcomes.empty()) judged_.back().drift_ratio = largest_drift_ratio(table, set).value;
  }
  for (const Outcome& outcome : verdict.outcomes) {
    const auto found = index.find({outcome.building, outcome.factor});
    if (found != index.end()) take(judged_[found->second], outcome);  // not there: a factor without runs
  }
  std::iota(order_.begin(), order_.end(), std::size_t{0});
  std::stable_sort(order_.begin(), order_.end(),
                   [&](std::size_t a, std::size_t b) { return governs(judged_[a], judged_[b]); });
}

std::string RankedSets::text(const RunTable& table, std::size_t most_lines, const ScreenStyle& style) const {
  const std::size_t lines = std::min(order_.size(), most_lines), name = name_width(table, style);
  std::vector<std::size_t> shown(order_.begin(), order_.begin() + static_cast<std::ptrdiff_t>(lines));
  if (lines == order_.size()) std::sort(shown.begin(), shown.end());  // in the order of the study
  std::string text = painted(counts_line(judged_, table.buildings().size() > 1), Tone::strong, style) + "\n";
  text += painted("Drift: largest drift ratio of runs that were done; margin: least of all limits.\n\n", Tone::quiet,
                  style) +
          heading(name, style);
  for (std::size_t i : shown) text += set_line(table, table.sets()[i], judged_[i], name, style);
  if (lines < order_.size())
    text += fmt::format("  These are the {} worst; --json tells of all {}.\n", lines, order_.size());
  return text;
}

}  // namespace pilotis
