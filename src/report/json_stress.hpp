#pragma once

#include <bandwright/design.hpp>

#include "report/json_notes.hpp"

namespace bandwright {

/// The stress of every part at its worst corner, as a field of a candidate in the result document.
void add_stress_fields(Json& candidate_document, const Candidate& candidate, Notes& notes);

}  // namespace bandwright
