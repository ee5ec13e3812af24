#include "io/results/store.hpp"

#include <fmt/chrono.h>
#include <fmt/format.h>

#include <ctime>
#include <span>

#include "core/error.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"
#include "io/results/hdf5_error.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

constexpr double format_version = 1;
constexpr const char* program = "pilotis";
constexpr const char* sign_convention =
    "x positive to the right; drift and story shear positive when the upper floor has moved to the right of the lower "
    "one; at a cut, shear is positive downward on the left face and upward on the right face, axial force positive in "
    "tension, moment positive when it puts the bottom (for a member read left to right) in tension";

std::string now() {
  const std::time_t seconds = std::time(nullptr);
  return fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(seconds));
}

H5::FileCreatPropList creation() {
  H5::FileCreatPropList properties;
  H5Pset_link_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_attr_creation_order(properties.getId(), H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED);
  H5Pset_obj_track_times(properties.getId(), false);  // the same results give the same bytes
  return properties;
}

// Closing the file closes everything in it, also after a failure half way.
H5::FileAccPropList access() {
  H5::FileAccPropList properties;
  properties.setFcloseDegree(H5F_CLOSE_STRONG);
  return properties;
}

// The file is made in memory and written by WholeFile in one go: the library cannot be left half way by a full disk.
H5::FileAccPropList in_memory() {
  constexpr std::size_t grow_by = 1 << 20;  // bytes
  H5::FileAccPropList properties = access();
  properties.setCore(grow_by, false);
  return properties;
}

// The bytes of an in-memory file that has been flushed; they live as long as it stays open.
std::span<const char> image_of(const H5::H5File& file) {
  void* handle = nullptr;
  file.getVFDHandle(&handle);  // of an in-memory file: the address of the pointer to its bytes
  const ssize_t size = H5Fget_file_image(file.getId(), nullptr, 0);  // without the room kept to grow
  if (size < 0) throw H5::FileIException("H5Fget_file_image", "");
  return {*static_cast<const char* const*>(handle), static_cast<std::size_t>(size)};
}

void write_root(H5::H5File& file, const StoredStudy& stored) {
  H5::Group root = file.openGroup("/");
  write_text(root, "title", stored.title);
  write_text(root, "program", program);
  write_text(root, "program_version", stored.program_version);
  write_text(root, "created", stored.created.empty() ? now() : stored.created);
  write_text(root, "sign_convention", sign_convention);
  write_text(root, "study_file", stored.study_file);
  write_text(root, "study_text", stored.study_text);
  write_text(root, "study_force_unit", stored.units.force);
  write_text(root, "study_length_unit", stored.units.length);
  write_text(root, "study_mass_unit", stored.units.mass);
  root.createAttribute("format_version", H5::PredType::IEEE_F64LE, H5::DataSpace(H5S_SCALAR))
      .write(H5::PredType::NATIVE_DOUBLE, &format_version);
}

H5::H5File made(const StoredStudy& stored, const Verdict& verdict) {
  H5::H5File file("results in memory", H5F_ACC_TRUNC, creation(), in_memory());
  write_root(file, stored);
  write_building(file, stored.results.building);
  write_motions(file, stored.results.motions);
  write_runs(file, stored.results.runs);
  write_peaks(file, stored.results);
  write_residuals(file, stored.results);
  write_histories(file, stored.results);
  write_verdict(file, stored.limits, verdict);
  file.flush(H5F_SCOPE_GLOBAL);
  return file;
}

ResultFile opened(const std::filesystem::path& path) {
  std::error_code ignored;
  const std::string name = path.string();
  if (!std::filesystem::exists(path, ignored))
    throw input_error(name, "there is no such file", "give a result file that `pilotis run` wrote");
  try {
    return {H5::H5File(name, H5F_ACC_RDONLY, H5::FileCreatPropList::DEFAULT, access()), name};
  } catch (const H5::Exception&) {
    throw input_error(name, "is not an HDF5 file, or cannot be read", "give a result file that `pilotis run` wrote");
  }
}

void require_ours(const GroupReader& root, const std::string& where) {
  if (root.text_attribute("program") != program)
    throw input_error(where, fmt::format("was written by \"{}\"", root.text_attribute("program")),
                      "give a result file that `pilotis run` wrote");
  const double version = root.number_attribute("format_version");
  if (version != format_version)
    throw input_error(where, fmt::format("has format version {}", version),
                      fmt::format("this program reads version {}", format_version));
}

StoredStudy read_root(const ResultFile& from) {
  const GroupReader root(from.file, from.where, "/");
  require_ours(root, from.where);
  StoredStudy stored;
  stored.title = root.text_attribute("title");
  stored.program_version = root.text_attribute("program_version");
  stored.created = root.text_attribute("created");
  stored.study_file = root.text_attribute("study_file");
  stored.study_text = root.text_attribute("study_text");
  stored.units.force = root.text_attribute("study_force_unit");
  stored.units.length = root.text_attribute("study_length_unit");
  stored.units.mass = root.text_attribute("study_mass_unit");
  return stored;
}

// Runs `read`; what the library could not do becomes an Error that names the file.
template <class Read>
auto reading(const std::filesystem::path& path, Read read) {
  const Hdf5Quiet quiet;
  try {
    return read(opened(path));
  } catch (const H5::Exception&) {
    throw input_error(path.string(), fmt::format("is damaged: {}", quiet.reason()),
                      "give a result file that `pilotis run` wrote");
  }
}

}  // namespace

void write_results(const std::filesystem::path& file, const StoredStudy& stored, const Verdict& verdict) {
  WholeFile whole(file);  // first: a folder that cannot be written is told before the work
  const Hdf5Quiet quiet;
  try {
    const H5::H5File made_file = made(stored, verdict);
    whole.write(image_of(made_file));
  } catch (const H5::Exception&) {
    throw outside_error(file.string(), fmt::format("cannot be written: {}", quiet.reason()),
                        "check that there is memory enough");
  }
  whole.commit();
}

StoredStudy read_results(const std::filesystem::path& file) {
  return reading(file, [](const ResultFile& from) {
    StoredStudy stored = read_root(from);
    stored.results.building = read_building(from);
    stored.results.motions = read_motions(from);
    stored.results.runs = read_runs(from);
    read_peaks(from, stored.results);
    read_residuals(from, stored.results);
    stored.limits = read_limits(from);
    return stored;
  });
}

RunResult read_run(const std::filesystem::path& file, int run) {
  return reading(file, [run](const ResultFile& from) {
    const GroupReader root(from.file, from.where, "/");
    require_ours(root, from.where);
    std::vector<RunResult> runs = read_runs(from);
    if (run < 0 || static_cast<std::size_t>(run) >= runs.size())
      throw input_error(from.where, fmt::format("there is no run {}", run),
                        fmt::format("runs are counted from 0 to {}", static_cast<int>(runs.size()) - 1));
    RunResult found = std::move(runs[static_cast<std::size_t>(run)]);
    const GroupReader building(from.file, from.where, "/building");
    read_history(from, run, static_cast<int>(building.length("story")), found);
    return found;
  });
}

}  // namespace pilotis
