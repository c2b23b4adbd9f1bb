// Stress: what every part has to stand at the worst corner of all units, supply and ambient.
//
// Every corner of the box is solved: both ends of each cause that acts on the operating point (resistors, hFE, VA,
// ICBO, VBE), at every corner of supply and ambient; the junction's rise is held, as in the worst case of figures.
// Where the best corner is not yet the extreme (a transistor dissipates most at half of the supply) a bounded local
// search goes on inside. A corner without an operating point counts with all that the rails can put across each part.
#pragma once

#include <array>
#include <bandwright/population.hpp>
#include <bandwright/spec.hpp>
#include <string>

namespace bandwright {

/// Extremes of a stress over all corners; NaN: the part is absent.
struct StressRange {
  double min = kNotComputed;
  double max = kNotComputed;
  std::string at_min;  ///< "hFE max, R3 min, 60 °C, 12.6 V"
  std::string at_max;

  double largest() const { return -min > max ? -min : max; }  ///< magnitude
  const std::string& at_largest() const { return -min > max ? at_min : at_max; }
  bool changes_sign() const { return min < 0 && max > 0; }
};

struct WorstStress {
  std::array<StressRange, kRoleCount> volts;  ///< first node minus second, with its real sign (nodes: purchase.hpp)
  std::array<StressRange, kRoleCount> watts;  ///< resistors
  StressRange collector_emitter_voltage;      ///< V, magnitude
  StressRange collector_current;              ///< A, magnitude
  StressRange dissipation;                    ///< W
  StressRange junction_temperature;           ///< K: ambient + theta_JA x dissipation of the same corner
};

/// The extremes of a design's stresses: not less than at any corner. Some hundred to ten thousand operating points.
WorstStress worst_stress(const Spec& spec, const Population& population);

/// The same where the nominal unit is not active: nothing better is known than that no node leaves the rails.
WorstStress rail_to_rail(const Spec& spec, const PartValues& values);

}  // namespace bandwright
