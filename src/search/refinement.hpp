// Discrete refinement: changes of one part and of pairs of parts by one or two neighbouring values, until none improves
// the order.
#pragma once

#include <functional>

#include "search/evaluator.hpp"

namespace bandwright {

/// The moves of one part: index steps.
inline constexpr int kSteps[] = {-1, 1, -2, 2};

/// Improves `start` until it is better than all its neighbours. `stop` ends early where it says so.
Evaluator::Trial refine(Evaluator& evaluator, const GridPoint& start, RankBy by, const std::function<bool()>& stop);

/// The first neighbour that comes before `trial`, or false. Used by refine and to verify its answer.
bool find_better(Evaluator& evaluator, Evaluator::Trial& trial, RankBy by, std::size_t& next_move);

}  // namespace bandwright
