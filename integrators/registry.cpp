#include <fmt/format.h>
#include <fmt/ranges.h>

#include <array>
#include <vector>

#include "core/error.hpp"
#include "integrators/catalogue.hpp"
#include "integrators/hht_alpha.hpp"
#include "integrators/modal_superposition.hpp"
#include "integrators/newmark.hpp"
#include "integrators/piecewise_exact.hpp"
#include "integrators/runge_kutta.hpp"

namespace pilotis {

namespace {

using Values = std::span<const double>;
using Made = std::shared_ptr<const Scheme>;

struct Entry {
  Method method;
  Made (*make)(Values);
};

Made average_acceleration(Values) { return std::make_shared<Newmark>(0.25, 0.5, Newmark::average.name); }
Made linear_acceleration(Values) { return std::make_shared<Newmark>(1.0 / 6, 0.5, Newmark::linear.name); }
Made dormand_prince(Values v) { return std::make_shared<RungeKutta>(RungeKutta::Pair::dormand_prince, v[0], v[1]); }
Made fehlberg(Values v) { return std::make_shared<RungeKutta>(RungeKutta::Pair::fehlberg, v[0], v[1]); }

// A new scheme: its pair of files in this folder, one line here.
constexpr std::array entries{Entry{Newmark::method, &Newmark::make},
                             Entry{Newmark::average, &average_acceleration},
                             Entry{Newmark::linear, &linear_acceleration},
                             Entry{HhtAlpha::method, &HhtAlpha::make},
                             Entry{RungeKutta::dormand_prince, &dormand_prince},
                             Entry{RungeKutta::fehlberg, &fehlberg},
                             Entry{PiecewiseExact::method, &PiecewiseExact::make},
                             Entry{ModalSuperposition::method, &ModalSuperposition::make}};

constexpr auto methods = [] {
  std::array<Method, entries.size()> list{};
  for (std::size_t i = 0; i < entries.size(); ++i) list[i] = entries[i].method;
  return list;
}();

}  // namespace

std::span<const Method> scheme_catalogue() { return methods; }

std::shared_ptr<const Scheme> make_scheme(std::string_view name, std::span<const double> values,
                                          const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : entries) {
    known.push_back(entry.method.name);
    if (entry.method.name != name) continue;
    for (std::size_t i = 0; i < values.size(); ++i)
      require_allowed(entry.method.parameters[i], values[i],
                      fmt::format("{}.{}", where, entry.method.parameters[i].key));
    return entry.make(values);
  }
  throw input_error(where, fmt::format("there is no scheme \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

}  // namespace pilotis
