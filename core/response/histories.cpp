#include "core/response/histories.hpp"

namespace pilotis {

HistoryKeeper::HistoryKeeper(const ResponseLayout& layout, const std::vector<const Quantity*>& kept, int every,
                             long steps)
    : layout_(layout), every_(every) {
  const std::size_t rows = kept.empty() ? 0 : static_cast<std::size_t>(steps / every + 1);
  times_.reserve(rows);
  for (const Quantity* quantity : kept) {
    histories_.push_back({quantity, {}});
    histories_.back().values.reserve(rows * layout.count(*quantity));
  }
}

bool HistoryKeeper::see(const Instant& instant) noexcept {
  if (histories_.empty() || !instant.whole_step || instant.state.step % every_ != 0) return true;
  times_.push_back(instant.time);
  for (History& history : histories_) {
    const double* first = instant.values + layout_.offset(*history.quantity);
    history.values.insert(history.values.end(), first, first + layout_.count(*history.quantity));
  }
  return true;
}

}  // namespace pilotis
