#include "io/records/labels.hpp"

#include <fmt/format.h>

#include "core/error.hpp"

namespace pilotis {

Labels::Labels(const std::vector<TextLine>& lines, const std::string& file) : file_(file) {
  for (const TextLine& line : lines) {
    const std::size_t colon = line.text.find(':');
    if (colon == std::string_view::npos) continue;
    labels_.push_back({stripped(line.text.substr(0, colon)), stripped(line.text.substr(colon + 1)), line.number});
  }
}

const Label* Labels::find(std::string_view name) const {
  for (const Label& label : labels_)
    if (begins(label.name, name) && !label.value.empty()) return &label;
  return nullptr;
}

const Label& Labels::need(std::string_view name) const {
  if (const Label* label = find(name)) return *label;
  throw input_error(file_, fmt::format("the header does not say {}", in_quotes(name)),
                    fmt::format("a line \"{}: ...\" is needed; was the file cut off?", name));
}

}  // namespace pilotis
