#include "io/records/number.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <system_error>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

// As std::from_chars wants it: a point, an E, no plus in front. Empty when the decimal sign is the wrong one.
std::string normal_notation(std::string_view token, char decimal_sign) {
  if (decimal_sign == ',' && token.find('.') != std::string_view::npos) return {};
  if (token.starts_with('+') && !token.substr(1).starts_with('-')) token.remove_prefix(1);
  std::string text(token);
  bool has_digit = false;
  for (char& c : text) {
    if (c == 'd' || c == 'D') c = 'e';
    if (c == decimal_sign) c = '.';
    has_digit |= c >= '0' && c <= '9';
  }
  return has_digit ? text : std::string(token);  // perhaps "nan" or "inf"
}

bool begins_exponent(char c) { return c == 'e' || c == 'E' || c == 'd' || c == 'D'; }

}  // namespace

bool parse_plainly(std::string_view field, double& value) noexcept {
  const char *begin = field.data(), *end = begin + field.size();
  while (begin != end && *begin == ' ') ++begin;
  const auto [rest, error] = std::from_chars(begin, end, value);
  if (error != std::errc{} || !std::isfinite(value)) return false;
  for (const char* blank = rest; blank != end; ++blank)
    if (*blank != ' ') return false;
  return true;
}

bool take_plainly(std::string_view& text, double& value) noexcept {
  const char *begin = text.data(), *end = begin + text.size();
  while (begin != end && *begin == ' ') ++begin;
  const auto [rest, error] = std::from_chars(begin, end, value);
  if (error != std::errc{} || !std::isfinite(value) || (rest != end && *rest != ' ')) return false;
  text.remove_prefix(static_cast<std::size_t>(rest - text.data()));
  return true;
}

ParsedNumber parse_number(std::string_view token, char decimal_sign) {
  const std::string text = normal_notation(token, decimal_sign);
  double value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error == std::errc::invalid_argument || end != text.data() + text.size()) return {};
  if (error == std::errc::result_out_of_range) {
    const bool tiny = text.find("e-") != std::string::npos || text.find("E-") != std::string::npos;
    return tiny ? ParsedNumber{ParsedNumber::Kind::number, 0} : ParsedNumber{ParsedNumber::Kind::not_finite, 0};
  }
  if (!std::isfinite(value)) return {ParsedNumber::Kind::not_finite, 0};
  return {ParsedNumber::Kind::number, value};
}

double require_number(std::string_view token, const std::string& where, char decimal_sign) {
  const ParsedNumber parsed = parse_number(token, decimal_sign);
  if (parsed.kind == ParsedNumber::Kind::number) return parsed.value;
  const std::string found = "found " + in_quotes(token);
  if (parsed.kind == ParsedNumber::Kind::not_finite)
    throw input_error(where, found + ", which is not a finite number", "every value must be finite");
  throw input_error(where, found + " where a number is needed",
                    fmt::format("a number such as 0{0}125 or -1{0}25E-02 is allowed here", decimal_sign));
}

Precision printed_precision(std::string_view token) {
  Precision precision;
  bool after_sign = false;
  std::size_t at = 0;
  for (; at < token.size() && !begins_exponent(token[at]); ++at) {
    const char c = token[at];
    if (c == '.' || c == ',') after_sign = true;
    if (c < '0' || c > '9') continue;
    if (after_sign) ++precision.decimals;
    if (c != '0' || precision.digits > 0) ++precision.digits;
  }
  if (at == token.size()) return precision;
  ++at;
  if (at < token.size() && token[at] == '+') ++at;
  int exponent = 0;
  std::from_chars(token.data() + at, token.data() + token.size(), exponent);
  precision.decimals -= exponent;
  return precision;
}

}  // namespace pilotis
