// The facts of the profile for scripts: SI throughout, told by the object "units".
#pragma once

#include <functional>
#include <string_view>

#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

// Writes one JSON object, piece by piece: it may be longer than memory holds. One building
// is "building", several are "buildings", and what is said of one then names it in "building". What is not a number is
// null: a value is null where no run gave one or where collapsed runs decide it ("finding", "collapsed" and
// "not_converged" tell which), a step error where it was not estimated. E.g. write_report_json(header, table, verdict,
// print_out).
void write_report_json(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                       const std::function<void(std::string_view)>& write);

}  // namespace pilotis
