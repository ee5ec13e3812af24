// Invented files in the formats of public archives, made from samples: for the tests of the readers, the seeds of the
// fuzzer and the bench of reading. Values are written with the digits of the format, so give values that have no more.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace pilotis {

using Samples = std::vector<double>;  // in the unit of the format

struct InventedFormat {
  std::string_view format;  // the name the reader gives it
  std::string_view unit;    // of the samples
  double step;              // s
  std::size_t components;   // all with the same samples
  std::string (*make)(const Samples& samples);
};

// One of every format that is read, plain text aside.
const std::vector<InventedFormat>& invented_formats();

std::string invented_peer(const Samples& in_g);
std::string invented_cosmos(const Samples& in_cm_s2);
std::string invented_smc(const Samples& in_cm_s2);
std::string invented_geonet(const Samples& in_mm_s2);
std::string invented_csmip_volume2(const Samples& in_cm_s2);
std::string invented_csmip_volume1(const Samples& in_g);              // the newer layout
std::string invented_csmip_volume1_pairs(const Samples& in_tenth_g);  // the older layout
std::string invented_knet(const Samples& in_counts);                  // a count is a thousandth of a gal; mean 0
std::string invented_esm_dyna(const Samples& in_cm_s2);
std::string invented_itaca(const Samples& in_m_s2);
std::string invented_afad(const Samples& in_gal);
std::string invented_asa(const Samples& in_gal);
std::string invented_cwb(const Samples& in_gal);
std::string invented_bhrc(const Samples& in_tenth_g);
std::string invented_csmnc(const Samples& in_cm_s2);

// `text` with the first `from` replaced; throws std::logic_error when it is not there.
std::string with(std::string text, std::string_view from, std::string_view to);
// With CR LF line endings.
std::string with_cr_lf(std::string_view text);

}  // namespace pilotis
