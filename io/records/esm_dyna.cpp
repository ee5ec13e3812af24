#include "io/records/esm_dyna.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/labels.hpp"

namespace pilotis {

namespace {

constexpr std::size_t longest_header = 100;  // lines; usually 64
constexpr Columns one_a_line{1, 0};

// Every line with a colon, down to the first number.
std::vector<TextLine> header_of(LineCursor& cursor) {
  std::vector<TextLine> header;
  for (; !cursor.at_end() && header.size() < longest_header; cursor.advance()) {
    if (cursor.line().text.find(':') == std::string_view::npos) break;
    header.push_back(cursor.line());
  }
  return header;
}

void require_acceleration(const Labels& labels, const std::string& file) {
  const Label& type = labels.need("DATA_TYPE");
  if (!begins(type.value, "acceleration"))
    refuse_quantity(at_line(file, type.line),
                    fmt::format("{}, not the acceleration of the ground", in_quotes(type.value)));
}

}  // namespace

bool recognises_esm_dyna(std::string_view content) {
  return begins(first_line_of(content), "event_name:") && holds(content.substr(0, 8000), "sampling_interval_s:");
}

FileOfRecords read_esm_dyna(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const Labels labels(header_of(cursor), where);
  require_acceleration(labels, where);
  const Label& count = labels.need("NDATA");
  const Promise promise = promise_of(count.value, count.line, where);
  Body body = read_body(cursor, one_a_line, promise, where);
  refuse_surplus(body, cursor, one_a_line, promise, where);

  ReadComponent read;
  read.stated_samples = promise.values;
  read.values = std::move(body.values);
  if (const Label* stream = labels.find("STREAM")) read.name = stream->value;
  if (const Label* unit = labels.find("UNITS")) read.says.unit = unit_stated(unit->value, unit->line);
  const Label& step = labels.need("SAMPLING_INTERVAL_S");
  read.says.step = step_stated(step.value, step.line, where);
  if (const Label* peak = labels.find("PGA_CM/S^2")) read.peak = stated_peak(peak->value, peak->line);

  FileOfRecords file;
  file.format = esm_dyna_name;
  file.components.push_back(finished(std::move(read), hints, where));
  return file;
}

}  // namespace pilotis
