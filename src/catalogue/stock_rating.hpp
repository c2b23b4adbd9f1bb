// Ratings as they stand in a stock: "50 V", "0.25 W", "0.25 W, 250 V".
#pragma once

#include <bandwright/catalogue.hpp>
#include <optional>
#include <string>
#include <string_view>

namespace bandwright {

/// Reads the rating of a resistor (power, voltage or both, each with its unit) or of a capacitor (a DC voltage); where
/// there is none, `expected` says what would be right and what is wrong.
std::optional<Rating> read_rating(std::string_view text, PartKind kind, std::string& expected);

}  // namespace bandwright
