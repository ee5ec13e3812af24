#include "apps/commands.hpp"

namespace pilotis {

ExitStatus exit_status_of(const Error& error) {
  return error.kind() == ErrorKind::input ? wrong_input : outside_failed;
}

}  // namespace pilotis
