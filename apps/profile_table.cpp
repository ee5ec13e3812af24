// The stories of one factor from the roof down, each with its drift ratio as a bar against the limit.
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
  std::size_t number = 3, statistic = 8, largest = 9, error = 8, margin = 8, residual = 10, ductility = 10, shear = 9;
  std::size_t label = 0, bar = 0, motion = 0;
};

Widths widths_for(const ScreenStyle& style, bool has_limit) {
  Widths widths;
  if (style.width < 96) {
    widths.statistic = widths.margin = widths.error = 7;
    widths.largest = 8, widths.residual = 9, widths.ductility = 7, widths.shear = 8;
  }
  if (!has_limit) widths.statistic = widths.margin = 0;
  const std::size_t gaps = 1 + 2 + 2;  // before the label and on both sides of the bar
  const std::size_t fixed = widths.number + widths.statistic + widths.largest + widths.error + widths.margin +
                            widths.residual + widths.ductility + widths.shear + gaps;
  const std::size_t room = static_cast<std::size_t>(std::clamp(style.width, 80, 132)) - fixed;
  widths.label = room < 24 ? 0 : std::min<std::size_t>(room / 4, 16);
  widths.motion = std::min<std::size_t>(room * 2 / 5, 18);
  widths.bar = std::min<std::size_t>(room - widths.label - widths.motion, 40);
  return widths;
}

std::size_t cells(double value, double scale, std::size_t width) {
  const double cell = std::round(value / scale * static_cast<double>(width));
  return static_cast<std::size_t>(std::clamp(cell, 0.0, static_cast<double>(width)));
}

// Strong up to the statistic (all of it without one), light up to the largest, a mark at the limit.
std::string bar_text(const StoryFacts& story, const Limit* limit, double scale, std::size_t width,
                     const ScreenStyle& style) {
  const Signs signs(style);
  const double strong_to = limit ? story.statistic : story.drift_ratio.value;
  const std::size_t strong = std::isnan(strong_to) ? 0 : cells(strong_to, scale, width);
  const std::size_t light = std::isnan(story.drift_ratio.value) ? 0 : cells(story.drift_ratio.value, scale, width);
  const std::size_t mark = limit ? std::max<std::size_t>(cells(limit->value, scale, width), 1) - 1 : width;
  const bool exceeded = limit && strong_to > limit->value;
  const bool cut = std::fmax(strong_to, story.drift_ratio.value) > scale * 1.0001;
  std::string text;
  for (std::size_t i = 0; i < width; ++i) {
    if (i == mark) text += painted(signs.mark, exceeded ? Tone::bad : Tone::plain, style);
    else if (cut && i + 1 == width) text += painted(signs.beyond, exceeded ? Tone::bad : Tone::quiet, style);
    else if (i < strong) text += painted(signs.bar, exceeded ? Tone::bad : Tone::good, style);
    else if (i < light) text += painted(signs.light_bar, Tone::quiet, style);
    else text += " ";
  }
  return text;
}

struct Decimals {
  int drift = 2, residual = 2, ductility = 2, shear = 0;
};

Decimals decimals_of(const FactorFacts& facts, const ShownUnit& force) {
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

// The statistic and the largest are one number where the limit is on the largest.
bool shows_statistic(const Limit* limit) { return limit != nullptr; }

std::string story_line(const StoryFacts& story, const Limit* limit, double scale, const Widths& widths,
                       const Decimals& decimals, const ShownUnit& force, const ScreenStyle& style) {
  const Signs signs(style);
  const Largest& drift = story.drift_ratio;
  std::string line = right(std::to_string(story.story), widths.number) + " ";
  if (widths.label > 0) line += left(clipped(story.label, widths.label - 1, style), widths.label);
  if (shows_statistic(limit))
    line += painted(right(number_text(story.statistic / percent, decimals.drift, signs), widths.statistic), Tone::strong, style);
  line += right(number_text(drift.value / percent, decimals.drift, signs), widths.largest);
  line += painted(right(error_text(drift.step_error / percent, decimals.drift), widths.error), Tone::quiet, style);
  line += "  " + bar_text(story, limit, scale, widths.bar, style);
  if (limit) line += right(number_text(std::round(story.margin * 100), 0, signs), widths.margin);
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
  const std::string bar_title = limit ? "" : "largest";
  std::string first = left(" story", front), second = left("", front);
  if (limit) first += right(heading_statistic(*limit), widths.statistic), second += right("%", widths.statistic);
  first += right("largest", widths.largest) + right(signs.plus_minus + "step", widths.error);
  second += right("%", widths.largest) + right("%", widths.error);
  first += "  " + left("drift ratio", widths.bar), second += left("", widths.bar + 2);
  if (limit) first += right("margin", widths.margin), second += right("%", widths.margin);
  first += "  " + left("motion", widths.motion), second += "  " + left("", widths.motion);
  first += right("residual", widths.residual) + right(widths.ductility < 10 ? "duct." : "ductility", widths.ductility) +
           right("shear", widths.shear);
  second += right("%", widths.residual) + right("-", widths.ductility) + right(force.unit, widths.shear);
  return painted(first, Tone::quiet, style) + "\n" + painted(second, Tone::quiet, style) + "\n";
}

}  // namespace

double bar_scale(const ProfileFacts& facts) {
  double largest = 0, limit = 0;
  for (const FactorFacts& factor : facts.factors) {
    if (factor.limit) limit = std::max(limit, factor.limit->value);
    for (const StoryFacts& story : factor.stories) largest = std::fmax(largest, story.drift_ratio.value);
  }
  if (limit == 0) return largest > 0 ? largest : 1;
  return std::clamp(largest, 1.15 * limit, 2.5 * limit);
}

std::string story_table(const FactorFacts& facts, double largest_shown, const StudyUnits& units,
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
