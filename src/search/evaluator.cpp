#include "search/evaluator.hpp"

#include <algorithm>
#include <cmath>

#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>

#include "analysis/operating_point.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kKeptBiases = 1 << 14;  // bounds the memory of a refinement

double shortage(double value, double needed) { return value < needed ? (needed - value) / needed : 0; }
double excess(double value, double limit) { return limit > 0 && value > limit ? value / limit - 1 : 0; }

std::uint64_t resistor_key(const GridPoint& p) {
  std::uint64_t key = 0;
  for (std::size_t i = 0; i < kResistorRoles; ++i) key = key << 12 | static_cast<std::uint64_t>(p[i] + 1);
  return key;
}

}  // namespace

double violation(const Analysis& a, const PartValues& working, const BipolarParameters& device) {
  const OperatingPoint& p = a.point;
  const double drop = p.collector_current * working[index(Role::collector)];
  const double v_ce = p.collector_emitter_voltage;
  double v = shortage(v_ce, std::max(kLeastCollectorEmitter, least_active_voltage(device, p.base_emitter_voltage))) +
             shortage(drop, kLeastCollectorDrop) + excess(p.collector_current, device.current_limit) +
             excess(v_ce * p.collector_current, device.power_limit) +
             excess(p.junction_temperature, device.junction_limit);
  if (p.state != BiasState::active) v = std::max(v, 1e-3);
  return v;
}

double search_error(const Spec& spec, const Analysis& a, const PartValues& working, const BipolarParameters& device) {
  const double v = violation(a, working, device);
  return v > 0 ? kWorstError * (1 + v) : error(spec, a.figures);
}

Evaluator::Evaluator(const Spec& spec, const DesignSpace& space)
    : spec_(spec), space_(space), definition_(gain_definition(spec)), around_(surroundings(spec)) {}

Stage Evaluator::stage_at(const PartValues& working) const { return {working, &space_.device->parameters, around_}; }

const NominalBias& Evaluator::bias(const GridPoint& point, const Stage& stage, const Circuit<double>& circuit) {
  const std::uint64_t key = resistor_key(point);
  const auto known = solved_.find(key);
  if (known != solved_.end()) return known->second;
  if (solved_.size() >= kKeptBiases) solved_.clear();
  return solved_.emplace(key, nominal_bias(stage, circuit)).first->second;
}

Evaluator::Trial Evaluator::evaluate(const GridPoint& point) {
  Trial t;
  t.point = point;
  const Stage stage = stage_at(working_values(space_, point));
  const Circuit<double> circuit = circuit_of<double>(stage);
  t.analysis = analyse_response(stage, circuit, bias(point, stage, circuit), definition_);
  t.key.error = search_error(spec_, t.analysis, stage.parts, space_.device->parameters);
  t.key.tolerance_sensitivity = kNotComputed;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    const OfferedValue& v = space_.at(i, point);
    t.key.values[i] = v.value;
    t.key.series_sum += v.series ? v.series->number : 0;
  }
  t.key.distinct_values = distinct_values(t.key.values);
  return t;
}

void Evaluator::add_sensitivity(Trial& t) const {
  if (!std::isnan(t.key.tolerance_sensitivity) || t.analysis.point.state != BiasState::active) return;
  CauseWidths widths{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space_.has(i)) widths[i] = half_width(space_.at(i, t.point).tolerance);
  }
  const BipolarParameters& device = space_.device->parameters;
  widths[kRoleCount] = gain_half_width(device, t.analysis.point.collector_current);
  const Sensitivity s = sensitivity(stage_at(working_values(space_, t.point)), t.analysis, definition_);
  t.key.tolerance_sensitivity = tolerance_sensitivity(spec_, s, widths);
}

}  // namespace bandwright
