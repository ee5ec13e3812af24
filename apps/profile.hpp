// The result of a study as an engineer reads it on a screen.
#pragma once

#include <string>
#include <vector>

#include "apps/profile_facts.hpp"
#include "apps/terminal.hpp"
#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

// Title, building, runs; per building and factor (a set) the stories from the roof down; the verdict; an overall
// statement. With more than 12 sets: a line for each, the worst only beyond 40, and the stories of the one that
// governs. Every number has its unit. No line is wider than style.width where that is at least 80.
std::string profile_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                         const ScreenStyle& style);

inline constexpr std::size_t most_sets_whole = 12;   // shown story by story
inline constexpr std::size_t most_sets_listed = 40;  // shown in a line

// The parts it is put together from.
std::string story_table(const SetFacts& facts, double largest_shown, const StudyUnits& units, const ScreenStyle& style);
std::string set_summary(const SetFacts& facts, const BuildingSummary& building, const StudyUnits& units,
                        const ScreenStyle& style);
std::string verdict_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                         const ScreenStyle& style);

// Drift ratio at the right end of every bar, so that all sets share one scale: the largest of all, but no more than
// 2.5 times the largest limit, so that one wild run does not flatten the rest.
double bar_scale(const std::vector<SetFacts>& sets);

}  // namespace pilotis
