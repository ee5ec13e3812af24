// Largest magnitude of every quantity, with sign and time.
#pragma once

#include "core/response/observer.hpp"
#include "core/response/results.hpp"

namespace pilotis {

class PeakWatch : public Observer {
 public:
  explicit PeakWatch(const ResponseLayout& layout) : peaks_(layout.size()) {}
  bool see(const Instant& instant) noexcept override;
  const std::vector<Peak>& peaks() const { return peaks_; }  // flat, ResponseLayout order; step errors not set

 private:
  std::vector<Peak> peaks_;
};

}  // namespace pilotis
