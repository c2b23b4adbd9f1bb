// The box of all units of a design: every cause between its ends, at a supply and an ambient temperature. A point of it
// is given by shares z between 0 (low end) and 1 (high end).
#pragma once

#include <bandwright/population.hpp>

#include "analysis/unit.hpp"

namespace bandwright {

using Shares = std::array<double, kCauseCount>;

/// A unit of the box.
struct BoxPoint {
  Shares z{};
  OperatingCondition at;
};

class UnitBox {
public:
  explicit UnitBox(const Population& population);

  const Population& population() const { return population_; }
  const std::vector<std::size_t>& varying() const { return varying_; }  ///< causes whose ends differ, at some condition

  UnitPoint unit(const BoxPoint& point) const;
  Analysis analyse(const BoxPoint& point) const;

  /// d ln|y| of every figure by each share in `varying`'s order, then by supply (1/V), then by ambient (1/K).
  std::vector<FigureValues> slopes(const BoxPoint& point, const Analysis& analysis, bool with_condition) const;

  /// The nominal unit's shares at a condition.
  BoxPoint nominal(const OperatingCondition& at) const;

private:
  struct Ends {
    double low, high, low_per_kelvin, high_per_kelvin;
  };
  Ends ends(std::size_t cause, double ambient) const;

  const Population& population_;
  std::vector<std::size_t> varying_;
};

/// The factor (VBE: the volts to add) that a deviation makes of a cause.
double factor_at(const CauseInfo& cause, double deviation);

}  // namespace bandwright
