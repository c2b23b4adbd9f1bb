#include "assessment/stress_corners.hpp"

#include <algorithm>
#include <bandwright/assessment.hpp>
#include <cmath>

#include "analysis/stress_equations.hpp"

namespace bandwright {

namespace {

constexpr double kNamedShare = 0.05;  // causes that make less of the excursion are not named

/// The causes that move the operating point.
std::vector<std::size_t> bias_causes(const UnitBox& box) {
  constexpr std::array kDevice = {Cause::current_gain, Cause::early_voltage, Cause::cutoff_current,
                                  Cause::base_emitter_voltage};
  std::vector<std::size_t> list;
  for (std::size_t i : box.varying()) {
    const bool device = std::any_of(kDevice.begin(), kDevice.end(), [i](Cause c) { return index(c) == i; });
    if (i < kResistorRoles || device) list.push_back(i);
  }
  return list;
}

StressEnds of_unit(const Spec& spec, const Circuit<double>& c, const OperatingPoint& p) {
  const Stress stress = stress_of(spec.pnp(), c, p, spec.source.dc, spec.load.dc);
  Stresses all{};
  std::copy(stress.volts.begin(), stress.volts.end(), all.begin() + kVoltsSlot);
  std::copy_n(stress.watts.begin(), kResistorRoles, all.begin() + kWattsSlot);
  all[kCollectorEmitterSlot] = p.collector_emitter_voltage;
  all[kCurrentSlot] = p.collector_current;
  all[kDissipationSlot] = p.collector_emitter_voltage * p.collector_current + p.base_emitter_voltage * p.base_current;
  return {all, all};
}

/// On its way into saturation the unit may have passed the highest dissipation, the base's share with it.
StressEnds of_saturated_unit(const Spec& spec, const Circuit<double>& c, const BiasTrial<double>& t) {
  StressEnds s = between_rails(spec, c.part, c.supply);
  s.high[kDissipationSlot] *= 1 + 2 * t.v_be / (t.gain * c.supply);
  return s;
}

}  // namespace

StressEnds between_rails(const Spec& spec, const PartValues& parts, double supply) {
  const auto ohms = [&](Role role) { return parts[index(role)]; };
  const double rail = spec.pnp() ? -supply : supply;
  const double r_e = ohms(Role::emitter) + ohms(Role::emitter_bypassed);
  const double r_c = ohms(Role::collector);
  // VCE and VBE are not negative: RC and R1 feed the emitter from the supply side by side
  const double r_feed = r_c * ohms(Role::upper_divider) / (r_c + ohms(Role::upper_divider));
  const double i_e = rail / (r_e + r_feed);
  PartValues first{}, second;  // the ends of each voltage
  second.fill(rail);
  second[index(Role::emitter)] = i_e * ohms(Role::emitter);
  second[index(Role::emitter_bypassed)] = second[index(Role::bypass)] = i_e * ohms(Role::emitter_bypassed);
  first[index(Role::input_coupling)] = spec.source.dc;
  second[index(Role::input_coupling)] = spec.source.dc - rail;
  first[index(Role::output_coupling)] = -spec.load.dc;
  second[index(Role::output_coupling)] = rail - spec.load.dc;
  StressEnds s;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    s.low[kVoltsSlot + i] = std::min(first[i], second[i]);
    s.high[kVoltsSlot + i] = std::max(first[i], second[i]);
    if (i < kResistorRoles && parts[i] > 0) s.high[kWattsSlot + i] = second[i] * second[i] / parts[i];
  }
  s.high[kCollectorEmitterSlot] = supply;
  s.high[kCurrentSlot] = supply / r_c;                             // leakage may take over all that the emitter carries
  s.high[kDissipationSlot] = supply * supply / (4 * (r_c + r_e));  // matched to what stands around it
  return s;
}

StressBox::StressBox(const Spec& spec, const Population& population)
    : spec_(spec), population_(population), box_(population), causes_(bias_causes(box_)) {
  for (const auto member : {&OperatingCondition::supply, &OperatingCondition::ambient}) {
    const auto less = [member](const auto& a, const auto& b) { return a.*member < b.*member; };
    const auto [low, high] = std::minmax_element(population.conditions.begin(), population.conditions.end(), less);
    if ((*high).*member > (*low).*member) sides_.push_back({member, (*low).*member, (*high).*member});
  }
}

OperatingCondition StressBox::condition(const Coordinates& x) const {
  OperatingCondition at = population_.conditions.front();
  for (std::size_t k = 0; k < sides_.size(); ++k) {
    const Side& side = sides_[k];
    const double share = x[causes_.size() + k];
    at.*side.member = share == 1 ? side.high : side.low + share * (side.high - side.low);
  }
  return at;
}

StressEnds StressBox::solve(const Coordinates& x) {
  BoxPoint point = box_.nominal(condition(x));
  for (std::size_t k = 0; k < causes_.size(); ++k) point.z[causes_[k]] = x[k];
  const UnitPoint unit = box_.unit(point);
  const Circuit<double> c = unit_circuit(unit.stage, unit.factors);
  const NominalBias bias = bias_at(unit.stage, c, unit.junction, guess_, unit.factors);
  const bool known = bias.point.state != BiasState::saturated;
  if (known) guess_ = ln(bias.point.collector_current);
  StressEnds s = known ? of_unit(spec_, c, bias.point) : of_saturated_unit(spec_, c, bias.solution.trial);
  for (Stresses* end : {&s.low, &s.high}) {
    const double rise = population_.device.thermal_resistance * (*end)[kDissipationSlot];
    (*end)[kJunctionSlot] = point.at.ambient + rise;
  }
  return s;
}

/// How far a stress moves when one cause goes to an end.
double StressBox::most_turned(Coordinates x, std::size_t k, std::size_t slot, int sign) {
  const double here = stress_at(solve(x), slot, sign);
  double most = 0;
  for (const double end : {0.0, 1.0}) {
    x[k] = end;
    most = std::max(most, std::fabs(stress_at(solve(x), slot, sign) - here));
  }
  return most;
}

std::string StressBox::name(const Coordinates& x, std::size_t slot, int sign) {
  std::vector<std::pair<double, std::size_t>> shares;
  double sum = 0;
  for (std::size_t k = 0; k < causes_.size(); ++k) {
    shares.emplace_back(most_turned(x, k, slot, sign), k);
    sum += shares.back().first;
  }
  std::stable_sort(shares.begin(), shares.end(), [](const auto& a, const auto& b) { return a.first > b.first; });
  std::string text;
  for (const auto& [share, k] : shares) {
    if (!(share > kNamedShare * sum)) break;
    text += causes()[causes_[k]].symbol;
    text += x[k] == 0 ? " min, " : x[k] == 1 ? " max, " : " inside its limits, ";
  }
  return text + condition_text(population_, condition(x));
}

}  // namespace bandwright
