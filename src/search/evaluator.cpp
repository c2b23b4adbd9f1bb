#include "search/evaluator.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <cmath>

#include "analysis/operating_point.hpp"
#include "assessment/variance.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kKeptBiases = 1 << 15, kKeptPoints = 1 << 20;  // bound the memory of one space

double shortage(double value, double needed) { return value < needed ? (needed - value) / needed : 0; }
double excess(double value, double limit) { return limit > 0 && value > limit ? value / limit - 1 : 0; }

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

CauseWidths cause_widths(const Spec& spec, const DesignSpace& space, const GridPoint& point, double collector_current) {
  CauseWidths widths{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.has(i))
      widths[i] = assessed_half_width(spec, static_cast<Cause>(i), half_width(tolerance_at_work(space.at(i, point))));
  }
  widths[index(Cause::current_gain)] =
      assessed_half_width(spec, Cause::current_gain, gain_half_width(space.device->parameters, collector_current));
  return widths;
}

namespace {

/// The population of a space before any part is chosen.
Population units_of(const Spec& spec, const DesignSpace& space) {
  Analysis anywhere;
  anywhere.point.collector_current = anywhere.point.gain_at_zero_vce = 1;
  anywhere.point.junction_temperature = spec.ambient.nominal;
  return population_of(spec, space.device->parameters, {}, anywhere);
}

}  // namespace

Evaluator::Evaluator(const Spec& spec, const DesignSpace& space, RankBy by)
    : spec_(spec),
      space_(space),
      by_(by),
      definition_(gain_definition(spec)),
      around_(surroundings(spec)),
      units_(units_of(spec, space)),
      loads_(spec, space, units_) {
  fixed_widths_ = relative_widths(units_, spec.ambient.nominal);
  for (const OperatingCondition& c : units_.conditions) {
    warmest_ = std::max(warmest_, std::fabs(c.ambient - kReferenceTemperature));
  }
}

Evaluator::Packed Evaluator::pack(const GridPoint& p) {
  Packed packed{0, 0};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    std::uint64_t& half = i < kResistorRoles ? packed.resistors : packed.capacitors;
    half = half << 12 | static_cast<std::uint64_t>(p[i] + 1);
  }
  return packed;
}

Stage Evaluator::stage_at(const GridPoint& point) {
  Stage stage{working_values(space_, point), &space_.device->parameters, around_};
  if (!loads_.has_bias_loss()) return stage;
  const OperatingPoint& nominal = prepared(point, stage).bias.point;
  if (nominal.state != BiasState::active) return stage;
  const PartValues factors = loads_.bias_factors(point, nominal);
  for (std::size_t i = 0; i < kRoleCount; ++i) stage.parts[i] *= factors[i];
  return stage;
}

const Evaluator::Prepared& Evaluator::prepared(const GridPoint& point, const Stage& stage) {
  if (prepared_.size() >= kKeptBiases) prepared_.clear();
  const auto [place, is_new] = prepared_.try_emplace(pack(point).resistors);
  if (is_new) place->second = {nominal_bias(stage, circuit_of<double>(stage)), loads_.resistors_are_clear(point)};
  return place->second;
}

Analysis Evaluator::analysis(const GridPoint& point) {
  ++evaluations_;
  const Stage stage = stage_at(point);
  Analysis a = analyse_response(stage, circuit_of<double>(stage), prepared(point, stage).bias, definition_);
  a.figures[index(Figure::cost)] = unit_cost(space_, point);
  return a;
}

Evaluator::Known& Evaluator::known(const GridPoint& point) {
  if (known_.size() >= kKeptPoints) known_.clear();
  return known_[pack(point)];
}

double Evaluator::error(const GridPoint& point) {
  Known& k = known(point);
  if (!std::isnan(k.error)) return k.error;
  if (const double lacking = loads_.shortage(point); lacking > 0) return k.error = kWorstError * (1 + lacking);
  const Stage stage = stage_at(point);
  const auto& [bias, clear] = prepared(point, stage);
  if (bias.point.state == BiasState::active) {
    if (const double over = loads_.excess(point, bias.point, clear); over > 0)
      return k.error = kWorstError * (1 + over);
  }
  const Analysis a = analysis(point);
  k.supply_current = a.figures[index(Figure::supply_current)];
  return k.error = search_error(spec_, a, stage.parts, space_.device->parameters);
}

const std::vector<NominalBias>& Evaluator::at_conditions(const GridPoint& point, const Stage& stage,
                                                         const OperatingPoint& nominal) {
  if (at_conditions_.size() >= kKeptBiases) at_conditions_.clear();
  const auto [place, is_new] = at_conditions_.try_emplace(pack(point).resistors);
  if (!is_new) return place->second;
  const double rise = nominal.junction_temperature - around_.ambient;
  Circuit<double> circuit = circuit_of<double>(stage);
  for (const OperatingCondition& c : units_.conditions) {
    circuit.supply = c.supply;
    place->second.push_back(bias_at(stage, circuit, c.ambient + rise, ln(nominal.collector_current)));
  }
  return place->second;
}

std::vector<PartValues> Evaluator::values_at_conditions(const GridPoint& point, const Stage& stage) const {
  Population p;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    p.printed[i] = space_.at(i, point).value;
    if (loads_.has_bias_loss()) p.bias_factor[i] = stage.parts[i] / space_.at(i, point).working_value;
    p.cold_loss[i] = space_.at(i, point).family->cold_loss;
  }
  std::vector<PartValues> list;
  for (const OperatingCondition& c : units_.conditions) list.push_back(values_at_work(p, c.ambient));
  return list;
}

FirstOrderSpread Evaluator::spread(const GridPoint& point, const OperatingPoint& nominal) const {
  FirstOrderSpread s;
  s.widths = fixed_widths_;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    const OfferedValue& part = space_.at(i, point);
    const double t = half_width(spec_.assess.causes[i].value_or(tolerance_at_work(part)));
    const double drift = warmest_ * spec_.assess.temperature_coefficient.value_or(part.family->temperature_coefficient);
    s.widths[i] = square_root(t * t + drift * drift);
  }
  if (spec_.assess.causes[index(Cause::current_gain)]) {
    s.gain_centre = units_.spread[index(Cause::current_gain)].centre;
  } else {
    const auto limits = gain_limits(space_.device->parameters, nominal.collector_current);
    s.widths[index(Cause::current_gain)] = ln(limits[1] / limits[0]) / 2;
    s.gain_centre = ln(limits[0] * limits[1] / (nominal.gain_at_zero_vce * nominal.gain_at_zero_vce)) / 2;
  }
  return s;
}

Evaluator::Outlook Evaluator::outlook(const GridPoint& point) {
  Outlook o;
  o.analysis = analysis(point);
  if (o.analysis.point.state != BiasState::active) return o;
  const Stage stage = stage_at(point);
  o.sensitivity = bandwright::sensitivity(stage, o.analysis, definition_, ResponseModel::exact, all_causes());
  const ConditionShifts shifts =
      condition_shifts(stage, o.analysis, units_.conditions, at_conditions(point, stage, o.analysis.point),
                       values_at_conditions(point, stage), definition_);
  o.distances = limit_distances(spec_, o.analysis, o.sensitivity, spread(point, o.analysis.point), shifts);
  return o;
}

double Evaluator::capability_near(const GridPoint& point, const Outlook& from) {
  const Analysis a = analysis(point);
  if (a.point.state != BiasState::active) return -kWorstError;
  return estimated_capability(moved(from.distances, from.analysis.figures, a.figures));
}

/// Tolerance sensitivity and, where the order asks for it, the estimated capability.
void Evaluator::look_ahead(const GridPoint& point, Known& k) {
  const bool by_capability = wants_capability(by_);
  Outlook o;
  if (by_capability) {
    o = outlook(point);
  } else {
    o.analysis = analysis(point);
    o.sensitivity = bandwright::sensitivity(stage_at(point), o.analysis, definition_);
  }
  k.sensitivity = kWorstError;
  k.capability = -kWorstError;
  if (o.analysis.point.state != BiasState::active) return;
  const CauseWidths widths = cause_widths(spec_, space_, point, o.analysis.point.collector_current);
  const double s = tolerance_sensitivity(spec_, o.sensitivity, widths);
  if (!std::isnan(s)) k.sensitivity = s;
  if (by_capability) k.capability = estimated_capability(o.distances);
}

RankKey Evaluator::key(const GridPoint& point) {
  RankKey k;
  k.error = error(point);
  Known& what = known(point);
  if (std::isnan(what.sensitivity)) look_ahead(point, what);
  k.tolerance_sensitivity = what.sensitivity;
  k.capability = what.capability;
  k.supply_current = what.supply_current;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    const OfferedValue& v = space_.at(i, point);
    k.values[i] = v.value;
    k.parts += v.connection == Connection::single ? 1 : 2;
    k.series_sum += v.series ? v.series->number : 0;
  }
  if (space_.has_stock) k.to_buy = to_buy(space_, point);
  k.cost = unit_cost(space_, point);
  k.distinct_values = distinct_values(k.values);
  return k;
}

}  // namespace bandwright
