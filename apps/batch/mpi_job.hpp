// The module that knows MPI, and how the program calls it.
#pragma once

#include "apps/batch/job.hpp"

namespace pilotis {

inline constexpr const char* mpi_module = "pilotis_mpi.so";
inline constexpr const char* mpi_maker = "pilotis_make_mpi_job";
using MakeMpiJob = Job*();  // starts MPI; the job ends it. To be deleted by the caller.

}  // namespace pilotis
