// The nearest known name to a misspelled one, for messages.
#pragma once

#include <span>
#include <string>
#include <string_view>

namespace pilotis {

// Insertions, deletions, replacements and swaps of neighbors that lead from one to the other, each counted one (optimal
// string alignment). Source: Damerau 1964; Levenshtein 1966.
int edit_distance(std::string_view a, std::string_view b);

// The known name at the least distance, if at most half of the letters differ; else one that starts with `name` or that
// `name` starts with; else empty.
std::string_view nearest(std::string_view name, std::span<const std::string_view> known);

// `did you mean "height"? allowed: label, height, weight`; without the question when nothing is alike.
std::string did_you_mean(std::string_view name, std::span<const std::string_view> known);

}  // namespace pilotis
