// Continuous relaxation of a design over the logarithms of its values, by NLopt's SLSQP with exact gradients.
#pragma once

#include <bandwright/margins.hpp>
#include <bandwright/spec.hpp>

#include "search/design_space.hpp"

namespace bandwright {

/// A relaxed design: values on no grid.
struct Relaxed {
  PartValues values{};
  double error = 0;  ///< of the exact response; past kWorstError where a condition of the search is broken
  double tolerance_sensitivity = kWorstError;  ///< with the tolerances of the nearest offered values
};

/// First on the pole model, then on the exact response. The operating point's conditions are constraints.
Relaxed relax(const Spec& spec, const DesignSpace& space, const PartValues& start);

}  // namespace bandwright
