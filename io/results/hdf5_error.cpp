#include "io/results/hdf5_error.hpp"

#include <string_view>

namespace pilotis {

namespace {

// The library's messages of a failed system call hold "error message = 'No space left on device'".
std::string plain(std::string_view description) {
  constexpr std::string_view mark = "error message = '";
  const auto from = description.find(mark);
  if (from == std::string_view::npos) return std::string(description);
  const auto rest = description.substr(from + mark.size());
  return std::string(rest.substr(0, rest.find('\'')));
}

herr_t take_innermost(unsigned position, const H5E_error2_t* error, void* data) {
  if (position == 0 && error->desc) *static_cast<std::string*>(data) = plain(error->desc);
  return 0;
}

herr_t remember(hid_t stack, void* data) { return H5Ewalk2(stack, H5E_WALK_UPWARD, take_innermost, data); }

}  // namespace

Hdf5Quiet::Hdf5Quiet() {
  H5Eget_auto2(H5E_DEFAULT, &former_, &former_data_);
  H5Eset_auto2(H5E_DEFAULT, remember, &reason_);
}

Hdf5Quiet::~Hdf5Quiet() { H5Eset_auto2(H5E_DEFAULT, former_, former_data_); }

}  // namespace pilotis
