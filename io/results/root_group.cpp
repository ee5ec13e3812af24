// The attributes of the root: what is needed to compute the study again.
#include <fmt/chrono.h>
#include <fmt/format.h>

#include <ctime>

#include "core/error.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

constexpr double format_version = 2;
constexpr const char* program = "pilotis";
constexpr const char* sign_convention =
    "x positive to the right; drift and story shear positive when the upper floor has moved to the right of the lower "
    "one; at a cut, shear is positive downward on the left face and upward on the right face, axial force positive in "
    "tension, moment positive when it puts the bottom (for a member read left to right) in tension";

std::string now() {
  const std::time_t seconds = std::time(nullptr);
  return fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(seconds));
}

void require_ours(const GroupReader& root, const std::string& where) {
  if (root.text_attribute("program") != program)
    throw input_error(where, fmt::format("was written by \"{}\"", root.text_attribute("program")),
                      "give a result file that `pilotis run` wrote");
  const double version = root.number_attribute("format_version");
  if (version != format_version)
    throw input_error(where, fmt::format("has format version {}", version),
                      fmt::format("this program reads version {}; run the study again", format_version));
}

}  // namespace

void write_root(H5::H5File& file, const StudyHeader& header) {
  H5::Group root = file.openGroup("/");
  write_text(root, "title", header.title);
  write_text(root, "program", program);
  write_text(root, "program_version", header.program_version);
  write_text(root, "created", header.created.empty() ? now() : header.created);
  write_text(root, "sign_convention", sign_convention);
  write_text(root, "study_file", header.study_file);
  write_text(root, "study_text", header.study_text);
  write_text(root, "study_force_unit", header.units.force);
  write_text(root, "study_length_unit", header.units.length);
  write_text(root, "study_mass_unit", header.units.mass);
  root.createAttribute("format_version", H5::PredType::IEEE_F64LE, H5::DataSpace(H5S_SCALAR))
      .write(H5::PredType::NATIVE_DOUBLE, &format_version);
}

StudyHeader read_root(const ResultFile& from) {
  const GroupReader root(from.file, from.where, "/");
  require_ours(root, from.where);
  StudyHeader header;
  header.title = root.text_attribute("title");
  header.program_version = root.text_attribute("program_version");
  header.created = root.text_attribute("created");
  header.study_file = root.text_attribute("study_file");
  header.study_text = root.text_attribute("study_text");
  header.units.force = root.text_attribute("study_force_unit");
  header.units.length = root.text_attribute("study_length_unit");
  header.units.mass = root.text_attribute("study_mass_unit");
  return header;
}

}  // namespace pilotis
