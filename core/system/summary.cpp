#include "core/system/summary.hpp"

#include "core/system/modes.hpp"

namespace pilotis {

namespace {

std::vector<double> flat(const Eigen::MatrixXd& symmetric) {
  return {symmetric.data(), symmetric.data() + symmetric.size()};
}

}  // namespace

BuildingSummary summary_of(const Stick& stick, const System& system, const std::string& title) {
  BuildingSummary summary;
  summary.title = title;
  for (const Story& story : stick.stories) summary.labels.push_back(story.label);
  summary.heights = system.stories.height;
  summary.masses = system.mass;
  summary.modes = modes_of(system);
  summary.mass_matrix = flat(Eigen::Map<const Eigen::VectorXd>(system.mass.data(), system.freedoms).asDiagonal());
  summary.damping_matrix = flat(dense_damping(system));
  summary.stiffness_matrix = flat(dense(initial_stiffness(system)));
  return summary;
}

}  // namespace pilotis
