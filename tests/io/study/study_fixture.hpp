// A small valid study on disk, for tests that change one line of it.
#pragma once

#include <unistd.h>

#include <array>
#include <filesystem>
#include <fstream>
#include <string>

#include "io/study/study.hpp"

namespace pilotis::test {

// A catalogue of our own: io knows no schemes.
inline constexpr std::array newmark_parameters{Parameter{"beta", Dimension::none, "Newmark's beta", 0.25, 0.0, 0.5},
                                               Parameter{"gamma", Dimension::none, "Newmark's gamma", 0.5, 0.5, 1.0}};
inline constexpr std::array schemes{Method{"newmark", "Newmark", newmark_parameters},
                                    Method{"linear_acceleration", "linear acceleration", {}}};

// A folder that goes away with the object.
class Folder {
 public:
  Folder() {
    std::string name = (std::filesystem::temp_directory_path() / "pilotis-study-XXXXXX").string();
    if (mkdtemp(name.data()) == nullptr) throw std::runtime_error("no temporary folder");
    path_ = name;
  }
  ~Folder() {
    std::error_code ignored;
    std::filesystem::remove_all(path_, ignored);
  }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;

  const std::filesystem::path& path() const { return path_; }
  std::filesystem::path write(const std::string& name, const std::string& content) const {
    const auto file = path_ / name;
    std::filesystem::create_directories(file.parent_path());
    std::ofstream(file) << content;
    return file;
  }

 private:
  std::filesystem::path path_;
};

inline const std::string valid_study = R"(title = "Two kinds of story"
[units]
force = "kN"
length = "m"
[building]
kind = "stick"
damping = { kind = "rayleigh", ratio = [0.05, 0.03], modes = [1, 3], stiffness = "initial" }
p_delta = true
[[story]]
label = "ground story"
height = 4.5
weight = 4200
spring = { law = "bilinear", stiffness = 2.1e5, yield_shear = 2600, post_yield_ratio = 0.03 }
[[story]]
height = "350 cm"
mass = 400
spring = { law = "bouc_wen", stiffness = "150 kN/mm", yield_shear = "2 MN" }
dashpot = 10
repeat = 2
[suite]
motions = ["motions/*.csv", { file = "site.txt", units = "cm/s2", step = "5 ms", factor = -1.5, first_sample_at = 0.005 }]
units = "g"
step = 0.01
factors = [0.5, 1.0]
[[force]]
floor = 2
factor = 2
table = [[0, 0], ["500 ms", "0.05 MN"]]
[initial]
displacement = [0.01, 0, "-2 mm"]
velocity = [0.0, 0.1, 0]
[march]
scheme = { name = "newmark", beta = 0.1666 }
step = "5 ms"
tail = 12
error_check = false
collapse_drift_ratio = 0.08
tolerance = 1e-8
halvings = 6
[keep]
histories = ["drift", "base_shear"]
every = 4
[[limit]]
quantity = "drift_ratio"
statistic = "percentile"
percentile = 84
value = 0.02
source = "project brief, section 4"
factors = [1.0]
[[limit]]
quantity = "floor_acceleration"
statistic = "max"
value = "0.8 g"
source = "equipment maker"
)";

// valid_study's motions.
inline void write_motions(const Folder& folder) {
  folder.write("motions/b.csv", "0.1\n-0.2\n0.1\n");
  folder.write("motions/a.csv", "0\n0.3\n");
  folder.write("site.txt", "10\n-20\n5\n");
}

// Line number (from 1) of the first line of `text` that starts with `start`; 0 when there is none.
inline int line_starting(const std::string& text, const std::string& start) {
  int line = 1;
  for (std::size_t at = 0; at != std::string::npos && at < text.size(); ++line) {
    if (text.compare(at, start.size(), start) == 0) return line;
    at = text.find('\n', at);
    if (at != std::string::npos) ++at;
  }
  return 0;
}

// `text` with the first line that starts with `start` replaced.
inline std::string with_line(const std::string& text, const std::string& start, const std::string& replacement) {
  const std::size_t found = ("\n" + text).find("\n" + start);  // the place of the line itself
  if (found == std::string::npos) throw std::logic_error("no line starts with " + start);
  std::string changed = text;
  return changed.replace(found, text.find('\n', found) - found, replacement);
}

}  // namespace pilotis::test
