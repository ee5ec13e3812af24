// Headers made of lines "LABEL: value".
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "io/records/text.hpp"

namespace pilotis {

struct Label {
  std::string_view name, value;  // blanks at both ends removed; either may be empty
  int line = 0;                  // of the file
};

class Labels {
 public:
  Labels(const std::vector<TextLine>& lines, const std::string& file);  // each divided at its first colon

  // The first whose name begins with `name` (case does not matter) and is not without a value; nullptr when there is
  // none.
  const Label* find(std::string_view name) const;
  // The same; throws Error (input) when there is none.
  const Label& need(std::string_view name) const;

 private:
  std::vector<Label> labels_;
  std::string file_;
};

}  // namespace pilotis
