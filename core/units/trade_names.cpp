#include "core/units/trade_names.hpp"

#include <algorithm>
#include <array>
#include <cctype>

namespace pilotis {

namespace {

// A tonne-force is 1000 kilograms-force.
constexpr std::array<std::pair<const char*, const char*>, 1> added{{{"tf", "1000 kgf"}}};

struct TradeName {
  Dimension dimension;
  std::string_view name;
  std::string_view meaning;  // as UDUNITS-2 reads it
};

// Upper case as in the headers of record files. A slug is what one pound-force accelerates by 1 ft/s2; UDUNITS-2 has it
// to six digits only.
constexpr std::array<TradeName, 12> replaced{{
    {Dimension::acceleration, "g", "gravity"},
    {Dimension::acceleration, "G", "gravity"},
    {Dimension::acceleration, "gn", "gravity"},
    {Dimension::acceleration, "gal", "cm/s2"},
    {Dimension::acceleration, "gals", "cm/s2"},
    {Dimension::acceleration, "GAL", "cm/s2"},
    {Dimension::acceleration, "CM", "cm"},
    {Dimension::acceleration, "MM", "mm"},
    {Dimension::acceleration, "M", "m"},
    {Dimension::acceleration, "S", "s"},
    {Dimension::acceleration, "SEC", "s"},
    {Dimension::mass, "slug", "(lbf s2/ft)"},
}};

struct Ambiguous {
  std::string_view name, advice;
};

constexpr std::string_view ton_advice =
    "write t (1000 kg) or short_ton (2000 lb), as a force tf (1000 kgf) or kip (1000 lbf)";
constexpr std::array<Ambiguous, 5> ambiguous{{{"ton", ton_advice},
                                              {"tons", ton_advice},
                                              {"tonf", ton_advice},
                                              {"ton_force", ton_advice},
                                              {"tons_force", ton_advice}}};

bool is_letter(char c) { return std::isalpha(static_cast<unsigned char>(c)) != 0 || c == '_'; }

// Calls visit(word, is_name) for each stretch of letters and each stretch of anything else, in order.
template <class Visit>
void for_each_word(std::string_view unit, Visit visit) {
  std::size_t at = 0;
  while (at < unit.size()) {
    const bool name = is_letter(unit[at]);
    std::size_t end = at;
    while (end < unit.size() && is_letter(unit[end]) == name) ++end;
    visit(unit.substr(at, end - at), name);
    at = end;
  }
}

template <class Meaning>
std::string with_names_replaced(std::string_view unit, Meaning meaning) {
  std::string text;
  for_each_word(unit, [&](std::string_view word, bool name) { text += name ? meaning(word) : word; });
  return text;
}

}  // namespace

std::span<const std::pair<const char*, const char*>> added_names() { return added; }

std::string with_trade_names(std::string_view unit, Dimension dimension) {
  return with_names_replaced(unit, [dimension](std::string_view word) {
    const auto found = std::find_if(replaced.begin(), replaced.end(), [&](const TradeName& trade) {
      return trade.dimension == dimension && trade.name == word;
    });
    return found == replaced.end() ? word : found->meaning;
  });
}

std::string with_pound_as_force(std::string_view unit) {
  return with_names_replaced(
      unit, [](std::string_view word) { return word == "lb" || word == "lbs" ? std::string_view("lbf") : word; });
}

std::string_view ambiguous_name(std::string_view unit) {
  std::string_view advice;
  for_each_word(unit, [&](std::string_view word, bool) {
    for (const Ambiguous& entry : ambiguous)
      if (entry.name == word) advice = entry.advice;
  });
  return advice;
}

std::string_view trimmed(std::string_view text) {
  const auto first = text.find_first_not_of(" \t\r\n");
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(" \t\r\n") - first + 1);
}

}  // namespace pilotis
