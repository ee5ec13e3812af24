// The numbers of an archive's file: as many as the header promises, in columns of a fixed width (values may run
// together) or between blanks.
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/records/text.hpp"

namespace pilotis {

// How a row is laid out.
struct Columns {
  std::size_t per_row = 0;  // values in a full row; 0: any number, between blanks
  std::size_t width = 0;    // characters of each; 0: between blanks
  int decimals = -1;        // digits after the point; -1: not said
  std::size_t glued = 0;    // where values between blanks run together: the width of each; 0: they must not
};

// From a FORTRAN edit descriptor: "8f10.6", "(1E15.6)", "10I8". Empty when it is not one.
std::optional<Columns> columns_from(std::string_view descriptor);

// What the header promises and where.
struct Promise {
  std::size_t values = 0;  // numbers in the body
  int line = 0;            // of the file
  std::string text;        // "NPTS = 3", for messages
};

// A promise of `token` samples, each `values_each` numbers. Throws Error (input) when `token` is no whole number of at
// least 2.
Promise promise_of(std::string_view token, int line, const std::string& file, std::size_t values_each = 1);

struct Body {
  std::vector<double> values;  // in the order of the file, as many as promised
  std::size_t surplus = 0;     // further values on the last row
  int first_line = 0;          // of the file
  int last_line = 0;
};

// Reads the promised numbers from the line the cursor stands at on, and leaves it on the line after the last row used.
// In columns of a fixed width all rows but the last must be full and end where a column ends. A value equal to
// `missing` is refused. Throws Error (input) naming file, line and text.
Body read_body(LineCursor& cursor, const Columns& columns, const Promise& promise, const std::string& file,
               std::optional<double> missing = std::nullopt);

// Every row from the cursor to the last line that is not blank, each with all its columns. columns.per_row > 0.
std::vector<double> read_rows(LineCursor& cursor, const Columns& columns, const std::string& file);

// Throws Error (input) when the last row holds more than was promised or another row of numbers follows.
void refuse_surplus(const Body& body, const LineCursor& cursor, const Columns& columns, const Promise& promise,
                    const std::string& file);

// True when the line is a row of at least one number, in whole columns.
bool is_row(std::string_view line, const Columns& columns);

// The numbers of a header block, a blank field being empty. Throws Error (input) for anything else, or when the file
// ends.
std::vector<std::optional<double>> header_numbers(LineCursor& cursor, const Columns& columns, std::size_t count,
                                                  const std::string& file);

// One of each `columns` values, from the `first` on: the samples of a component in a table.
std::vector<double> column_of(const std::vector<double>& values, std::size_t columns, std::size_t first);

}  // namespace pilotis
