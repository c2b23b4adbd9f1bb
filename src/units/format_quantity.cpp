// Numbers back to text: SI prefix and unit, or the code of IEC 60062.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/quantity.hpp>
#include <cmath>
#include <cstdlib>

#include "units/constants.hpp"
#include "units/unit_table.hpp"

namespace bandwright {

namespace {

// value = 0.d1 d2 d3 ... times ten to `point`, rounded, trailing zeros dropped.
struct Digits {
  std::string text;
  int point = 0;
};

Digits rounded(double magnitude, int digits) {
  const std::string written = fmt::format("{:.{}e}", magnitude, std::clamp(digits, 1, 17) - 1);
  const std::size_t e = written.find('e');
  Digits out{written.substr(0, e), std::atoi(written.c_str() + e + 1) + 1};
  std::erase(out.text, '.');
  out.text.erase(out.text.find_last_not_of('0') + 1);
  return out;
}

// The digits with `mark` where the decimal point stands; no mark behind a whole number.
std::string placed(const Digits& digits, int point, std::string_view mark) {
  const auto length = static_cast<int>(digits.text.size());
  if (point >= length) return digits.text + std::string(static_cast<std::size_t>(point - length), '0');
  if (point > 0) {
    const auto at = static_cast<std::size_t>(point);
    return fmt::format("{}{}{}", digits.text.substr(0, at), mark, digits.text.substr(at));
  }
  return fmt::format("0{}{}{}", mark, std::string(static_cast<std::size_t>(-point), '0'), digits.text);
}

// The power of a thousand that leaves one to three digits before the point.
int thousands(const Digits& digits) { return 3 * static_cast<int>(std::floor((digits.point - 1) / 3.0)); }

// Above the largest prefix a capacitance up to 0.1 F stays in µF, as it is sold.
int prefix_power(const Digits& digits, const DimensionInfo& dimension) {
  const int power = thousands(digits);
  if (dimension.dimension == Dimension::capacitance && digits.point > 0) return 0;
  return std::clamp(power, dimension.least_power, dimension.most_power);
}

std::string_view prefix_text(int power) {
  if (power == 0) return "";
  if (power == -6) return "\xC2\xB5";  // U+00B5
  for (const Prefix& prefix : prefixes())
    if (prefix.power == power) return prefix.text;
  return "";
}

std::string with_unit(const std::string& number, std::string_view prefix, const char* unit) {
  const std::string suffix = std::string(prefix) + unit;
  return suffix.empty() ? number : number + " " + suffix;
}

// R47 but 47L; 100p but 1n0: the smallest multiplier that leaves a digit before it, the first one where none does.
int code_step(const Digits& digits, Dimension dimension) {
  if (dimension == Dimension::resistance) {
    if (digits.point < 0) return -3;
    return std::clamp(thousands(digits), 0, 12);
  }
  return std::clamp(thousands(digits), -12, 0);
}

std::string code_letter(int power, Dimension dimension) {
  for (const char letter : std::string_view(info(dimension).code))
    if (code_power(letter, dimension) == power) return std::string(1, letter);
  return "";
}

}  // namespace

std::string format_quantity(double value, Dimension dimension, int digits) {
  if (std::isnan(value)) return "-";
  if (dimension == Dimension::temperature) value -= kZeroCelsius;
  const DimensionInfo& row = info(dimension);
  if (std::isinf(value)) return value > 0 ? "infinite" : "-infinite";
  if (value == 0) return with_unit("0", "", row.shown);
  const Digits number = rounded(std::fabs(value), digits);
  const int power = prefix_power(number, row);
  const std::string sign = value < 0 ? "-" : "";
  return sign + with_unit(placed(number, number.point - power, "."), prefix_text(power), row.shown);
}

std::string value_code(double value, Dimension dimension) {
  if (!std::isfinite(value) || value < 0 || *info(dimension).code == '\0') return "-";
  if (value == 0) return dimension == Dimension::resistance ? "0R" : "0p";
  constexpr int kCodeDigits = 4;
  const Digits digits = rounded(value, kCodeDigits);
  const int power = code_step(digits, dimension);
  const int point = digits.point - power;
  const std::string letter = code_letter(power, dimension);
  std::string code = placed(digits, point, letter);
  if (point <= 0) return code.substr(1) + (code.size() == 3 ? "0" : "");
  if (point >= static_cast<int>(digits.text.size())) code += letter + (point == 1 ? "0" : "");
  return code;
}

}  // namespace bandwright
