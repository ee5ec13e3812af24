// A record as a CSV file that any study reads: comment lines, step, then time and acceleration of each sample.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// `remarks`: one comment line each, without "# ". Samples in m/s2 with `decimals` places.
std::string record_csv(const Accelerogram& record, const std::vector<std::string>& remarks, int decimals);

// To `decimals` places, exactly as a file with as many is read back.
void round_samples(Accelerogram& record, int decimals);

// Writes `text`, whole or not at all. Throws Error at `where` when `file` is a folder or stands in none.
void write_text_file(const std::filesystem::path& file, const std::string& text, const std::string& where);

}  // namespace pilotis
