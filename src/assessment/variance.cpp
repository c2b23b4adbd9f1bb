#include "assessment/variance.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/unit.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

CauseWidths relative_widths(const Population& p, double ambient) {
  CauseWidths widths{};
  for (const CauseInfo& row : causes()) {
    const CauseSpread& s = p.spread[index(row.cause)];
    double& w = widths[index(row.cause)];
    w = row.scale == CauseScale::share ? half_width({s.below, s.above}) : (s.below + s.above) / 2;
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

void add_root_sum_squares(const Population& p, const std::vector<Figure>& figures,
                          std::array<WorstCase, kFigureCount>& list) {
  for (const OperatingCondition& c : p.conditions) {
    const UnitPoint unit{nominal_stage(p, c), {}, c.ambient + p.junction_rise};
    const Analysis a = analyse_unit(unit, p.definition);
    const Sensitivity s = sensitivity(unit.stage, a, p.definition, ResponseModel::exact, all_causes());
    const CauseWidths widths = relative_widths(p, c.ambient);
    for (Figure f : figures) {
      const double value = a.figures[index(f)], spread = root_sum_square(s[index(f)], widths);
      WorstCase& w = list[index(f)];
      const double one = value * e_to(spread), other = value * e_to(-spread);
      w.rss_min = std::fmin(w.rss_min, std::fmin(one, other));
      w.rss_max = std::fmax(w.rss_max, std::fmax(one, other));
    }
  }
}

}  // namespace bandwright
