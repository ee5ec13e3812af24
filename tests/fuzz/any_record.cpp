#include "tests/fuzz/any_record.hpp"

#include <cmath>
#include <cstdio>
#include <cstdlib>

#include "core/error.hpp"
#include "io/records/record.hpp"

namespace pilotis {

namespace {

void require(bool holds, const char* what, const FileOfRecords& file) {
  if (holds) return;
  std::fprintf(stderr, "%s: %s\n", file.format.c_str(), what);
  std::abort();
}

void require_sound(const FileOfRecords& file) {
  require(!file.components.empty(), "accepted without a component", file);
  for (const RecordComponent& component : file.components) {
    const Accelerogram& record = component.record;
    const bool as_promised = !component.stated_samples || record.samples.size() == *component.stated_samples;
    require(as_promised, "the number of samples is not the one promised", file);
    require(record.samples.size() >= 2, "fewer than two samples", file);
    require(std::isfinite(record.step) && record.step > 0, "the step is not above 0", file);
    for (double sample : record.samples) require(std::isfinite(sample), "a sample is not finite", file);
  }
}

void read_with(std::string_view content, const RecordHints& hints) {
  try {
    require_sound(read_record_content(content, "fuzzed", hints));
  } catch (const Error&) {
  }
}

}  // namespace

void read_any_record(std::string_view content) {
  static const RecordHints nothing, everything{"cm/s2", 0.01, 0.0, std::nullopt};
  read_with(content, nothing);
  read_with(content, everything);
}

}  // namespace pilotis
