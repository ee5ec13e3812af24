// Every law, listed once. A new law: its header in this folder, its name here; nothing else.
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <tuple>
#include <variant>

#include "core/laws/bilinear.hpp"
#include "core/laws/bouc_wen.hpp"
#include "core/laws/linear.hpp"
#include "core/laws/trilinear.hpp"

namespace pilotis {

template <class... L>
struct LawList {
  using Variant = std::variant<L...>;
  template <template <class> class Group>
  using Tuple = std::tuple<Group<L>...>;
};

using Laws = LawList<Linear, Bilinear, Trilinear, BoucWen>;
using Law = Laws::Variant;

// The catalogue, in the order above.
std::span<const Method> law_catalogue();

// A law from its name and its parameters (SI), in the order of its Method::parameters. Throws Error (input) at `where`
// when the name is unknown, a value is out of range, or the values do not go together.
Law make_law(std::string_view name, std::span<const double> values, const std::string& where);

std::string_view law_name(const Law& law);
double initial_stiffness(const Law& law);  // N/m
double yield_deformation(const Law& law);  // m, 0 when it does not yield

}  // namespace pilotis
