// One bilinear spring, pushed past yield and back, through the installed headers and libraries.
#include <array>
#include <cmath>
#include <cstdio>

#include "core/error.hpp"
#include "core/laws/registry.hpp"
#include "integrators/catalogue.hpp"
#include "io/records/record.hpp"
#include "io/results/store.hpp"
#include "io/study/study.hpp"

namespace {

int failures = 0;

void expect(bool holds, const char* what) {
  if (!holds) std::printf("failed: %s\n", what);
  failures += holds ? 0 : 1;
}

bool near(double a, double b) { return std::abs(a - b) < 1e-6; }

// k = 1000 N/m, f_y = 10 N (so u_y = 0.01 m), r = 0.1, by hand:
//   at 0.03 m: f_y + r k (0.03 - 0.01) = 10 + 100 * 0.02 = 12 N, slope r k = 100 N/m
//   back to 0.02 m, unloading with k:  12 - 1000 * 0.01 = 2 N, slope k = 1000 N/m
void check_bilinear() {
  const pilotis::Law made = pilotis::make_law("bilinear", std::array{1000.0, 10.0, 0.1}, "consumer");
  const auto& law = std::get<pilotis::Bilinear>(made);
  pilotis::Bilinear::Memory<double> virgin{}, pushed{}, back{};
  const auto at_peak = pilotis::reply(law, 0.03, 0.0, virgin, pushed);
  expect(near(at_peak.force, 12) && near(at_peak.tangent, 100), "12 N and 100 N/m at 0.03 m");
  const auto returned = pilotis::reply(law, 0.02, 0.0, pushed, back);
  expect(near(returned.force, 2) && near(returned.tangent, 1000), "2 N and 1000 N/m back at 0.02 m");
}

void check_refusal() {
  try {
    pilotis::make_law("bilinear", std::array{-1.0, 10.0, 0.1}, "consumer");
    expect(false, "a negative stiffness is refused");
  } catch (const pilotis::Error& error) {
    expect(error.kind() == pilotis::ErrorKind::input, "the refusal is an input error");
  }
}

// The unit database is found at run time too: 1 kN/mm = 1e6 N/m.
void check_units() {
  expect(near(pilotis::si_factor("kN/mm", pilotis::Dimension::stiffness, "consumer"), 1e6), "1 kN/mm is 1e6 N/m");
}

// Each of these pulls in what io is made of: TOML, HDF5, the digest and the record formats.
template <class Read>
void expect_refused(Read read, const char* what) {
  try {
    read();
    expect(false, what);
  } catch (const pilotis::Error&) {
  }
}
void check_files() {
  expect_refused([] { pilotis::read_study("gone.toml", pilotis::scheme_catalogue()); },
                 "a study that is gone is refused");
  expect_refused([] { pilotis::read_results("gone.h5"); }, "a result file that is gone is refused");
  expect_refused([] { pilotis::read_record("gone.csv"); }, "a record that is gone is refused");
}

}  // namespace

int main() {
  check_bilinear();
  check_refusal();
  check_units();
  check_files();
  expect(!pilotis::scheme_catalogue().empty(), "the schemes are listed");
  return failures == 0 ? 0 : 1;
}
