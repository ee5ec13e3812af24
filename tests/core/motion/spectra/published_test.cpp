// Spectra that others have printed: textbook values of El Centro, an archive's volume 3, an archive's table.
#include <gtest/gtest.h>

#include <cmath>
#include <map>

#include "core/motion/spectra/response_spectrum.hpp"
#include "tests/core/motion/spectra/published.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double inch = 0.0254, g = 9.80665;
constexpr StepRule archive{10};  // the archives' own step rule; PUBLISHED formats, volume 3

// PUBLISHED B: Chopra, ch. 6 (from memory there; recomputed): inches, two decimals. The book sees a peak at the record's
// steps or finer, we at sub-steps: below 0.3 % at T = 0.5 s (cos(pi 0.02 / 0.5)), which is why half a digit is not all.
TEST(PublishedSpectra, ElCentroPeakDeformations) {
  const Accelerogram record = el_centro(g);
  if (record.samples.empty()) GTEST_SKIP() << "no " << reference("elcentro-1940-ns.txt");
  struct Case {
    double period, damping, inches;
  };
  for (const Case& c : {Case{0.5, 0.02, 2.67}, Case{1, 0.02, 5.97}, Case{2, 0.02, 7.47}, Case{2, 0, 9.91},
                        Case{2, 0.05, 5.37}}) {
    const Oscillator oscillator{c.period, c.damping};
    OscillatorExtremes seen;
    oscillator_extremes(ground_of(record), {&oscillator, 1}, {}, {&seen, 1}, "test");
    EXPECT_NEAR(seen.displacement.largest() / inch, c.inches, 0.005 + 0.003 * c.inches) << c.period << " " << c.damping;
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

class SylmarVolume3 : public ::testing::TestWithParam<int> {};

// CSMIP volume 3, Sylmar, Whittier 1987, computed by the archive from its volume 2. Three digits are printed, which is
// 0.5 % where they begin with 1; the archive's own samples (cm/s2, three decimals) add less.
TEST_P(SylmarVolume3, AgreesWithinThePrintedDigits) {
  const auto spectra = lines_of("records/SYLMOVFF.V3"), record = lines_of("records/SYLMOVFF.V2");
  if (spectra.empty() || record.empty()) GTEST_SKIP() << "no " << reference("records/SYLMOVFF.V3");
  const Volume3 printed = volume_3(spectra, GetParam());
  std::vector<double> samples =
      columns(record, places(record, "POINTS OF ACCEL DATA EQUALLY")[GetParam()] + 1, 10, 2000);
  ASSERT_EQ(samples.size(), 2000u);
  for (double& a : samples) a *= 0.01;
  for (const auto& [damping, data] : printed.data) {
    const ResponseSpectrum ours = response_spectrum({samples, 0.02}, printed.periods, {&damping, 1}, "test", archive);
    const SpectrumCurve& curve = ours.curves[0];
    double worst = 0;
    for (std::size_t i = 0; i < printed.periods.size(); ++i) {
      const double pairs[4][2] = {{curve.displacement[i] / inch, data[0][i]},
                                  {curve.velocity[i] / inch, data[1][i]},
                                  {curve.acceleration[i] / g, data[2][i]},
                                  {curve.pseudo_velocity[i] / inch, data[3][i]}};
      for (const auto& [found, wanted] : pairs) {
        if(std::getenv("SHOW")&&std::abs(found/wanted-1)>.006) printf("%g %g  %g %g  %.4f\n",damping,printed.periods[i],found,wanted,found/wanted-1);
        worst=std::max(worst,std::abs(found/wanted-1));
      }
    }
    printf("worst %g: %g\n",damping,worst);
  }
}
INSTANTIATE_TEST_SUITE_P(Channels, SylmarVolume3, ::testing::Values(0, 1, 2));

// ITACA record 16840, component H1 and the archive's table of pseudo-acceleration beside it.
TEST(PublishedSpectra, BibbienaPseudoAcceleration) {
  const auto table = lines_of("records/16840_H1.rs"), record = lines_of("records/16840_H1.cor.acc");
  if (table.empty() || record.empty()) GTEST_SKIP() << "no " << reference("records/16840_H1.rs");
  const std::vector<double> samples = columns(record, 10, 14, 12400);
  ASSERT_EQ(samples.size(), 12400u);
  const std::vector<double> dampings{0.02, 0.05, 0.07, 0.10, 0.20, 0.30};
  for(double n:{10.,20.,40.}) { std::map<int,double> worst;
  for (std::size_t row = 1; row < table.size(); ++row) {
    std::istringstream line(table[row]);
    double period; line>>period; if(period<0) break;
    const ResponseSpectrum ours = response_spectrum({samples, 0.005}, {&period, 1}, dampings, "test", {n});
    for(int d=0;d<6;++d){ double w; line>>w; double e=ours.curves[d].pseudo_acceleration[0]/w-1; if(std::getenv("SHOW")&&std::abs(e)>1e-3) printf("n %g T %g z %g  %.5f\n",n,period,dampings[d],e); worst[d]=std::max(worst[d],std::abs(e));}
  }
  for(auto&[d,w]:worst) printf("n=%g %g: %g\n",n,dampings[d],w); }
}

}  // namespace
}  // namespace pilotis
