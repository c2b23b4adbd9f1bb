// The extremes of a figure over the box of all units, supply and ambient: from the nominal unit to the corner that the
// signs of the slopes ask for, from the signs there to the next one; the same from the corner across; then single
// causes turned to their other end; and where a slope at the best corner points into the box, a bounded local search.
// Each of these is local: where a figure has several humps, a lower one may be found.
//
// Source: vertex search by signs, Bandler, Liu & Chen, IEEE Trans. MTT-23(8), 1975 (secondary).
#pragma once

#include <optional>
#include <vector>

#include "assessment/wide_box.hpp"

namespace bandwright {

struct Extremes {
  Place low, high;
  std::optional<Place> failed;  ///< a corner on the way that has no value: there are no extremes
};

/// `nominal`: the nominal unit at every corner of supply and ambient, active at all of them. `polish`: false stops at
/// the corners of the box.
Extremes extremes(const UnitBox& box, Figure figure, const std::vector<Place>& nominal, bool polish);

}  // namespace bandwright
