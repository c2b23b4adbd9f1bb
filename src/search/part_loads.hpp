// Whether every part of a grid point has a rating that holds at its worst corner, and whether the stock has enough.
#pragma once

#include <bandwright/assessment.hpp>

#include "assessment/load_bounds.hpp"
#include "search/design_space.hpp"

namespace bandwright {

class PartLoads {
public:
  /// `units`: the population of the space without its parts.
  PartLoads(const Spec& spec, const DesignSpace& space, Population units);

  /// 0 where every part and the transistor hold at every corner, each polarised part keeps its polarity and the stock
  /// has enough; else how far beyond. `nominal`: the operating point, active.
  double excess(const GridPoint& point, const OperatingPoint& nominal, bool resistors_clear);

  /// True where resistors and transistor cannot be overloaded, whatever the operating point is.
  bool resistors_are_clear(const GridPoint& point) const;

  /// What DC voltage leaves of each class 2 ceramic; 1 for all other parts.
  PartValues bias_factors(const GridPoint& point, const OperatingPoint& nominal);
  bool has_bias_loss() const { return has_bias_loss_; }

  double shortage(const GridPoint& point) const;  ///< pieces that the stock lacks

private:
  const LoadBounds& bounds(const GridPoint& point, const OperatingPoint& nominal);
  bool capacitors_are_clear(const GridPoint& point) const;
  double transistor_excess(const LoadBounds& b) const;
  bool holds_rating(const OfferedValue& part, double volts, double watts) const;
  double part_excess(const OfferedValue& part, std::size_t role, const LoadBounds& b) const;
  ResistorEnds resistor_ends(const GridPoint& point) const;

  const Spec& spec_;
  const DesignSpace& space_;
  Population units_;
  std::array<std::vector<bool>, kRoleCount> always_holds_;  ///< whatever the operating point is
  bool has_bias_loss_ = false;
  bool has_limited_stock_ = false;
  std::array<std::int16_t, kResistorRoles> known_{};  ///< resistors that bounds_ belongs to
  bool is_known_ = false;
  LoadBounds bounds_;
};

}  // namespace bandwright
