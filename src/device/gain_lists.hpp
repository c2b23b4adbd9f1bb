// hFE over collector current: from published points to curves of beta0 in ln IC.
//
// Every value is first divided by 1 + VCE/VA of its own point: beta0. The shape goes through the typ points where there
// are two or more, else through the min points, constant beyond its ends; min, typ and max are the shape moved to their
// anchors. The anchor of min is the min point at the current of the max; without a max, the min point nearest 1 mA.
// max is constant where the shape comes from min points; where there is none it is 3 times min. Without a typ the
// nominal curve is the geometric mean of the two.
#pragma once

#include <bandwright/device.hpp>
#include <utility>
#include <vector>

#include "device/nominal.hpp"

namespace bandwright {

struct GainEntry {
  double collector_current = 0;          ///< A
  double collector_emitter_voltage = 0;  ///< V
  MarkedValue value;                     ///< hFE as printed
};

/// The published points of one kind each, by rising current, one a current: the one with VCE nearest 5 V.
struct GainLists {
  std::vector<GainEntry> min, typ, max;
};
GainLists gain_lists(const std::vector<SheetFigure>& entries);

/// The monotone cubic through (ln IC, ln beta0) of rising ln IC: slopes as the weighted harmonic mean of the secants
/// on both sides (Fritsch & Butland, SIAM J. Sci. Stat. Comput. 5(2), 1984), 0 at the ends. At most kMaxPoints.
GainCurve monotone_cubic(const std::vector<std::pair<double, double>>& points);

struct GainCurves {
  GainCurve nominal, min, max;
};
/// `lists.min` must not be empty.
GainCurves gain_curves(const GainLists& lists, double inverse_early_voltage);

/// How many points the shape goes through.
std::size_t shape_points(const GainLists& lists);

}  // namespace bandwright
