#include "integrators/scheme.hpp"

#include <fmt/format.h>

#include <type_traits>

#include "core/error.hpp"

namespace pilotis {

void require_linear(const System& system, const std::string& scheme) {
  for_each_group(system, [&]<class L>(const ElementGroup<L>& group) {
    if (std::is_same_v<L, Linear> || group.laws.empty()) return;
    throw input_error("march.scheme",
                      fmt::format("{} marches linear buildings only, and the law {} stands in element {}", scheme,
                                  L::method.name, group.id[0] + 1),
                      "a scheme for nonlinear buildings, such as newmark, or the law linear in every story");
  });
}

}  // namespace pilotis
