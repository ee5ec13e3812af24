// Energy balance of a march, relative to the moving ground: input = kinetic + damping + absorbed + elastic.
// (Relative energy formulation: Uang & Bertero, "Evaluation of seismic energy in structures", Earthq. Eng. Struct. Dyn.
// 19 (1990) 77.) Energies of position and speed are exact functions of the state, and so is what the laws absorb; only
// the work of the load and of damping is summed over the steps. The error left over measures the marching.
#pragma once

#include <vector>

#include "core/response/observer.hpp"

namespace pilotis {

// How the work over a step is summed: it must be no coarser than the scheme.
//   trapezoid  force times displacement increment: conjugate to the second-order schemes
//   corrected  power by the trapezoid rule with end correction (fourth order), for schemes above second order
enum class WorkRule { trapezoid, corrected };

struct Energies {  // J
  double input = 0, kinetic = 0, damping = 0, absorbed = 0, elastic = 0;
  double imbalance() const { return input - kinetic - damping - absorbed - elastic; }
};

class EnergyWatch : public Observer {
 public:
  EnergyWatch(const System& system, WorkRule rule);
  bool see(const Instant& instant) noexcept override;
  const Energies& now() const { return now_; }  // energy the building started with counts as input
  double error() const;  // largest |imbalance| / largest input over the march; 0 when nothing was put in

 private:
  struct Powers {
    double load = 0, damping = 0;              // W, v.p and v.Cv
    double load_slope = 0, damping_slope = 0;  // W/s, of them; the load's own slope enters in add_work
  };
  void add_work(const Instant& instant) noexcept;
  void add_absorbed(const Instant& instant) noexcept;
  void read_state(const Instant& instant) noexcept;
  Powers powers(const Instant& instant) noexcept;
  void remember(const Instant& instant) noexcept;

  const System& system_;
  WorkRule rule_;
  bool started_ = false;
  double last_time_ = 0;
  Powers last_powers_;
  std::vector<double> last_u_, last_v_, last_load_, last_damping_, scratch_;
  Memories<double> last_memory_;
  Energies now_;
  double largest_input_ = 0, largest_imbalance_ = 0;
};

}  // namespace pilotis
