#include "io/records/not_records.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// Version 2: six digits, a quality letter, a blank. Version 3: "MS" and the number 3.
bool is_miniseed(std::string_view c) {
  if (c.starts_with(std::string_view("MS\x03", 3))) return true;
  const bool numbered = c.size() >= 48 && std::all_of(c.begin(), c.begin() + 6, is_digit);
  return numbered && std::string_view("DRQM").find(c[6]) != std::string_view::npos && (c[7] == ' ' || c[7] == '\0') &&
         c.substr(0, 48).find('\0') != std::string_view::npos;
}

bool is_volume_3(std::string_view c) { return begins(first_line_of(c), "response and fourier"); }

bool is_itaca_spectra(std::string_view c) {
  return begins(first_line_of(c), "per(s)") && holds(first_line_of(c), "psa");
}

constexpr std::array<NotARecord, 3> files{{
    {"miniSEED", "binary counts of a recorder, which have no scale",
     "export one component as text: two columns, time and acceleration, with their units", is_miniseed},
    {"CSMIP volume 3 (.V3)", "response spectra, no accelerogram", "read the volume 2 of the same record (.V2)",
     is_volume_3},
    {"ITACA .rs", "response spectra, no accelerogram", "read the .cor.acc of the same record", is_itaca_spectra},
}};

}  // namespace

std::span<const NotARecord> not_records() { return files; }

void refuse_not_records(std::string_view content, const std::string& where) {
  for (const NotARecord& file : files)
    if (file.recognises(content))
      throw input_error(where, fmt::format("this file is in the format {}: {}", file.name, file.holds),
                        std::string(file.remedy));
}

}  // namespace pilotis
