// Assembles what is reported: a candidate in full, and what belongs to the result as a whole.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright {

/// A result with spec, definitions and assumptions, no candidates yet.
DesignResult empty_result(const Spec& spec, const Catalogue& catalogue, RankBy by);

/// The transistors that a spec names, or every one of the right polarity.
std::vector<const Transistor*> fitting_transistors(const Spec& spec, const Catalogue& catalogue);

/// The spec as it bears on parts that are given: one device, from the stock or not.
Spec of_given_parts(Spec spec, const std::string& device);

/// Everything that is reported of one stage.
Candidate assemble(const Spec& spec, const DerivedDevice& device, const Catalogue& catalogue,
                   const OfferedParts& parts);

/// What rests on memory, explanations, and whether the spec is met.
void finish(DesignResult& result, const std::vector<DerivedDevice>& devices, const std::string& nearest_miss);

}  // namespace bandwright
