#include "io/records/asa.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/labels.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

constexpr std::size_t header_lines = 109;
constexpr std::size_t most_extra_rows = 2, usual_width = 10, most_channels = 12;

struct Item {
  std::string_view text;
  int line = 0;
};

// "/0.01/0.01/0.01"
void add_items(const Label* label, std::vector<Item>& items) {
  if (label == nullptr) return;
  std::size_t slash = label->value.find('/');
  while (slash != std::string_view::npos) {
    const std::size_t next = label->value.find('/', slash + 1);
    const std::string_view text = stripped(label->value.substr(slash + 1, next - slash - 1));
    if (!text.empty()) items.push_back({text, label->line});
    slash = next;
  }
}

// The list of the channels 1 to 6 and that of 7 to 12, one after the other.
std::vector<Item> list_of(const Labels& labels, const std::string& first, const std::string& second) {
  std::vector<Item> items;
  add_items(labels.find(first), items);
  add_items(labels.find(second), items);
  return items;
}

std::vector<Item> needed_list(const Labels& labels, const std::string& first, const std::string& second,
                              std::size_t channels, const std::string& file) {
  std::vector<Item> items = list_of(labels, first, second);
  if (items.size() == channels) return items;
  throw input_error(file,
                    fmt::format("found {} values for {} channels in {}", items.size(), channels, in_quotes(first)),
                    "the list must have a value for every channel");
}

std::size_t channels_in(const Labels& labels, const std::string& file) {
  const Label& label = labels.need("NUMERO DE CANALES");
  const ParsedNumber parsed = parse_number(label.value);
  const bool sensible = parsed.kind == ParsedNumber::Kind::number && parsed.value >= 1 &&
                        parsed.value <= most_channels && parsed.value == static_cast<int>(parsed.value);
  if (sensible) return static_cast<std::size_t>(parsed.value);
  throw input_error(at_line(file, label.line), fmt::format("found {} channels", in_quotes(label.value)),
                    fmt::format("1 to {} are allowed", most_channels));
}

// "3F10.2"; by default ten characters a channel.
Columns columns_in(const Labels& labels, std::size_t channels) {
  Columns columns{channels, usual_width};
  if (const Label* label = labels.find("FORMATO DATOS"))
    if (const auto stated = columns_from(label->value)) columns.width = stated->width;
  return columns;
}

// "Gal (cm/s/s)"
StatedUnit unit_in(const Labels& labels) {
  const Label& label = labels.need("UNIDADES DE LOS DATOS");
  return unit_stated(label.value.substr(0, label.value.find_first_of(" (")), label.line);
}

Promise rows_promised(const std::vector<Item>& counts, std::size_t channels, const std::string& file) {
  Promise most;
  for (const Item& count : counts)
    if (const Promise promise = promise_of(count.text, count.line, file, channels); promise.values > most.values)
      most = promise;
  return most;
}

// One or two rows more than stated are usual in this archive.
std::size_t pass_extra_rows(LineCursor& cursor, const Columns& columns, const Promise& promise,
                            const std::string& file) {
  std::size_t rows = 0;
  for (; !cursor.at_end() && is_row(cursor.line().text, columns); cursor.advance()) ++rows;
  if (rows <= most_extra_rows) return rows;
  throw input_error(
      at_line(file, cursor.line().number),
      fmt::format("{} rows follow after the last of them, but line {} promises {}", rows, promise.line, promise.text),
      fmt::format("at most {} are known to follow", most_extra_rows));
}

}  // namespace

bool recognises_asa(std::string_view content) {
  return holds(content.substr(0, 4000), "archivo estandar de aceleracion");
}

FileOfRecords read_asa(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const Labels labels(cursor.take(header_lines), where);
  const std::size_t channels = channels_in(labels, where);
  const auto names = needed_list(labels, "ORIENTACION C1-C6", "ORIENTACION C7-C12", channels, where);
  const auto steps =
      needed_list(labels, "INTERVALO DE MUESTREO, C1-C6", "INTERVALO DE MUESTREO, C7-C12", channels, where);
  const auto counts =
      needed_list(labels, "NUM. TOTAL DE MUESTRAS, C1-C6", "NUM. TOTAL DE MUESTRAS, C7-C12", channels, where);
  const auto peaks = list_of(labels, "ACEL. MAX.(Gal), C1-C6", "ACEL. MAX.(Gal), C7-C12");
  const Columns columns = columns_in(labels, channels);
  const Promise promise = rows_promised(counts, channels, where);
  const Body body = read_body(cursor, columns, promise, where);

  FileOfRecords file;
  file.format = asa_name;
  if (const std::size_t rows = pass_extra_rows(cursor, columns, promise, where))
    file.notes.push_back(fmt::format("{} row(s) after the stated ones are left out", rows));
  for (std::size_t i = 0; i < channels; ++i) {
    ReadComponent read;
    read.name = names[i].text;
    read.channel = static_cast<int>(i) + 1;
    read.stated_samples = promise_of(counts[i].text, counts[i].line, where).values;
    read.values = column_of(body.values, channels, i);
    read.values.resize(*read.stated_samples);
    read.says.unit = unit_in(labels);
    read.says.step = step_stated(steps[i].text, steps[i].line, where);
    if (peaks.size() == channels) read.peak = stated_peak(peaks[i].text, peaks[i].line);
    file.components.push_back(finished(std::move(read), hints, where));
  }
  return file;
}

}  // namespace pilotis
