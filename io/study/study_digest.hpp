// A fingerprint of all that a study's results depend on, so that parts of one batch can be told from parts of another.
#pragma once

#include <string>
#include <string_view>

#include "io/study/study.hpp"

namespace pilotis {

// SHA-256, 64 lower-case hexadecimal digits, of the program's version, the study's text, names and texts of its
// building files, names and digests of its motions (samples, the factor applied) and the forces read from files. The
// same wherever the study's folder stands and whatever the study file is called. Throws Error (outside) as digest_of()
// does.
std::string study_digest(const Study& study, std::string_view program_version);

}  // namespace pilotis
