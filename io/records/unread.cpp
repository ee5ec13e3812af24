#include "io/records/unread.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

// Every archive here tells itself within its first lines; a header is never longer than this.
constexpr std::size_t header_bytes = 4096;

std::string_view head_of(std::string_view content) { return content.substr(0, header_bytes); }

std::string first_line(std::string_view content) {
  return lower_case(stripped(content.substr(0, content.find_first_of("\r\n"))));
}

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// Version 2: six digits, a quality letter, a blank. Version 3: "MS" and the number 3.
bool is_miniseed(std::string_view c) {
  if (c.starts_with(std::string_view("MS\x03", 3))) return true;
  const bool numbered = c.size() >= 48 && std::all_of(c.begin(), c.begin() + 6, is_digit);
  return numbered && std::string_view("DRQM").find(c[6]) != std::string_view::npos && (c[7] == ' ' || c[7] == '\0') &&
         c.substr(0, 48).find('\0') != std::string_view::npos;
}

bool is_cosmos(std::string_view c) { return holds(first_line(c), "(format v") && holds(first_line(c), "text lines)"); }

bool is_volume_3(std::string_view c) { return first_line(c).starts_with("response and fourier"); }

bool is_smc(std::string_view c) {
  const std::string line = first_line(c);
  return line.starts_with("0 unknown") || line.starts_with("1 uncorrected accelerogram") ||
         line.starts_with("2 corrected accelerogram");
}

bool is_geonet(std::string_view c) {
  return holds(first_line(c), "corrected accelerogram") &&
         (holds(head_of(c), "gns science") || holds(head_of(c), "nuclear sciences"));
}

bool is_volume_1(std::string_view c) { return first_line(c).starts_with("uncorrected accelerogram"); }
bool is_volume_2(std::string_view c) { return first_line(c).starts_with("corrected accelerogram"); }

bool is_knet(std::string_view c) {
  return first_line(c).starts_with("origin time") && holds(head_of(c), "sampling freq") &&
         holds(head_of(c), "scale factor");
}

bool is_esm_dyna(std::string_view c) { return first_line(c).starts_with("event_name:"); }

bool is_itaca(std::string_view c) {
  return first_line(c).starts_with("event date & time") && holds(head_of(c), "time increment");
}

bool is_itaca_spectra(std::string_view c) { return first_line(c).starts_with("per(s)") && holds(first_line(c), "psa"); }

bool is_afad(std::string_view c) { return holds(head_of(c), "strong ground motion records of turk"); }
bool is_asa(std::string_view c) { return holds(head_of(c), "archivo estandar de aceleracion"); }
bool is_cwb(std::string_view c) { return holds(head_of(c), "#samplerate") && holds(head_of(c), "#amplitudeunit"); }
bool is_bhrc(std::string_view c) { return holds(first_line(c), "vol1ds file"); }

bool is_csmnc(std::string_view c) {
  return holds(head_of(c), "no. of points:") && holds(head_of(c), "equally spaced intervals of:");
}

// GeoNet before volume 2, SMC before volumes 1 and 2: their first lines are alike.
constexpr std::array<UnreadFormat, 16> formats{{
    {"miniSEED (binary counts, which also need a scale)", is_miniseed},
    {"COSMOS v1.20", is_cosmos},
    {"SMC", is_smc},
    {"GeoNet volume 2", is_geonet},
    {"CSMIP volume 3 (response spectra, no accelerogram)", is_volume_3},
    {"CSMIP volume 2 (.V2)", is_volume_2},
    {"volume 1 (.V1)", is_volume_1},
    {"K-NET / KiK-net", is_knet},
    {"ESM / ITACA DYNA", is_esm_dyna},
    {"ITACA .cor.acc", is_itaca},
    {"ITACA .rs (response spectra, no accelerogram)", is_itaca_spectra},
    {"AFAD", is_afad},
    {"ASA 2.0", is_asa},
    {"CWB", is_cwb},
    {"BHRC volume 1", is_bhrc},
    {"CSMNC", is_csmnc},
}};

}  // namespace

std::span<const UnreadFormat> unread_formats() { return formats; }

void refuse_unread_formats(std::string_view content, const std::string& where) {
  for (const UnreadFormat& format : formats)
    if (format.recognises(content))
      throw input_error(where, fmt::format("this file is in the format {}, which is not read yet", format.name),
                        "export one component as two-column text, time and acceleration, with their units, e.g. under "
                        "the line \"time (s), acceleration (cm/s2)\"");
}

}  // namespace pilotis
