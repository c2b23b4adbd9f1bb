// What the parts of one unit of a design stand, in long double and by Kirchhoff's laws alone: no derivative, nothing of
// the library's solver, its box of units or its stress equations.
#pragma once

#include <bandwright/population.hpp>
#include <string>
#include <vector>

#include "bias.hpp"

namespace oracle {

struct Loads {
  bool saturated = false;
  Real i_c = 0, v_ce = 0, dissipation = 0, junction = 0;
  std::array<Real, bandwright::kRoleCount> volts{};  ///< first node minus second, with the real sign
  std::array<Real, bandwright::kRoleCount> watts{};  ///< of resistors
};

/// A unit: each coordinate from 0, the low end of what varies, to 1.
using Coordinates = std::vector<double>;

/// The units of a design at all its conditions. The coordinates are the causes that act on the bias, then supply and
/// ambient temperature where they vary.
class UnitLoads {
public:
  UnitLoads(const bandwright::Population& population, double source_dc, double load_dc);

  std::size_t size() const { return causes_.size() + sides_.size(); }
  Loads at(const Coordinates& x);

  /// The same from nested bisection (bias.hpp), slow.
  Loads at_by_bisection(const Coordinates& x) const;

private:
  struct Unit {
    BiasNetwork network;
    bandwright::BipolarParameters device;
    Real ambient = 0;
  };
  struct Side {
    bool is_supply;
    double low, high;
  };
  bandwright::OperatingCondition condition(const Coordinates& x) const;
  double factor(std::size_t cause, double share, double ambient) const;
  void set_unit(const Coordinates& x, Unit& unit) const;
  Loads loads(const Unit& unit, const Bias& bias) const;

  const bandwright::Population& population_;
  double source_dc_, load_dc_;
  std::vector<std::size_t> causes_;
  std::vector<Side> sides_;
  Unit unit_;
  Real guess_ = 0;  ///< ln IC of the last unit; 0: none
};

}  // namespace oracle
