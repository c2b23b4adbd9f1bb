// First-order spread: each cause's part in a figure's variance, and the root sum of squares.
#pragma once

#include <bandwright/assessment.hpp>

namespace bandwright {

/// Half-widths of all causes as relative changes of what the sensitivities refer to (VBE: of its published value);
/// parts with their drift at a temperature added in squares.
CauseWidths relative_widths(const Population& population, double ambient);

/// Shares of each figure's variance.
Sensitivity variance_shares(const Sensitivity& sensitivity, const CauseWidths& widths);

/// sqrt(sum (S_i t_i)^2) of a figure.
double root_sum_square(const std::array<double, kCauseCount>& sensitivity, const CauseWidths& widths);

/// Fills rss_min and rss_max: the conditions add up, the causes as a root sum of squares.
void add_root_sum_squares(const Population& population, const std::vector<Figure>& figures,
                          std::array<WorstCase, kFigureCount>& list);

}  // namespace bandwright
