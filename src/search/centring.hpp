// Design centring: a stage that meets the spec is moved to where the most units do.
#pragma once

#include "search/refinement.hpp"

namespace bandwright {

/// From a grid point to the grid point nearest to the continuous optimum of the least distance from any limit, each
/// counted in its own spread. Spread and shifts between conditions are taken at the start of each round, the figures
/// and their slopes exactly. Returns the best point of all rounds in the order `by`.
GridPoint centred(const Spec& spec, Evaluator& evaluator, const GridPoint& start, RankBy by);

}  // namespace bandwright
