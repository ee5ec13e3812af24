// One JSON object written member by member, indented as nlohmann's dump(2) does.
#pragma once

#include <functional>
#include <nlohmann/json.hpp>
#include <string>
#include <string_view>

namespace pilotis {

class JsonStream {
 public:
  using Json = nlohmann::ordered_json;
  explicit JsonStream(std::function<void(std::string_view)> write) : write_(std::move(write)) {}

  void member(const std::string& name, const Json& value);
  // `elements` calls element() for each.
  void array(const std::string& name, const std::function<void()>& elements);
  void element(const Json& value);
  void finish();  // closes the object and ends the line

 private:
  void name(const std::string& text);

  std::function<void(std::string_view)> write_;
  bool any_member_ = false, any_element_ = false;
};

}  // namespace pilotis
