// How strong the shaking is over time, as one of two forms.
//
// jennings (Jennings, Housner & Tsai 1968, Simulated earthquake motions, Caltech EERL; their c is 1 / t_decay):
//     I(t) = (t / t1)^2                 0 <= t < t1
//     I(t) = 1                         t1 <= t <= t2
//     I(t) = exp(-(t - t2) / t_decay)   t2 < t
// Its integral of I^2 from 0 to infinity is t1 / 5 + t2 - t1 + t_decay / 2.
//
// saragoni_hart (Saragoni & Hart 1974, Earthquake Engineering and Structural Dynamics 2, 249), as Boore 2003, Pure and
// Applied Geophysics 160, 635, writes it, x = t / t_eta:
//     I(t) = a x^b exp(-c x),   b = -epsilon ln(eta) / (1 + epsilon (ln(epsilon) - 1)),   c = b / epsilon,
//     a = (e / epsilon)^b
// It is 1 at its peak, t = epsilon t_eta, and eta at t = t_eta. Its integral of I^2 from 0 to infinity is
// t_eta a^2 Gamma(2 b + 1) / (2 c)^(2 b + 1).
#pragma once

#include <array>
#include <variant>
#include <vector>

#include "core/motion/synthetic/kind.hpp"
#include "core/motion/synthetic/parameters.hpp"

namespace pilotis {

struct JenningsEnvelope {
  double rise_end = 2;     // t1, s, > 0
  double strong_end = 10;  // t2, s, >= t1
  double decay_time = 4;   // t_decay, s, > 0: to 1/e

  double at(double time) const;  // dimensionless, 0 to 1; `time` in s, >= 0
};

class SaragoniHartEnvelope {
 public:
  // t_eta in s, > 0; epsilon and eta in (0, 1).
  SaragoniHartEnvelope(double window_time, double peak_fraction, double end_level);

  double at(double time) const;  // dimensionless, 0 to 1; `time` in s, >= 0
  double a() const { return a_; }
  double b() const { return b_; }
  double c() const { return c_; }

 private:
  double window_time_, a_, b_, c_;
};

using Envelope = std::variant<JenningsEnvelope, SaragoniHartEnvelope>;

inline constexpr std::array<std::string_view, 2> envelope_forms{"jennings", "saragoni_hart"};
inline constexpr std::array<Parameter, 7> envelope_parameters{
    one_of("envelope", "form of the envelope", envelope_forms),
    positive("rise_end", Dimension::time, "jennings: end of the quadratic rise", 2),
    positive("strong_end", Dimension::time, "jennings: end of the strong part", 10),
    positive("decay_time", Dimension::time, "jennings: time in which it then falls to 1/e", 4),
    positive("window_time", Dimension::time, "saragoni_hart: t_eta, when it has fallen to end_level", 20),
    damping_ratio("peak_fraction", "saragoni_hart: epsilon, time of the peak over window_time", 0.2),
    damping_ratio("end_level", "saragoni_hart: eta, its value at window_time", 0.05)};

// From a kind whose list holds envelope_parameters. Throws Error (input) when the times do not go together or the
// duration does not reach beyond the rise.
Envelope envelope_of(const SyntheticInput& input);

// I at every sample of the grid.
std::vector<double> sampled(const Envelope& envelope, const SyntheticInput& input);

}  // namespace pilotis
