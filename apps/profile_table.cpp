// The stories of one set from the roof down, each with its drift ratio as a bar against the limit.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "apps/profile.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

constexpr double percent = 0.01;

// Widths in columns. The free room is shared between label, bar and motion.
struct Widths {
  std::size_t number = 3, statistic = 7, largest = 8, error = 7, margin = 8, residual = 9, ductility = 8, shear = 8;
  std::size_t label = 0, bar = 0, motion = 0;
};

constexpr std::size_t gaps = 1 + 2 + 2;  // before the label, before the bar, before the motion

Widths widths_for(const ScreenStyle& style, bool has_limit) {
  Widths widths;
  if (style.width < 96) widths.residual = widths.margin = widths.shear = 7, widths.ductility = widths.error = 6;
  if (!has_limit) widths.statistic = widths.margin = 0;
  const std::size_t fixed = widths.number + widths.statistic + widths.largest + widths.error + widths.margin +
                            widths.residual + widths.ductility + widths.shear + gaps;
  const std::size_t room = static_cast<std::size_t>(std::clamp(style.width, 80, 132)) - fixed;
  widths.label = room < 26 ? 0 : std::min<std::size_t>(room / 4, 16);
  widths.motion = std::min<std::size_t>(room / 3, 18);
  widths.bar = std::min<std::size_t>(room - widths.label - widths.motion, 40);
  return widths;
}

// Where things end on the bar, in half cells.
struct BarEnds {
  std::size_t strong = 0, light = 0, mark = 0;
  bool cut = false, exceeded = false;
};

std::size_t half_cells(double value, double scale, std::size_t width) {
  const double halves = std::round(value / scale * 2 * static_cast<double>(width));
  return std::isfinite(halves) ? static_cast<std::size_t>(std::clamp(halves, 0.0, 2.0 * static_cast<double>(width)))
                               : 0;
}

BarEnds ends_of(const StoryFacts& story, const Limit* limit, double scale, std::size_t width) {
  const double statistic = limit ? story.statistic : story.drift_ratio.value;
  BarEnds ends;
  ends.strong = half_cells(statistic, scale, width);  // none when it is infinite: the light bar then shows the rest
  ends.light = half_cells(story.drift_ratio.value, scale, width);
  ends.mark = limit ? std::max<std::size_t>(half_cells(limit->value, scale, width), 2) / 2 - 1 : width;
  ends.exceeded = limit && statistic > limit->value;
  ends.cut = story.drift_ratio.value > scale * 1.0001;
  return ends;
}

// One cell of the bar: strong up to the statistic, light from there to the largest, a mark at the limit.
std::string cell_text(std::size_t i, std::size_t width, const BarEnds& ends, const ScreenStyle& style) {
  const Signs signs(style);
  const Tone strong = ends.exceeded ? Tone::bad : Tone::good, light = ends.exceeded ? Tone::bad : Tone::quiet;
  const std::size_t first_half = 2 * i + 1, whole = 2 * i + 2;
  if (i == ends.mark) return painted(signs.mark, ends.exceeded ? Tone::bad : Tone::plain, style);
  if (ends.cut && i + 1 == width) return painted(signs.beyond, light, style);
  if (ends.strong >= whole) return painted(signs.bar, strong, style);
  if (ends.strong >= first_half)
    return painted(ends.light >= whole ? signs.half_to_light : signs.half_bar, strong, style);
  if (ends.light >= whole) return painted(signs.light_bar, light, style);
  if (ends.light >= first_half) return painted(signs.half_light, light, style);
  return " ";
}

std::string bar_text(const BarEnds& ends, std::size_t width, const ScreenStyle& style) {
  std::string text;
  for (std::size_t i = 0; i < width; ++i) text += cell_text(i, width, ends, style);
  return text;
}

struct Decimals {
  int drift = 2, residual = 2, ductility = 2, shear = 0;
};

Decimals decimals_of(const SetFacts& facts, const ShownUnit& force) {
  double residual = 0, ductility = 0, shear = 0, drift = 0;
  for (const StoryFacts& story : facts.stories) {
    drift = std::fmax(drift, story.drift_ratio.value);
    residual = std::fmax(residual, story.residual_drift_ratio.value);
    ductility = std::fmax(ductility, story.ductility.value);
    shear = std::fmax(shear, story.story_shear.value);
  }
  const auto in_percent = [](double ratio) { return ratio < 0.001 && ratio > 0 ? 4 : 2; };
  return {in_percent(drift), residual < 1e-4 && residual > 0 ? 4 : 3, std::min(decimals_for(ductility), 2),
          decimals_for(shear / force.factor)};
}

std::string story_line(const StoryFacts& story, const Limit* limit, double scale, const Widths& widths,
                       const Decimals& decimals, const ShownUnit& force, const ScreenStyle& style) {
  const Signs signs(style);
  const Largest& drift = story.drift_ratio;
  std::string line = right(std::to_string(story.story), widths.number) + " ";
  if (widths.label > 0) line += left(clipped(story.label, widths.label - 1, style), widths.label);
  if (limit)
    line += painted(right(number_text(story.statistic / percent, decimals.drift, signs), widths.statistic),
                    Tone::strong, style);
  line += right(number_text(drift.value / percent, decimals.drift, signs), widths.largest);
  line += painted(right(error_text(drift.step_error / percent, decimals.drift + 1), widths.error), Tone::quiet, style);
  line += "  " + bar_text(ends_of(story, limit, scale, widths.bar), widths.bar, style);
  if (limit && std::isinf(story.margin))
    line += right("none", widths.margin);
  else if (limit)
    line += right(number_text(std::round(story.margin * 100), 0, signs), widths.margin);
  line += "  " + left(clipped(drift.motion, widths.motion, style), widths.motion);
  line += right(number_text(story.residual_drift_ratio.value / percent, decimals.residual, signs), widths.residual);
  line += right(number_text(story.ductility.value, decimals.ductility, signs), widths.ductility);
  line += right(number_text(story.story_shear.value / force.factor, decimals.shear, signs), widths.shear);
  return line;
}

std::string heading_statistic(const Limit& limit) {
  if (limit.statistic == Statistic::percentile) return fmt::format("p{:g}", limit.percentile);
  return std::string(statistic_name(limit.statistic));
}

// Two title lines: what it is, and in which unit.
std::string heading(const Limit* limit, const Widths& widths, const ShownUnit& force, const ScreenStyle& style) {
  const Signs signs(style);
  const std::size_t front = widths.number + 1 + widths.label;
  const std::size_t drift = widths.statistic + widths.largest + widths.error;
  const bool narrow = widths.residual < 9, short_motion = widths.motion < 11;
  std::string first =
      left(widths.label > 0 ? " story" : " no.", front) + right("drift ratio, %", drift) + left("", widths.bar + 2);
  std::string second = left("", front);
  if (limit) second += right(heading_statistic(*limit), widths.statistic);
  second +=
      right("largest", widths.largest) + right(signs.plus_minus + "step", widths.error) + left("", widths.bar + 2);
  if (limit) first += right("margin", widths.margin), second += right("%", widths.margin);
  first += "  " + left(short_motion ? "motion" : "motion with", widths.motion) +
           right(narrow ? "resid." : "residual", widths.residual) +
           right(narrow ? "duct." : "ductil.", widths.ductility) + right("shear", widths.shear);
  second += "  " + left(short_motion ? "" : "the largest", widths.motion) +
            right(narrow ? "%" : "drift, %", widths.residual) + right("1", widths.ductility) +
            right(force.unit, widths.shear);
  return painted(first, Tone::quiet, style) + "\n" + painted(second, Tone::quiet, style) + "\n";
}

}  // namespace

double bar_scale(const std::vector<SetFacts>& sets) {
  double largest = 0, limit = 0;
  for (const SetFacts& set : sets) {
    if (set.limit) limit = std::max(limit, set.limit->value);
    for (const StoryFacts& story : set.stories) largest = std::fmax(largest, story.drift_ratio.value);
  }
  if (limit == 0) return largest > 0 ? largest : 1;
  return std::clamp(largest, 1.15 * limit, 2.5 * limit);
}

std::string story_table(const SetFacts& facts, double largest_shown, const StudyUnits& units,
                        const ScreenStyle& style) {
  const ShownUnit force = shown_unit(*find_quantity("story_shear"), units);
  const Widths widths = widths_for(style, facts.limit != nullptr);
  const Decimals decimals = decimals_of(facts, force);
  std::string text = heading(facts.limit, widths, force, style);
  for (auto story = facts.stories.rbegin(); story != facts.stories.rend(); ++story)
    text += story_line(*story, facts.limit, largest_shown, widths, decimals, force, style) + "\n";
  return text;
}

}  // namespace pilotis
