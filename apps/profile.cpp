#include "apps/profile.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

std::string length_text(double meters, const StudyUnits& units) {
  const double value = meters / units.factor(Dimension::length);
  return fmt::format("{:.{}f} {}", value, decimals_for(value), units.name(Dimension::length));
}

std::string building_line(const StoredStudy& stored, const ProfileFacts& facts, const Signs& signs) {
  const BuildingSummary& building = stored.results.building;
  const double weight = facts.weight / stored.units.factor(Dimension::force);
  std::string line = fmt::format("{} {}{}height {}{}weight {:.{}f} {}", building.heights.size(),
                                 building.heights.size() == 1 ? "story" : "stories", signs.separator,
                                 length_text(facts.height, stored.units), signs.separator, weight, decimals_for(weight),
                                 stored.units.name(Dimension::force));
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
std::string march_line(const StudyResults& results, const Signs& signs) {
  if (results.runs.empty()) return "";
  double least = INFINITY, most = 0, energy = 0;
  for (const RunResult& run : results.runs) {
    least = std::min(least, run.step);
    most = std::max(most, run.step);
    energy = std::fmax(energy, run.energy_error);
  }
  const std::string steps =
      least == most ? fmt::format("step {:g} s", least) : fmt::format("steps {:g} to {:g} s", least, most);
  return fmt::format("{}{}{}{}energy error up to {:.1g} of the input", results.runs.front().scheme, signs.separator,
                     steps, signs.separator, energy);
}

std::string factor_title(const FactorFacts& facts, const ScreenStyle& style) {
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

}  // namespace

std::string factor_summary(const FactorFacts& facts, const ProfileFacts& building, const StudyUnits& units,
                           const ScreenStyle& style) {
  const Signs signs(style);
  const std::string head = left("", 30) + right("largest", 9) + right(signs.plus_minus + "step", 9) + right("mean", 9) +
                           "   " + left("where", 9) + "motion";
  std::string text = painted(head, Tone::quiet, style) + "\n";
  text += summary_line("base shear", facts.base_shear, *find_quantity("base_shear"), units, style);
  text += ratio_line("base shear over weight", facts.base_shear, building.weight, 0.01, "%", 1, style);
  text +=
      summary_line("roof displacement", facts.roof_displacement, *find_quantity("floor_displacement"), units, style);
  text += ratio_line("roof drift (over height)", facts.roof_displacement, building.height, 0.01, "%", 2, style);
  text +=
      summary_line("floor acceleration", facts.floor_acceleration, *find_quantity("floor_acceleration"), units, style);
  return text;
}

std::string profile_text(const StoredStudy& stored, const Verdict& verdict, const ScreenStyle& style) {
  const Signs signs(style);
  const ProfileFacts facts = profile_facts(stored);
  const auto width = static_cast<std::size_t>(style.width);
  std::string text = painted(clipped(stored.title, width, style), Tone::strong, style) + "\n";
  text += clipped(building_line(stored, facts, signs), width, style) + "\n";
  text += clipped(march_line(stored.results, signs), width, style) + "\n";
  text +=
      painted(runs_line(verdict), verdict.collapsed + verdict.not_converged > 0 ? Tone::warning : Tone::plain, style) +
      "\n\n";
  const double scale = bar_scale(facts);
  for (const FactorFacts& factor : facts.factors) {
    text += factor_title(factor, style) + "\n" + story_table(factor, scale, stored.units, style) + "\n";
    text += factor_summary(factor, facts, stored.units, style) + "\n";
  }
  return text + verdict_text(stored, verdict, style);
}

}  // namespace pilotis
