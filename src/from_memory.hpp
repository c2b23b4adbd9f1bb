// What the figures from memory are worth: each halved and doubled, the stage recomputed.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright {

/// One line a figure from memory of the device: how far gain, lower and upper cutoff of the candidate move when it is
/// halved and doubled (VBE: 50 mV either way), where that exceeds 0.1 dB or 1 %.
std::vector<std::string> memory_effects(const Spec& spec, const DerivedDevice& device, const Candidate& candidate);

}  // namespace bandwright
