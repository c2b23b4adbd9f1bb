// A result made by hand, so that the writers can be tested without a search. All of it is invented.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright::test {

/// Two candidates on 12 V: the first meets every requirement, the second lacks upper cutoff.
DesignResult sample_result();

/// The first candidate of it.
Candidate sample_candidate();

}  // namespace bandwright::test
