// Laws with random legal parameters and random deformation paths, for properties that hold for every law. A new law is
// drawn by its own list of parameters; nothing is to be added here for it.
#pragma once

#include <gtest/gtest.h>
#include <rapidcheck.h>

#include <algorithm>
#include <cmath>
#include <cstring>
#include <stdexcept>
#include <string>
#include <vector>

#include "core/error.hpp"
#include "core/laws/registry.hpp"

namespace pilotis::test {

template <class List>
struct TestTypesOf;
template <class... L>
struct TestTypesOf<LawList<L...>> {
  using Type = ::testing::Types<L...>;
};
using EveryLawType = TestTypesOf<Laws>::Type;

// How far the numbers without a unit go: to their bounds, or to where one step of a path resolves the rule.
enum class Reach { all, moderate };

// `share` in [0, 1] runs over the legal range of `p`: on a logarithmic scale for numbers with a unit.
inline double drawn_value(const Parameter& p, double share, Reach reach) {
  if (p.dimension == Dimension::stiffness) return std::pow(10, 5 + 4 * share);  // N/m
  if (p.dimension == Dimension::force) return std::pow(10, 3 + 4 * share);      // N
  const double room = reach == Reach::all ? 1e3 : 3.0;
  const double least = std::max(p.least, -room), most = std::min(p.most, room);
  const double inside = 1e-3 * (most - least);
  const double low = p.least_allowed ? least : least + inside, high = p.most_allowed ? most : most - inside;
  return low + share * (high - low);
}

// A value in [low, high] in thousandths, so that what RapidCheck prints is short and shrinks; the whole range from the
// first case on.
inline rc::Gen<double> thousandths(int low, int high) {
  return rc::gen::map(rc::gen::resize(rc::kNominalSize, rc::gen::inRange(low, high + 1)),
                      [](int x) { return x / 1000.0; });
}

// A law of type L; parameters that do not go together are drawn again.
template <class L>
L drawn_law(Reach reach) {
  const std::size_t count = L::method.parameters.size();
  for (int attempt = 0; attempt < 200; ++attempt) {
    std::vector<double> values;
    for (std::size_t i = 0; i < count; ++i)
      values.push_back(drawn_value(L::method.parameters[i], *thousandths(0, 1000), reach));
    try {
      return std::get<L>(make_law(L::method.name, values, "drawn"));
    } catch (const Error&) {
    }
  }
  throw std::runtime_error("no legal parameters found for " + std::string(L::method.name));
}

// m, a deformation of the order at which the law shows its character.
template <class L>
double scale_of(const L& law) {
  const double yields = yield_deformation(law);
  return yields > 0 ? yields : 0.01;
}

// Turning points of a path, m.
template <class L>
std::vector<double> drawn_path(const L& law, std::size_t turns) {
  std::vector<double> path = *rc::gen::container<std::vector<double>>(turns, thousandths(-5000, 5000));
  for (double& d : path) d *= scale_of(law);
  return path;
}

// One spring that is led along a path, each point committed.
template <class L>
struct Walker {
  L law;
  typename L::template Memory<double> memory{};
  double deformation = 0;  // m
  double force = 0;        // N

  Reply<double> peek(double to) const {
    typename L::template Memory<double> trial = memory;
    return reply<double>(law, to, 0.0, memory, trial);
  }
  Reply<double> go(double to) {
    typename L::template Memory<double> trial = memory;
    const Reply<double> answer = reply<double>(law, to, 0.0, memory, trial);
    memory = trial;
    deformation = to;
    force = answer.force;
    return answer;
  }
};

// What a path cost: work of the force by the trapezoid rule, and what the law says it stored and dissipated; J.
struct PathWork {
  double work = 0, dissipated = 0, stored = 0, force = 0, travel = 0;  // force: largest, N; travel: m
};

// From the virgin state through all turns, each leg in `pieces` equal parts.
template <class L>
PathWork walk(const L& law, const std::vector<double>& turns, int pieces) {
  Walker<L> walker{law};
  PathWork sum;
  for (const double turn : turns) {
    const double from = walker.deformation;
    for (int k = 1; k <= pieces; ++k) {
      const Walker<L> before = walker;
      walker.go(from + (turn - from) * k / pieces);
      const double moved = walker.deformation - before.deformation;
      sum.work += 0.5 * (before.force + walker.force) * moved;
      sum.dissipated += dissipated_energy<double>(law, before.memory, walker.memory);
      sum.force = std::max(sum.force, std::abs(walker.force));
      sum.travel += std::abs(moved);
    }
  }
  sum.stored = stored_energy<double>(law, walker.memory, walker.deformation);
  return sum;
}

template <class M>
bool same_bits(const M& a, const M& b) {
  if constexpr (std::is_empty_v<M>) return true;
  return std::memcmp(&a, &b, sizeof(M)) == 0;
}

}  // namespace pilotis::test
