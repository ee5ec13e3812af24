// A TOML file as plain data with line numbers. The one translation unit that sees the TOML library makes it.
#pragma once

#include <cstdint>
#include <string>
#include <utility>
#include <vector>

namespace pilotis {

enum class NodeKind { text, whole, real, flag, date, array, table };

struct Node {
  struct Entry;

  NodeKind kind = NodeKind::table;
  int line = 0;                // of the value; of the header for a table with one
  std::string text;            // NodeKind::text; the digits of a date
  std::int64_t whole = 0;      // NodeKind::whole
  double real = 0;             // NodeKind::real
  bool flag = false;           // NodeKind::flag
  std::vector<Node> items;     // NodeKind::array, in the order of the file
  std::vector<Entry> entries;  // NodeKind::table, in the order of the file

  // nullptr when there is no such key.
  const Entry* find(const std::string& key) const;
};

struct Node::Entry {
  std::string key;
  int line = 0;  // of the key
  Node value;
};

// The root table. Throws Error (input) "file:line" for anything that is not TOML, a key given twice included.
Node parse_toml(const std::string& content, const std::string& file);

// What was found, as a person would say it: `the text "abc"`, `the number 4.5`, `a table`.
std::string described(const Node& node);

}  // namespace pilotis
