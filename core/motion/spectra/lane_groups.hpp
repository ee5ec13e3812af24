// Oscillators that take the same fraction of the record's step walk together.
#pragma once

#include <algorithm>
#include <numeric>
#include <span>
#include <vector>

namespace pilotis {

// Calls use(pieces, members) for every group: members are places in `pieces` (one entry per oscillator) that share one
// value, in rising order.
template <class Use>
void each_lane_group(const std::vector<int>& pieces, Use&& use) {
  std::vector<int> order(pieces.size());
  std::iota(order.begin(), order.end(), 0);
  std::stable_sort(order.begin(), order.end(), [&](int i, int j) { return pieces[i] < pieces[j]; });
  for (std::size_t begin = 0, end = 0; begin < order.size(); begin = end) {
    while (end < order.size() && pieces[order[end]] == pieces[order[begin]]) ++end;
    use(pieces[order[begin]], std::span<const int>(order).subspan(begin, end - begin));
  }
}

}  // namespace pilotis
