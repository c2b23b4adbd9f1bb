#pragma once

#include <bandwright/design.hpp>

#include "report/json_notes.hpp"

namespace bandwright {

/// The resistors and capacitors of a candidate; of a pair both parts.
Json part_documents(const Candidate& candidate, Notes& notes);

/// Its transistor as a part.
Json transistor_document(const Candidate& candidate, Notes& notes);

}  // namespace bandwright
