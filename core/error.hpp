// The one error type of set-up and files. The hot loop never throws; see integrators/scheme.hpp for its status.
#pragma once

#include <stdexcept>
#include <string>

namespace pilotis {

// Who has to act: the author of the input (exit status 2) or whoever looks after the machine (exit status 4).
enum class ErrorKind { input, outside };

// Three plain sentences: where it is ("study.toml:12: story[2].spring.stiffness"), what is wrong with what was found,
// and how to mend it (what is allowed). `what()` joins them as "where: what; how".
class Error : public std::runtime_error {
 public:
  Error(ErrorKind kind, std::string where, std::string what, std::string how);

  ErrorKind kind() const noexcept { return kind_; }
  const std::string& where() const noexcept { return where_; }
  const std::string& problem() const noexcept { return problem_; }
  const std::string& remedy() const noexcept { return remedy_; }

 private:
  ErrorKind kind_;
  std::string where_, problem_, remedy_;
};

// Shorthand for the common kind.
Error input_error(std::string where, std::string what, std::string how);
// Shorthand for disk, permission and the like.
Error outside_error(std::string where, std::string what, std::string how);

}  // namespace pilotis
