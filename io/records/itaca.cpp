#include "io/records/itaca.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/labels.hpp"

namespace pilotis {

namespace {

constexpr Columns five_of_14{5, 14};
constexpr std::size_t longest_header = 40;  // lines; usually ten

bool names_quantity(std::string_view line) { return holds(line, "time series in"); }

// The lines down to the one that names the quantity, over which the cursor passes.
std::vector<TextLine> header_of(LineCursor& cursor, const std::string& file) {
  std::vector<TextLine> header;
  for (; !cursor.at_end() && header.size() < longest_header; cursor.advance()) {
    header.push_back(cursor.line());
    if (!names_quantity(cursor.line().text)) continue;
    cursor.advance();
    return header;
  }
  throw input_error(at_line(file, cursor.line().number), "the header has no line \"... time series in m/s/s\"",
                    "was the file cut off?");
}

}  // namespace

bool recognises_itaca(std::string_view content) {
  return begins(first_line_of(content), "event date & time") && holds(content.substr(0, 4000), "time increment");
}

FileOfRecords read_itaca(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const std::vector<TextLine> header = header_of(cursor, where);
  const TextLine& quantity = header.back();
  if (!begins(stripped(quantity.text), "accel"))
    refuse_quantity(at_line(where, quantity.number), in_quotes(stripped(quantity.text)));
  const Labels labels(header, where);
  const Label& count = labels.need("Number of Data");
  const Promise promise = promise_of(count.value, count.line, where);
  Body body = read_body(cursor, five_of_14, promise, where);
  refuse_surplus(body, cursor, five_of_14, promise, where);

  ReadComponent read;
  read.stated_samples = promise.values;
  read.values = std::move(body.values);
  if (const Label* orientation = labels.find("Orientation")) read.name = orientation->value;
  read.says.unit = unit_stated(text_after(quantity.text, "time series in"), quantity.number);
  const Label& step = labels.need("Time Increment (s)");
  read.says.step = step_stated(step.value, step.line, where);
  if (const Label* peak = labels.find("PGA")) read.peak = stated_peak(peak->value, peak->line);

  FileOfRecords file;
  file.format = itaca_name;
  file.components.push_back(finished(std::move(read), hints, where));
  return file;
}

}  // namespace pilotis
