// What later pictures need: the response with its envelope over the units, and node voltages.
#pragma once

#include <bandwright/assessment.hpp>

namespace bandwright {

/// Response of the nominal unit, envelope over all simulated units at all conditions, node voltages with their ranges.
void add_pictures(const Spec& spec, const Analysis& nominal, Assessment& assessment);

}  // namespace bandwright
