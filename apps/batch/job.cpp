#include "apps/batch/job.hpp"

#include <dlfcn.h>
#include <fmt/format.h>

#include <array>
#include <cstdlib>
#include <filesystem>
#include <string>

#include "apps/batch/mpi_job.hpp"
#include "core/error.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;

// Whoever starts ranks tells each of them how many there are: Open MPI's own mpirun, and schedulers through PMIx or
// PMI.
int ranks_announced() {
  for (const char* name : {"OMPI_COMM_WORLD_SIZE", "PMIX_SIZE", "PMI_SIZE"})
    if (const char* text = std::getenv(name)) return std::max(1, std::atoi(text));
  return std::getenv("PMIX_RANK") != nullptr ? 2 : 1;  // PMIx may tell the rank alone
}

// MPI stands in a module of its own: a run that is not in a job does not pay for loading it. It lies beside the program
// where it was built, in the folder of libraries where it was installed.
std::array<fs::path, 2> module_places() {
  const fs::path program = fs::read_symlink("/proc/self/exe").parent_path();
  return {program / mpi_module, program / ".." / PILOTIS_LIBRARY_FOLDER / "pilotis" / mpi_module};
}

std::unique_ptr<Job> mpi_job(int ranks) {
  std::string reason = "it was built without MPI";
  for (const fs::path& place : module_places()) {
    std::error_code ignored;
    if (!fs::exists(place, ignored)) continue;
    void* module = ::dlopen(place.c_str(), RTLD_NOW | RTLD_GLOBAL);
    if (module == nullptr) {
      reason = ::dlerror();
      continue;
    }
    if (void* maker = ::dlsym(module, mpi_maker)) return std::unique_ptr<Job>(reinterpret_cast<MakeMpiJob*>(maker)());
    reason = ::dlerror();
  }
  throw outside_error(
      "MPI", fmt::format("this process is one of {} ranks, and the program cannot take part: {}", ranks, reason),
      "build with Open MPI (-DPILOTIS_MPI=ON), or start one process alone");
}

}  // namespace

std::unique_ptr<Job> make_job() {
  const int ranks = ranks_announced();
  return ranks > 1 ? mpi_job(ranks) : make_single_job();
}

}  // namespace pilotis
