#include "assessment/variance.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/unit.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

/// Root sum of squares of what the two parts do to their common value.
double pair_width(const PairSpread& pair) {
  const double a = pair.weight * half_width(pair.tolerance[0]), b = (1 - pair.weight) * half_width(pair.tolerance[1]);
  return square_root(a * a + b * b);
}

}  // namespace

CauseWidths relative_widths(const Population& p, double ambient) {
  CauseWidths widths{};
  for (const CauseInfo& row : causes()) {
    const CauseSpread& s = p.spread[index(row.cause)];
    double& w = widths[index(row.cause)];
    w = row.scale == CauseScale::share ? half_width({s.below, s.above}) : (s.below + s.above) / 2;
    if (row.kind == CauseKind::part && p.pairs[index(row.cause)].is_pair) w = pair_width(p.pairs[index(row.cause)]);
    if (row.scale == CauseScale::volts) w /= p.device.base_emitter_voltage;
    if (row.kind != CauseKind::part) continue;
    const double drift = p.temperature_coefficient[index(row.cause)] * std::fabs(ambient - kReferenceTemperature);
    w = square_root(w * w + drift * drift);
  }
  return widths;
}

Sensitivity variance_shares(const Sensitivity& s, const CauseWidths& widths) {
  Sensitivity shares{};
  for (std::size_t f = 0; f < kFigureCount; ++f) {
    double sum = 0;
    for (std::size_t i = 0; i < kCauseCount; ++i) {
      const double part = s[f][i] * widths[i];
      shares[f][i] = part * part;
      sum += shares[f][i];
    }
    for (double& share : shares[f]) share = sum > 0 ? share / sum : sum;
  }
  return shares;
}

double root_sum_square(const std::array<double, kCauseCount>& sensitivity, const CauseWidths& widths) {
  double sum = 0;
  for (std::size_t i = 0; i < kCauseCount; ++i) {
    const double part = sensitivity[i] * widths[i];
    sum += part * part;
  }
  return square_root(sum);
}

namespace {

/// What a cause does to a figure at the end that moves it upwards (`toward` +1) or downwards, as a relative change.
double excursion(const CauseInfo& row, const CauseSpread& s, double slope, double toward, double base_emitter_voltage) {
  const double d = slope * toward > 0 ? s.high() : s.low();
  if (row.scale == CauseScale::volts) return slope * d / base_emitter_voltage;
  return slope * (row.scale == CauseScale::share ? ln(1 + d) : d);
}

/// Root sum of squares of the causes' effects at their ends on one side, drift with temperature beside them.
double side_spread(const Population& p, const std::array<double, kCauseCount>& slopes, double ambient, double toward) {
  double sum = 0;
  for (const CauseInfo& row : causes()) {
    const std::size_t i = index(row.cause);
    const double one = excursion(row, p.spread[i], slopes[i], toward, p.device.base_emitter_voltage);
    sum += one * one;
    if (row.kind != CauseKind::part) continue;
    const double drift = slopes[i] * p.temperature_coefficient[i] * (ambient - kReferenceTemperature);
    sum += drift * drift;
  }
  return square_root(sum);
}

/// Voltages by difference, all else by ratio.
double moved_by(double value, Dimension dimension, double relative) {
  return dimension == Dimension::voltage ? value * (1 + relative) : value * e_to(relative);
}

}  // namespace

void add_root_sum_squares(const Population& p, const std::vector<Figure>& figures,
                          std::array<WorstCase, kFigureCount>& list) {
  for (const OperatingCondition& c : p.conditions) {
    const UnitPoint unit{nominal_stage(p, c), {}, c.ambient + p.junction_rise};
    const Analysis a = analyse_unit(unit, p.definition);
    const Sensitivity s = sensitivity(unit.stage, a, p.definition, ResponseModel::exact, all_causes());
    for (Figure f : figures) {
      const double value = a.figures[index(f)];
      WorstCase& w = list[index(f)];
      if (std::isnan(w.min)) continue;  // where there is no worst case, this would only look like one
      const Dimension dimension = info(f).dimension;
      w.rss_min = std::fmin(w.rss_min, moved_by(value, dimension, -side_spread(p, s[index(f)], c.ambient, -1)));
      w.rss_max = std::fmax(w.rss_max, moved_by(value, dimension, side_spread(p, s[index(f)], c.ambient, +1)));
    }
  }
}

}  // namespace bandwright
