#include "tests/integrators/cvode_reference.hpp"

#include <cvode/cvode.h>
#include <nvector/nvector_serial.h>
#include <sunnonlinsol/sunnonlinsol_fixedpoint.h>

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace pilotis::test {

namespace {

constexpr double relative = 1e-9, absolute = 1e-11;  // m, m/s
// Before the shaking has come up the building, drift rates there are exactly zero, which a root search takes for roots.
constexpr double off_zero = 1e-12;  // m/s

enum class Slider { sticks, slips_right, slips_left };

// Everything the right-hand side needs. y = [u; v].
struct Problem {
  const Stick& stick;
  int n;
  double mass_factor, stiffness_factor;
  std::vector<Slider> slider;
  std::vector<double> slip;  // m
  double segment_start = 0, ground_start = 0, ground_slope = 0;

  const Bilinear& law(int i) const { return std::get<Bilinear>(stick.stories[i].spring); }
  double drift(const double* y, int i) const { return i == 0 ? y[0] : y[i] - y[i - 1]; }
  double rate(const double* y, int i) const { return i == 0 ? y[n] : y[n + i] - y[n + i - 1]; }
  double slider_stiffness(int i) const { return (1 - law(i).post_yield_ratio) * law(i).stiffness; }
  double strength(int i) const { return (1 - law(i).post_yield_ratio) * law(i).yield_shear; }

  double slider_force(const double* y, int i) const {
    if (slider[i] == Slider::slips_right) return strength(i);
    if (slider[i] == Slider::slips_left) return -strength(i);
    return slider_stiffness(i) * (drift(y, i) - slip[i]);
  }
  double shear(const double* y, int i) const {
    const double k = law(i).stiffness;
    return law(i).post_yield_ratio * k * drift(y, i) + slider_force(y, i) + stiffness_factor * k * rate(y, i);
  }
};

int right_hand_side(double t, N_Vector state, N_Vector slope, void* user) {
  const Problem& p = *static_cast<Problem*>(user);
  const double* y = N_VGetArrayPointer(state);
  double* out = N_VGetArrayPointer(slope);
  const double ground = p.ground_start + p.ground_slope * (t - p.segment_start);
  double above = 0;
  for (int i = p.n - 1; i >= 0; --i) {
    const double below = p.shear(y, i), mass = p.stick.stories[i].mass;
    out[i] = y[p.n + i];
    out[p.n + i] = (above - below) / mass - p.mass_factor * y[p.n + i] - ground;
    above = below;
  }
  return 0;
}

// Roots 0..n-1: a drift turns round. Roots n..2n-1: a spring that sticks reaches its strength.
int roots(double, N_Vector state, double* g, void* user) {
  const Problem& p = *static_cast<Problem*>(user);
  const double* y = N_VGetArrayPointer(state);
  for (int i = 0; i < p.n; ++i) {
    g[i] = p.rate(y, i) + off_zero;
    g[p.n + i] = p.slider[i] == Slider::sticks ? 1 - std::abs(p.slider_force(y, i)) / p.strength(i) : 1;
  }
  return 0;
}

void check(int flag, const char* what) {
  if (flag < 0) throw std::runtime_error(std::string("CVODE: ") + what);
}

class Solver {
 public:
  explicit Solver(Problem& problem) : problem_(problem) {
    check(SUNContext_Create(nullptr, &context_), "context");
    y_ = N_VNew_Serial(2 * problem.n, context_);
    N_VConst(0, y_);
    memory_ = CVodeCreate(CV_ADAMS, context_);
    check(CVodeInit(memory_, right_hand_side, 0, y_), "init");
    check(CVodeSStolerances(memory_, relative, absolute), "tolerances");
    solver_ = SUNNonlinSol_FixedPoint(y_, 0, context_);
    check(CVodeSetNonlinearSolver(memory_, solver_), "nonlinear solver");
    check(CVodeSetUserData(memory_, &problem), "user data");
    check(CVodeSetMaxNumSteps(memory_, 100000), "steps");
    check(CVodeRootInit(memory_, 2 * problem.n, roots), "roots");
    std::vector<int> direction(2 * problem.n, 0);
    std::fill(direction.begin() + problem.n, direction.end(), -1);
    check(CVodeSetRootDirection(memory_, direction.data()), "direction");
    check(CVodeSetNoInactiveRootWarn(memory_), "warnings");
    peaks_.assign(problem.n, 0);
  }
  ~Solver() {
    CVodeFree(&memory_);
    SUNNonlinSolFree(solver_);
    N_VDestroy(y_);
    SUNContext_Free(&context_);
  }
  Solver(const Solver&) = delete;
  Solver& operator=(const Solver&) = delete;

  // To `end`, without a kink of the load on the way.
  void march(double start, double end) {
    double t = start;
    check(CVodeReInit(memory_, t, y_), "again");
    check(CVodeSetStopTime(memory_, end), "stop time");
    while (t < end) {
      const int flag = CVode(memory_, end, y_, &t, CV_NORMAL);
      check(flag, "step");
      note_peaks();
      if (flag != CV_ROOT_RETURN || !switch_sliders()) continue;
      if (t < end) {
        check(CVodeReInit(memory_, t, y_), "again");
        check(CVodeSetStopTime(memory_, end), "stop time");
      }
    }
  }
  const std::vector<double>& peaks() const { return peaks_; }

 private:
  void note_peaks() {
    const double* y = N_VGetArrayPointer(y_);
    for (int i = 0; i < problem_.n; ++i) peaks_[i] = std::max(peaks_[i], std::abs(problem_.drift(y, i)));
  }

  // True when some spring went from sticking to slipping or back.
  bool switch_sliders() {
    std::vector<int> found(2 * problem_.n);
    check(CVodeGetRootInfo(memory_, found.data()), "root info");
    const double* y = N_VGetArrayPointer(y_);
    bool changed = false;
    for (int i = 0; i < problem_.n; ++i) {
      Slider& slider = problem_.slider[i];
      const double reach = problem_.strength(i) / problem_.slider_stiffness(i);
      if (slider == Slider::sticks && found[problem_.n + i] != 0) {
        slider = problem_.slider_force(y, i) > 0 ? Slider::slips_right : Slider::slips_left;
        changed = true;
      } else if ((slider == Slider::slips_right && found[i] < 0) || (slider == Slider::slips_left && found[i] > 0)) {
        problem_.slip[i] = problem_.drift(y, i) - (slider == Slider::slips_right ? reach : -reach);
        slider = Slider::sticks;
        changed = true;
      }
    }
    return changed;
  }

  Problem& problem_;
  SUNContext context_ = nullptr;
  N_Vector y_ = nullptr;
  void* memory_ = nullptr;
  SUNNonlinearSolver solver_ = nullptr;
  std::vector<double> peaks_;
};

}  // namespace

std::vector<double> cvode_peak_drifts(const Stick& stick, const Accelerogram& record, double factor, double end) {
  const auto& damping = std::get<RayleighByFactors>(stick.damping);
  const int n = static_cast<int>(stick.stories.size());
  Problem problem{stick,
                  n,
                  damping.mass_factor,
                  damping.stiffness_factor,
                  std::vector<Slider>(n, Slider::sticks),
                  std::vector<double>(n, 0.0)};
  Solver solver(problem);
  // The record begins one step before its first sample, at rest, and comes to rest one step after the last.
  const long lead = std::lround(record.first_sample_at / record.step), count = static_cast<long>(record.samples.size());
  const auto ground = [&](long k) { return k < lead || k - lead >= count ? 0.0 : factor * record.samples[k - lead]; };
  for (long k = 0; static_cast<double>(k) * record.step < end - 1e-9; ++k) {
    problem.segment_start = static_cast<double>(k) * record.step;
    problem.ground_start = ground(k);
    problem.ground_slope = (ground(k + 1) - ground(k)) / record.step;
    solver.march(problem.segment_start, std::min(end, static_cast<double>(k + 1) * record.step));
  }
  return solver.peaks();
}

}  // namespace pilotis::test
