// Pairs of parts in one role, where no single value meets the spec.
#pragma once

#include <bandwright/search.hpp>
#include <vector>

#include "search/design_space.hpp"

namespace bandwright {

/// From the best stages found, none of which meets the spec: the same with one part after another changed to the pair
/// or single value that helps most, until the spec is met or no change of one part helps. Empty where a stage meets the
/// spec already.
std::vector<Found> paired(const Spec& spec, const DesignSpaces& all, const std::vector<Found>& found, RankBy by);

}  // namespace bandwright
