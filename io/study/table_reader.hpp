// A TOML table as the sections of a study read it: typed values with units, and errors that say where.
#pragma once

#include <initializer_list>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/error.hpp"
#include "core/parameter.hpp"
#include "io/study/study.hpp"
#include "io/study/toml_tree.hpp"

namespace pilotis {

// What every section needs to know of the file it stands in, a study or a building file. Outlives its readers.
struct StudySource {
  std::string file;  // as the user named it
  StudyUnits units;  // set once [units] has been read
};

// A value and where it stands: "study.toml:12: story[2].spring.stiffness".
class ValueReader {
 public:
  ValueReader(const StudySource& source, const Node& node, int line, std::string path);

  const Node& node() const { return *node_; }
  const StudySource& source() const { return *source_; }
  const std::string& path() const { return path_; }
  int line() const { return line_; }
  std::string where() const;

  // "found ..., needed ..." at this place.
  Error wrong(const std::string& found, const std::string& needed) const;
  // "found the text "abc", needed ..." at this place.
  Error wrong_type(const std::string& needed) const;

  std::string text() const;  // not empty
  bool flag() const;
  // SI. A bare number is in the study's unit (seconds for a time); text carries its own unit. Within the parameter's
  // range. Of a parameter with choices: the place of the word.
  double quantity(const Parameter& parameter) const;
  // One of `allowed`; the nearest is named when it is none of them.
  std::string choice(std::string_view thing, std::span<const std::string_view> allowed) const;
  std::vector<ValueReader> items() const;                            // of a list
  std::vector<double> quantities(const Parameter& parameter) const;  // of a list

 private:
  const StudySource* source_;
  const Node* node_;
  int line_;  // of the key where there is one, else of the value
  std::string path_;
};

// A table. Getters throw Error (input). Before known_keys() any key may be asked for (the one that says which others
// there are); afterwards asking for a key that is not among them is a fault of the program.
class TableReader {
 public:
  TableReader(const StudySource& source, const Node& table, int line, std::string path);
  // Throws Error when the value is not a table.
  explicit TableReader(const ValueReader& value);

  // The keys this table may have; throws Error at the first other key, naming the nearest.
  void known_keys(std::span<const std::string_view> keys);
  void known_keys(std::initializer_list<std::string_view> keys) { known_keys(std::span(keys.begin(), keys.size())); }

  std::string where() const { return self_.where(); }
  const std::string& path() const { return self_.path(); }
  const StudySource& source() const { return self_.source(); }
  Error wrong(const std::string& found, const std::string& needed) const { return self_.wrong(found, needed); }

  bool has(std::string_view key) const;
  std::optional<ValueReader> find(std::string_view key) const;
  ValueReader at(std::string_view key, const std::string& meaning) const;  // required; `meaning` tells what is missing

  std::string text(std::string_view key, const std::string& meaning) const;  // required
  std::string text_or(std::string_view key, const std::string& otherwise) const;
  bool flag_or(std::string_view key, bool otherwise) const;
  // By parameter.key; the parameter's `otherwise` when the key is absent, an error when it has none.
  double quantity(const Parameter& parameter) const;
  std::optional<double> quantity_if_given(const Parameter& parameter) const;

  // The tables of [[key]], or none.
  std::vector<TableReader> tables(std::string_view key) const;

 private:
  Error missing(std::string_view key, const std::string& meaning) const;

  ValueReader self_;
  std::vector<std::string> known_;
};

}  // namespace pilotis
