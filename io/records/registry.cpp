#include <fmt/format.h>

#include <array>
#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/file.hpp"
#include "io/records/peer.hpp"
#include "io/records/plain.hpp"
#include "io/records/record.hpp"
#include "io/records/unread.hpp"

namespace pilotis {

namespace {

constexpr std::array<RecordFormat, 2> formats{{
    {peer_name, "four header lines, then values row by row (.AT2)", recognises_peer, read_peer},
    {plain_name, "one column of samples, or time and acceleration; CSV", recognises_plain, read_plain},
}};

// About twice the strongest shaking ever recorded: more is most likely a wrong unit.
constexpr double remarkable_peak = 8 * standard_gravity;

std::string_view without_byte_order_mark(std::string_view content) {
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  return content.starts_with(mark) ? content.substr(mark.size()) : content;
}

RecordFile read_content(std::string_view content, const std::string& where, const RecordHints& hints) {
  for (const RecordFormat& format : formats)
    if (format.recognises(content)) return format.read(content, where, hints);
  throw input_error(where, "no format recognises this file", "");
}

void note_remarkable_peak(RecordFile& file) {
  const double peak = peak_of(file.record).value;
  if (std::abs(peak) > remarkable_peak)
    file.notes.push_back(fmt::format("the peak of {:.3g} g is far beyond recorded shaking: is the unit \"{}\" right?",
                                     peak / standard_gravity, file.unit));
}

}  // namespace

std::span<const RecordFormat> record_formats() { return formats; }

RecordFile read_record(const std::filesystem::path& file, const RecordHints& hints) {
  const std::string content = content_of(file);
  const std::string where = file.string();
  const std::string_view text = without_byte_order_mark(content);
  refuse_unread_formats(text, where);
  require_text(text, where);
  RecordFile read = read_content(text, where, hints);
  validate(read.record, where);
  note_remarkable_peak(read);
  return read;
}

}  // namespace pilotis
