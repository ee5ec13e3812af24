// The fuzzer's entry: see tests/fuzz/CMakeLists.txt and DEVELOPERS.md.
#include <cstddef>
#include <cstdint>

#include "tests/fuzz/any_record.hpp"

// UDUNITS-2 loses a few bytes of text each time it meets one that is no unit.
extern "C" const char* __lsan_default_suppressions() { return "leak:utlex\nleak:utparse\nleak:ut_parse\n"; }

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
  pilotis::read_any_record({reinterpret_cast<const char*>(data), size});
  return 0;
}
