// Records and spectra that others have published, as they stand in the folder `shared` beside the repository. Just
// enough of their formats for these files; empty where a file is not there.
#pragma once

#include <fstream>
#include <string>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis::test {

inline std::string reference(const std::string& name) { return std::string(PILOTIS_SHARED) + "/reference/" + name; }

inline std::vector<std::string> lines_of(const std::string& name) {
  std::vector<std::string> lines;
  std::ifstream file(reference(name));
  for (std::string line; std::getline(file, line);) lines.push_back(line);
  return lines;
}

// Columns of `width` from line `at` on, until `count` numbers are read. An exponent may be written "E 00".
inline std::vector<double> columns(const std::vector<std::string>& lines, std::size_t at, std::size_t width,
                                   std::size_t count) {
  std::vector<double> numbers;
  for (; numbers.size() < count && at < lines.size(); ++at)
    for (std::size_t c = 0; c + width <= lines[at].size() && numbers.size() < count; c += width) {
      std::string field = lines[at].substr(c, width);
      if (const auto e = field.find("E "); e != std::string::npos) field[e + 1] = '+';
      numbers.push_back(std::stod(field));
    }
  return numbers;
}

// Where the lines with `text` stand.
inline std::vector<std::size_t> places(const std::vector<std::string>& lines, const std::string& text) {
  std::vector<std::size_t> found;
  for (std::size_t i = 0; i < lines.size(); ++i)
    if (lines[i].find(text) != std::string::npos) found.push_back(i);
  return found;
}

// El Centro 1940 NS, m/s2 with one g as `unit`; the first sample follows rest by one step.
inline Accelerogram el_centro(double unit) {
  Accelerogram record{0.02, 0.02, {}};
  for (const std::string& line : lines_of("elcentro-1940-ns.txt"))
    if (!line.empty() && line[0] != '#') record.samples.push_back(unit * std::stod(line));
  return record;
}

}  // namespace pilotis::test
