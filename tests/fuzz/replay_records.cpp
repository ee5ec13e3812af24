// Hands every file of a folder to the readers, as the fuzzer does, in the ordinary build.
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <string>

#include "tests/fuzz/any_record.hpp"

int main(int count, char** arguments) {
  if (count != 2) return std::fprintf(stderr, "usage: replay_records FOLDER\n"), 2;
  int files = 0;
  for (const auto& entry : std::filesystem::directory_iterator(arguments[1])) {
    std::ifstream stream(entry.path(), std::ios::binary);
    const std::string content((std::istreambuf_iterator<char>(stream)), std::istreambuf_iterator<char>());
    std::fprintf(stderr, "%s\n", entry.path().filename().c_str());  // the last one shown is the one that fails
    pilotis::read_any_record(content);
    ++files;
  }
  std::printf("%d files read or refused\n", files);
  return files > 0 ? 0 : 1;
}
