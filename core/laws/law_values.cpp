#include "core/laws/law_values.hpp"

namespace pilotis {

const Method& law_method(const Law& law) {
  return std::visit([](const auto& l) -> const Method& { return l.method; }, law);
}

std::vector<double> law_values(const Law& law) {
  return std::visit(
      [](const auto& l) {
        const auto values = l.values();
        return std::vector<double>(values.begin(), values.end());
      },
      law);
}

}  // namespace pilotis
