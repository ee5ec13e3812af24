// What a law was made from comes back in the same order: every law of the catalogue.
#include "core/laws/law_values.hpp"

#include <gtest/gtest.h>

namespace pilotis {
namespace {

// Numbers all different, within the ranges: forces rise in the order they stand (cracking before yield).
double some_value(const Parameter& parameter, int place) {
  if (parameter.dimension != Dimension::none) return 1000.0 * (place + 1);
  const double low = std::max(parameter.least, 0.0), high = std::min(parameter.most, low + 1.0);
  return high - (high - low) * (0.5 + 0.05 * place);
}

TEST(LawValues, RoundTripOfEveryLaw) {
  for (const Method& method : law_catalogue()) {
    std::vector<double> values;
    for (const Parameter& parameter : method.parameters)
      values.push_back(some_value(parameter, static_cast<int>(values.size())));
    const Law law = make_law(method.name, values, "here");
    EXPECT_EQ(law_values(law), values) << method.name;
    EXPECT_EQ(law_method(law).name, method.name);
  }
}

}  // namespace
}  // namespace pilotis
