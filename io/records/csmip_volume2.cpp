#include "io/records/csmip_volume2.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/csmip.hpp"

namespace pilotis {

namespace {

constexpr Columns usual_columns{8, 10};

bool is_block_line(std::string_view line) {
  return holds(line, "points of") && holds(line, "data") && holds(line, "equally") && holds(line, "spaced at");
}

bool begins_channel(std::string_view line) { return begins(stripped(line), "corrected accelerogram"); }

struct Block {
  std::string quantity;  // "ACCEL"
  Promise promise;
  StatedTime step;
  std::optional<StatedUnit> unit;
  Columns columns = usual_columns;
};

// "in cm/sec2." or "(UNITS: CM/SEC/SEC)"; empty when the line has none.
std::string_view unit_in(std::string_view after_step) {
  std::string_view rest = text_after(after_step, "units");
  if (rest.empty()) rest = text_after(after_step, " in ");
  const std::size_t begin = rest.find_first_not_of(" :");
  if (begin == std::string_view::npos) return {};
  rest = rest.substr(begin);
  const std::string_view unit = rest.substr(0, rest.find_first_of(" ,()"));
  return unit.substr(0, unit.find_last_not_of('.') + 1);
}

Block block_of(const TextLine& line, const std::string& file) {
  Block block;
  const std::string_view quantity = text_after(line.text, "points of");
  block.quantity = stripped(quantity).substr(0, stripped(quantity).find(' '));
  block.promise = promise_of(first_number_in(line.text), line.number, file);
  const std::string_view spacing = text_after(line.text, "spaced at");
  const std::string_view step = first_number_in(spacing);
  block.step = step_stated(step, line.number, file);
  const std::string_view after_step = text_after(spacing, step);
  if (const std::string_view unit = unit_in(after_step); !unit.empty()) block.unit = unit_stated(unit, line.number);
  const std::size_t last = after_step.rfind('(');
  if (last != std::string_view::npos)
    if (const auto columns = columns_from(after_step.substr(last))) block.columns = *columns;
  return block;
}

// "PEAK ACCELERATION =    50.298    CM/SEC/SEC  AT    6.820   SEC."
std::optional<StatedPeak> peak_in(const std::vector<TextLine>& header) {
  for (const TextLine& line : header)
    if (begins(stripped(line.text), "peak") && holds(line.text, "acceleration"))
      return stated_peak(first_number_in(text_after(line.text, "=")), line.number);
  return std::nullopt;
}

RecordComponent component_of(const std::vector<TextLine>& header, Block block, std::vector<double> values,
                             const RecordHints& hints, const std::string& where) {
  ReadComponent read;
  const ChannelName channel = csmip_channel(header);
  read.name = channel.name;
  read.channel = channel.number;
  read.peak = peak_in(header);
  read.stated_samples = block.promise.values;
  read.values = std::move(values);
  read.says.step = block.step;
  read.says.unit = block.unit;
  const bool assumed = !block.unit && !hints.unit;
  if (assumed) read.says.unit = StatedUnit{"cm/s2", block.promise.line};
  RecordComponent component = finished(std::move(read), hints, where);
  if (assumed) component.notes.push_back("the file gives no unit: taken as cm/s2, the unit of its format");
  return component;
}

// The blocks of one channel, of which the acceleration is the first.
RecordComponent read_channel(LineCursor& cursor, const RecordHints& hints, const std::string& where) {
  const std::vector<TextLine> header =
      csmip_header(cursor, is_block_line, "the line \"... points of accel data equally spaced at ...\"", where);
  const Block first = block_of(cursor.line(), where);
  if (!begins(first.quantity, "acc"))
    refuse_quantity(at_line(where, cursor.line().number),
                    fmt::format("{} as its first block", in_quotes(first.quantity)));
  std::vector<double> acceleration;
  while (!cursor.at_end() && is_block_line(cursor.line().text)) {
    const Block block = block_of(cursor.line(), where);
    cursor.advance();
    Body body = read_body(cursor, block.columns, block.promise, where);
    refuse_surplus(body, cursor, block.columns, block.promise, where);
    if (acceleration.empty()) acceleration = std::move(body.values);
  }
  pass_csmip_end(cursor, begins_channel, where);
  return component_of(header, first, std::move(acceleration), hints, where);
}

}  // namespace

bool recognises_csmip_volume2(std::string_view content) { return begins_channel(first_line_of(content)); }

FileOfRecords read_csmip_volume2(std::string_view content, const std::string& where, const RecordHints& hints) {
  FileOfRecords file;
  file.format = csmip_volume2_name;
  for (LineCursor cursor(content); !cursor.at_end();) file.components.push_back(read_channel(cursor, hints, where));
  return file;
}

}  // namespace pilotis
