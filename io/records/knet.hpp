// K-NET and KiK-net, one component a file: seventeen lines of labels ("Origin Time" to "Memo."), then whole numbers of
// the recorder, eight a line. "Scale Factor      3920(gal)/6182761" makes them accelerations; their number is "Duration
// Time(s)" times "Sampling Freq(Hz)". The mean of the whole record is taken off, as the network advises for its
// recorders, with a note.
//
// Traps: labels vary ("Max. Acc. (gal)", "Max Acc. (gal)"); of KiK-net the components 1 to 3 are of the sensor at the
// foot of a borehole, and a note says so. Checked by "Max. Acc.".
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view knet_name = "K-NET / KiK-net";

bool recognises_knet(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_knet(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
