#include "io/records/cosmos.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr double unknown = -999;
constexpr std::size_t name_line = 8, step_real = 62, peak_real = 64;  // text line from 0, reals from 1

// What stands above the blocks of a channel.
struct Channel {
  std::vector<TextLine> text;
  std::vector<std::optional<double>> reals;
  int reals_line = 0;
  std::string sensor;  // from the comment "|<SCNL>8040.HNE.NP.01": HNE
};

// "42000 acceleration pts, approx  210 secs, units=cm/sec2(04),Format=(1E15.6)"
struct BlockLine {
  std::string quantity;  // "acceleration", "raw accel.", "velocity"
  std::string unit;      // "cm/sec2"
  std::string code;      // "04"
  Promise promise;
  Columns columns;
};

std::string between(std::string_view text, std::string_view after, char until) {
  const std::string_view rest = text_after(text, after);
  return std::string(stripped(rest.substr(0, rest.find(until))));
}

Columns columns_in(const TextLine& line, const std::string& file) {
  const std::string descriptor = between(text_after(line.text, "format"), "(", ')');
  if (const auto columns = columns_from(descriptor)) return *columns;
  throw input_error(at_line(file, line.number), fmt::format("found the format {}", in_quotes(descriptor)),
                    "a FORTRAN descriptor is needed, such as Format=(8f10.6)");
}

// "100 Integer-header values follow on  10 lines, Format= (10I8)" and the numbers under it.
std::vector<std::optional<double>> block_of_numbers(LineCursor& cursor, std::string_view named,
                                                    const std::string& file) {
  if (cursor.at_end() || !holds(cursor.line().text, named))
    throw input_error(at_line(file, cursor.line().number),
                      fmt::format("found {} where the {} values must follow", in_quotes(cursor.line().text), named),
                      "is the header cut off?");
  const Columns columns = columns_in(cursor.line(), file);
  cursor.advance();
  return header_numbers(cursor, columns, 100, file);
}

// Comments start with a bar; the line above them says how many there are.
void pass_comments(LineCursor& cursor, Channel& channel) {
  if (!cursor.at_end() && holds(cursor.line().text, "comment line")) cursor.advance();
  for (; !cursor.at_end() && stripped(cursor.line().text).starts_with('|'); cursor.advance()) {
    const std::string code = between(cursor.line().text, "<SCNL>", ' ');
    if (const std::size_t dot = code.find('.'); dot != std::string::npos)
      channel.sensor = code.substr(dot + 1, code.find('.', dot + 1) - dot - 1);
  }
}

Channel channel_header(LineCursor& cursor, const std::string& file) {
  Channel channel;
  const TextLine first = cursor.line();
  const std::string_view counted = first_number_in(text_after(text_after(first.text, "format v"), "with"));
  const Promise texts = promise_of(counted, first.number, file);
  channel.text = cursor.take(texts.values);
  block_of_numbers(cursor, "integer-header", file);
  channel.reals_line = cursor.line().number;
  channel.reals = block_of_numbers(cursor, "real-header", file);
  pass_comments(cursor, channel);
  return channel;
}

bool is_block_line(std::string_view line) { return holds(line, "pts") && holds(line, "units"); }

BlockLine block_line(const TextLine& line, const std::string& file) {
  BlockLine block;
  const std::string_view count = first_number_in(line.text);
  block.promise = promise_of(count, line.number, file);
  block.quantity = between(line.text, count, ',');
  block.quantity = stripped(std::string_view(block.quantity).substr(0, block.quantity.rfind("pts")));
  const std::string_view units = text_after(text_after(line.text, "units"), "=");
  block.unit = stripped(units.substr(0, units.find_first_of("(,")));
  block.code = between(units.substr(0, units.find(',')), "(", ')');
  block.columns = columns_in(line, file);
  return block;
}

// The unit by its name, else by its code: 2 is g, 4 is cm/s2.
StatedUnit unit_of(const BlockLine& block, const std::string& file) {
  const std::string by_code = block.code == "02" ? "g" : block.code == "04" ? "cm/s2" : "";
  StatedUnit unit = unit_stated(block.unit.empty() ? by_code : block.unit, block.promise.line);
  const std::string where = at_line(file, unit.line);
  if (unit.unit.find("count") != std::string::npos || block.code == "50")
    refuse_quantity(where, "raw counts of the recorder, which nothing in it turns into an acceleration");
  if (!by_code.empty() &&
      si_factor(by_code, Dimension::acceleration, where) != si_factor(unit.unit, Dimension::acceleration, where))
    throw input_error(
        where,
        fmt::format("found the unit {} with the code {}, which means {}", in_quotes(block.unit), block.code, by_code),
        "correct one of them");
  return unit;
}

// "Sta Chan   1: 90 Deg (Rcrdr Chan  ?) Location:Basement"
void name_component(const Channel& channel, ReadComponent& read) {
  if (channel.text.size() > name_line) {
    const std::string_view text = text_after(channel.text[name_line].text, "chan");
    const std::string_view number = stripped(text.substr(0, text.find(':')));
    if (const std::string_view digits = first_number_in(number); !digits.empty() && digits == number)
      read.channel = std::atoi(std::string(digits).c_str());
    read.name = between(text, ":", '(');
  }
  if (read.name.empty() || begins(read.name, "other")) read.name = channel.sensor;
}

std::optional<double> real(const Channel& channel, std::size_t number) {
  const std::optional<double> value = channel.reals[number - 1];
  return value && *value != unknown ? value : std::nullopt;
}

ReadComponent component_of(const Channel& channel, const BlockLine& block, std::vector<double> values,
                           const std::string& file) {
  ReadComponent read;
  name_component(channel, read);
  read.says.unit = unit_of(block, file);
  if (const auto milliseconds = real(channel, step_real)) {
    if (*milliseconds <= 0)
      throw input_error(at_line(file, channel.reals_line), fmt::format("found Real(62) = {} ms", *milliseconds),
                        "the time step must be greater than 0");
    read.says.step = StatedTime{*milliseconds / 1000, channel.reals_line};
  }
  if (const auto peak = real(channel, peak_real)) read.peak = StatedPeak{*peak, 1e-6, channel.reals_line};
  read.stated_samples = block.promise.values;
  read.values = std::move(values);
  return read;
}

bool is_end_mark(std::string_view line) {
  return begins(stripped(line), "end-of-data") || begins(stripped(line), "/&");
}

// All blocks of one channel; those that are no acceleration are passed over.
void read_channel(LineCursor& cursor, const std::string& where, const RecordHints& hints, FileOfRecords& file,
                  std::string& other) {
  const Channel channel = channel_header(cursor, where);
  bool ended = false;
  while (!cursor.at_end() && is_block_line(cursor.line().text)) {
    const BlockLine block = block_line(cursor.line(), where);
    const bool accelerates = holds(block.quantity, "acc");
    if (accelerates) unit_of(block, where);
    cursor.advance();
    Body body =
        read_body(cursor, block.columns, block.promise, where, accelerates ? std::optional(unknown) : std::nullopt);
    refuse_surplus(body, cursor, block.columns, block.promise, where);
    if (accelerates)
      file.components.push_back(finished(component_of(channel, block, std::move(body.values), where), hints, where));
    else
      other = block.quantity;
    for (; !cursor.at_end() && is_end_mark(cursor.line().text); cursor.advance()) ended = true;
  }
  if (!ended)
    throw input_error(at_line(where, cursor.line().number), "found no end mark after the numbers of a channel",
                      "\"End-of-data\" or \"/&\" must follow; was the file cut off?");
}

}  // namespace

bool recognises_cosmos(std::string_view content) {
  const std::string_view line = first_line_of(content);
  return holds(line, "(format v") && holds(line, "text lines)");
}

FileOfRecords read_cosmos(std::string_view content, const std::string& where, const RecordHints& hints) {
  FileOfRecords file;
  file.format = cosmos_name;
  std::string other;
  for (LineCursor cursor(content); !cursor.at_end();) {
    if (stripped(cursor.line().text).empty()) {
      cursor.advance();
      continue;
    }
    if (!recognises_cosmos(cursor.line().text))
      throw input_error(at_line(where, cursor.line().number),
                        fmt::format("found {} where a channel must begin", in_quotes(cursor.line().text)),
                        "each begins with a line such as \"... (Format v01.20 with 13 text lines)\"");
    read_channel(cursor, where, hints, file, other);
  }
  if (file.components.empty()) refuse_quantity(where, fmt::format("the {} of the ground", other));
  return file;
}

}  // namespace pilotis
