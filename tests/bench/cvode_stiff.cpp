#include "tests/bench/cvode_stiff.hpp"

#include <cvode/cvode.h>
#include <nvector/nvector_serial.h>
#include <sunlinsol/sunlinsol_band.h>
#include <sunmatrix/sunmatrix_band.h>

#include <algorithm>
#include <cmath>
#include <stdexcept>
#include <variant>

namespace pilotis::bench {

namespace {

struct Problem {
  const Stick& stick;
  const Accelerogram& record;
  double factor, mass_share, stiffness_share;  // Rayleigh

  const Bilinear& law(std::size_t i) const { return std::get<Bilinear>(stick.stories[i].spring); }

  double ground(double t) const {
    const double x = (t - record.first_sample_at) / record.step + 1;  // the ramp to the first sample is number 0
    const auto i = static_cast<long>(std::floor(x));
    const auto at = [&](long k) { return k < 1 || k > long(record.samples.size()) ? 0.0 : record.samples[k - 1]; };
    return factor * (at(i) + (x - static_cast<double>(i)) * (at(i + 1) - at(i)));
  }
};

int rate(double t, N_Vector state, N_Vector slope, void* data) {
  const Problem& p = *static_cast<Problem*>(data);
  const double *y = N_VGetArrayPointer(state), ground = p.ground(t);
  double* f = N_VGetArrayPointer(slope);
  const std::size_t n = p.stick.stories.size();
  double shear_above = 0;
  for (std::size_t i = n; i-- > 0;) {
    const Bilinear& law = p.law(i);
    const double drift = y[3 * i] - (i > 0 ? y[3 * i - 3] : 0), speed = y[3 * i + 1] - (i > 0 ? y[3 * i - 2] : 0);
    const double k = (1 - law.post_yield_ratio) * law.stiffness,
                 strength = (1 - law.post_yield_ratio) * law.yield_shear;
    const double slider = std::clamp(k * (drift - y[3 * i + 2]), -strength, strength);
    const bool slips = std::abs(k * (drift - y[3 * i + 2])) >= strength && slider * speed > 0;
    const double shear =
        law.post_yield_ratio * law.stiffness * drift + slider + p.stiffness_share * law.stiffness * speed;
    const double mass = p.stick.stories[i].mass;
    f[3 * i] = y[3 * i + 1];
    f[3 * i + 1] = (shear_above - shear) / mass - p.mass_share * y[3 * i + 1] - ground;
    f[3 * i + 2] = slips ? speed : 0;
    shear_above = shear;
  }
  return 0;
}

void require(bool good, const char* what) {
  if (!good) throw std::runtime_error(what);
}

}  // namespace

std::vector<double> cvode_stiff_peaks(const Stick& stick, const Accelerogram& record, double factor, double end,
                                      double rtol) {
  const auto& damping = std::get<RayleighByFactors>(stick.damping);
  Problem problem{stick, record, factor, damping.mass_factor, damping.stiffness_factor};
  const std::size_t n = stick.stories.size();
  SUNContext context;
  require(SUNContext_Create(nullptr, &context) == 0, "SUNContext_Create");
  N_Vector y = N_VNew_Serial(static_cast<sunindextype>(3 * n), context);
  N_VConst(0, y);
  void* solver = CVodeCreate(CV_BDF, context);
  require(CVodeInit(solver, rate, 0, y) == 0, "CVodeInit");
  CVodeSStolerances(solver, rtol, rtol * 1e-3);
  CVodeSetUserData(solver, &problem);
  CVodeSetMaxNumSteps(solver, 1000000);
  SUNMatrix matrix = SUNBandMatrix(static_cast<sunindextype>(3 * n), 5, 5, context);
  SUNLinearSolver linear = SUNLinSol_Band(y, matrix, context);
  require(CVodeSetLinearSolver(solver, linear, matrix) == 0, "CVodeSetLinearSolver");
  std::vector<double> peaks(n, 0.0);
  double t = 0;
  for (long step = 1; 0.005 * static_cast<double>(step) <= end + 1e-9; ++step) {
    require(CVode(solver, 0.005 * static_cast<double>(step), y, &t, CV_NORMAL) >= 0, "CVode");
    const double* now = N_VGetArrayPointer(y);
    for (std::size_t i = 0; i < n; ++i)
      peaks[i] = std::max(peaks[i], std::abs(now[3 * i] - (i > 0 ? now[3 * i - 3] : 0)));
  }
  CVodeFree(&solver);
  SUNLinSolFree(linear);
  SUNMatDestroy(matrix);
  N_VDestroy(y);
  SUNContext_Free(&context);
  return peaks;
}

}  // namespace pilotis::bench
