#include "assessment/unit_box.hpp"

#include <algorithm>
#include <cmath>

#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

double factor_at(const CauseInfo& cause, double deviation) {
  if (cause.scale == CauseScale::logarithm) return e_to(deviation);
  return cause.scale == CauseScale::share ? 1 + deviation : deviation;
}

UnitBox::UnitBox(const Population& population) : population_(population) {
  for (std::size_t i = 0; i < kCauseCount; ++i) {
    const bool is_part = i < kRoleCount;
    const bool is_there = !is_part || population.printed[i] > 0;
    const bool drifts = is_part && population.temperature_coefficient[i] > 0;
    if (is_there && (population.spread[i].varies() || drifts)) varying_.push_back(i);
  }
}

/// A part's tolerance and its drift from 25 °C add up at both ends.
UnitBox::Ends UnitBox::ends(std::size_t cause, double ambient) const {
  const CauseSpread& s = population_.spread[cause];
  const CauseInfo& row = causes()[cause];
  Ends e{factor_at(row, s.low()), factor_at(row, s.high()), 0, 0};
  if (cause >= kRoleCount) return e;
  const double warmth = ambient - kReferenceTemperature;
  const double c = population_.temperature_coefficient[cause], drift = c * std::fabs(warmth);
  const double sign = warmth < 0 ? -c : c;
  const double cold = population_.cold_loss[cause];
  const double gain_by_warming = ambient < kColdBegins ? cold / (1 - cold * (kColdBegins - ambient)) : 0;
  e.low_per_kelvin = -e.low * sign;
  e.high_per_kelvin = e.high * sign;
  e.low *= 1 - drift;
  e.high *= 1 + drift;
  e.low_per_kelvin += e.low * gain_by_warming;
  e.high_per_kelvin += e.high * gain_by_warming;
  return e;
}

UnitPoint UnitBox::unit(const BoxPoint& p) const {
  UnitPoint u{nominal_stage(population_, p.at), {}, p.at.ambient + population_.junction_rise};
  for (std::size_t i : varying_) {
    const Ends e = ends(i, p.at.ambient);
    u.factors.of[i] = e.low + p.z[i] * (e.high - e.low);
  }
  return u;
}

Analysis UnitBox::analyse(const BoxPoint& p) const { return analyse_unit(unit(p), population_.definition); }

std::vector<FigureValues> UnitBox::slopes(const BoxPoint& p, const Analysis& a, bool with_condition) const {
  std::vector<Direction> directions;
  Direction warmer;
  warmer.junction = 1;
  for (std::size_t i : varying_) {
    const Ends e = ends(i, p.at.ambient);
    Direction d;
    d.factors[i] = e.high - e.low;
    directions.push_back(d);
    warmer.factors[i] = e.low_per_kelvin + p.z[i] * (e.high_per_kelvin - e.low_per_kelvin);
  }
  if (with_condition) {
    Direction more_supply;
    more_supply.supply = 1;
    directions.push_back(more_supply);
    directions.push_back(warmer);
  }
  return bandwright::slopes(unit(p), a, population_.definition, directions);
}

BoxPoint UnitBox::nominal(const OperatingCondition& at) const {
  BoxPoint p;
  p.at = at;
  const UnitFactors<double> unchanged;
  for (std::size_t i : varying_) {
    const Ends e = ends(i, at.ambient);
    p.z[i] = e.high > e.low ? (unchanged.of[i] - e.low) / (e.high - e.low) : 0.5;
  }
  return p;
}

}  // namespace bandwright
