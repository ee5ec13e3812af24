#include "apps/motion/tables.hpp"

#include <fmt/format.h>

#include <cmath>
#include <iterator>

#include "apps/export_tables.hpp"
#include "core/error.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;

// Shortest text that reads back to the same double; empty for what is not known, as CSV readers expect.
std::string cell(double value) { return std::isfinite(value) ? fmt::format("{}", value) : ""; }

std::string who(const RecordNumbers& record) { return csv_cell(record.file) + "," + csv_cell(record.component); }

class Rows {
 public:
  // The cells that begin every row.
  explicit Rows(std::string head) : head_(std::move(head)) {}

  template <typename... Numbers>
  void add(Numbers... numbers) {
    text_ += head_;
    ((text_ += ',', append(numbers)), ...);
    text_ += '\n';
  }
  const std::string& text() const { return text_; }

 private:
  void append(double value) {
    if (std::isfinite(value)) fmt::format_to(std::back_inserter(text_), "{}", value);
  }
  void append(const char* word) { text_ += word; }
  void append(int value) { fmt::format_to(std::back_inserter(text_), "{}", value); }

  std::string head_, text_;
};

std::string measures_heading(const MotionRequest& request) {
  std::string text = "file,component,format,unit_in_file,samples,step [s],first_sample_at [s]";
  for (const Measure* measure : request.measures)
    text += fmt::format(",{} [{}]", measure->name, si_unit(measure->dimension));
  return text + "\n";
}

std::string measures_row(const RecordNumbers& record) {
  std::string text = fmt::format("{},{},{},{},{},{}", who(record), csv_cell(record.format), csv_cell(record.unit),
                                 record.samples, cell(record.record.step), cell(record.record.first_sample_at));
  for (const double value : record.measures) text += "," + cell(value);
  return text + "\n";
}

constexpr const char* spectrum_heading =
    "file,component,damping_ratio [1],period [s],displacement [m],velocity [m/s],acceleration [m/s2],pseudo_velocity "
    "[m/s],pseudo_acceleration [m/s2]\n";

std::string spectrum_rows(const RecordNumbers& record) {
  Rows rows(who(record));
  const std::vector<double>& periods = record.spectrum.periods;
  for (const SpectrumCurve& curve : record.spectrum.curves)
    for (std::size_t i = 0; i < periods.size(); ++i)
      rows.add(curve.damping_ratio, periods[i], curve.displacement[i], curve.velocity[i], curve.acceleration[i],
               curve.pseudo_velocity[i], curve.pseudo_acceleration[i]);
  return rows.text();
}

constexpr const char* inelastic_heading =
    "file,component,held,post_yield_ratio [1],damping_ratio [1],period [s],yield_acceleration [m/s2],strength_ratio "
    "[1],ductility [1],peak_displacement [m],residual_displacement [m],found\n";

std::string inelastic_rows(const RecordNumbers& record, const InelasticRequest& held) {
  Rows rows(fmt::format("{},{},{}", who(record), csv_cell(held.text), cell(held.post_yield_ratio)));
  for (const InelasticCurve& curve : record.inelastic)
    for (const InelasticPoint& point : curve.points)
      rows.add(curve.damping_ratio, point.period, point.yield_acceleration, point.strength_ratio, point.peak.ductility,
               point.peak.displacement, point.peak.residual,
               held.held == InelasticRequest::Held::ductility ? word_of(point.found) : "");
  return rows.text();
}

std::string fourier_rows(const RecordNumbers& record) {
  Rows rows(who(record));
  for (std::size_t i = 0; i < record.fourier.frequencies.size(); ++i)
    rows.add(record.fourier.frequencies[i], record.fourier.amplitudes[i]);
  return rows.text();
}

std::string histories_rows(const RecordNumbers& record) {
  Rows rows(who(record));
  const MotionHistories& all = record.histories;
  for (std::size_t i = 0; i < all.acceleration.size(); ++i)
    rows.add(all.step * static_cast<double>(i), all.acceleration[i], all.velocity[i], all.displacement[i]);
  return rows.text();
}

constexpr const char* pair_heading =
    "first,second,damping_ratio [1],period [s],rotd00_displacement [m],rotd50_displacement [m],rotd100_displacement "
    "[m],rotd50_pseudo_acceleration [m/s2],rotd100_pseudo_acceleration [m/s2],direction_of_rotd100 [degree]\n";

std::string pair_rows(const PairNumbers& pair) {
  Rows rows(csv_cell(pair.first) + "," + csv_cell(pair.second));
  for (const RotatedSpectrum& spectrum : pair.spectra)
    for (std::size_t i = 0; i < spectrum.periods.size(); ++i)
      rows.add(spectrum.damping_ratio, spectrum.periods[i], spectrum.displacement[i].least,
               spectrum.displacement[i].median, spectrum.displacement[i].largest,
               spectrum.median_pseudo_acceleration[i], spectrum.largest_pseudo_acceleration[i],
               spectrum.displacement[i].direction_of_largest);
  return rows.text();
}

}  // namespace

MotionTables::MotionTables(const fs::path& file, const MotionRequest& request, bool pair) : request_(request) {
  measures_ = open(file, "", measures_heading(request));
  if (request.spectrum) spectrum_ = open(file, "-spectrum", spectrum_heading);
  if (request.inelastic) inelastic_ = open(file, "-inelastic", inelastic_heading);
  if (request.fourier) fourier_ = open(file, "-fourier", "file,component,frequency [Hz],amplitude [m/s]\n");
  if (request.histories)
    histories_ =
        open(file, "-histories", "file,component,time [s],acceleration [m/s2],velocity [m/s],displacement [m]\n");
  if (pair) pair_ = open(file, "-rotd", pair_heading);
}

std::unique_ptr<WholeFile> MotionTables::open(const fs::path& file, const std::string& kind,
                                              const std::string& heading) {
  fs::path name = file.parent_path() / (file.stem().string() + kind + file.extension().string());
  auto whole = std::make_unique<WholeFile>(name);
  whole->write(heading);
  files_.push_back(std::move(name));
  return whole;
}

void MotionTables::add(const RecordNumbers& record) {
  measures_->write(measures_row(record));
  if (spectrum_) spectrum_->write(spectrum_rows(record));
  if (inelastic_) inelastic_->write(inelastic_rows(record, *request_.inelastic));
  if (fourier_) fourier_->write(fourier_rows(record));
  if (histories_) histories_->write(histories_rows(record));
}

void MotionTables::add(const PairNumbers& pair) {
  if (pair_) pair_->write(pair_rows(pair));
}

void MotionTables::commit() {
  for (auto* file : {&measures_, &spectrum_, &inelastic_, &fourier_, &histories_, &pair_})
    if (*file) (*file)->commit();
}

}  // namespace pilotis
