#include "core/error.hpp"

#include <utility>

namespace pilotis {

namespace {

std::string joined(const std::string& where, const std::string& what, const std::string& how) {
  std::string text = where.empty() ? what : where + ": " + what;
  return how.empty() ? text : text + "; " + how;
}

}  // namespace

Error::Error(ErrorKind kind, std::string where, std::string what, std::string how)
    : std::runtime_error(joined(where, what, how)),
      kind_(kind),
      where_(std::move(where)),
      problem_(std::move(what)),
      remedy_(std::move(how)) {}

Error input_error(std::string where, std::string what, std::string how) {
  return {ErrorKind::input, std::move(where), std::move(what), std::move(how)};
}

Error outside_error(std::string where, std::string what, std::string how) {
  return {ErrorKind::outside, std::move(where), std::move(what), std::move(how)};
}

}  // namespace pilotis
