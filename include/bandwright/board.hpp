// Board: a candidate as the parts of one board, ready for a bill of materials.
//
//   BoardParts board = board_of(spec, catalogue, result.candidates.front(), true);
//   Bill bill = bill_of_materials({board}, catalogue, {.quantity = 10});
#pragma once

#include <bandwright/design.hpp>

namespace bandwright {

/// The parts, the transistor among them, what feeds them, and a name. With alternates each part says which value or
/// type may take its place while all other parts stay as they are and the spec still holds: "43K", "BC547C".
BoardParts board_of(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate, bool with_alternates);

}  // namespace bandwright
