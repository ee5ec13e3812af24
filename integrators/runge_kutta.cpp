#include "integrators/runge_kutta.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <boost/numeric/odeint/stepper/controlled_runge_kutta.hpp>
#include <boost/numeric/odeint/stepper/runge_kutta_dopri5.hpp>
#include <boost/numeric/odeint/stepper/runge_kutta_fehlberg78.hpp>
#include <cmath>

#include "core/system/kernel.hpp"

namespace pilotis {

namespace {

namespace odeint = boost::numeric::odeint;
using Vector = std::vector<double>;  // [u; v], [2 freedoms]

// y' = f(t, y) over one step; t counts from the start of the step.
class Equation {
 public:
  explicit Equation(const System& system)
      : system_(system), forces_(system), trial_(state_at_rest<double>(system).memory) {}

  void begin(const Memories<double>& committed, const LoadStep& load) noexcept {
    committed_ = &committed, load_ = &load;
  }

  void operator()(const Vector& y, Vector& rate, double t) noexcept {
    const int n = system_.freedoms;
    internal_forces(system_, y.data(), y.data() + n, *committed_, trial_, forces_);
    const double share = t / load_->dt;
    for (int i = 0; i < n; ++i) {
      const double p = load_->before[i] + share * (load_->after[i] - load_->before[i]);
      rate[i] = y[n + i];
      rate[n + i] = (p - forces_.internal[i]) / system_.mass[i];
    }
  }

  // What the laws would remember at y.
  const Memories<double>& remembered(const Vector& y) noexcept {
    const int n = system_.freedoms;
    internal_forces(system_, y.data(), y.data() + n, *committed_, trial_, forces_);
    return trial_;
  }

 private:
  const System& system_;
  const Memories<double>* committed_ = nullptr;
  const LoadStep* load_ = nullptr;
  Forces<double> forces_;
  Memories<double> trial_;
};

// Where an element turned round inside the step: deformation and rate at its two ends, h apart.
struct Passage {
  double before, rate_before, after, rate_after;
  bool turns() const { return rate_before * rate_after < 0; }
  double turning_share() const { return rate_before / (rate_before - rate_after); }
  double turning_deformation(double h) const { return before + 0.5 * rate_before * turning_share() * h; }
};

// How much force the element would have lost or gained by way of the turning point, as a deformation (m).
template <class L>
double missed_deformation(const L& law, const typename L::template Memory<double>& memory, const Passage& p, double h) {
  typename L::template Memory<double> at_turn{}, unused{};
  reply(law, p.turning_deformation(h), 0.0, memory, at_turn);
  const double by_way = reply(law, p.after, p.rate_after, at_turn, unused).force;
  const double direct = reply(law, p.after, p.rate_after, memory, unused).force;
  return std::abs(by_way - direct) / initial_stiffness(law);
}

// The share of the step at which it must be cut, 1 when no reversal was missed noticeably.
double cut_at_reversal(const System& system, const Memories<double>& memory, const Vector& from, const Vector& to,
                       double h, double rtol, double atol) noexcept {
  double share = 1;
  const int n = system.freedoms;
  const auto& rows = system.rows;
  for_each_group<double>(system, memory, [&]<class L>(const ElementGroup<L>& group, const auto& before) {
    if constexpr (!std::is_same_v<L, Linear>)
      for (std::size_t e = 0; e < group.laws.size(); ++e) {
        const int row = group.row[e];
        const Passage p{row_value(rows, row, from.data()), row_value(rows, row, from.data() + n),
                        row_value(rows, row, to.data()), row_value(rows, row, to.data() + n)};
        if (!p.turns()) continue;
        const double allowed = atol + rtol * std::max(std::abs(p.before), std::abs(p.after));
        if (missed_deformation(group.laws[e], before[e], p, h) > allowed) share = std::min(share, p.turning_share());
      }
  });
  return share;
}

// `Controlled` is one of Odeint's controlled explicit pairs.
template <class Controlled>
class AdaptiveStepper : public Stepper {
 public:
  AdaptiveStepper(const System& system, double rtol, double atol)
      : system_(system),
        rtol_(rtol),
        atol_(atol),
        equation_(system),
        from_(2 * system.freedoms),
        to_(from_),
        controlled_(typename Controlled::error_checker_type(atol, rtol)) {}

  // One accepted step of its own, at most load.dt long.
  StepResult step(State<double>& state, const LoadStep& load) noexcept override {
    equation_.begin(state.memory, load);
    std::copy(state.u.begin(), state.u.end(), from_.begin());
    std::copy(state.v.begin(), state.v.end(), from_.begin() + system_.freedoms);
    const double wanted = state.inner_step > 0 ? state.inner_step : load.dt;
    double h = std::min(wanted, load.dt);
    for (int attempt = 0; attempt < attempts; ++attempt) {
      double t = 0, next = h;
      if constexpr (requires { controlled_.reset(); }) controlled_.reset();
      to_ = from_;
      if (controlled_.try_step(std::ref(equation_), to_, t, next) == odeint::fail) {
        h = next;
        if (!(h > smallest * load.dt)) break;
        continue;
      }
      const double share = cut_at_reversal(system_, state.memory, from_, to_, h, rtol_, atol_);
      if (share < 1 && share * h > smallest * load.dt) {
        h *= share;
        continue;
      }
      accept(state);
      // A step cut short by the end of the interval says nothing against the longer one wanted.
      state.inner_step = h < wanted && h == load.dt ? std::max(wanted, next) : next;
      return {StepStatus::done, h / load.dt};
    }
    return {StepStatus::failed, 0};
  }

 private:
  static constexpr int attempts = 200;
  static constexpr double smallest = 1e-9;  // of the interval; below it the step is not cut any more

  void accept(State<double>& state) noexcept {
    const Memories<double>& memory = equation_.remembered(to_);
    std::copy_n(to_.begin(), system_.freedoms, state.u.begin());
    std::copy_n(to_.begin() + system_.freedoms, system_.freedoms, state.v.begin());
    state.memory = memory;
  }

  const System& system_;
  double rtol_, atol_;
  Equation equation_;
  Vector from_, to_;
  Controlled controlled_;
};

}  // namespace

Traits RungeKutta::traits() const {
  Traits traits;
  traits.order = pair_ == Pair::dormand_prince ? 5 : 8;
  traits.implicit = false;
  traits.adaptive = true;
  traits.spectral_radius = std::numeric_limits<double>::infinity();
  traits.accurate_omega_dt = 0.126;  // states are kept at least this often, so that no peak is missed by over 0.2 %
  return traits;
}

std::string RungeKutta::description() const {
  const auto name = pair_ == Pair::dormand_prince ? dormand_prince.name : fehlberg.name;
  return fmt::format("{} (rtol {:.3g}, atol {:.3g})", name, rtol_, atol_);
}

std::unique_ptr<Stepper> RungeKutta::prepare(const System& system, const StepSettings&) const {
  if (pair_ == Pair::dormand_prince)
    return std::make_unique<AdaptiveStepper<odeint::controlled_runge_kutta<odeint::runge_kutta_dopri5<Vector>>>>(
        system, rtol_, atol_);
  return std::make_unique<AdaptiveStepper<odeint::controlled_runge_kutta<odeint::runge_kutta_fehlberg78<Vector>>>>(
      system, rtol_, atol_);
}

std::shared_ptr<const Scheme> RungeKutta::refined() const {
  // Kinks keep the error from falling in step with the tolerance, so the check is made much tighter; never below
  // rounding.
  return std::make_shared<RungeKutta>(pair_, std::max(rtol_ / 100, 1e-14), std::max(atol_ / 100, 1e-16));
}

}  // namespace pilotis
