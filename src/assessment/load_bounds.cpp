#include "assessment/load_bounds.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/operating_point.hpp"
#include "assessment/unit_box.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

// Room for what the signs leave out (the Early effect turns some by less than this), of the supply.
constexpr double kRoom = 0.002;
// VBE IB over IC, without any operating point: 1 V and hFE of 5 and more.
constexpr double kBaseShare = 0.2;

/// Whether a larger value of a cause raises the collector current.
struct CurrentSign {
  Cause cause;
  bool raises;
};
constexpr std::array kDevice = {CurrentSign{Cause::current_gain, true}, CurrentSign{Cause::early_voltage, false},
                                CurrentSign{Cause::cutoff_current, true},
                                CurrentSign{Cause::base_emitter_voltage, false}};
constexpr std::array kRaisedBy = {false, true, false, false, false};  // R1, R2, RC, RE1, RE2

UnitFactors<double> device_end(const Population& units, bool most) {
  UnitFactors<double> f;
  for (const CurrentSign& row : kDevice) {
    const CauseSpread& s = units.spread[index(row.cause)];
    if (!s.varies()) continue;
    f.of[index(row.cause)] = factor_at(info(row.cause), row.raises == most ? s.high() : s.low());
  }
  return f;
}

/// The operating point of the largest or the smallest collector current.
OperatingPoint extreme(const Population& units, const ResistorEnds& ends, double supply, double junction, bool most,
                       double guess) {
  const Stage stage{units.printed, &units.device, units.around};
  Circuit<double> c = circuit_of<double>(stage);
  c.supply = supply;
  for (std::size_t i = 0; i < kResistorRoles; ++i) c.part[i] = kRaisedBy[i] == most ? ends.high[i] : ends.low[i];
  return bias_at(stage, c, junction, guess, device_end(units, most)).point;
}

}  // namespace

LoadBounds rail_bounds(const Spec& spec, const ResistorEnds& ends, double thermal_resistance) {
  const double rail = spec.highest_supply(), sign = spec.pnp() ? -1 : 1;
  LoadBounds b;
  const auto between = [&](Role role, double volts) {
    b.low[index(role)] = std::min(volts, 0.0);
    b.high[index(role)] = std::max(volts, 0.0);
  };
  for (const RoleInfo& r : roles()) between(r.role, sign * rail);
  const auto beside = [&](Role role, double a, double c) {
    b.low[index(role)] = std::min(a, c);
    b.high[index(role)] = std::max(a, c);
  };
  beside(Role::input_coupling, spec.source.dc, spec.source.dc - sign * rail);
  beside(Role::output_coupling, -spec.load.dc, sign * rail - spec.load.dc);
  const auto low = [&](Role role) { return ends.low[index(role)]; };
  const double loop = low(Role::collector) + low(Role::emitter) + low(Role::emitter_bypassed);
  for (std::size_t i = 0; i < kResistorRoles; ++i)
    if (ends.low[i] > 0) b.watts[i] = rail * rail / ends.low[i];
  // RC and R1 feed the emitter from the supply side by side
  const double feed =
      low(Role::collector) * low(Role::upper_divider) / (low(Role::collector) + low(Role::upper_divider));
  const double i_e = rail / (loop - low(Role::collector) + feed);
  for (Role role : {Role::emitter, Role::emitter_bypassed})
    if (feed > 0) b.watts[index(role)] = i_e * i_e * ends.high[index(role)];
  b.collector_emitter_voltage = rail;
  b.collector_current = low(Role::collector) > 0 ? rail / low(Role::collector) : 0;  // leakage may take over all of IE
  // matched to what stands around the transistor, and the base's share
  b.dissipation = rail * rail / (4 * loop) + kBaseShare * rail / loop;
  b.junction_temperature = spec.ambient.max + thermal_resistance * b.dissipation;
  return b;
}

LoadBounds load_bounds(const Spec& spec, const Population& units, const ResistorEnds& ends,
                       const OperatingPoint& nominal) {
  const LoadBounds rail = rail_bounds(spec, ends, units.device.thermal_resistance);
  const auto low = [&](Role role) { return ends.low[index(role)]; };
  const auto high = [&](Role role) { return ends.high[index(role)]; };
  const double highest = spec.highest_supply(), room = kRoom * highest, guess = ln(nominal.collector_current);
  const double rise = units.junction_rise;
  const double lowest = spec.pnp() ? -spec.supply.max : spec.supply.min;
  const double r_e_low = low(Role::emitter) + low(Role::emitter_bypassed);
  const double r_e_high = high(Role::emitter) + high(Role::emitter_bypassed);
  double base_share = 0;  // IB over IC, the most
  double i_most = 0, i_least = HUGE_VAL, v_be_least = HUGE_VAL, v_be_most = 0, v_c_low = HUGE_VAL, v_c_high = 0;
  for (const double supply : {lowest, highest}) {
    const OperatingPoint most = extreme(units, ends, supply, spec.ambient.max + rise, true, guess);
    const OperatingPoint least = extreme(units, ends, supply, spec.ambient.min + rise, false, guess);
    // a large RC may saturate what a small one does not
    const double v_ce_least = supply - most.collector_current * (high(Role::collector) + r_e_high) * (1 + kRoom);
    const bool may_saturate = v_ce_least < least_active_voltage(units.device, most.base_emitter_voltage) + room;
    if (may_saturate || least.state == BiasState::saturated) return rail;
    for (const OperatingPoint& p : {most, least})
      base_share = std::max(base_share, p.base_current / p.collector_current);
    i_most = std::max(i_most, most.collector_current);
    i_least = std::min(i_least, least.collector_current);
    v_be_least = std::min(v_be_least, most.base_emitter_voltage);
    v_be_most = std::max(v_be_most, least.base_emitter_voltage);
    v_c_low = std::min(v_c_low, supply - most.collector_current * high(Role::collector) - room);
    v_c_high = std::max(v_c_high, supply - least.collector_current * low(Role::collector) + room);
  }
  // VBE follows the logarithm of the current beside its own spread and the temperature
  const double v_be_moves = (spec.ambient.max + rise) * kBoltzmann / kElementaryCharge * ln(i_most / i_least);
  const double i_e_most = i_most * (1 + base_share) * (1 + kRoom);
  const double v_b_low = i_least * r_e_low + v_be_least - v_be_moves - room;
  const double v_b_high = i_e_most * r_e_high + v_be_most + v_be_moves + room;

  const double sign = spec.pnp() ? -1 : 1;
  LoadBounds b = rail;
  const auto set = [&](Role role, double least, double most, double outside = 0) {
    b.low[index(role)] = std::max(std::min(sign * least, sign * most) + outside, rail.low[index(role)]);
    b.high[index(role)] = std::min(std::max(sign * least, sign * most) + outside, rail.high[index(role)]);
  };
  set(Role::upper_divider, 0, highest - v_b_low);
  set(Role::lower_divider, v_b_low, v_b_high);
  set(Role::collector, 0, i_most * high(Role::collector) + room);
  set(Role::emitter, 0, i_e_most * high(Role::emitter));
  set(Role::emitter_bypassed, 0, i_e_most * high(Role::emitter_bypassed));
  set(Role::input_coupling, -v_b_high, -v_b_low, spec.source.dc);
  set(Role::output_coupling, v_c_low, v_c_high, -spec.load.dc);
  set(Role::bypass, 0, i_e_most * high(Role::emitter_bypassed));
  set(Role::shunt, std::max(v_c_low, 0.0), v_c_high);
  const auto power = [&](Role role, double watts) { b.watts[index(role)] = std::min(b.watts[index(role)], watts); };
  power(Role::upper_divider, (highest - v_b_low) * (highest - v_b_low) / low(Role::upper_divider));
  power(Role::lower_divider, v_b_high * v_b_high / low(Role::lower_divider));
  for (Role role : {Role::collector, Role::emitter, Role::emitter_bypassed})
    power(role, i_e_most * i_e_most * high(role));
  b.collector_emitter_voltage = std::min(rail.collector_emitter_voltage, v_c_high - i_least * r_e_low);
  b.collector_current = std::min(rail.collector_current, i_most * (1 + kRoom));
  b.dissipation = std::min(rail.dissipation, i_most * (b.collector_emitter_voltage + v_be_most * base_share));
  b.junction_temperature = spec.ambient.max + units.device.thermal_resistance * b.dissipation;
  return b;
}

}  // namespace bandwright
