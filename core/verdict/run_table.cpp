#include "core/verdict/run_table.hpp"

namespace pilotis {

RunSet RunTable::set_of(int building, double factor) const {
  for (const RunSet& set : sets())
    if (set.building == building && set.factor == factor) return set;
  return {building, factor, 0, 0};
}

std::vector<double> RunTable::factors_of(int building) const {
  std::vector<double> factors;
  for (const RunSet& set : sets())
    if (set.building == building) factors.push_back(set.factor);
  return factors;
}

void add_to_sets(std::vector<RunSet>& sets, int building, double factor, std::size_t run) {
  if (sets.empty() || sets.back().building != building || sets.back().factor != factor)
    sets.push_back({building, factor, run, 0});
  ++sets.back().count;
}

}  // namespace pilotis
