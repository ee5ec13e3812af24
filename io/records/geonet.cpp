#include "io/records/geonet.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"

namespace pilotis {

namespace {

constexpr std::size_t text_lines = 16;
constexpr Columns of_eight{10, 8};
constexpr int reals_after_integers = 4;  // lines

struct Header {
  std::vector<TextLine> text;
  std::vector<std::optional<double>> integers, reals;
  int integers_line = 0;
};

bool begins_component(std::string_view line) { return holds(line, "corrected accelerogram"); }

Header header_of(LineCursor& cursor, const std::string& file) {
  Header header;
  header.text = cursor.take(text_lines);
  if (begins(stripped(header.text.front().text), "uncorrected"))
    refuse_quantity(at_line(file, header.text.front().number), "an uncorrected accelerogram (volume 1)");
  header.integers_line = cursor.line().number;
  header.integers = header_numbers(cursor, of_eight, 40, file);
  header.reals = header_numbers(cursor, of_eight, 60, file);
  return header;
}

// Int(34), (35) and (36): values of acceleration, velocity and displacement.
Promise promise_of_block(const Header& header, std::size_t number, const std::string& file) {
  const std::optional<double> count = header.integers[number - 1];
  return promise_of(count ? fmt::format("{}", *count) : "nothing", header.integers_line + 3, file);
}

const TextLine& line_with(const Header& header, std::string_view phrase, const std::string& file) {
  for (const TextLine& line : header.text)
    if (begins(stripped(line.text), phrase)) return line;
  throw input_error(at_line(file, header.text.front().number),
                    fmt::format("this component's header has no line {}", in_quotes(phrase)), "was the file cut off?");
}

// "Component S16W  Longitudinal Accelerometer Axis"
std::string name_in(const Header& header, const std::string& file) {
  const std::string_view text = stripped(text_after(line_with(header, "component", file).text, "component"));
  return std::string(text.substr(0, text.find(' ')));
}

// "Acceleration:  peak    -41.6 mm/s/s at  43.68 sec     rms      2.2 mm/s/s"
void say_unit_and_peak(const Header& header, const std::string& file, ReadComponent& read) {
  const TextLine& line = line_with(header, "acceleration:", file);
  const std::string_view text = text_after(line.text, "peak"), number = first_number_in(text);
  read.peak = stated_peak(number, line.number);
  const std::string_view unit = stripped(text_after(text, number));
  read.says.unit = unit_stated(unit.substr(0, unit.find(' ')), line.number);
}

RecordComponent read_component(LineCursor& cursor, const RecordHints& hints, const std::string& where) {
  const Header header = header_of(cursor, where);
  ReadComponent read;
  read.name = name_in(header, where);
  say_unit_and_peak(header, where, read);
  const std::optional<double> step = header.reals[25];
  const int step_line = header.integers_line + reals_after_integers + 2;
  read.says.step = step_stated(step ? fmt::format("{}", *step) : "nothing", step_line, where);
  for (std::size_t block : {34, 35, 36}) {
    const Promise promise = promise_of_block(header, block, where);
    Body body = read_body(cursor, of_eight, promise, where);
    if (body.surplus > 0 || block == 36) refuse_surplus(body, cursor, of_eight, promise, where);
    if (block != 34) continue;
    read.stated_samples = promise.values;
    read.values = std::move(body.values);
  }
  return finished(std::move(read), hints, where);
}

}  // namespace

bool recognises_geonet(std::string_view content) {
  return begins_component(first_line_of(content)) &&
         (holds(content.substr(0, 2000), "gns science") || holds(content.substr(0, 2000), "nuclear sciences"));
}

FileOfRecords read_geonet(std::string_view content, const std::string& where, const RecordHints& hints) {
  FileOfRecords file;
  file.format = geonet_name;
  for (LineCursor cursor(content); !cursor.at_end();) {
    if (stripped(cursor.line().text).empty()) {
      cursor.advance();
      continue;
    }
    if (!begins_component(cursor.line().text))
      throw input_error(at_line(where, cursor.line().number),
                        fmt::format("found {} where a component must begin", in_quotes(cursor.line().text)),
                        "each begins with a line \"Corrected accelerogram ...\"");
    file.components.push_back(read_component(cursor, hints, where));
  }
  return file;
}

}  // namespace pilotis
