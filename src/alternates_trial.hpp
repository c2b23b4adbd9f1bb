// One change tried: the stage with it, assembled and assessed as every candidate is.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright {

/// When the units are simulated.
enum class TrialDepth {
  full,               ///< wherever the stage is active
  where_it_may_hold,  ///< only where nothing else rules it out
};

struct Trial {
  OfferedParts parts;  ///< with the polarity settled
  Outcome outcome;
};

/// `before`: the design that is changed.
Trial tried(const Spec& spec, const Catalogue& catalogue, const Candidate& before, const BipolarParameters& device,
            const OfferedParts& parts, TrialDepth depth);

/// The stage's own parts with another one in a role.
OfferedParts with_part(OfferedParts parts, Role role, const OfferedValue& part);

/// What the stock lacks for all boards, in words; empty where it has enough.
std::string shortage(const Spec& spec, const OfferedParts& parts);

/// True where a role has a part and the spec leaves its value open.
bool is_open(const Spec& spec, const Candidate& candidate, Role role);

/// Values as printed, compared across families and stocks.
bool same_print(double a, double b);

/// True where a is higher; what was not computed comes last.
bool more_capable(const Outcome& a, const Outcome& b);

/// Alternates of every listed candidate.
void add_alternates(const Spec& spec, const Catalogue& catalogue, const DesignOptions& options, DesignResult& result);

}  // namespace bandwright
