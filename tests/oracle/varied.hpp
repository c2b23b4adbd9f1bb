// A circuit with one cause of variation changed by hand in the sheet's parameters, the parts or the surroundings: what
// the definitions in <bandwright/cause.hpp> and <bandwright/device.hpp> say, without the library's factors for units.
#pragma once

#include <bandwright/cause.hpp>

#include "random_circuits.hpp"

namespace oracle {

/// False where the cause is an absent part.
bool is_there(const RandomCircuit& circuit, bandwright::Cause cause);

/// The cause's value times a factor (VBE: its published value).
RandomCircuit varied(const RandomCircuit& circuit, bandwright::Cause cause, double factor);

/// The junction held at a temperature: no rise, and that ambient.
RandomCircuit held_at(const RandomCircuit& circuit, double junction);

}  // namespace oracle
