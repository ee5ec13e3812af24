#include "core/response/results.hpp"

namespace pilotis {

std::string_view status_name(RunStatus status) {
  switch (status) {
    case RunStatus::done:
      return "done";
    case RunStatus::collapsed:
      return "collapsed";
    case RunStatus::not_converged:
      return "not converged";
  }
  return "";
}

}  // namespace pilotis
