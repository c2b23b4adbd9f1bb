// What becomes of many units, as fields of a candidate in the result document.
#pragma once

#include <bandwright/design.hpp>

#include "report/json_notes.hpp"

namespace bandwright {

/// Sensitivities, shares of the spread, worst case, spread, capability, yield, verdict, conditions and causes; null
/// where the candidate was not assessed.
void add_assessment_fields(Json& candidate_document, const Candidate& candidate, const Spec& spec, Notes& notes);

/// The tolerance allocation; nothing where there is none.
void add_allocation_fields(Json& candidate_document, const Candidate& candidate, Notes& notes);

/// What may stand in for the parts; null where it was not asked for.
void add_alternates_fields(Json& candidate_document, const Candidate& candidate, const Spec& spec, Notes& notes);

/// Response, histograms and node voltages; nothing where they were not asked for.
void add_picture_fields(Json& candidate_document, const Candidate& candidate, Notes& notes);

/// The count of a simulation and its interval.
Json yield_count(const Yield& yield, const std::string& field, Notes& notes);

}  // namespace bandwright
