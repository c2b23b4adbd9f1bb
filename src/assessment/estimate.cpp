#include "assessment/estimate.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <cmath>

#include "analysis/bias_reuse.hpp"
#include "assessment/variance.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kNormalReach = 0.98664;   // three sigma of a normal spread truncated at the tolerance, over it
constexpr double kUniformReach = 1.73205;  // the same of a uniform one: sqrt(3)
constexpr double kLeastReach = 1e-6;

double headroom_of(const NominalBias& bias) {
  const OperatingPoint& p = bias.point;
  return p.collector_emitter_voltage - least_active_voltage(*bias.device.sheet, p.base_emitter_voltage);
}

}  // namespace

ConditionShifts condition_shifts(const Stage& stage, const Analysis& nominal,
                                 const std::vector<OperatingCondition>& conditions,
                                 const std::vector<NominalBias>& biases, const std::vector<PartValues>& values,
                                 const GainDefinition& definition) {
  ConditionShifts s;
  s.headroom = s.leakage = 1e9;
  Stage moved = stage;
  FigureValues reference = nominal.figures;
  for (std::size_t c = 0; c < conditions.size(); ++c) {
    moved.parts = values[c];
    moved.around.supply = conditions[c].supply;
    moved.around.ambient = conditions[c].ambient;
    s.headroom = std::min(s.headroom, headroom_of(biases[c]));
    if (biases[c].device.cutoff_current > 0) {
      const double ratio = biases[c].point.collector_current / (kLeakageRatio * biases[c].device.cutoff_current);
      s.leakage = std::min(s.leakage, ln(ratio));
    }
    const Analysis a =
        analyse_response(moved, circuit_of<double>(moved), biases[c], definition, ResponseModel::pole_model);
    if (c == 0) reference = a.figures;
    for (std::size_t i = 0; i < kFigureCount; ++i) {
      const double ratio = a.figures[i] / reference[i];
      if (!(ratio > 0)) continue;
      const double shift = ln(ratio);
      s.up[i] = std::max(s.up[i], shift);
      s.down[i] = std::min(s.down[i], shift);
    }
  }
  return s;
}

std::vector<LimitDistance> limit_distances(const Spec& spec, const Analysis& nominal, const Sensitivity& sensitivity,
                                           const FirstOrderSpread& spread, const ConditionShifts& shifts) {
  const double k = spec.assess.uniform ? kUniformReach : kNormalReach;
  std::vector<LimitDistance> list;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (!r || !varies(f.figure)) continue;
    const std::size_t i = index(f.figure);
    const double x = nominal.figures[i];
    const bool linear = f.dimension == Dimension::voltage;
    const double reach = k * root_sum_square(sensitivity[i], spread.widths);
    const double middle = sensitivity[i][index(Cause::current_gain)] * spread.gain_centre;
    for (double toward : {1.0, -1.0}) {
      const double limit = toward > 0 ? r->upper : r->lower;
      if (std::isnan(limit)) continue;
      const double off = middle + (toward > 0 ? shifts.up[i] : shifts.down[i]);
      const double at = linear ? x * e_to(off) : ln(x) + off;
      LimitDistance d{f.figure, toward, toward * ((linear ? limit : ln(limit)) - at), reach, 1};
      if (linear) d.per_ln = x, d.reach *= x;
      d.reach = std::max(d.reach, kLeastReach);
      list.push_back(d);
    }
  }
  const std::size_t v_ce = index(Figure::collector_emitter_voltage), i_c = index(Figure::collector_current);
  const double volts = nominal.figures[v_ce];
  list.push_back({Figure::collector_emitter_voltage, -1, shifts.headroom,
                  std::max(k * volts * root_sum_square(sensitivity[v_ce], spread.widths), kLeastReach), volts});
  const double leak = spread.widths[index(Cause::cutoff_current)];
  const double current = root_sum_square(sensitivity[i_c], spread.widths);
  list.push_back({Figure::collector_current, -1, shifts.leakage,
                  std::max(k * square_root(leak * leak + current * current), kLeastReach), 1});
  return list;
}

std::vector<LimitDistance> limit_distances(const Spec& spec, const Population& p, const Analysis& nominal,
                                           const Sensitivity& sensitivity) {
  std::vector<NominalBias> biases;
  std::vector<PartValues> values;
  double warmest = p.conditions.front().ambient;
  for (const OperatingCondition& c : p.conditions) {
    const Stage stage = nominal_stage(p, c);
    biases.push_back(bias_at(stage, circuit_of<double>(stage), c.ambient + p.junction_rise));
    values.push_back(stage.parts);
    const auto off = [](double ambient) { return std::fabs(ambient - kReferenceTemperature); };
    if (off(c.ambient) > off(warmest)) warmest = c.ambient;
  }
  const FirstOrderSpread spread{relative_widths(p, warmest), p.spread[index(Cause::current_gain)].centre};
  const ConditionShifts shifts =
      condition_shifts(nominal_stage(p, p.conditions.front()), nominal, p.conditions, biases, values, p.definition);
  return limit_distances(spec, nominal, sensitivity, spread, shifts);
}

std::vector<LimitDistance> moved(std::vector<LimitDistance> distances, const FigureValues& from,
                                 const FigureValues& to) {
  for (LimitDistance& d : distances) {
    d.distance -= d.toward * d.per_ln * ln(to[index(d.figure)] / from[index(d.figure)]);
  }
  return distances;
}

double estimated_capability(const std::vector<LimitDistance>& distances) {
  double least = kHighestCapability;
  for (const LimitDistance& d : distances) {
    if (std::isnan(d.distance)) return -kHighestCapability;
    least = std::min(least, d.capability());
  }
  return least;
}

}  // namespace bandwright
