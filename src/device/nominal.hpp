// Nominal values of data-sheet figures.
//
// The nominal value is typ, of any provenance; else sqrt(min max); else a factor on the one limit that is published.
// Entries of one figure at the same conditions are one point; where two state the same kind, the better mark stays:
// two or more sheets, one sheet, derived here, from memory.
#pragma once

#include <bandwright/catalogue.hpp>
#include <string>
#include <vector>

namespace bandwright {

/// VCE of a figure that does not state it.
inline constexpr double kUnstatedVoltage = 5.0;  // V

struct MarkedValue {
  double value = kNotComputed;
  Provenance provenance = Provenance::assumed;
  bool stated() const { return value == value; }
};

/// One figure at one set of conditions.
struct FigurePoint {
  MarkedValue min, typ, max;
  double collector_current = kNotComputed;          ///< A
  double collector_emitter_voltage = kNotComputed;  ///< V
  double reverse_voltage = kNotComputed;            ///< V
};

/// The entries at 25 °C, in order of appearance, those at the same conditions made one.
std::vector<FigurePoint> points_of(const std::vector<SheetFigure>& entries);
FigurePoint point_of(const SheetFigure& entry);

/// Factors on a lone limit; NaN: a lone limit gives no nominal value.
struct LoneLimit {
  double on_min = kNotComputed;
  double on_max = kNotComputed;
};

struct Nominal {
  double value = kNotComputed;
  Provenance provenance = Provenance::assumed;
  bool by_factor = false;  ///< from a lone limit
  std::string rule;        ///< empty where printed; else "1.5 times the published minimum of 300 MHz"
  bool stated() const { return value == value; }
};

Nominal nominal(const FigurePoint& point, const LoneLimit& lone, Dimension dimension);

}  // namespace bandwright
