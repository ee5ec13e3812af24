// What the volumes 1 and 2 of CSMIP (formerly CDMG) have alike: a header of text lines, 100 integers (16I5) and 50 or
// 100 reals (8F10) for every channel, whose fields may run together, and "/&" after a channel.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/text.hpp"

namespace pilotis {

struct ChannelName {
  std::string name;  // "90 DEG"
  std::optional<int> number;
};

// From the header's line "CHAN  1:  90 DEG  (STA CHN: 14)".
ChannelName csmip_channel(const std::vector<TextLine>& header);

bool is_csmip_end_mark(std::string_view line);  // "/&  ---- END OF DATA FOR CHANNEL 1"

// The lines from the cursor to the first one that `begins_body` accepts, where the cursor then stands. Throws Error
// (input), saying that `missing` is, when the file or the channel ends before.
std::vector<TextLine> csmip_header(LineCursor& cursor, bool (*begins_body)(std::string_view line), const char* missing,
                                   const std::string& file);

// After a channel: passes its end mark and blank lines. Throws Error (input) when the mark is missing or something else
// follows.
void pass_csmip_end(LineCursor& cursor, bool (*begins_channel)(std::string_view line), const std::string& file);

}  // namespace pilotis
