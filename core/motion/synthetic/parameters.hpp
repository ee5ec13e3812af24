// Parameters that several kinds of made motion share, and how a kind puts its list together.
#pragma once

#include <algorithm>
#include <array>

#include "core/parameter.hpp"

namespace pilotis {

// One list after the other.
template <std::size_t... sizes>
constexpr auto joined(const std::array<Parameter, sizes>&... lists) {
  std::array<Parameter, (sizes + ...)> all;
  auto to = all.begin();
  ((to = std::copy(lists.begin(), lists.end(), to)), ...);
  return all;
}

// A number that must be greater than 0.
constexpr Parameter positive(std::string_view key, Dimension dimension, std::string_view meaning,
                             std::optional<double> otherwise = {}) {
  return {.key = key,
          .dimension = dimension,
          .meaning = meaning,
          .otherwise = otherwise,
          .least = 0,
          .least_allowed = false};
}

// A number that must be at least 0.
constexpr Parameter not_negative(std::string_view key, Dimension dimension, std::string_view meaning,
                                 std::optional<double> otherwise = {}) {
  return {.key = key, .dimension = dimension, .meaning = meaning, .otherwise = otherwise, .least = 0};
}

// A damping ratio: greater than 0 and less than 1.
constexpr Parameter damping_ratio(std::string_view key, std::string_view meaning,
                                  std::optional<double> otherwise = {}) {
  return {.key = key,
          .meaning = meaning,
          .otherwise = otherwise,
          .least = 0,
          .most = 1,
          .least_allowed = false,
          .most_allowed = false};
}

// One of several words; the first unless said otherwise.
constexpr Parameter one_of(std::string_view key, std::string_view meaning, std::span<const std::string_view> words) {
  return {.key = key, .meaning = meaning, .otherwise = 0, .choices = words};
}

}  // namespace pilotis
