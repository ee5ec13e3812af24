// A fingerprint of an accelerogram, so that a result can name exactly what shook the building.
#pragma once

#include <string>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// SHA-256 (FIPS 180-4) of step, first sample time and samples, in this order, each as a little-endian IEEE 754 double:
// 64 lower-case hexadecimal digits. Throws Error (outside) when the cryptographic library refuses to work.
std::string digest_of(const Accelerogram& record);

}  // namespace pilotis
