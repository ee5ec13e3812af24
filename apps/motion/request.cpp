#include "apps/motion/request.hpp"

#include <fmt/format.h>

#include <sstream>

#include "apps/typed_values.hpp"
#include "core/error.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {

namespace {

std::string trimmed(const std::string& text) {
  const std::size_t begin = text.find_first_not_of(" \t"), end = text.find_last_not_of(" \t");
  return begin == std::string::npos ? "" : text.substr(begin, end - begin + 1);
}

std::vector<std::string> parts_of(const std::string& text, char separator) {
  std::vector<std::string> parts;
  std::istringstream rest(text);
  for (std::string part; std::getline(rest, part, separator);) parts.push_back(trimmed(part));
  return parts;
}

std::vector<double> numbers_typed(const std::string& text, Dimension dimension, const std::string& where) {
  std::vector<double> numbers;
  for (const std::string& part : parts_of(text, ',')) numbers.push_back(typed_quantity(part, dimension, where));
  if (numbers.empty()) throw input_error(where, "found nothing", "at least one number is needed");
  return numbers;
}

int count_typed(const std::string& text, const std::string& where) {
  const double number = typed_quantity(text, Dimension::none, where);
  if (number != static_cast<int>(number) || number < 2 || number > 1e6)
    throw input_error(where, fmt::format("found the count \"{}\"", text), "a whole number from 2 is needed");
  return static_cast<int>(number);
}

double ratio_typed(const std::string& text, const std::string& where) {
  const bool percent = text.ends_with('%');
  const double number =
      typed_quantity(percent ? trimmed(text.substr(0, text.size() - 1)) : text, Dimension::none, where);
  const double ratio = percent ? number / 100 : number;
  if (!(ratio >= 0 && ratio < 1))
    throw input_error(where, fmt::format("found \"{}\"", text), "a ratio from 0 to below 1 is needed, 0.05 or 5%");
  return ratio;
}

constexpr const char* inelastic_where = "motion --inelastic";

// One "key=value" of the list.
void take_inelastic(InelasticRequest& request, const std::string& key, const std::string& value) {
  using Held = InelasticRequest::Held;
  const bool strength = key == "strength";
  const double number = typed_quantity(value, strength ? Dimension::acceleration : Dimension::none, inelastic_where);
  if (key == "post_yield_ratio") {
    request.post_yield_ratio = number;
    return;
  }
  if (!request.text.empty())
    throw input_error(inelastic_where, fmt::format("found \"{}\" besides {}", key, request.text),
                      "only one of ductility, strength and strength_ratio may be held");
  if (key == "ductility")
    request.held = Held::ductility, request.text = fmt::format("ductility {:g}", number);
  else if (strength)
    request.held = Held::yield_acceleration, request.text = fmt::format("strength {:.4g} g", number / standard_gravity);
  else if (key == "strength_ratio")
    request.held = Held::strength_ratio, request.text = fmt::format("{:g} of the elastic strength", number);
  else
    throw input_error(inelastic_where, fmt::format("found \"{}\"", key),
                      "ductility=4, strength=\"0.2 g\" or strength_ratio=0.25 is needed, and post_yield_ratio=0.03 may "
                      "follow after a comma");
  request.value = number;
  if (!(number > 0) || (key == "ductility" && number < 1))
    throw input_error(inelastic_where, fmt::format("found \"{}={}\"", key, value),
                      key == "ductility" ? "a ductility of at least 1 is needed" : "a number above 0 is needed");
}

}  // namespace

std::vector<const Measure*> measures_typed(const std::string& text) {
  std::vector<const Measure*> measures;
  if (text == "none") return measures;
  if (text == "all") {
    for (const Measure& measure : measure_catalogue()) measures.push_back(&measure);
    return measures;
  }
  for (const std::string& name : parts_of(text, ',')) measures.push_back(&measure_named(name, "motion --measures"));
  return measures;
}

std::vector<double> periods_typed(const std::string& text) {
  const std::string where = "motion --periods";
  const std::vector<std::string> range = parts_of(text, ':');
  if (range.size() < 2) return numbers_typed(text, Dimension::time, where);
  if (range.size() != 3)
    throw input_error(where, fmt::format("found \"{}\"", text), "shortest:longest:count is needed, e.g. 0.05:4:80");
  return period_grid(typed_quantity(range[0], Dimension::time, where), typed_quantity(range[1], Dimension::time, where),
                     count_typed(range[2], where), where);
}

std::vector<double> damping_typed(const std::string& text) {
  std::vector<double> ratios;
  for (const std::string& part : parts_of(text, ',')) ratios.push_back(ratio_typed(part, "motion --damping"));
  if (ratios.empty()) throw input_error("motion --damping", "found nothing", "at least one ratio is needed");
  return ratios;
}

InelasticRequest inelastic_typed(const std::string& text) {
  InelasticRequest request;
  for (const std::string& part : parts_of(text, ',')) {
    const std::size_t equals = part.find('=');
    if (equals == std::string::npos)
      throw input_error(inelastic_where, fmt::format("found \"{}\"", part), "key=value is needed, e.g. ductility=4");
    take_inelastic(request, trimmed(part.substr(0, equals)), trimmed(part.substr(equals + 1)));
  }
  if (request.text.empty())
    throw input_error(inelastic_where, "nothing is held", "ductility, strength or strength_ratio is needed");
  if (!(request.post_yield_ratio >= 0 && request.post_yield_ratio < 1))
    throw input_error(inelastic_where, fmt::format("found post_yield_ratio {:g}", request.post_yield_ratio),
                      "it must be from 0 to below 1");
  return request;
}

}  // namespace pilotis
