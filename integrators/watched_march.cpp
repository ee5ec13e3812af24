#include "integrators/watched_march.hpp"

namespace pilotis {

State<double> initial_state(const System& system, const Load& load, const BatchSettings& settings) {
  State<double> state = state_at_rest<double>(system);
  for (std::size_t i = 0; i < settings.initial_displacement.size(); ++i)
    state.u[system.stories.floor[i]] = settings.initial_displacement[i];
  for (std::size_t i = 0; i < settings.initial_velocity.size(); ++i)
    state.v[system.stories.floor[i]] = settings.initial_velocity[i];
  start(system, load, state);
  return state;
}

double step_tolerance(const System& system, const Load& load, const State<double>& start,
                      const BatchSettings& settings) {
  double scale = load.largest();
  for (int i = 0; i < system.freedoms; ++i) scale = std::max(scale, std::abs(system.mass[i] * start.a[i]));
  return settings.tolerance * scale;
}

}  // namespace pilotis
