#include "apps/text_layout.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <sstream>

namespace pilotis {

namespace {

bool starts_character(char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }

// ANSI escape sequences (ECMA-48, select graphic rendition); the eight basic colors, which every scheme keeps legible.
const char* escape_of(Tone tone) {
  switch (tone) {
    case Tone::plain:
      return "";
    case Tone::strong:
      return "\x1b[1m";
    case Tone::quiet:
      return "\x1b[2m";
    case Tone::good:
      return "\x1b[32m";
    case Tone::warning:
      return "\x1b[33m";
    case Tone::bad:
      return "\x1b[1;31m";
  }
  return "";
}

const char* ordinal_ending(int n) {
  if (n % 100 >= 11 && n % 100 <= 13) return "th";
  switch (n % 10) {
    case 1:
      return "st";
    case 2:
      return "nd";
    case 3:
      return "rd";
    default:
      return "th";
  }
}

}  // namespace

std::size_t columns_of(std::string_view text) {
  return static_cast<std::size_t>(std::count_if(text.begin(), text.end(), starts_character));
}

std::string clipped(const std::string& text, std::size_t width, const ScreenStyle& style) {
  if (columns_of(text) <= width) return text;
  const std::string tail = style.unicode ? "…" : "..";
  const std::size_t keep = width - std::min(width, columns_of(tail));
  std::size_t at = 0;
  for (std::size_t seen = 0; at < text.size(); ++at)
    if (starts_character(text[at]) && seen++ == keep) break;
  return text.substr(0, at) + (keep > 0 ? tail : "");
}

std::vector<std::string> wrapped(const std::string& text, std::size_t width) {
  std::vector<std::string> lines;
  std::istringstream words(text);
  for (std::string word; words >> word;) {
    if (lines.empty() || columns_of(lines.back()) + 1 + columns_of(word) > width)
      lines.push_back(word);
    else
      lines.back() += " " + word;
  }
  return lines;
}

std::string left(const std::string& text, std::size_t width) {
  return text + std::string(width - std::min(width, columns_of(text)), ' ');
}

std::string right(const std::string& text, std::size_t width) {
  return std::string(width - std::min(width, columns_of(text)), ' ') + text;
}

std::string painted(const std::string& text, Tone tone, const ScreenStyle& style) {
  if (!style.color || tone == Tone::plain || text.empty()) return text;
  return escape_of(tone) + text + "\x1b[0m";
}

Signs::Signs(const ScreenStyle& style) {
  if (style.unicode) {
    plus_minus = "±", times = "×", at_most = "≤", infinity = "∞", separator = " · ";
    bar = "━", light_bar = "─", mark = "┃", beyond = "▶";
    half_bar = "╸", half_light = "╴", half_to_light = "╾";
  } else {
    plus_minus = "+-", times = "x", at_most = "<=", infinity = "inf", separator = ", ";
    bar = "=", light_bar = "-", mark = "|", beyond = ">";
    half_bar = half_to_light = "-", half_light = " ";
  }
}

std::string number_text(double value, int decimals, const Signs& signs) {
  if (std::isnan(value)) return "-";
  if (std::isinf(value)) return (value < 0 ? "-" : "") + signs.infinity;
  return fmt::format("{:.{}f}", value, decimals);
}

std::string error_text(double error, int decimals) {
  if (!std::isfinite(error)) return "?";
  const double least = std::pow(10.0, -decimals);
  if (error > 0 && error < 0.5 * least) return fmt::format("<{:.{}f}", least, decimals);
  return fmt::format("{:.{}f}", error, decimals);
}

int decimals_for(double largest) {
  if (!std::isfinite(largest) || largest <= 0) return 2;
  return std::clamp(2 - static_cast<int>(std::floor(std::log10(largest))), 0, 4);
}

ShownUnit shown_unit(const Quantity& quantity, const StudyUnits& units) {
  if (quantity.name.ends_with("drift_ratio")) return {0.01, "%"};
  if (quantity.dimension == Dimension::none) return {1, ""};
  if (quantity.dimension == Dimension::acceleration) return {standard_gravity, "g"};
  return {units.factor(quantity.dimension), units.name(quantity.dimension)};
}

std::string shown_name(const Quantity& quantity) {
  std::string name(quantity.name);
  std::replace(name.begin(), name.end(), '_', ' ');
  return name;
}

std::string shown_statistic(const Limit& limit) {
  if (limit.statistic == Statistic::max) return "largest";
  if (limit.statistic != Statistic::percentile) return std::string(statistic_name(limit.statistic));
  const int whole = static_cast<int>(limit.percentile);
  if (whole == limit.percentile) return fmt::format("{}{}-percentile", whole, ordinal_ending(whole));
  return fmt::format("{}th-percentile", limit.percentile);
}

}  // namespace pilotis
