#include "io/records/csmnc.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"

namespace pilotis {

namespace {

constexpr std::size_t header_lines = 16;
constexpr Columns between_blanks{};

const TextLine* line_with(const std::vector<TextLine>& header, std::string_view phrase) {
  for (const TextLine& line : header)
    if (holds(line.text, phrase)) return &line;
  return nullptr;
}

const TextLine& needed(const std::vector<TextLine>& header, std::string_view phrase, const std::string& file) {
  if (const TextLine* line = line_with(header, phrase)) return *line;
  throw input_error(file, fmt::format("the {} header lines do not hold {}", header_lines, in_quotes(phrase)),
                    "was the file cut off?");
}

}  // namespace

bool recognises_csmnc(std::string_view content) {
  const std::string_view head = content.substr(0, 4000);
  return holds(head, "no. of points:") && holds(head, "equally spaced intervals of:");
}

FileOfRecords read_csmnc(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const std::vector<TextLine> header = cursor.take(header_lines);
  const TextLine& quantity = needed(header, "unit:", where);
  if (!holds(quantity.text, "acceleration"))
    refuse_quantity(at_line(where, quantity.number), in_quotes(stripped(quantity.text)));
  const TextLine& points = needed(header, "no. of points:", where);
  const Promise promise = promise_of(first_number_in(text_after(points.text, "no. of points:")), points.number, where);
  Body body = read_body(cursor, between_blanks, promise, where);
  refuse_surplus(body, cursor, between_blanks, promise, where);

  ReadComponent read;
  read.values = std::move(body.values);
  read.stated_samples = promise.values;
  if (const TextLine* name = line_with(header, "comp.")) read.name = stripped(text_after(name->text, "comp."));
  read.says.unit = unit_stated(text_after(quantity.text, "unit:"), quantity.number);
  read.says.step = step_stated(first_number_in(text_after(points.text, "intervals of:")), points.number, where);
  if (const TextLine* peak = line_with(header, "peak value:"))
    read.peak = stated_peak(first_number_in(text_after(peak->text, "peak value:")), peak->number);

  FileOfRecords file;
  file.format = csmnc_name;
  file.components.push_back(finished(std::move(read), hints, where));
  return file;
}

}  // namespace pilotis
