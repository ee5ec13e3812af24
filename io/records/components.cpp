#include "io/records/components.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <array>
#include <cmath>

#include "core/error.hpp"
#include "io/records/number.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

double in_circle(double degrees) { return degrees - 360 * std::floor(degrees / 360); }

std::optional<double> number_in(std::string_view text) {
  const ParsedNumber parsed = parse_number(text);
  if (parsed.kind != ParsedNumber::Kind::number || std::abs(parsed.value) > 720) return std::nullopt;
  return parsed.value;
}

// "n35e": 35 degrees from north to east.
std::optional<double> bearing(std::string_view lower) {
  if (lower.size() < 3) return std::nullopt;
  const char from = lower.front(), toward = lower.back();
  const bool quadrant = (from == 'n' || from == 's') && (toward == 'e' || toward == 'w');
  const std::optional<double> angle = number_in(lower.substr(1, lower.size() - 2));
  if (!quadrant || !angle || *angle < 0 || *angle > 90) return std::nullopt;
  const double start = from == 'n' ? 0 : 180;
  const bool clockwise = (from == 'n') == (toward == 'e');
  return in_circle(clockwise ? start + *angle : start - *angle);
}

struct NamedDirection {
  std::string_view name;
  double azimuth;
};
constexpr std::array<NamedDirection, 10> directions{{{"n", 0},
                                                     {"e", 90},
                                                     {"s", 180},
                                                     {"w", 270},
                                                     {"n-s", 0},
                                                     {"ns", 0},
                                                     {"e-w", 90},
                                                     {"ew", 90},
                                                     {"north", 0},
                                                     {"east", 90}}};

// Lower case, without blanks.
std::string essence(std::string_view name) {
  std::string text;
  for (std::string_view word : words_of(name)) text += lower_case(word);
  return text;
}

std::vector<const RecordComponent*> named(const FileOfRecords& file, const std::string& wanted) {
  std::vector<const RecordComponent*> found;
  for (const RecordComponent& component : file.components)
    if (essence(component.name) == wanted || essence(component_label(component)) == wanted) found.push_back(&component);
  return found;
}

std::vector<const RecordComponent*> pointing(const FileOfRecords& file, const std::string& wanted) {
  std::vector<const RecordComponent*> found;
  const std::optional<double> azimuth = number_in(wanted);
  for (const RecordComponent& component : file.components)
    if (azimuth && component.azimuth == in_circle(*azimuth)) found.push_back(&component);
  return found;
}

std::vector<const RecordComponent*> numbered(const FileOfRecords& file, const std::string& wanted) {
  std::vector<const RecordComponent*> found;
  for (const RecordComponent& component : file.components)
    if (component.channel && fmt::format("channel{}", *component.channel) == wanted) found.push_back(&component);
  return found;
}

std::vector<const RecordComponent*> matches(const FileOfRecords& file, const std::string& wanted) {
  for (const auto& way : {named, pointing, numbered})
    if (auto found = way(file, wanted); !found.empty()) return found;
  return {};
}

std::string listed(const FileOfRecords& file) {
  std::vector<std::string> labels;
  for (const RecordComponent& component : file.components) labels.push_back(in_quotes(component_label(component)));
  return fmt::format("{}", fmt::join(labels, ", "));
}

}  // namespace

std::optional<double> azimuth_of_name(std::string_view name) {
  const std::string text = essence(name);
  for (const NamedDirection& direction : directions)
    if (text == direction.name) return direction.azimuth;
  if (const auto found = bearing(text)) return found;
  const std::size_t degrees = text.find("deg");
  if (const auto found = number_in(std::string_view(text).substr(0, degrees))) return in_circle(*found);
  return std::nullopt;
}

std::string component_label(const RecordComponent& component) {
  const std::string name = component.name.empty() ? "without a name" : component.name;
  return component.channel ? fmt::format("channel {}: {}", *component.channel, name) : name;
}

const RecordComponent& chosen_component(const FileOfRecords& file, const std::optional<std::string>& wanted,
                                        const std::string& where) {
  if (!wanted) {
    if (file.components.size() == 1) return file.components.front();
    throw input_error(where, fmt::format("the file holds {} components: {}", file.components.size(), listed(file)),
                      fmt::format("say which one: beside the file in the study, component = {}",
                                  in_quotes(component_label(file.components.front()))));
  }
  const std::vector<const RecordComponent*> found = matches(file, essence(*wanted));
  if (found.size() == 1) return *found.front();
  throw input_error(
      where, fmt::format("{} of the components is {}", found.empty() ? "none" : "more than one", in_quotes(*wanted)),
      fmt::format("the components of this file are {}; one is named by its name, its azimuth in degrees, "
                  "or its number as in \"channel 1\"",
                  listed(file)));
}

}  // namespace pilotis
