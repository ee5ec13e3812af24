#include "io/records/afad.hpp"

#include <fmt/format.h>

#include <array>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/labels.hpp"

namespace pilotis {

namespace {

constexpr std::size_t longest_header = 60;  // lines; usually about twenty
constexpr std::array names{"N-S", "E-W", "U-D"};

bool names_columns(std::string_view line) {
  return words_of(line).size() >= names.size() && line.find(':') == std::string_view::npos && holds(line, names[0]) &&
         holds(line, names[1]) && holds(line, names[2]);
}

// The lines down to the one that names the columns, where the cursor then stands.
std::vector<TextLine> header_of(LineCursor& cursor, const std::string& file) {
  std::vector<TextLine> header;
  for (; !cursor.at_end() && header.size() < longest_header; cursor.advance()) {
    if (names_columns(cursor.line().text)) return header;
    header.push_back(cursor.line());
  }
  throw input_error(at_line(file, cursor.line().number), "the header has no line that names the columns",
                    "N-S, E-W and U-D are needed");
}

void pass_blank_lines(LineCursor& cursor) {
  while (!cursor.at_end() && stripped(cursor.line().text).empty()) cursor.advance();
}

}  // namespace

bool recognises_afad(std::string_view content) {
  return holds(content.substr(0, 4000), "strong ground motion records of turk");
}

FileOfRecords read_afad(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const Labels labels(header_of(cursor, where), where);
  const std::vector<std::string_view> columns = words_of(cursor.line().text);
  cursor.advance();
  pass_blank_lines(cursor);
  const Label &count = labels.need("NUMBER OF DATA"), &step = labels.need("SAMPLING INTERVAL");
  const Columns rows{columns.size(), 0};
  const Promise promise = promise_of(count.value, count.line, where, columns.size());
  const Body body = read_body(cursor, rows, promise, where);
  refuse_surplus(body, cursor, rows, promise, where);

  FileOfRecords file;
  file.format = afad_name;
  for (std::size_t i = 0; i < columns.size(); ++i) {
    ReadComponent read;
    read.name = columns[i];
    read.values = column_of(body.values, columns.size(), i);
    read.stated_samples = promise.values / columns.size();
    read.says.unit = StatedUnit{"gal", 1};
    read.says.step = step_stated(first_number_in(step.value), step.line, where);
    file.components.push_back(finished(std::move(read), hints, where));
  }
  return file;
}

}  // namespace pilotis
