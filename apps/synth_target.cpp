#include "apps/synth_target.hpp"

#include <fmt/format.h>

#include "apps/synth_curve.hpp"
#include "apps/typed_values.hpp"
#include "core/motion/synthetic/spectrum_compatible.hpp"

namespace pilotis {

void add_synth_target_options(CLI::App& command, SynthTarget& target) {
  add_target_options(command, target.typed);
  command.add_option("--from", target.from, "shortest period held to a named target; a bare number is in s [0.05 s]");
  command.add_option("--to", target.to, "longest period held to a named target; a bare number is in s [3 s]");
}

void add_target(const SynthTarget& target, double damping, SynthRecipe& recipe) {
  const TargetSpectrum spectrum = target_of(target.typed, damping, "synth");
  std::string options = target_text(target.typed, damping, "synth");
  Curve curve;
  if (target.typed.name.empty()) {
    curve = read_curve(target.typed.file, target_table_columns());
  } else {
    const double from = typed_quantity(target.from, Dimension::time, "synth --from");
    const double to = typed_quantity(target.to, Dimension::time, "synth --to");
    curve.x = target_grid(from, to);
    for (const double period : curve.x) curve.y.push_back(spectrum.acceleration(period));
    options += fmt::format(" --from \"{} s\" --to \"{} s\"", from, to);
  }
  recipe.curves.push_back(std::move(curve));
  recipe.curve_options.push_back(std::move(options));
  recipe.notes.push_back("target: " + spectrum.description());
}

}  // namespace pilotis
