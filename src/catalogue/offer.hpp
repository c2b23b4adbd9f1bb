// One value of one family, resolved before any analysis.
#pragma once

#include "catalogue/choice.hpp"

namespace bandwright {

OfferedValue offer(const Catalogue& catalogue, const Spec& spec, const OfferedFamily& from, double value);

/// True for a class 2 ceramic in a role that sets a cutoff which must be better than +-40 % (own rule, after the
/// catalogue's notes on DC bias).
bool is_too_loose(const Family& family, const Spec& spec, Role role);

}  // namespace bandwright
