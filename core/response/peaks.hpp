// Largest magnitude of every quantity, with sign and time.
#pragma once

#include "core/response/observer.hpp"
#include "core/response/results.hpp"

namespace pilotis {

class PeakWatch : public Observer {
 public:
  explicit PeakWatch(const ResponseLayout& layout);
  bool see(const Instant& instant) noexcept override;
  const std::vector<Peak>& peaks() const { return peaks_; }  // flat, ResponseLayout order; step errors not set

  // How far the true extreme may lie above the state kept: at most half a step away from it, hence curvature h^2 / 8
  // with the curvature of the parabola through that state and its two neighbors. SI, >= 0, ResponseLayout order; 0
  // where the peak is the first or the last state seen.
  const std::vector<double>& between_states() const { return between_; }

 private:
  void bound_rise(std::size_t i, const Instant& instant) noexcept;

  std::vector<Peak> peaks_;
  std::vector<double> between_;
  std::vector<double> last_, before_last_;  // values of the last two states
  double last_time_ = 0, before_last_time_ = 0;
  long seen_ = 0;
};

}  // namespace pilotis
