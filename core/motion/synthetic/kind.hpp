// What a kind of made motion shows to the outside: its name, its numbers, its tables, whether it draws random numbers.
// Help, validation and the tests over all kinds iterate these lists (registry.hpp).
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/accelerogram.hpp"
#include "core/motion/synthetic/grid.hpp"
#include "core/parameter.hpp"

namespace pilotis {

// A table of pairs, e.g. of period and spectral acceleration. SI; empty: not given.
struct Curve {
  std::vector<double> x;  // > 0, rising, as many as y, at least two
  std::vector<double> y;  // > 0
};

struct CurveParameter {
  std::string_view key;
  std::string_view x_name, y_name;  // as the columns of its file are named
  Dimension x = Dimension::none, y = Dimension::none;
  std::string_view meaning;  // one line
  bool required = true;
  bool is_target = false;  // a target spectrum: may also be one of core/motion/target by name
};

struct SyntheticKind {
  Method method;
  std::string_view example;  // options that make an example with the usual step and duration, e.g. " --pga 3"
  std::span<const CurveParameter> curves = {};
  bool random = true;  // false: a formula; the seed changes nothing
};

// The numbers of one motion in the order of the kind's lists, all checked against them.
class SyntheticInput {
 public:
  SyntheticInput(const SyntheticKind& kind, std::span<const double> values, std::span<const Curve> curves,
                 const SyntheticGrid& grid, std::string where)
      : grid(grid), where(std::move(where)), kind_(kind), values_(values), curves_(curves) {}

  double operator[](std::string_view key) const;        // SI; throws std::logic_error for a key the kind does not list
  const Curve& curve(std::string_view key) const;       // the same
  std::string_view choice(std::string_view key) const;  // the word of a parameter with choices
  // For errors: "synth ricker.frequency".
  std::string at(std::string_view key) const { return where + "." + std::string(key); }
  // Samples of the grid: duration / step + 1.
  std::size_t count() const;

  const SyntheticGrid grid;
  const std::string where;

 private:
  std::size_t place_of(std::string_view key) const;

  const SyntheticKind& kind_;
  std::span<const double> values_;
  std::span<const Curve> curves_;
};

// Throws Error (input) when the grid's step is coarser than a tenth of `period` (s), the shortest that the parameter
// `key` stands for.
void require_fine_step(const SyntheticInput& input, std::string_view key, double period);

struct MadeMotion {
  Accelerogram record;             // m/s2, rounded to 1e-6 m/s2
  std::vector<std::string> notes;  // what was derived or done, one line each, with units
};

}  // namespace pilotis
