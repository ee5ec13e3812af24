#include <fmt/format.h>

#include <algorithm>

#include "io/records/number.hpp"
#include "io/records/text.hpp"
#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"

namespace pilotis {

namespace {

const char* const two_columns =
    "two numbers a line are needed: time in s and force, between blanks, tabs, a comma or a semicolon";

// The numbers of one line, any of the separators between them.
std::vector<double> numbers_of(std::string_view line, const std::string& where) {
  std::string text(line);
  std::replace_if(
      text.begin(), text.end(), [](char c) { return c == ',' || c == ';'; }, ' ');
  std::vector<double> numbers;
  for (const std::string_view word : words_of(text)) numbers.push_back(require_number(word, where));
  return numbers;
}

}  // namespace

void require_rising(const FloorForce& force, const std::string& where) {
  if (force.times.size() < 2)
    throw input_error(where, fmt::format("found {} point(s) of time and force", force.times.size()),
                      "at least two are needed");
  if (force.times.front() < 0)
    throw input_error(where, fmt::format("the first time is {:g} s", force.times.front()),
                      "times start at 0 s or later");
  for (std::size_t i = 1; i < force.times.size(); ++i)
    if (!(force.times[i] > force.times[i - 1]))
      throw input_error(where, fmt::format("the time {:g} s follows {:g} s", force.times[i], force.times[i - 1]),
                        "times must rise");
}

FloorForce read_force_file(const std::filesystem::path& file, double factor_to_si) {
  const std::string content = read_whole(file, two_columns);
  FloorForce force;
  for (const TextLine& line : lines_of(content)) {
    const auto words = words_of(line.text);
    if (words.empty() || words.front().starts_with('#')) continue;
    const std::string where = at_line(file.string(), line.number);
    const std::vector<double> numbers = numbers_of(line.text, where);
    if (numbers.size() != 2) throw input_error(where, fmt::format("found {} number(s)", numbers.size()), two_columns);
    force.times.push_back(numbers[0]);
    force.forces.push_back(numbers[1] * factor_to_si);
  }
  require_rising(force, file.string());
  return force;
}

}  // namespace pilotis
