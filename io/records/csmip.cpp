#include "io/records/csmip.hpp"

#include <fmt/format.h>

#include <cstdlib>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::size_t longest_header = 100;  // lines; usually 45

}  // namespace

ChannelName csmip_channel(const std::vector<TextLine>& header) {
  for (const TextLine& line : header) {
    const std::string_view text = stripped(line.text);
    const std::size_t colon = text.find(':');
    if (!begins(text, "chan") || colon == std::string_view::npos) continue;
    ChannelName channel;
    if (const std::string_view number = first_number_in(text.substr(0, colon)); !number.empty())
      channel.number = std::atoi(std::string(number).c_str());
    std::string_view name = stripped(text.substr(colon + 1));
    name = name.substr(0, name.find('('));
    channel.name = stripped(name.substr(0, name.find("  ")));
    return channel;
  }
  return {};
}

bool is_csmip_end_mark(std::string_view line) { return begins(stripped(line), "/&"); }

std::vector<TextLine> csmip_header(LineCursor& cursor, bool (*begins_body)(std::string_view line), const char* missing,
                                   const std::string& file) {
  std::vector<TextLine> header;
  for (; !cursor.at_end() && header.size() < longest_header; cursor.advance()) {
    if (!header.empty() && begins_body(cursor.line().text)) return header;
    if (is_csmip_end_mark(cursor.line().text)) break;
    header.push_back(cursor.line());
  }
  throw input_error(at_line(file, cursor.line().number),
                    fmt::format("{} is missing in the header of a channel", missing), "is the file cut off?");
}

void pass_csmip_end(LineCursor& cursor, bool (*begins_channel)(std::string_view line), const std::string& file) {
  bool ended = false;
  for (; !cursor.at_end(); cursor.advance()) {
    const bool mark = is_csmip_end_mark(cursor.line().text);
    if (!mark && !stripped(cursor.line().text).empty()) break;
    ended |= mark;
  }
  if (!ended && (cursor.at_end() || begins_channel(cursor.line().text)))
    throw input_error(at_line(file, cursor.line().number), "found no mark /& after the numbers of a channel",
                      "was the file cut off?");
  if (cursor.at_end() || begins_channel(cursor.line().text)) return;
  throw input_error(at_line(file, cursor.line().number),
                    fmt::format("found {} after the numbers of a channel", in_quotes(cursor.line().text)),
                    "the mark /&, another channel or the end of the file must follow");
}

}  // namespace pilotis
