#include <fmt/format.h>

#include <bandwright/quantity.hpp>
#include <cmath>

#include "units/constants.hpp"
#include "units/number_text.hpp"
#include "units/printable.hpp"
#include "units/quantity_text.hpp"
#include "units/unit_table.hpp"

namespace bandwright {

namespace {

constexpr double kSqrt2 = 1.41421356237309504880;

std::string with_reason(Dimension dimension, const std::string& reason) {
  return describe_dimension(dimension) + " (" + reason + ")";
}

std::string lower(std::string_view text) {
  std::string out(text);
  for (char& c : out)
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  return out;
}

bool is_decimal_comma(std::string_view rest) { return rest.size() > 1 && rest[0] == ',' && is_digit(rest[1]); }

std::string why_no_number(std::string_view rest) {
  if (rest.empty()) return "a number is missing";
  if (is_decimal_comma(rest)) return "write a decimal point, not a comma";
  const std::string word = lower(rest.substr(0, 3));
  if (word == "nan" || word == "inf" || rest.starts_with("\xE2\x88\x9E")) return "the number must be finite";
  return "a number is missing";
}

// "Hz" for "khz": the unit of this dimension that differs only in case; one letter may be a prefix.
const Unit* same_but_case(std::string_view suffix, Dimension dimension) {
  for (const Unit& unit : units()) {
    const std::string_view text = unit.text;
    if (unit.dimension != dimension || suffix.size() < text.size() || suffix.size() > text.size() + 1) continue;
    const std::string_view end = suffix.substr(suffix.size() - text.size());
    if (end != text && lower(end) == lower(text)) return &unit;
  }
  return nullptr;
}

const Unit* unit_of_another(std::string_view suffix, Dimension dimension) {
  for (const Unit& unit : units())
    if (unit.dimension != dimension && find_suffix(suffix, unit.dimension) && suffix.ends_with(unit.text)) return &unit;
  return nullptr;
}

std::string why_no_unit(std::string_view suffix, Dimension dimension) {
  const DimensionInfo& wanted = info(dimension);
  if (is_decimal_comma(suffix)) return "write a decimal point, not a comma";
  const std::string shown = printable(suffix, 30);
  if (const Unit* other = unit_of_another(suffix, dimension))
    return fmt::format("{} is a unit of {}, not of {}", shown, info(other->dimension).noun, wanted.noun);
  if (const Unit* unit = same_but_case(suffix, dimension)) return fmt::format("the unit is written {}", unit->text);
  return fmt::format("\"{}\" after the number is no unit of {}", shown, wanted.noun);
}

bool is_main_unit(std::string_view text, Dimension dimension) {
  for (const Unit& unit : units())
    if (unit.dimension == dimension && unit.prefixed && text == unit.text) return true;
  return false;
}

// "4K7", "R47", "2u2": IEC 60062, the multiplier letter in place of the decimal point, digits behind it.
std::optional<Suffix> take_code(NumberText& number, std::string_view rest, Dimension dimension) {
  if (!number.whole || rest.size() < 2 || !is_digit(rest[1])) return std::nullopt;
  const auto power = code_power(rest[0], dimension);
  if (!power) return std::nullopt;
  std::size_t end = 1;
  while (end < rest.size() && is_digit(rest[end])) ++end;
  const std::string_view unit = trimmed(rest.substr(end));
  if (!unit.empty() && !is_main_unit(unit, dimension)) return std::nullopt;
  number.digits += '.';
  number.digits += rest.substr(1, end - 1);
  number.whole = false;
  return Suffix{*power, UnitLaw::linear};
}

Quantity peak(double value) { return {value, "read as " + format_quantity(value, Dimension::voltage) + " peak"}; }

// In long double, then rounded: the same double whichever way the machine raises to a power.
double ratio_of_decibels(double level) {
  constexpr double kLargest = 20 * 308;  // dB, within the range of double
  if (std::fabs(level) > kLargest) return level > 0 ? HUGE_VAL : 0;
  return static_cast<double>(std::pow(10.0L, level / 20.0L));
}

Quantity under_law(double number, UnitLaw law) {
  switch (law) {
    case UnitLaw::linear:
      return {number, ""};
    case UnitLaw::peak_to_peak:
      return peak(number / 2);
    case UnitLaw::rms:
      return peak(number * kSqrt2);
    case UnitLaw::celsius:
      return {number + kZeroCelsius, ""};
    case UnitLaw::voltage_decibel:
      return {ratio_of_decibels(number), ""};
  }
  return {};
}

// What holds for the value, whatever it was written in.
std::optional<Quantity> checked(Quantity quantity, Dimension dimension, std::string& reason) {
  if (!std::isfinite(quantity.value)) {
    reason = "the number is too large";
    return std::nullopt;
  }
  if (dimension == Dimension::temperature && quantity.value < 0) {
    reason = "this is below absolute zero";
    return std::nullopt;
  }
  if (dimension == Dimension::gain && quantity.value < 0) return Quantity{-quantity.value, "a minus sign: inverting"};
  return quantity;
}

std::optional<Suffix> suffix_of(NumberText& number, std::string_view rest, Dimension dimension, std::string& reason) {
  if (auto code = take_code(number, rest, dimension)) return code;
  if (number.digits.empty()) {
    reason = why_no_number(rest);
    return std::nullopt;
  }
  rest = trimmed(rest);
  if (rest.empty()) {
    const bool zero = number.digits.find_first_not_of("0.") == std::string::npos;
    if (info(dimension).bare_number || (zero && dimension != Dimension::temperature)) return Suffix{};
    reason = "the unit is missing";
    return std::nullopt;
  }
  auto suffix = find_suffix(rest, dimension);
  if (!suffix) reason = why_no_unit(rest, dimension);
  return suffix;
}

std::optional<Quantity> read_spelt(std::string_view rest, Dimension dimension, std::string& reason) {
  NumberText number = take_number(rest);
  const auto suffix = suffix_of(number, rest, dimension, reason);
  if (!suffix) return std::nullopt;
  const auto value = scaled(number, suffix->power);
  if (!value) {
    reason = "the number is too large or too small";
    return std::nullopt;
  }
  return checked(under_law(*value, suffix->law), dimension, reason);
}

}  // namespace

std::optional<Quantity> read_quantity(std::string_view text, Dimension dimension, std::string& expected) {
  std::string reason;
  const std::string spelt = one_spelling(text);
  auto quantity = read_spelt(spelt, dimension, reason);
  if (!quantity) expected = spelt.empty() ? describe_dimension(dimension) : with_reason(dimension, reason);
  return quantity;
}

Quantity parse_quantity(std::string_view text, Dimension dimension) {
  std::string expected;
  if (auto quantity = read_quantity(text, dimension, expected)) return *quantity;
  if (trimmed(text).empty()) throw QuantityError("nothing found; expected " + expected);
  throw QuantityError(fmt::format("found \"{}\"; expected {}", printable(text), expected));
}

std::optional<double> read_temperature_difference(std::string_view text, std::string& expected) {
  const std::string spelt = one_spelling(text);
  std::string_view rest = spelt;
  const NumberText number = take_number(rest);
  const auto value = number.digits.empty() ? std::nullopt : scaled(number, 0);
  const bool zero = value && *value == 0 && trimmed(rest).empty();
  if (value && *value >= 0 && (zero || find_suffix(trimmed(rest), Dimension::temperature))) return *value;
  expected = "a difference of temperatures such as 10 K";
  return std::nullopt;
}

}  // namespace bandwright
