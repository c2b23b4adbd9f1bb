// An assessment made by hand for the sample result. All of it is invented.
#pragma once

#include <bandwright/design.hpp>

namespace bandwright::test {

/// 20,000 units at nominal and four corners, 160 of them fail: lower cutoff most, at the cold corner. The pictures are
/// left out.
Assessment sample_assessment(const Candidate& candidate);

/// The same with response, histograms and node voltages.
Assessment sample_assessment_with_pictures(const Candidate& candidate);

/// R3 and R4 need 1 %, C2 another family; the rest may be at their loosest.
Allocation sample_allocation();

}  // namespace bandwright::test
