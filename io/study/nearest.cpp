#include "io/study/nearest.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>
#include <vector>

namespace pilotis {

namespace {

// "stat" for "statistic", "maximum" for "max".
bool one_starts_the_other(std::string_view a, std::string_view b) {
  return std::min(a.size(), b.size()) >= 3 && (a.starts_with(b) || b.starts_with(a));
}

}  // namespace

int edit_distance(std::string_view a, std::string_view b) {
  // rows[i][j]: distance of the first i letters of a and the first j of b.
  std::vector<std::vector<int>> rows(a.size() + 1, std::vector<int>(b.size() + 1));
  for (std::size_t i = 0; i <= a.size(); ++i) rows[i][0] = static_cast<int>(i);
  for (std::size_t j = 0; j <= b.size(); ++j) rows[0][j] = static_cast<int>(j);
  for (std::size_t i = 1; i <= a.size(); ++i)
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const int replaced = rows[i - 1][j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
      rows[i][j] = std::min({rows[i - 1][j] + 1, rows[i][j - 1] + 1, replaced});
      if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
        rows[i][j] = std::min(rows[i][j], rows[i - 2][j - 2] + 1);
    }
  return rows[a.size()][b.size()];
}

std::string_view nearest(std::string_view name, std::span<const std::string_view> known) {
  std::string_view best;
  int least = 0;
  for (const std::string_view candidate : known) {
    const int distance = edit_distance(name, candidate);
    if (best.empty() || distance < least) {
      best = candidate;
      least = distance;
    }
  }
  if (2 * least <= static_cast<int>(std::max(name.size(), best.size()))) return best;
  const auto start =
      std::find_if(known.begin(), known.end(), [&](std::string_view k) { return one_starts_the_other(name, k); });
  return start == known.end() ? std::string_view{} : *start;
}

std::string did_you_mean(std::string_view name, std::span<const std::string_view> known) {
  const std::string allowed = fmt::format("allowed: {}", fmt::join(known, ", "));
  const std::string_view near = nearest(name, known);
  return near.empty() ? allowed : fmt::format("did you mean \"{}\"? {}", near, allowed);
}

}  // namespace pilotis
