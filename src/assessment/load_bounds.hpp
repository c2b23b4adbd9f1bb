// Bounds on what every part has to stand, from four operating points: never under the exact worst corners, at most a
// few per cent above them. For searches; what is reported is worst_stress.
#pragma once

#include <bandwright/population.hpp>
#include <bandwright/spec.hpp>

namespace bandwright {

/// The ends of the resistors over all units and ambients, ohm; 0: absent, or not known.
struct ResistorEnds {
  std::array<double, kResistorRoles> low{}, high{};
};

struct LoadBounds {
  std::array<double, kRoleCount> low{}, high{};  ///< V, first node minus second, with the real sign
  std::array<double, kResistorRoles> watts{};
  double collector_emitter_voltage = 0;
  double collector_current = 0;
  double dissipation = 0;
  double junction_temperature = 0;  ///< K

  double largest(std::size_t role) const { return -low[role] > high[role] ? -low[role] : high[role]; }
  double watts_in(std::size_t role) const { return role < kResistorRoles ? watts[role] : 0; }
};

/// Without any operating point: no node leaves the rails.
LoadBounds rail_bounds(const Spec& spec, const ResistorEnds& ends, double thermal_resistance);

/// From the largest and the smallest collector current at both ends of the supply. It is largest with a large R2, hFE,
/// ICBO and ambient and a small R1, RC, RE, VA and VBE, smallest the other way round; every voltage is bounded by the
/// currents and the ends of its resistors. `units`: of its causes those of the transistor count, and the rise;
/// `nominal`: active.
LoadBounds load_bounds(const Spec& spec, const Population& units, const ResistorEnds& ends,
                       const OperatingPoint& nominal);

}  // namespace bandwright
