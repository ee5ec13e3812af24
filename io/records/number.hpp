// One number of a record: every notation the archives use, none that is not a number.
#pragma once

#include <string>
#include <string_view>

namespace pilotis {

// Decimal notation with an optional sign, decimal sign and exponent (E or D, either case), e.g. "-.8075668E-03",
// "+1.5d2", "3". A magnitude too small for a double is zero.
struct ParsedNumber {
  enum class Kind {
    number,
    not_finite,
    not_a_number
  } kind = Kind::not_a_number;  // not_finite: NaN, infinity, overflow
  double value = 0;             // when it is a number
};
ParsedNumber parse_number(std::string_view token, char decimal_sign = '.');

// The usual case fast: one finite number in decimal notation with a point and an E, blanks around it. False for all
// else, which parse_number then judges.
bool parse_plainly(std::string_view field, double& value) noexcept;

// The same for the first number of a text, which is taken off with the blanks before it. A blank or the end must
// follow.
bool take_plainly(std::string_view& text, double& value) noexcept;

// As parse_number; throws Error (input) at `where` for everything but a finite number.
double require_number(std::string_view token, const std::string& where, char decimal_sign = '.');

// How finely a number is printed: "12.340" has 3 decimals and 5 digits, "1.5E-03" has 4 and 2.
struct Precision {
  int decimals = 0;  // of the last printed digit, may be negative
  int digits = 0;    // from the first digit that is not zero
};
Precision printed_precision(std::string_view token);

}  // namespace pilotis
