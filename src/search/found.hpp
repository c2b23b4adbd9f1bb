// What a search hands over of a grid point, and why nothing is allowed.
#pragma once

#include <bandwright/search.hpp>
#include <string>

#include "search/refinement.hpp"

namespace bandwright {

Found found_from(Evaluator& evaluator, const Ranked& ranked);

/// Which condition of the search the nearest stage breaks, with its numbers.
std::string nearest_miss(const Found& nearest, const Spec& spec, const std::vector<DerivedDevice>& devices);

}  // namespace bandwright
