// DC voltages and powers of the parts of a solved unit.
#pragma once

#include <bandwright/analysis.hpp>

#include "stage/common_emitter.hpp"

namespace bandwright {

/// Voltages first node minus second with their real sign, and power in each resistor.
Stress stress_of(bool pnp, const Circuit<double>& circuit, const OperatingPoint& point, double source_dc,
                 double load_dc);

}  // namespace bandwright
