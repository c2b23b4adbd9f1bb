// Quantities: text to SI numbers and back.
//
// Accepted: a number with an optional SI prefix and unit ("4.7k", "10 uF", "2.2 MHz"), an
// IEC 60062 code ("4K7", "2u2"), decibels for a gain ("40 dB"), percentages for tolerances
// ("5 %", "-20/+50 %"), temperatures ("-10 °C", "263 K"). `m` is milli, `M` is mega, k and K are
// kilo. Levels are peak: "2 Vpp" and "1 Vrms" are converted. Inside the library every number is SI.
//
//   double r = parse_quantity("4K7", Dimension::resistance).value;   // 4700.0
//   std::string s = format_quantity(4700.0, Dimension::resistance);  // "4.7 kΩ"
#pragma once

#include <optional>
#include <stdexcept>
#include <string>
#include <string_view>

namespace bandwright {

/// The kind of a quantity: fixes the unit that is accepted and shown.
enum class Dimension {
  gain,                ///< voltage ratio, V/V; "40 dB" accepted (20 log10)
  resistance,          ///< ohm
  capacitance,         ///< farad; a bare number other than 0 is refused
  voltage,             ///< volt, peak where it is a level
  current,             ///< ampere
  power,               ///< watt
  frequency,           ///< hertz
  time,                ///< second
  temperature,         ///< kelvin inside; a unit is always needed
  noise_density,       ///< V per square root of hertz
  decibel,             ///< dB of a power ratio (noise figure), shown as dB
  fraction,            ///< pure number; "5 %" accepted
  thermal_resistance,  ///< K/W
  money,               ///< a plain number
};

/// A quantity as read.
struct Quantity {
  double value = 0;  ///< SI
  std::string note;  ///< what the reader should know: "read as 1.414 V peak", "a minus sign: inverting"; or empty
};

/// A relative tolerance: the true value lies between value (1 - below) and value (1 + above).
struct Tolerance {
  double below = 0;
  double above = 0;
  friend bool operator==(const Tolerance&, const Tolerance&) = default;
};

/// Text that is not the quantity asked for. what() says what was found and what would be right.
class QuantityError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// Reads one quantity. Throws QuantityError on an empty text, a wrong unit, a decimal comma,
/// NaN, infinity or trailing text.
Quantity parse_quantity(std::string_view text, Dimension dimension);

/// Reads a relative tolerance: "5 %", "0.05", "-20/+50 %"; "1 dB" only where the quantity it belongs to
/// is a gain (10^(dB/20) - 1 above; below chosen so that the lower limit is target / (1 + above)).
Tolerance parse_tolerance(std::string_view text, Dimension of);

/// A number with SI prefix and unit, `digits` significant digits, trailing zeros dropped:
/// 4700 ohm gives "4.7 kΩ". Gains are shown as ratio ("50.1"), temperatures in degrees Celsius.
/// NaN gives "-".
std::string format_quantity(double value, Dimension dimension, int digits = 4);

/// The IEC 60062 code of a resistance or capacitance, exact to four significant digits:
/// 4700 gives "4K7", 1e-7 F gives "100n". Source: IEC 60062:2016, letter in place of the decimal point.
std::string value_code(double value, Dimension dimension);

/// The tolerance letter of IEC 60062, "F" for 1 %; empty where its table has none. Below 10 pF the letters of
/// capacitors mean something else: see below. Source and marks: src/units/tolerance_letters.cpp.
std::string tolerance_letter(const Tolerance& tolerance);

/// What a tolerance letter of IEC 60062 stands for; capital letters only.
std::optional<Tolerance> tolerance_of_letter(char letter);

/// The same on a capacitor below 10 pF: farad, two-sided; none where no letter is used there.
std::optional<double> small_capacitance_tolerance_of_letter(char letter);

/// A nominal example for error messages: "a resistance such as 4.7k, 4K7 or 4700".
std::string describe_dimension(Dimension dimension);

}  // namespace bandwright
