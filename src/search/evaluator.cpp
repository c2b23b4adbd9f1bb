#include "search/evaluator.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <cmath>

#include "analysis/operating_point.hpp"

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

CauseWidths cause_widths(const DesignSpace& space, const GridPoint& point, double collector_current) {
  CauseWidths widths{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.has(i)) widths[i] = half_width(space.at(i, point).tolerance);
  }
  widths[kRoleCount] = gain_half_width(space.device->parameters, collector_current);
  return widths;
}

Evaluator::Evaluator(const Spec& spec, const DesignSpace& space)
    : spec_(spec), space_(space), definition_(gain_definition(spec)), around_(surroundings(spec)) {}

Evaluator::Packed Evaluator::pack(const GridPoint& p) {
  Packed packed{0, 0};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    std::uint64_t& half = i < kResistorRoles ? packed.resistors : packed.capacitors;
    half = half << 12 | static_cast<std::uint64_t>(p[i] + 1);
  }
  return packed;
}

Stage Evaluator::stage_at(const GridPoint& point) const {
  return {working_values(space_, point), &space_.device->parameters, around_};
}

/// 0 where every part has a rating that holds.
double Evaluator::overload(const GridPoint& point, const Stress& s) const {
  double worst = 0;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    const Family& family = *space_.at(i, point).family;
    if (rating_row(family, s.volts[i], s.watts[i])) continue;
    const bool by_power = !family.power_ratings.empty();
    worst = std::max(worst, by_power ? s.watts[i] / family.power_ratings.back()
                                     : std::fabs(s.volts[i]) / family.voltage_ratings.back());
  }
  return worst;
}

const Evaluator::Prepared& Evaluator::prepared(const GridPoint& point, const Stage& stage,
                                               const Circuit<double>& circuit) {
  if (prepared_.size() >= kKeptBiases) prepared_.clear();
  const auto [place, is_new] = prepared_.try_emplace(pack(point).resistors);
  if (is_new) {
    place->second.bias = nominal_bias(stage, circuit);
    const OperatingPoint& nominal = place->second.bias.point;
    if (nominal.state == BiasState::active) {
      place->second.stress = stress(stage, nominal, spec_.highest_supply(), spec_.source.dc, spec_.load.dc);
    }
  }
  return place->second;
}

Analysis Evaluator::analysis(const GridPoint& point) {
  ++evaluations_;
  const Stage stage = stage_at(point);
  const Circuit<double> circuit = circuit_of<double>(stage);
  return analyse_response(stage, circuit, prepared(point, stage, circuit).bias, definition_);
}

Evaluator::Known& Evaluator::known(const GridPoint& point) {
  if (known_.size() >= kKeptPoints) known_.clear();
  return known_[pack(point)];
}

double Evaluator::error(const GridPoint& point) {
  Known& k = known(point);
  if (!std::isnan(k.error)) return k.error;
  ++evaluations_;
  const Stage stage = stage_at(point);
  const Circuit<double> circuit = circuit_of<double>(stage);
  const Prepared& p = prepared(point, stage, circuit);
  if (const double over = overload(point, p.stress); over > 0) return k.error = kWorstError * (1 + over);
  const Analysis a = analyse_response(stage, circuit, p.bias, definition_);
  return k.error = search_error(spec_, a, stage.parts, space_.device->parameters);
}

double Evaluator::sensitivity(const GridPoint& point) {
  Known& k = known(point);
  if (!std::isnan(k.sensitivity)) return k.sensitivity;
  const Analysis a = analysis(point);
  if (a.point.state != BiasState::active) return k.sensitivity = kWorstError;
  const CauseWidths widths = cause_widths(space_, point, a.point.collector_current);
  const double s = tolerance_sensitivity(spec_, bandwright::sensitivity(stage_at(point), a, definition_), widths);
  return k.sensitivity = std::isnan(s) ? kWorstError : s;
}

RankKey Evaluator::key(const GridPoint& point) {
  RankKey k;
  k.error = error(point);
  k.tolerance_sensitivity = sensitivity(point);
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i)) continue;
    const OfferedValue& v = space_.at(i, point);
    k.values[i] = v.value;
    k.series_sum += v.series ? v.series->number : 0;
  }
  k.distinct_values = distinct_values(k.values);
  return k;
}

}  // namespace bandwright
