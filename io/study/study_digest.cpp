#include "io/study/study_digest.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include "io/digest.hpp"

namespace pilotis {

namespace {

// Each field goes in with its length, so that no two lists of fields make the same text.
void add(std::string& all, std::string_view field) { all += fmt::format("{}:{}\n", field.size(), field); }

void add_count(std::string& all, std::size_t count) { add(all, fmt::format("{}", count)); }

// Hexadecimal floating point: exact.
std::string exact(const std::vector<double>& numbers) { return fmt::format("{:a}", fmt::join(numbers, " ")); }

}  // namespace

std::string study_digest(const Study& study, std::string_view program_version) {
  std::string all;
  add(all, program_version);
  add(all, study.text);
  add_count(all, study.buildings.size());
  for (const StudyBuilding& building : study.buildings) {
    add(all, building.name);
    add(all, building.text);
  }
  add_count(all, study.motions.size());
  for (const Motion& motion : study.motions) {
    add(all, motion.name);
    add(all, motion.digest);
  }
  add_count(all, study.forces.size());
  for (const FloorForce& force : study.forces) {
    add(all, exact(force.times));
    add(all, exact(force.forces));
  }
  return digest_of(all);
}

}  // namespace pilotis
