#include "apps/json_stream.hpp"

namespace pilotis {

namespace {

// Line breaks of dump() are of the layout only: those in texts are escaped.
std::string indented(const nlohmann::ordered_json& value, const std::string& indent) {
  std::string text;
  for (char c : value.dump(2)) {
    text += c;
    if (c == '\n') text += indent;
  }
  return text;
}

}  // namespace

void JsonStream::name(const std::string& text) {
  write_((any_member_ ? ",\n  " : "{\n  ") + Json(text).dump() + ": ");
  any_member_ = true;
}

void JsonStream::member(const std::string& text, const Json& value) {
  name(text);
  write_(indented(value, "  "));
}

void JsonStream::array(const std::string& text, const std::function<void()>& elements) {
  name(text);
  any_element_ = false;
  elements();
  write_(any_element_ ? "\n  ]" : "[]");
}

void JsonStream::element(const Json& value) {
  write_((any_element_ ? ",\n    " : "[\n    ") + indented(value, "    "));
  any_element_ = true;
}

void JsonStream::finish() { write_(any_member_ ? "\n}\n" : "{}\n"); }

}  // namespace pilotis
