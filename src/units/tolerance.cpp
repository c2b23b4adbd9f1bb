// Relative tolerances: "5 %", "0.05", "-20/+50 %", "1 dB"; and for each kelvin: "50 ppm/K".
#include <fmt/format.h>

#include <array>
#include <bandwright/quantity.hpp>
#include <utility>

#include "units/number_text.hpp"
#include "units/printable.hpp"
#include "units/quantity_text.hpp"

namespace bandwright {

namespace {

constexpr const char* kPlusMinus = "\xC2\xB1";  // U+00B1

// A share without its sign: "20 %", "0.2", or "20" where the per cent sign stands behind the pair.
std::optional<double> share(std::string_view text, bool percent_behind, std::string& reason) {
  std::string_view rest = trimmed(text);
  const NumberText number = take_number(rest);
  rest = trimmed(rest);
  const bool percent = rest == "%" || (rest.empty() && percent_behind);
  if (number.digits.empty() || (!rest.empty() && !percent)) {
    reason = "a number and % are wanted";
    if (rest.starts_with(',')) reason = "write a decimal point, not a comma";
    return std::nullopt;
  }
  const auto value = scaled(number, percent ? -2 : 0);
  if (!value || *value < 0) {
    reason = !value ? "the number is too large or too small" : "a tolerance is never negative";
    return std::nullopt;
  }
  if (!percent && *value >= 1) {
    reason = fmt::format("write {} %", number.digits);
    return std::nullopt;
  }
  return value;
}

std::optional<WrittenTolerance> decibels(std::string_view text, Dimension of, std::string& reason) {
  std::string unused;
  const auto factor = read_quantity(text, Dimension::gain, unused);
  if (of != Dimension::gain)
    reason = "dB is for a gain only";
  else if (!factor)
    reason = "the number is too large";
  else if (factor->value < 1)
    reason = "a tolerance is never negative";
  if (!reason.empty()) return std::nullopt;
  return WrittenTolerance{{1 - 1 / factor->value, factor->value - 1}, false};
}

// "-20/+50 %" or "+50/-20 %".
std::optional<WrittenTolerance> pair(std::string_view text, std::string& reason) {
  const std::size_t slash = text.find('/');
  std::string_view first = trimmed(text.substr(0, slash));
  std::string_view second = trimmed(text.substr(slash + 1));
  const bool percent_behind = second.ends_with('%');
  if (first.starts_with('+')) std::swap(first, second);
  if (!first.starts_with('-') || !second.starts_with('+')) {
    reason = "write the low side with -, the high side with +";
    return std::nullopt;
  }
  const auto below = share(first.substr(1), percent_behind, reason);
  const auto above = share(second.substr(1), percent_behind, reason);
  if (!below || !above) return std::nullopt;
  return WrittenTolerance{{*below, *above}, true};
}

// What stands behind "±", or the text itself.
std::string_view without_plus_minus(std::string_view text) {
  for (const std::string_view sign : {std::string_view(kPlusMinus), std::string_view("+/-"), std::string_view("+-")})
    if (text.starts_with(sign)) return trimmed(text.substr(sign.size()));
  return text;
}

std::optional<WrittenTolerance> symmetric(std::string_view text, std::string& reason) {
  const auto both = share(without_plus_minus(text), false, reason);
  if (!both) return std::nullopt;
  return WrittenTolerance{{*both, *both}, false};
}

std::optional<WrittenTolerance> read_spelt(std::string_view text, Dimension of, std::string& reason) {
  std::string unused;
  if (text.ends_with("dB") && read_quantity(text, Dimension::decibel, unused)) return decibels(text, of, reason);
  if (text.find('/') != std::string_view::npos && !text.starts_with("+/-")) return pair(text, reason);
  return symmetric(text, reason);
}

// Shares for each kelvin, and their powers of ten.
constexpr std::array kPerKelvin = {std::pair{"ppm/K", -6}, std::pair{"%/K", -2}, std::pair{"1/K", 0}};

std::optional<int> per_kelvin_power(std::string_view unit) {
  for (const auto& [text, power] : kPerKelvin)
    if (unit == text) return power;
  return std::nullopt;
}

}  // namespace

std::string describe_tolerance(Dimension of) {
  return of == Dimension::gain ? "a tolerance such as 1 dB, 5 % or -20/+50 %" : "a tolerance such as 5 % or -20/+50 %";
}

std::optional<WrittenTolerance> read_tolerance(std::string_view text, Dimension of, std::string& expected) {
  std::string reason;
  const std::string spelt = one_spelling(text);
  auto tolerance = read_spelt(spelt, of, reason);
  if (tolerance && tolerance->asymmetric && tolerance->value.below >= 1) {
    reason = "the low side must stay under 100 %";
    tolerance.reset();
  }
  if (!tolerance) expected = spelt.empty() ? describe_tolerance(of) : describe_tolerance(of) + " (" + reason + ")";
  return tolerance;
}

std::optional<double> read_per_kelvin(std::string_view text, std::string& expected) {
  const std::string spelt = one_spelling(text);
  std::string_view rest = without_plus_minus(spelt);
  const NumberText number = take_number(rest);
  const auto power = per_kelvin_power(trimmed(rest));
  const auto share = power && !number.digits.empty() ? scaled(number, *power) : std::nullopt;
  if (share && *share >= 0) return share;
  expected = "a share for each kelvin such as 50 ppm/K or 0.5 %/K";
  return std::nullopt;
}

Tolerance parse_tolerance(std::string_view text, Dimension of) {
  std::string expected;
  if (const auto tolerance = read_tolerance(text, of, expected)) return tolerance->value;
  if (trimmed(text).empty()) throw QuantityError("nothing found; expected " + expected);
  throw QuantityError(fmt::format("found \"{}\"; expected {}", printable(text), expected));
}

}  // namespace bandwright
