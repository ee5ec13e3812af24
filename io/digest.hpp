// Fingerprints, so that a result can name exactly what it was computed from.
#pragma once

#include <string>
#include <string_view>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// SHA-256 (FIPS 180-4) of step, first sample time and samples, in this order, each as a little-endian IEEE 754 double:
// 64 lower-case hexadecimal digits. Throws Error (outside) when the cryptographic library refuses to work.
std::string digest_of(const Accelerogram& record);

// The same of any bytes, as they stand.
std::string digest_of(std::string_view bytes);

}  // namespace pilotis
