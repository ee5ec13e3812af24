// The result of a study as an engineer reads it on a screen.
#pragma once

#include <string>

#include "apps/profile_facts.hpp"
#include "apps/terminal.hpp"
#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"
#include "io/results/store.hpp"

namespace pilotis {

// Title, building, runs; per building and factor the stories from the roof down; the verdict; an overall statement.
// With more than 12 sets of building and factor: one line for each, the worst only beyond 40, and the stories of the
// one that governs. Every number has its unit. No line is wider than style.width where that is at least 80.
std::string profile_text(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                         const ScreenStyle& style);
std::string profile_text(const StoredStudy& stored, const Verdict& verdict, const ScreenStyle& style);

// The parts it is put together from.
std::string story_table(const FactorFacts& facts, double largest_shown, const StudyUnits& units,
                        const ScreenStyle& style);
std::string factor_summary(const FactorFacts& facts, const ProfileFacts& building, const StudyUnits& units,
                           const ScreenStyle& style);
std::string verdict_text(const StoredStudy& stored, const Verdict& verdict, const ScreenStyle& style);

// Drift ratio at the right end of every bar, so that all factors share one scale: the largest of all, but no more than
// 2.5 times the largest limit, so that one wild run does not flatten the rest.
double bar_scale(const ProfileFacts& facts);

}  // namespace pilotis
