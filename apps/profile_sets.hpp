// Many sets of building and factor on a screen: a line for each, the worst only where there are very many.
#pragma once

#include <string>
#include <vector>

#include "apps/terminal.hpp"
#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"

namespace pilotis {

class RankedSets {
 public:
  // Reads drift ratios of all sets only where no limit was judged.
  RankedSets(const RunTable& table, const Verdict& verdict);

  // Sets by their index in table.sets(), the one that governs first: exceeded limits before undetermined ones before
  // those too close to call, then by the least margin; then by collapsed runs, and the largest drift ratio.
  const std::vector<std::size_t>& order() const { return order_; }

  // How many of each finding there are; a table of all sets, or of the `most_lines` worst.
  std::string text(const RunTable& table, std::size_t most_lines, const ScreenStyle& style) const;

  // What became of one set.
  struct Judged {
    bool any = false;  // whether a limit was for it
    Finding worst = Finding::holds;
    double margin = 0;  // the least; infinite where there is none
    int collapsed = 0, not_converged = 0;
    double drift_ratio = 0;  // the largest; only where nothing was judged
  };

 private:
  std::vector<Judged> judged_;  // [set]
  std::vector<std::size_t> order_;
};

}  // namespace pilotis
