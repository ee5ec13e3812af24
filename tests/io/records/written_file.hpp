// A file for one test, gone afterwards.
#pragma once

#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <string>
#include <string_view>

namespace pilotis {

class WrittenFile {
 public:
  WrittenFile(const std::string& name, std::string_view content) {
    const auto* test = testing::UnitTest::GetInstance()->current_test_info();
    folder_ = std::filesystem::path(testing::TempDir()) / (std::string("pilotis-") + test->test_suite_name() + "-" +
                                                           test->name() + "-" + std::to_string(counter_++));
    std::string text = folder_.string();
    for (char& c : text)
      if (c == '/' && &c > text.data() + testing::TempDir().size()) c = '-';
    folder_ = text;
    std::filesystem::create_directories(folder_);
    path_ = folder_ / name;
    std::ofstream(path_, std::ios::binary).write(content.data(), static_cast<std::streamsize>(content.size()));
  }
  ~WrittenFile() {
    std::error_code ignored;
    std::filesystem::remove_all(folder_, ignored);
  }
  WrittenFile(const WrittenFile&) = delete;
  WrittenFile& operator=(const WrittenFile&) = delete;

  const std::filesystem::path& path() const { return path_; }

 private:
  static inline int counter_ = 0;
  std::filesystem::path folder_, path_;
};

}  // namespace pilotis
