// The fuzzer's entry: see tests/fuzz/CMakeLists.txt and DEVELOPERS.md.
#include <cstddef>
#include <cstdint>

#include "tests/fuzz/any_record.hpp"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  pilotis::read_any_record({reinterpret_cast<const char*>(data), size});
  return 0;
}
