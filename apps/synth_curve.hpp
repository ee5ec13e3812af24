// Tables of pairs that a made motion needs, from a text file.
#pragma once

#include <filesystem>

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

// Two columns separated by a comma, semicolon or blanks, under one line that names them with their units, such as
// "period (s), acceleration (g)". Lines that start with # and blank lines are passed over. Throws Error naming file and
// line.
Curve read_curve(const std::filesystem::path& file, const CurveParameter& parameter);

// The line that names the columns, in SI: "period (s), acceleration (m/s2)".
std::string curve_heading(const CurveParameter& parameter);

}  // namespace pilotis
