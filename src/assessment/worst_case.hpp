// The extremes of figures over the box of all units.
#pragma once

#include <bandwright/assessment.hpp>

namespace bandwright {

struct WorstCaseOptions {
  bool polish = true;  ///< false: corners only
};

/// Corner worst case of the figures asked for, with the corners named and the root sum of squares; the others left NaN.
std::array<WorstCase, kFigureCount> worst_cases(const Population& population, const std::vector<Figure>& figures,
                                                const WorstCaseOptions& options = {});

}  // namespace bandwright
