// Quantities and tolerances as text, for readers that collect faults: no exception, the reason in words.
#pragma once

#include <bandwright/quantity.hpp>
#include <optional>
#include <string>
#include <string_view>

namespace bandwright {

/// Reads a quantity; where there is none, `expected` says what would be right and what is wrong.
std::optional<Quantity> read_quantity(std::string_view text, Dimension dimension, std::string& expected);

/// A tolerance as it was written.
struct WrittenTolerance {
  Tolerance value;
  bool asymmetric = false;  ///< "-a/+b": below and above were given apart
};
std::optional<WrittenTolerance> read_tolerance(std::string_view text, Dimension of, std::string& expected);
std::string describe_tolerance(Dimension of);

/// A difference of temperatures, kelvin: "10 K", "10 °C". Never negative.
std::optional<double> read_temperature_difference(std::string_view text, std::string& expected);

/// A two-sided share for each kelvin, 1/K: "50 ppm/K", "±50 ppm/K", "0.5 %/K". Never negative.
std::optional<double> read_per_kelvin(std::string_view text, std::string& expected);

}  // namespace bandwright
