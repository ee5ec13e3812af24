// What the comments and headings of a plain text file say about its columns.
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "io/records/stated.hpp"
#include "io/records/table.hpp"

namespace pilotis {

// A column of samples.
struct PlainColumn {
  std::size_t index = 0;           // counted from 0
  std::string name;                // by its heading; empty when there is none
  std::optional<StatedUnit> unit;  // by its heading
};

struct PlainHeader {
  Statements statements;
  std::string time_unit = "s";
  bool time_unit_stated = false;
  std::optional<std::size_t> time_column;  // counted from 0; empty: samples only
  std::vector<PlainColumn> values;         // at least one
};

// Throws Error (input) when a statement cannot be understood, statements contradict each other, the values are no
// acceleration, or it is not clear which column is.
PlainHeader plain_header(const PlainText& text, std::size_t columns, const std::string& file);

}  // namespace pilotis
