#include "apps/motion/pair.hpp"

#include <fmt/format.h>

#include "apps/motion/names.hpp"
#include "core/error.hpp"

namespace pilotis {

PairNumbers pair_of(const std::vector<RecordNumbers>& records, const MotionRequest& request) {
  const std::string where = "motion --rotd";
  if (records.size() != 2)
    throw input_error(where, fmt::format("found {} usable record components", records.size()),
                      "the two horizontal components of one motion are needed, in one file or in two");
  const std::vector<std::string> names = shown_names(records);
  PairNumbers pair{names[0], names[1], {}};
  for (const double damping_ratio : request.damping_ratios)
    pair.spectra.push_back(rotated_spectrum(ground_of(records[0].record), ground_of(records[1].record), request.periods,
                                            damping_ratio, fmt::format("{}: {} and {}", where, names[0], names[1])));
  return pair;
}

}  // namespace pilotis
