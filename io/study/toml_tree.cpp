#include "io/study/toml_tree.hpp"

#include <fmt/format.h>
#include <toml++/toml.h>

#include <algorithm>
#include <sstream>

#include "core/error.hpp"

namespace pilotis {

namespace {

int line_of(const toml::source_region& region) { return static_cast<int>(region.begin.line); }

Node converted(const toml::node& from);

void convert_table(const toml::table& from, Node& to) {
  to.kind = NodeKind::table;
  std::vector<std::pair<toml::source_position, Node::Entry>> entries;
  for (const auto& [key, value] : from)
    entries.emplace_back(key.source().begin,
                         Node::Entry{std::string(key.str()), line_of(key.source()), converted(value)});
  std::sort(entries.begin(), entries.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
  for (auto& [position, entry] : entries) to.entries.push_back(std::move(entry));
}

void convert_date(const toml::node& from, Node& to) {
  to.kind = NodeKind::date;
  std::ostringstream text;
  from.visit([&text](const auto& value) {
    if constexpr (toml::is_date<decltype(value)> || toml::is_time<decltype(value)> ||
                  toml::is_date_time<decltype(value)>)
      text << value.get();
  });
  to.text = text.str();
}

Node converted(const toml::node& from) {
  Node to;
  to.line = line_of(from.source());
  if (const auto* table = from.as_table()) {
    convert_table(*table, to);
  } else if (const auto* array = from.as_array()) {
    to.kind = NodeKind::array;
    for (const toml::node& item : *array) to.items.push_back(converted(item));
  } else if (const auto* text = from.as_string()) {
    to.kind = NodeKind::text;
    to.text = text->get();
  } else if (const auto* whole = from.as_integer()) {
    to.kind = NodeKind::whole;
    to.whole = whole->get();
  } else if (const auto* real = from.as_floating_point()) {
    to.kind = NodeKind::real;
    to.real = real->get();
  } else if (const auto* flag = from.as_boolean()) {
    to.kind = NodeKind::flag;
    to.flag = flag->get();
  } else {
    convert_date(from, to);
  }
  return to;
}

}  // namespace

const Node::Entry* Node::find(const std::string& key) const {
  for (const Entry& entry : entries)
    if (entry.key == key) return &entry;
  return nullptr;
}

Node parse_toml(const std::string& content, const std::string& file) {
  try {
    return converted(toml::parse(content, file));
  } catch (const toml::parse_error& e) {
    std::string problem(e.description());
    // The library shows a line end as an escape.
    if (const auto at = problem.find("saw '\\n'"); at != std::string::npos)
      problem.replace(at, 8, "found the end of the line");
    const bool twice = problem.find("cannot redefine") != std::string::npos;
    throw input_error(fmt::format("{}:{}", file, line_of(e.source())), problem,
                      twice ? "give each key and each table once" : "the file must be TOML (toml.io, version 1.0)");
  }
}

std::string described(const Node& node) {
  switch (node.kind) {
    case NodeKind::text:
      return fmt::format("the text \"{}\"", node.text);
    case NodeKind::whole:
      return fmt::format("the number {}", node.whole);
    case NodeKind::real:
      return fmt::format("the number {}", node.real);
    case NodeKind::flag:
      return node.flag ? "true" : "false";
    case NodeKind::date:
      return fmt::format("the date or time {}", node.text);
    case NodeKind::array:
      return fmt::format("a list of {} values", node.items.size());
    case NodeKind::table:
      return "a table";
  }
  return "nothing";
}

}  // namespace pilotis
