#include <fmt/format.h>

#include <algorithm>
#include <charconv>
#include <system_error>

#include "io/study/nearest.hpp"
#include "io/study/table_reader.hpp"

namespace pilotis {

namespace {

// "kN/mm" for messages; nothing for plain numbers.
std::string unit_of(const StudyUnits& units, Dimension dimension) {
  return dimension == Dimension::none ? std::string() : fmt::format(" {}", units.name(dimension));
}

std::string trimmed(const std::string& text) {
  const auto first = text.find_first_not_of(" \t");
  return first == std::string::npos ? "" : text.substr(first, text.find_last_not_of(" \t") - first + 1);
}

std::string needed_quantity(const ValueReader& value, const Parameter& parameter) {
  if (parameter.dimension == Dimension::none) return fmt::format("{}: a number is needed", parameter.meaning);
  return fmt::format("{}: a number (in {}) or text with a unit of {}, such as \"1.5 {}\", is needed", parameter.meaning,
                     value.source().units.name(parameter.dimension), dimension_name(parameter.dimension),
                     value.source().units.name(parameter.dimension));
}

// "320 kN/mm" in SI.
double from_text(const ValueReader& value, const Parameter& parameter) {
  const std::string text = trimmed(value.node().text);
  double number = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error != std::errc{}) throw value.wrong_type(needed_quantity(value, parameter));
  const std::string unit = trimmed(std::string(end, text.data() + text.size()));
  if (unit.empty())
    throw value.wrong(fmt::format("found the text \"{}\" without a unit", value.node().text),
                      needed_quantity(value, parameter));
  try {
    return number * si_factor(unit, parameter.dimension, value.where());
  } catch (const Error& e) {
    if (e.kind() != ErrorKind::input) throw;
    throw value.wrong(fmt::format("{} in \"{}\"", e.problem(), value.node().text), e.remedy());
  }
}

std::string as_written(const ValueReader& value, const Parameter& parameter) {
  const Node& node = value.node();
  if (node.kind == NodeKind::text) return fmt::format("found \"{}\"", node.text);
  const std::string unit = unit_of(value.source().units, parameter.dimension);
  return node.kind == NodeKind::whole ? fmt::format("found {}{}", node.whole, unit)
                                      : fmt::format("found {}{}", node.real, unit);
}

}  // namespace

ValueReader::ValueReader(const StudySource& source, const Node& node, int line, std::string path)
    : source_(&source), node_(&node), line_(line), path_(std::move(path)) {}

std::string ValueReader::where() const {
  const std::string place = fmt::format("{}:{}", source_->file, line_);
  return path_.empty() ? place : fmt::format("{}: {}", place, path_);
}

Error ValueReader::wrong(const std::string& found, const std::string& needed) const {
  return input_error(where(), found, needed);
}

Error ValueReader::wrong_type(const std::string& needed) const {
  return wrong(fmt::format("found {}", described(*node_)), needed);
}

std::string ValueReader::text() const {
  if (node_->kind != NodeKind::text) throw wrong_type("text in quotes is needed");
  if (trimmed(node_->text).empty()) throw wrong("found empty text", "something must be said here");
  return node_->text;
}

bool ValueReader::flag() const {
  if (node_->kind != NodeKind::flag) throw wrong_type("true or false is needed");
  return node_->flag;
}

double ValueReader::quantity(const Parameter& parameter) const {
  if (!parameter.choices.empty()) {
    const std::string chosen = choice(parameter.key, parameter.choices);
    const auto place = std::find(parameter.choices.begin(), parameter.choices.end(), chosen);
    return static_cast<double>(place - parameter.choices.begin());
  }
  double value = 0;
  switch (node_->kind) {
    case NodeKind::whole:
      value = static_cast<double>(node_->whole) * source_->units.factor(parameter.dimension);
      break;
    case NodeKind::real:
      value = node_->real * source_->units.factor(parameter.dimension);
      break;
    case NodeKind::text:
      value = from_text(*this, parameter);
      break;
    default:
      throw wrong_type(needed_quantity(*this, parameter));
  }
  try {
    require_allowed(parameter, value, where());
  } catch (const Error& e) {
    throw wrong(as_written(*this, parameter), e.remedy());
  }
  return value;
}

std::string ValueReader::choice(std::string_view thing, std::span<const std::string_view> allowed) const {
  const std::string found = text();
  if (std::find(allowed.begin(), allowed.end(), found) == allowed.end())
    throw wrong(fmt::format("there is no {} \"{}\"", thing, found), did_you_mean(found, allowed));
  return found;
}

std::vector<ValueReader> ValueReader::items() const {
  if (node_->kind != NodeKind::array) throw wrong_type("a list in square brackets is needed");
  std::vector<ValueReader> readers;
  for (std::size_t i = 0; i < node_->items.size(); ++i)
    readers.emplace_back(*source_, node_->items[i], node_->items[i].line, fmt::format("{}[{}]", path_, i + 1));
  return readers;
}

std::vector<double> ValueReader::quantities(const Parameter& parameter) const {
  std::vector<double> values;
  for (const ValueReader& item : items()) values.push_back(item.quantity(parameter));
  return values;
}

}  // namespace pilotis
