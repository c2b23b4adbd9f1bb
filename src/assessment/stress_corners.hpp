// What every part stands in one unit, and the box of units over which that is looked for its extremes.
#pragma once

#include <bandwright/spec.hpp>
#include <string>
#include <vector>

#include "assessment/unit_box.hpp"

namespace bandwright {

/// Places in a list of stresses.
enum StressSlot : std::size_t {
  kVoltsSlot = 0,                        ///< of each role
  kWattsSlot = kVoltsSlot + kRoleCount,  ///< of each resistor
  kCollectorEmitterSlot = kWattsSlot + kResistorRoles,
  kCurrentSlot,
  kDissipationSlot,
  kJunctionSlot,
  kStressSlots
};
using Stresses = std::array<double, kStressSlots>;

/// What a unit stands; the two ends differ where it has no operating point.
struct StressEnds {
  Stresses low{}, high{};
};

/// Without an operating point: no node leaves the rails, and what an emitter resistor carries came through RC and R1.
/// `supply`: magnitude. The junction temperature is left 0.
StressEnds between_rails(const Spec& spec, const PartValues& parts, double supply);

/// The causes that move the operating point, then supply and ambient temperature, as far as they vary: coordinates from
/// 0, the low end, to 1.
class StressBox {
public:
  using Coordinates = std::vector<double>;

  StressBox(const Spec& spec, const Population& population);

  std::size_t size() const { return causes_.size() + sides_.size(); }
  StressEnds solve(const Coordinates& x);

  /// "hFE max, R3 min, 60 °C, 12.6 V": the causes without whose turn the stress would be visibly less, largest first.
  /// `slot`: which stress, `sign`: +1 its largest value, -1 its smallest.
  std::string name(const Coordinates& x, std::size_t slot, int sign);

private:
  struct Side {
    double OperatingCondition::*member;
    double low, high;
  };
  OperatingCondition condition(const Coordinates& x) const;
  double most_turned(Coordinates x, std::size_t k, std::size_t slot, int sign);

  const Spec& spec_;
  const Population& population_;
  UnitBox box_;
  std::vector<std::size_t> causes_;
  std::vector<Side> sides_;
  double guess_ = kNotComputed;  ///< ln IC of the last unit
};

/// The stress in question of a solved unit.
inline double stress_at(const StressEnds& s, std::size_t slot, int sign) {
  return sign < 0 ? s.low[slot] : s.high[slot];
}

}  // namespace bandwright
