#include "units/number_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>
#include <system_error>
#include <utility>

namespace bandwright {

namespace {

constexpr int kHugeExponent = 100000;  // beyond any double, far from overflow of int

// UTF-8 on the left, our spelling on the right.
constexpr std::array<std::pair<std::string_view, std::string_view>, 12> kSpellings = {{
    {"\xC2\xB5", "u"},             // U+00B5 micro sign
    {"\xCE\xBC", "u"},             // U+03BC small mu
    {"\xE2\x84\xA6", "\xCE\xA9"},  // U+2126 ohm sign
    {"\xE2\x84\x83",
     "\xC2\xB0"
     "C"},                     // U+2103 degree Celsius
    {"\xC2\xBA", "\xC2\xB0"},  // U+00BA ordinal sign, mistaken for the degree sign
    {"\xE2\x84\xAA", "K"},     // U+212A kelvin sign
    {"\xE2\x88\x92", "-"},     // U+2212 minus sign
    {"\xC2\xA0", " "},         // U+00A0 no-break space
    {"\xE2\x80\x89", " "},     // U+2009 thin space
    {"\xE2\x80\xAF", " "},     // U+202F narrow no-break space
    {"\t", " "},
    {"\xEF\xBC\x85", "%"},  // U+FF05 full-width per cent
}};

// Printable ASCII has one spelling only.
bool is_one_spelling(char c) { return c >= ' ' && c <= '~'; }

std::string_view take_digits(std::string_view& rest) {
  std::size_t n = 0;
  while (n < rest.size() && is_digit(rest[n])) ++n;
  const std::string_view digits = rest.substr(0, n);
  rest.remove_prefix(n);
  return digits;
}

bool take_sign(std::string_view& rest) {
  if (rest.empty() || (rest[0] != '+' && rest[0] != '-')) return false;
  const bool negative = rest[0] == '-';
  rest.remove_prefix(1);
  return negative;
}

// "e3", "E-12"; an e without digits stays where it is.
std::optional<int> take_exponent(std::string_view& rest) {
  if (rest.empty() || (rest[0] != 'e' && rest[0] != 'E')) return std::nullopt;
  std::string_view after = rest.substr(1);
  const bool negative = take_sign(after);
  const std::string_view digits = take_digits(after);
  if (digits.empty()) return std::nullopt;
  rest = after;
  int value = 0;
  const auto read = std::from_chars(digits.data(), digits.data() + digits.size(), value);
  if (read.ec != std::errc() || value > kHugeExponent) value = kHugeExponent;
  return negative ? -value : value;
}

}  // namespace

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::string_view trimmed(std::string_view text) {
  while (!text.empty() && text.front() == ' ') text.remove_prefix(1);
  while (!text.empty() && text.back() == ' ') text.remove_suffix(1);
  return text;
}

std::string one_spelling(std::string_view text) {
  if (std::all_of(text.begin(), text.end(), is_one_spelling)) return std::string(trimmed(text));
  std::string out;
  while (!text.empty()) {
    std::size_t taken = 1;
    std::string_view put = text.substr(0, 1);
    for (const auto& [theirs, ours] : kSpellings) {
      if (!text.starts_with(theirs)) continue;
      taken = theirs.size();
      put = ours;
    }
    out += put;
    text.remove_prefix(taken);
  }
  return std::string(trimmed(out));
}

NumberText take_number(std::string_view& rest) {
  NumberText number;
  number.negative = take_sign(rest);
  const std::string_view start = rest;
  number.digits = take_digits(rest);
  if (rest.starts_with('.')) {
    rest.remove_prefix(1);
    const std::string_view fraction = take_digits(rest);
    if (number.digits.empty() && fraction.empty()) {
      rest = start;
      return number;
    }
    number.digits += '.';
    number.digits += fraction;
    number.whole = false;
  }
  if (number.digits.empty()) return number;
  if (const auto exponent = take_exponent(rest)) {
    number.exponent = *exponent;
    number.whole = false;
  }
  return number;
}

std::optional<double> scaled(const NumberText& number, int power) {
  const std::string text = fmt::format("{}e{}", number.digits, number.exponent + power);
  double value = 0;
  const auto read = std::from_chars(text.data(), text.data() + text.size(), value);
  if (read.ec != std::errc() || read.ptr != text.data() + text.size()) return std::nullopt;
  if (value == 0) return 0.0;  // no negative zero
  return number.negative ? -value : value;
}

}  // namespace bandwright
