// Pairs: two parts in series or parallel that act as one value.
#pragma once

#include <bandwright/catalogue.hpp>
#include <vector>

namespace bandwright {

/// True where the values add up: resistors in series, capacitors in parallel; else their reciprocals do.
bool adds_up(PartKind kind, Connection connection);

/// Two parts of one family as one value, its tolerance that of both at their ends.
OfferedValue joined(const OfferedValue& first, const OfferedValue& second, Connection connection);

/// The pair that a choice means.
OfferedValue resolve_pair(const Catalogue& catalogue, const Spec& spec, Role role, const PartChoice& wanted);

/// Every pair of the offered single values of a role that lies between two values at work, rising; of those that lie
/// within a tenth of their own tolerance of each other the cheapest. Polarised parts stand in parallel only.
std::vector<OfferedValue> pairs_between(const std::vector<OfferedValue>& offered, int boards, double low, double high);

}  // namespace bandwright
