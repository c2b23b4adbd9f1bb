#pragma once

#include <bandwright/stress.hpp>

namespace bandwright {

/// True where a polarised capacitor may stand: the voltage is never 0 throughout and never changes its sign.
bool keeps_one_sign(const StressRange& volts);

}  // namespace bandwright
