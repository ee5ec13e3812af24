#include "core/laws/law_values.hpp"

#include <array>
#include <bit>

namespace pilotis {

const Method& law_method(const Law& law) {
  return std::visit([](const auto& l) -> const Method& { return l.method; }, law);
}

std::vector<double> law_values(const Law& law) {
  return std::visit(
      []<class L>(const L& l) {
        // A law holds its parameters and nothing else, in the order it declares them.
        constexpr std::size_t count = L::parameters.size();
        static_assert(sizeof(L) == count * sizeof(double));
        const auto values = std::bit_cast<std::array<double, count>>(l);
        return std::vector<double>(values.begin(), values.end());
      },
      law);
}

}  // namespace pilotis
