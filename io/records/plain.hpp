// Plain text and CSV: one column of samples, or a table whose first column is the time.
//
// Rows: any separator (comma, semicolon, tab, blanks), exponents with E or D, decimal commas where columns are
// separated by semicolons or tabs. Comments start with # % * | or /. Above the rows there may be one line of column
// names
// ("time (s), acceleration (m/s^2)") and one of units. A line, comment or not, may state
//     units: g        step: 0.02 s        first sample at: 0.02 s
// More than two columns need names that tell which are accelerations; each of these is one component. Unit and step
// come from the file or the study, are never guessed, and must agree where both speak. Times start at 0 or at one step,
// else they are shifted with a note.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view plain_name = "plain text";

// Takes everything: the last of the formats.
bool recognises_plain(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_plain(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
