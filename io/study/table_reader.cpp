#include "io/study/table_reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <stdexcept>

#include "io/study/nearest.hpp"

namespace pilotis {

namespace {

bool among(const std::vector<std::string>& names, std::string_view name) {
  return std::find(names.begin(), names.end(), name) != names.end();
}

std::string joined_path(const std::string& path, std::string_view key) {
  return path.empty() ? std::string(key) : fmt::format("{}.{}", path, key);
}

}  // namespace

TableReader::TableReader(const StudySource& source, const Node& table, int line, std::string path)
    : self_(source, table, line, std::move(path)) {}

TableReader::TableReader(const ValueReader& value) : self_(value) {
  if (value.node().kind != NodeKind::table) throw value.wrong_type("a table is needed");
}

void TableReader::known_keys(std::span<const std::string_view> keys) {
  known_.assign(keys.begin(), keys.end());
  for (const Node::Entry& entry : self_.node().entries) {
    if (among(known_, entry.key)) continue;
    const ValueReader place(self_.source(), entry.value, entry.line, joined_path(path(), entry.key));
    throw place.wrong(fmt::format("found the unknown key \"{}\"", entry.key), did_you_mean(entry.key, keys));
  }
}

bool TableReader::has(std::string_view key) const { return find(key).has_value(); }

std::optional<ValueReader> TableReader::find(std::string_view key) const {
  if (!known_.empty() && !among(known_, key))
    throw std::logic_error(fmt::format("key \"{}\" read but not among the known keys", key));
  const Node::Entry* entry = self_.node().find(std::string(key));
  if (entry == nullptr) return std::nullopt;
  return ValueReader(self_.source(), entry->value, entry->line, joined_path(path(), key));
}

Error TableReader::missing(std::string_view key, const std::string& meaning) const {
  const ValueReader place(self_.source(), self_.node(), self_.line(), joined_path(path(), key));
  return place.wrong("this key is missing", meaning);
}

ValueReader TableReader::at(std::string_view key, const std::string& meaning) const {
  const auto value = find(key);
  if (!value) throw missing(key, meaning);
  return *value;
}

std::string TableReader::text(std::string_view key, const std::string& meaning) const {
  return at(key, meaning).text();
}

std::string TableReader::text_or(std::string_view key, const std::string& otherwise) const {
  const auto value = find(key);
  return value ? value->text() : otherwise;
}

bool TableReader::flag_or(std::string_view key, bool otherwise) const {
  const auto value = find(key);
  return value ? value->flag() : otherwise;
}

double TableReader::quantity(const Parameter& parameter) const {
  if (const auto given = quantity_if_given(parameter)) return *given;
  if (parameter.otherwise) return *parameter.otherwise;
  const std::string range = allowed_range(parameter);
  throw missing(parameter.key, fmt::format("give {}{}{}", parameter.meaning, range.empty() ? "" : ", ", range));
}

std::optional<double> TableReader::quantity_if_given(const Parameter& parameter) const {
  const auto value = find(parameter.key);
  return value ? std::optional(value->quantity(parameter)) : std::nullopt;
}

std::vector<TableReader> TableReader::tables(std::string_view key) const {
  const auto value = find(key);
  if (!value) return {};
  if (value->node().kind != NodeKind::array)
    throw value->wrong_type(fmt::format("write [[{}]] with double brackets, once for each", value->path()));
  std::vector<TableReader> readers;
  for (const ValueReader& item : value->items()) readers.emplace_back(item);
  return readers;
}

}  // namespace pilotis
