#include "spec/shown_value.hpp"

#include <fmt/format.h>

#include <charconv>
#include <cmath>
#include <functional>
#include <limits>
#include <string>

#include "units/constants.hpp"
#include "units/number_text.hpp"

namespace bandwright {

namespace {

double number_of(const std::string& text) {
  double value = 0;
  std::from_chars(text.data(), text.data() + text.size(), value);
  return value;
}

// The shortest decimal near `guess` for which `same` holds.
std::string shortest(double guess, const std::function<bool(const std::string&)>& same) {
  constexpr int kDigits = std::numeric_limits<double>::max_digits10;
  for (int digits = 1; digits <= kDigits; ++digits) {
    const std::string text = fmt::format("{:.{}g}", guess, digits);
    if (same(text)) return fmt::format("{}", number_of(text));
  }
  for (const double towards : {0.0, HUGE_VAL}) {
    const std::string text = fmt::format("{}", std::nextafter(guess, towards));
    if (same(text)) return text;
  }
  return fmt::format("{}", guess);
}

// The shortest decimal of a number times ten to `power`, not rounded again: 1.28 and 2 give "1.28e2".
std::string moved(double value, int power) {
  constexpr int kDigits = std::numeric_limits<double>::max_digits10 - 1;  // behind the point
  std::string text = fmt::format("{:.0e}", value);
  for (int digits = 1; digits <= kDigits && number_of(text) != value; ++digits)
    text = fmt::format("{:.{}e}", value, digits);
  const std::size_t e = text.find('e');
  return fmt::format("{}e{}", text.substr(0, e), std::stoi(text.substr(e + 1)) + power);
}

std::string percentage(double share) {
  const auto same = [&](const std::string& text) {
    std::string_view rest = text;
    return scaled(take_number(rest), -2) == share;
  };
  const std::string text = shortest(100 * share, same);
  return same(text) ? text : moved(share, 2);
}

}  // namespace

Json shown_number(double value) { return std::isnan(value) ? Json(nullptr) : Json(value); }

Json shown_temperature(double kelvin) {
  const auto same = [&](const std::string& text) { return number_of(text) + kZeroCelsius == kelvin; };
  return shortest(kelvin - kZeroCelsius, same) + " °C";
}

Json shown_load(double conductance) {
  if (conductance == 0) return "open";
  return number_of(
      shortest(1 / conductance, [&](const std::string& text) { return 1 / number_of(text) == conductance; }));
}

Json shown_tolerance(const Tolerance& tolerance) {
  if (tolerance.below == tolerance.above) return tolerance.above;
  return fmt::format("-{}/+{} %", percentage(tolerance.below), percentage(tolerance.above));
}

}  // namespace bandwright
