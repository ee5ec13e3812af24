// Names of the things a study lists by their files: motions and buildings.
#pragma once

#include <fmt/format.h>

#include <map>
#include <set>
#include <string>
#include <string_view>
#include <vector>

namespace pilotis {

// Names those without one by their file without extension; by their full_name() where two would be called alike. Throws
// Error at the place of the first that is still called like another. T has file (path), name (text), full_name() and
// place (ValueReader); `thing` is what one of them is called.
template <class T>
void name_by_file(std::vector<T>& listed, std::string_view thing) {
  std::map<std::string, int> stems;
  for (const T& one : listed) ++stems[one.name.empty() ? one.file.stem().string() : one.name];
  for (T& one : listed) {
    const std::string stem = one.file.stem().string();
    if (one.name.empty()) one.name = stems[stem] == 1 ? stem : one.full_name();
  }
  std::set<std::string> taken;
  for (const T& one : listed)
    if (!taken.insert(one.name).second)
      throw one.place.wrong(fmt::format("a second {} is called \"{}\" ({})", thing, one.name, one.file.string()),
                            "name it differently with { file = \"...\", name = \"...\" }, or list it once");
}

}  // namespace pilotis
