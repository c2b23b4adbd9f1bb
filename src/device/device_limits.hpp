// How far the units of a type lie from its nominal figures.
#pragma once

#include "device/chosen_figures.hpp"

namespace bandwright {

/// Published limits where there are some, else the usual spread: "assumed".
std::array<DeviceLimits, kCauseCount> device_limits(const ChosenFigures& chosen);

}  // namespace bandwright
