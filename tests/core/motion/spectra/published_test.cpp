// Spectra that others have printed: textbook values of El Centro, an archive's volume 3, an archive's table.
#include "tests/core/motion/spectra/published.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <iterator>
#include <map>
#include <sstream>

#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double inch = 0.0254, g = 9.80665;

// PUBLISHED B: Chopra, ch. 6 (from memory there; recomputed there). Half a unit of the second decimal, and 0.2 % for
// the book's digitisation of the record, as PUBLISHED F has it. Seen at the record's own steps, as the book does (n =
// 10).
TEST(PublishedSpectra, ElCentroPeakDeformations) {
  const Accelerogram record = el_centro(g);
  if (record.samples.empty()) GTEST_SKIP() << "no " << reference("elcentro-1940-ns.txt");
  struct Case {
    double period, damping, inches;
  };
  for (const Case& c :
       {Case{0.5, 0.02, 2.67}, Case{1, 0.02, 5.97}, Case{2, 0.02, 7.47}, Case{2, 0, 9.91}, Case{2, 0.05, 5.37}}) {
    const Oscillator oscillator{c.period, c.damping};
    OscillatorExtremes seen;
    oscillator_extremes(ground_of(record), {&oscillator, 1}, archive_rule, {&seen, 1}, "test");
    EXPECT_NEAR(seen.displacement.largest() / inch, c.inches, 0.005 + 0.002 * c.inches) << c.period << " " << c.damping;
  }
}

struct Volume3 {
  std::vector<double> periods;                              // s
  std::map<double, std::vector<std::vector<double>>> data;  // damping -> SD (in), SV (in/s), SA (g), PSSV (in/s)
};

Volume3 volume_3(const std::vector<std::string>& lines, int channel) {
  constexpr std::size_t count = 65, rows = 13;
  Volume3 out{columns(lines, places(lines, "FOURIER AMPLITUDE SPECTRA IN")[channel] - rows, 10, count), {}};
  for (const char* damping : {".02", ".05", ".10", ".20"}) {
    const std::size_t at = places(lines, std::string("DAMPING =  ") + damping + ". DATA")[channel] + 1;
    for (std::size_t kind = 0; kind < 4; ++kind)
      out.data[std::stod(damping)].push_back(columns(lines, at + kind * rows, 10, count));
  }
  return out;
}

double last_of_three_digits(double value) { return std::pow(10, std::floor(std::log10(value)) - 2); }

class SylmarVolume3 : public ::testing::TestWithParam<int> {};

// CSMIP volume 3, Sylmar, Whittier 1987, computed by the archive from its volume 2, damping 2 to 20 %. Three digits are
// printed: half a unit of the last one, and a tenth for the record's own rounding to 0.001 cm/s2. The archive's g is
// 386 in/s2: the one round value that meets all its accelerations.
TEST_P(SylmarVolume3, AgreesToThePrintedDigits) {
  const auto spectra = lines_of("records/SYLMOVFF.V3"), record = lines_of("records/SYLMOVFF.V2");
  if (spectra.empty() || record.empty()) GTEST_SKIP() << "no " << reference("records/SYLMOVFF.V3");
  const Volume3 printed = volume_3(spectra, GetParam());
  std::vector<double> samples =
      columns(record, places(record, "POINTS OF ACCEL DATA EQUALLY")[GetParam()] + 1, 10, 2000);
  ASSERT_EQ(samples.size(), 2000u);
  for (double& a : samples) a *= 0.01;
  for (const auto& [damping, data] : printed.data) {
    const ResponseSpectrum ours =
        response_spectrum({samples, 0.02}, printed.periods, {&damping, 1}, "test", archive_rule);
    const SpectrumCurve& curve = ours.curves[0];
    for (std::size_t i = 0; i < printed.periods.size(); ++i) {
      SCOPED_TRACE(printed.periods[i]);
      EXPECT_NEAR(curve.displacement[i] / inch, data[0][i], 0.6 * last_of_three_digits(data[0][i])) << damping;
      EXPECT_NEAR(curve.velocity[i] / inch, data[1][i], 0.6 * last_of_three_digits(data[1][i])) << damping;
      EXPECT_NEAR(curve.acceleration[i] / (386 * inch), data[2][i], 0.6 * last_of_three_digits(data[2][i])) << damping;
      EXPECT_NEAR(curve.pseudo_velocity[i] / inch, data[3][i], 0.6 * last_of_three_digits(data[3][i])) << damping;
    }
  }
}
INSTANTIATE_TEST_SUITE_P(Channels, SylmarVolume3, ::testing::Values(0, 1, 2));

// The rows of the archive's table: period (s), then pseudo-acceleration (m/s2) at 2, 5, 7, 10, 20 and 30 %.
std::vector<std::vector<double>> rows_of(const std::vector<std::string>& table) {
  std::vector<std::vector<double>> rows;
  for (std::size_t i = 1; i < table.size(); ++i) {
    std::istringstream line(table[i]);
    const std::vector<double> row{std::istream_iterator<double>(line), {}};
    if (row.size() == 7 && row[0] >= 0) rows.push_back(row);
  }
  return rows;
}

// ITACA record 16840, component H1, and the archive's table beside it. Agreement within 7e-4 is what an independent
// calculation found too (PUBLISHED formats). The column headed 2 % stands two rows too high in this file: its last rows
// repeat others. Read that way it agrees within what sampling at 0.005 s can miss, (pi 0.005 / T)^2 / 2 or 1.1e-3 at
// T = 0.34 s, which matters at low damping.
TEST(PublishedSpectra, BibbienaPseudoAcceleration) {
  const auto rows = rows_of(lines_of("records/16840_H1.rs"));
  const auto record = lines_of("records/16840_H1.cor.acc");
  if (rows.empty() || record.empty()) GTEST_SKIP() << "no " << reference("records/16840_H1.rs");
  const std::vector<double> samples = columns(record, 10, 14, 12400);
  ASSERT_EQ(samples.size(), 12400u);
  ASSERT_EQ(rows.size(), 78u);
  std::vector<double> periods;
  for (const auto& row : rows) periods.push_back(row[0]);
  const std::vector<double> dampings{0.02, 0.05, 0.07, 0.10, 0.20, 0.30};
  const ResponseSpectrum ours = response_spectrum({samples, 0.005}, periods, dampings, "test", archive_rule);
  for (std::size_t column = 0; column < dampings.size(); ++column) {
    const std::size_t shift = column == 0 ? 2 : 0;
    for (std::size_t i = 0; i + shift < periods.size(); ++i) {
      const double wanted = rows[i][column + 1], allowed = column == 0 ? 1.1e-3 : 7e-4;
      EXPECT_NEAR(ours.curves[column].pseudo_acceleration[i + shift], wanted, allowed * wanted)
          << periods[i + shift] << " s, " << dampings[column];
    }
  }
}

}  // namespace
}  // namespace pilotis
