// Values as they are written so that they read back as the same numbers.
#pragma once

#include <bandwright/quantity.hpp>

#include "spec/json_document.hpp"

namespace bandwright {

/// "25 °C" of 298.15 K: the shortest text that reads back as the same kelvin.
Json shown_temperature(double kelvin);

/// The resistance that reads back as the same conductance; "open" for 0.
Json shown_load(double conductance);

/// 0.05, or "-20/+50 %".
Json shown_tolerance(const Tolerance& tolerance);

/// A number; null for NaN.
Json shown_number(double value);

}  // namespace bandwright
