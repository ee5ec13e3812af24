// How strong the shaking is over time: rise, strong part, decay.
//
//     I(t) = (t / t1)^2                 0 <= t < t1
//     I(t) = 1                         t1 <= t <= t2
//     I(t) = exp(-(t - t2) / t_decay)   t2 < t
//
// The form of Jennings, Housner & Tsai 1968, Simulated earthquake motions, Caltech EERL (their c is 1 / t_decay); the
// times are the user's.
#pragma once

namespace pilotis {

struct Envelope {
  double rise_end = 2;     // t1, s, > 0
  double strong_end = 10;  // t2, s, >= t1
  double decay_time = 4;   // t_decay, s, > 0: to 1/e

  double at(double time) const;  // dimensionless, 0 to 1; `time` in s, >= 0
};

}  // namespace pilotis
