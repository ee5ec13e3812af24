#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/afad.hpp"
#include "io/records/asa.hpp"
#include "io/records/bhrc.hpp"
#include "io/records/components.hpp"
#include "io/records/cosmos.hpp"
#include "io/records/csmip_volume1.hpp"
#include "io/records/csmip_volume2.hpp"
#include "io/records/csmnc.hpp"
#include "io/records/cwb.hpp"
#include "io/records/esm_dyna.hpp"
#include "io/records/file.hpp"
#include "io/records/geonet.hpp"
#include "io/records/itaca.hpp"
#include "io/records/knet.hpp"
#include "io/records/not_records.hpp"
#include "io/records/peer.hpp"
#include "io/records/plain.hpp"
#include "io/records/record.hpp"
#include "io/records/smc.hpp"

namespace pilotis {

namespace {

// GeoNet and SMC before CSMIP: their first lines are alike.
constexpr std::array<RecordFormat, 15> formats{{
    {peer_name, "four header lines, then values row by row (.AT2)", recognises_peer, read_peer},
    {cosmos_name, "text, integer and real headers per channel (.V1c, .V2c)", recognises_cosmos, read_cosmos},
    {smc_name, "one component with integer and real headers (.smc)", recognises_smc, read_smc},
    {geonet_name, "three components in mm/s2 (.V2A)", recognises_geonet, read_geonet},
    {csmip_volume2_name, "corrected accelerograms, channel by channel (.V2)", recognises_csmip_volume2,
     read_csmip_volume2},
    {csmip_volume1_name, "uncorrected accelerograms, channel by channel (.V1)", recognises_csmip_volume1,
     read_csmip_volume1},
    {knet_name, "counts with a scale factor (.NS, .EW, .UD, ...)", recognises_knet, read_knet},
    {esm_dyna_name, "64 lines of KEY: value, then one value a line (.ASC)", recognises_esm_dyna, read_esm_dyna},
    {itaca_name, "labelled header lines, then five columns", recognises_itaca, read_itaca},
    {afad_name, "three components in columns, gal", recognises_afad, read_afad},
    {asa_name, "up to twelve channels in columns, gal", recognises_asa, read_asa},
    {cwb_name, "time and three components in columns, gal", recognises_cwb, read_cwb},
    {bhrc_name, "three components in G/10 (.V1)", recognises_bhrc, read_bhrc},
    {csmnc_name, "sixteen header lines, then values row by row", recognises_csmnc, read_csmnc},
    {plain_name, "columns of samples, with or without their times; CSV", recognises_plain, read_plain},
}};

// About twice the strongest shaking ever recorded: more is most likely a wrong unit.
constexpr double remarkable_peak = 8 * standard_gravity;

std::string_view without_byte_order_mark(std::string_view content) {
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  return content.starts_with(mark) ? content.substr(mark.size()) : content;
}

FileOfRecords read_text(std::string_view text, const std::string& where, const RecordHints& hints) {
  for (const RecordFormat& format : formats)
    if (format.recognises(text)) return format.read(text, where, hints);
  throw input_error(where, "no format recognises this file", "");
}

void note_remarkable_peak(RecordComponent& component) {
  const double peak = peak_of(component.record).value;
  if (std::abs(peak) > remarkable_peak)
    component.notes.push_back(
        fmt::format("the peak of {:.3g} g is far beyond recorded shaking: is the unit \"{}\" right?",
                    peak / standard_gravity, component.unit));
}

}  // namespace

std::span<const RecordFormat> record_formats() { return formats; }

FileOfRecords read_record_content(std::string_view content, const std::string& where, const RecordHints& hints) {
  const std::string_view marked = without_byte_order_mark(content);
  refuse_not_records(marked, where);
  const std::string_view text = text_of(marked, where);
  FileOfRecords file = read_text(text, where, hints);
  for (RecordComponent& component : file.components) {
    validate(component.record, where);
    note_remarkable_peak(component);
  }
  return file;
}

FileOfRecords read_record_file(const std::filesystem::path& file, const RecordHints& hints) {
  return read_record_content(content_of(file), file.string(), hints);
}

RecordFile read_record(const std::filesystem::path& path, const RecordHints& hints) {
  const FileOfRecords file = read_record_file(path, hints);
  const RecordComponent& chosen = chosen_component(file, hints.component, path.string());
  std::vector<std::string> notes = file.notes;
  notes.insert(notes.end(), chosen.notes.begin(), chosen.notes.end());
  return {chosen.record, file.format, chosen.unit, std::move(notes), chosen.name};
}

}  // namespace pilotis
