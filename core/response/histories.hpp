// Values over time of chosen quantities, at whole steps, every n-th of them.
#pragma once

#include "core/response/observer.hpp"
#include "core/response/results.hpp"

namespace pilotis {

class HistoryKeeper : public Observer {
 public:
  // `every` >= 1; `steps` is how many whole steps the march will take, to reserve memory once.
  HistoryKeeper(const ResponseLayout& layout, const std::vector<const Quantity*>& kept, int every, long steps);
  bool see(const Instant& instant) noexcept override;
  const std::vector<double>& times() const { return times_; }  // s
  const std::vector<History>& histories() const { return histories_; }

 private:
  ResponseLayout layout_;
  int every_;
  std::vector<double> times_;
  std::vector<History> histories_;
};

}  // namespace pilotis
