#include "apps/profile.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "apps/profile_sets.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

std::string length_text(double meters, const StudyUnits& units) {
  const double value = meters / units.factor(Dimension::length);
  return fmt::format("{:.{}f} {}", value, decimals_for(value), units.name(Dimension::length));
}

std::string building_line(const BuildingSummary& building, const StudyUnits& units, const Signs& signs) {
  const Bulk bulk = bulk_of(building);
  const double weight = bulk.weight / units.factor(Dimension::force);
  std::string line =
      fmt::format("{} {}{}height {}{}weight {:.{}f} {}", building.heights.size(),
                  building.heights.size() == 1 ? "story" : "stories", signs.separator, length_text(bulk.height, units),
                  signs.separator, weight, decimals_for(weight), units.name(Dimension::force));
  const std::size_t shown = std::min<std::size_t>(building.modes.size(), 3);
  for (std::size_t i = 0; i < shown; ++i)
    line += fmt::format("{}T{} {:.{}f} s", signs.separator, i + 1, building.modes[i].period,
                        std::max(decimals_for(building.modes[i].period), 2));
  return line;
}

std::string runs_line(const Verdict& verdict) {
  const int done = verdict.runs - verdict.collapsed - verdict.not_converged;
  std::string line = fmt::format("{} runs: {} done", verdict.runs, done);
  if (verdict.collapsed > 0) line += fmt::format(", {} collapsed", verdict.collapsed);
  if (verdict.not_converged > 0) line += fmt::format(", {} not converged", verdict.not_converged);
  return line;
}

// How it was marched; of the first run where runs differ.
std::string march_line(const RunTable& table, const Signs& signs) {
  if (table.runs() == 0) return "";
  const MarchFacts march = march_facts(table);
  const std::string steps = march.least_step == march.largest_step
                                ? fmt::format("step {:g} s", march.least_step)
                                : fmt::format("steps {:g} to {:g} s", march.least_step, march.largest_step);
  return fmt::format("{}{}{}{}energy error up to {:.1g} of the input", march.scheme, signs.separator, steps,
                     signs.separator, march.energy_error);
}

std::string set_title(const SetFacts& facts, const ScreenStyle& style) {
  const Signs signs(style);
  const bool still = facts.runs == 1 && facts.stories.front().drift_ratio.motion == "none";
  const std::string ground =
      still ? "No ground motion" : fmt::format("Ground motion {} {:g}", signs.times, facts.factor);
  std::string text = painted(ground, Tone::strong, style);
  std::string rest;
  if (!still) rest = fmt::format("{}{} motion{}", signs.separator, facts.runs, facts.runs == 1 ? "" : "s");
  if (facts.limit)
    rest += fmt::format("{}{} {} drift ratio, {} largest, {} limit {:g} %", signs.separator, signs.bar,
                        shown_statistic(*facts.limit), signs.light_bar, signs.mark, facts.limit->value * 100);
  else
    rest += fmt::format("{}{} largest drift ratio, no limit on it", signs.separator, signs.bar);
  text += painted(rest, Tone::quiet, style) + "\n";
  if (facts.done < facts.runs)
    text += painted(fmt::format("{} of {} runs lasted to the end; all columns{} are of those", facts.done, facts.runs,
                                facts.limit ? fmt::format(" but the {}", shown_statistic(*facts.limit)) : ""),
                    Tone::warning, style) +
            "\n";
  return text;
}

// One line of the summary: name, largest, its error, mean over the motions, place, motion.
std::string summary_line(const std::string& name, const Largest& largest, const Quantity& quantity,
                         const StudyUnits& units, const ScreenStyle& style) {
  const Signs signs(style);
  const ShownUnit shown = shown_unit(quantity, units);
  const int decimals = decimals_for(largest.value / shown.factor);
  const std::string place = quantity.per == Per::floor ? fmt::format("floor {}", largest.place) : "";
  std::string line = "  " + left(fmt::format("{}, {}", name, shown.unit), 28);
  line += painted(right(number_text(largest.value / shown.factor, decimals, signs), 9), Tone::strong, style);
  line += painted(right(error_text(largest.step_error / shown.factor, decimals), 9), Tone::quiet, style);
  line += right(number_text(largest.mean / shown.factor, decimals, signs), 9) + "   " + left(place, 9);
  const std::size_t used = 2 + 28 + 9 + 9 + 9 + 3 + 9;
  return line + clipped(largest.motion, static_cast<std::size_t>(style.width) - used, style) + "\n";
}

// The same motion's numbers against the building: base shear over weight, roof displacement over height.
std::string ratio_line(const std::string& name, const Largest& largest, double of, double unit, const char* unit_name,
                       int decimals, const ScreenStyle& style) {
  const Signs signs(style);
  std::string line = "  " + left(fmt::format("{}, {}", name, unit_name), 28);
  line += painted(right(number_text(largest.value / of / unit, decimals, signs), 9), Tone::strong, style);
  line += painted(right(error_text(largest.step_error / of / unit, decimals), 9), Tone::quiet, style);
  return line + right(number_text(largest.mean / of / unit, decimals, signs), 9) + "\n";
}

// A building by its name, where there are several: a line before its sets.
std::string building_heading(const BuildingSummary& building, const StudyUnits& units, const ScreenStyle& style) {
  const auto width = static_cast<std::size_t>(style.width);
  std::string text = painted(clipped(building.name, width, style), Tone::strong, style) + "\n";
  return text + clipped(building_line(building, units, Signs(style)), width, style) + "\n";
}

std::string set_text(const SetFacts& facts, double scale, const BuildingSummary& building, const StudyUnits& units,
                     const ScreenStyle& style) {
  return set_title(facts, style) + "\n" + story_table(facts, scale, units, style) + "\n" +
         set_summary(facts, building, units, style) + "\n";
}

// Every set with its stories.
std::string all_sets(const StudyHeader& header, const RunTable& table, const ScreenStyle& style) {
  std::vector<SetFacts> sets;
  for (const RunSet& set : table.sets()) sets.push_back(set_facts(table, set, header.limits));
  const double scale = bar_scale(sets);
  std::string text;
  int headed = table.buildings().size() > 1 ? -1 : 0;
  for (const SetFacts& set : sets) {
    const BuildingSummary& building = table.buildings().at(static_cast<std::size_t>(set.building));
    if (set.building != headed) text += building_heading(building, header.units, style) + "\n";
    headed = set.building;
    text += set_text(set, scale, building, header.units, style);
  }
  return text;
}

// A line for each set, or the worst of them, and the governing one with its stories.
std::string worst_sets(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                       const ScreenStyle& style) {
  const RankedSets ranked(table, verdict);
  std::string text = ranked.text(table, most_sets_listed, style) + "\n";
  const SetFacts worst = set_facts(table, table.sets()[ranked.order().front()], header.limits);
  const BuildingSummary& building = table.buildings().at(static_cast<std::size_t>(worst.building));
  text += painted("The governing one", Tone::quiet, style) + "\n";
  if (table.buildings().size() > 1) text += building_heading(building, header.units, style);
  return text + set_text(worst, bar_scale({worst}), building, header.units, style);
}

std::string study_lines(const StudyHeader& header, const RunTable& table, const ScreenStyle& style) {
  const Signs signs(style);
  const auto width = static_cast<std::size_t>(style.width);
  const std::size_t buildings = table.buildings().size();
  std::string text = painted(clipped(header.title, width, style), Tone::strong, style) + "\n";
  text += buildings == 1 ? clipped(building_line(table.buildings()[0], header.units, signs), width, style)
                         : fmt::format("{} buildings", buildings);
  return text + "\n" + clipped(march_line(table, signs), width, style) + "\n";
}

}  // namespace

std::string set_summary(const SetFacts& facts, const BuildingSummary& building, const StudyUnits& units,
                        const ScreenStyle& style) {
  const Signs signs(style);
  const Bulk bulk = bulk_of(building);
  const std::string head = left("", 30) + right("largest", 9) + right(signs.plus_minus + "step", 9) + right("mean", 9) +
                           "   " + left("where", 9) + "motion";
  std::string text = painted(head, Tone::quiet, style) + "\n";
  text += summary_line("base shear", facts.base_shear, *find_quantity("base_shear"), units, style);
  text += ratio_line("base shear over weight", facts.base_shear, bulk.weight, 0.01, "%", 1, style);
  text +=
      summary_line("roof displacement", facts.roof_displacement, *find_quantity("floor_displacement"), units, style);
  text += ratio_line("roof drift (over height)", facts.roof_displacement, bulk.height, 0.01, "%", 2, style);
  text +=
      summary_line("floor acceleration", facts.floor_acceleration, *find_quantity("floor_acceleration"), units, style);
  return text;
}

std::string profile_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                         const ScreenStyle& style) {
  const Tone tone = verdict.collapsed + verdict.not_converged > 0 ? Tone::warning : Tone::plain;
  return study_lines(header, table, style) + painted(runs_line(verdict), tone, style) + "\n\n" +
         (table.sets().size() <= most_sets_whole ? all_sets(header, table, style)
                                                 : worst_sets(header, table, verdict, style)) +
         verdict_text(header, table, verdict, style);
}

}  // namespace pilotis
