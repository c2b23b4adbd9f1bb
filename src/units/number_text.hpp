// Decimal numbers as they are written.
#pragma once

#include <optional>
#include <string>
#include <string_view>

namespace bandwright {

/// A decimal number kept as text until its power of ten is known, so that "2.2 u" is rounded once only.
struct NumberText {
  bool negative = false;
  std::string digits;  ///< "4.7", "100", ".5"; empty: there is no number
  int exponent = 0;
  bool whole = true;  ///< neither point nor exponent
};

/// The text trimmed, with one spelling for each sign: u for micro, Ω for ohm, - for minus, ° for degree, and plain
/// spaces.
std::string one_spelling(std::string_view text);

std::string_view trimmed(std::string_view text);

bool is_digit(char c);

/// Takes the number off the front of `rest`.
NumberText take_number(std::string_view& rest);

/// The number times ten to `power`; none where it lies outside the range of double.
std::optional<double> scaled(const NumberText& number, int power);

}  // namespace bandwright
