// What is bought of a stage: its parts at their worst stress, in the right family and rating, and what they cost.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright {

/// Fills in stress, parts as offered (polarity settled, bias loss counted), parts list, stress table and their notes.
/// `c.device` and `c.parameters` are set.
void buy(const Spec& spec, const Catalogue& catalogue, const OfferedParts& chosen, Candidate& c);

/// What a result says of the stock and of class 2 ceramics.
std::vector<std::string> stock_and_family_assumptions(const Spec& spec, const Catalogue& catalogue);

/// Sum over all parts of one board; NaN where the cost of one is not known.
double cost_of(const Candidate& c);

}  // namespace bandwright
