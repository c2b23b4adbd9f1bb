// Starting points of the relaxation: textbook designs whose free choices (voltages, current, spread, shares of the
// lower cutoff) come from a Sobol sequence.
#pragma once

#include <array>
#include <bandwright/spec.hpp>
#include <vector>

#include "search/design_space.hpp"

namespace bandwright {

/// The choices a designer makes before any formula; each in 0..1.
inline constexpr std::size_t kChoices = 6;
using Choices = std::array<double, kChoices>;

/// `count` points of the Sobol sequence, shifted by the seed (Cranley & Patterson rotation).
std::vector<Choices> sobol_choices(std::size_t count, std::uint64_t seed);

/// A design by first estimates, clamped to the offered ranges. `practice`: the divider by the common rule of ten times
/// the base current instead of by spread.
PartValues start_point(const Spec& spec, const DesignSpace& space, const Choices& choices, bool practice);

/// What a requirement aims at: its target, or a value well inside its limits; NaN where there is no requirement.
double aim(const Spec& spec, Figure figure);

}  // namespace bandwright
