#include "unit_loads.hpp"

#include <algorithm>
#include <bandwright/purchase.hpp>
#include <cmath>
#include <map>

namespace oracle {

using bandwright::Cause;
using bandwright::CauseScale;
using bandwright::index;
using bandwright::kResistorRoles;
using bandwright::OperatingCondition;
using bandwright::Population;
using bandwright::Role;

namespace {

constexpr Real kRoom = 298.15L;
constexpr Real kThermalVoltage = 1.380649e-23L * kRoom / 1.602176634e-19L;  // at kRoom, constants exact by the SI

/// The root of a falling function between a and b: bracketed secant with the end that stays halved in weight (Illinois;
/// Dowell and Jarratt, BIT 11, 1971, from memory). It stops where |f| is within `rounding`.
template <class F>
Real secant_root(F f, Real a, Real b, Real rounding) {
  Real f_a = f(a), f_b = f(b), x = a;
  int stayed = 0;  // > 0: b, < 0: a
  for (int i = 0; i < 300; ++i) {
    x = (a * f_b - b * f_a) / (f_b - f_a);
    const Real f_x = f(x);
    if (std::fabs(f_x) <= rounding || x == a || x == b) break;
    if (f_x > 0) {
      a = x, f_a = f_x;
      if (stayed > 0) f_b /= 2;
      stayed = 1;
    } else {
      b = x, f_b = f_x;
      if (stayed < 0) f_a /= 2;
      stayed = -1;
    }
  }
  return x;
}

/// The bias equations of one unit at one junction temperature: those of bias.cpp, here with VCE by iteration.
class Equations {
public:
  Equations(const BiasNetwork& net, Real temperature) : q_(*net.device), t_(temperature), supply_(net.supply) {
    const auto ohms = [&](Role role) { return net.parts[index(role)]; };
    v_thevenin_ = supply_ * ohms(Role::lower_divider) / (ohms(Role::upper_divider) + ohms(Role::lower_divider));
    r_thevenin_ = v_thevenin_ / supply_ * ohms(Role::upper_divider);
    r_c_ = ohms(Role::collector);
    r_e_ = ohms(Role::emitter) + ohms(Role::emitter_bypassed);
    v_t_ = kThermalVoltage * t_ / kRoom;
    log_is_ = q_.log_saturation_current + q_.saturation_current_exponent * std::log(t_ / kRoom) +
              q_.bandgap / kThermalVoltage * (1 - kRoom / t_);
    icbo_ = q_.cutoff_current * std::exp2((t_ - kRoom) / 10);
    multiplier_ = net.gain_multiplier * std::pow(t_ / kRoom, Real(q_.gain_exponent));
  }

  Bias solve(Real guess) const {
    const auto f = [this](Real x) { return residual(x); };
    Real low = guess - 0.02L, high = guess + 0.02L;
    for (Real step = 0.2L; !(f(low) > 0); step *= 2) low -= step;
    for (Real step = 0.2L; !(f(high) < 0); step *= 2) high += step;
    return at(std::exp(secant_root(f, low, high, 4e-18L * supply_)));
  }

private:
  Bias at(Real i_c) const {
    Bias b;
    b.temperature = t_;
    b.i_c = i_c;
    b.beta0 = multiplier_ * gain_at(q_.gain, i_c);
    Real early = 1, last = 0;
    b.v_ce = supply_;
    for (int i = 0; i < 200 && b.v_ce != last; ++i) {
      last = b.v_ce;
      early = 1 + std::max<Real>(last, 0) * q_.inverse_early_voltage;
      b.i_b = i_c / (early * b.beta0) - icbo_ * (1 + 1 / b.beta0);
      b.v_ce = supply_ - i_c * r_c_ - (i_c + b.i_b) * r_e_;
    }
    b.v_be = v_t_ * (std::log(i_c / early) - log_is_);
    const bool saturated = b.v_ce < std::max(q_.saturation_voltage + 0.3L, b.v_be);
    b.state = saturated ? bandwright::BiasState::saturated : bandwright::BiasState::active;
    return b;
  }

  Real residual(Real log_ic) const {
    const Bias b = at(std::exp(log_ic));
    return v_thevenin_ - b.i_b * r_thevenin_ - b.v_be - (b.i_c + b.i_b) * r_e_;
  }

  const bandwright::BipolarParameters& q_;
  Real t_, supply_, v_thevenin_ = 0, r_thevenin_ = 0, r_c_ = 0, r_e_ = 0;
  Real v_t_ = 0, log_is_ = 0, icbo_ = 0, multiplier_ = 1;
};

/// A factor of a cause for a deviation, as <bandwright/cause.hpp> defines the scales.
double applied(CauseScale scale, double deviation) {
  if (scale == CauseScale::logarithm) return std::exp(deviation);
  return scale == CauseScale::share ? 1 + deviation : deviation;
}

}  // namespace

UnitLoads::UnitLoads(const Population& population, double source_dc, double load_dc)
    : population_(population), source_dc_(source_dc), load_dc_(load_dc) {
  for (std::size_t i = 0; i < bandwright::kCauseCount; ++i) {
    const bool resistor = i < kResistorRoles && population.printed[i] > 0;
    const bool device = i == index(Cause::current_gain) || i == index(Cause::early_voltage) ||
                        i == index(Cause::cutoff_current) || i == index(Cause::base_emitter_voltage);
    const bool drifts = resistor && population.temperature_coefficient[i] > 0;
    if ((resistor || device) && (population.spread[i].varies() || drifts)) causes_.push_back(i);
  }
  for (const bool supply : {true, false}) {
    const auto of = [supply](const OperatingCondition& c) { return supply ? c.supply : c.ambient; };
    Side side{supply, of(population.conditions.front()), of(population.conditions.front())};
    for (const OperatingCondition& c : population.conditions) {
      side.low = std::min(side.low, of(c));
      side.high = std::max(side.high, of(c));
    }
    if (side.high > side.low) sides_.push_back(side);
  }
}

OperatingCondition UnitLoads::condition(const Coordinates& x) const {
  OperatingCondition c = population_.conditions.front();
  for (std::size_t k = 0; k < sides_.size(); ++k) {
    const double share = x[causes_.size() + k];
    (sides_[k].is_supply ? c.supply : c.ambient) = (1 - share) * sides_[k].low + share * sides_[k].high;
  }
  return c;
}

/// Tolerance and drift of a part add up at both of its ends; in between the factor is taken in proportion.
double UnitLoads::factor(std::size_t cause, double share, double ambient) const {
  const bandwright::CauseSpread& s = population_.spread[cause];
  const CauseScale scale = bandwright::causes()[cause].scale;
  double low = applied(scale, s.centre - s.below), high = applied(scale, s.centre + s.above);
  if (cause < kResistorRoles) {
    const double drift = population_.temperature_coefficient[cause] * std::fabs(ambient - 298.15);
    low *= 1 - drift;
    high *= 1 + drift;
  }
  return (1 - share) * low + share * high;
}

void UnitLoads::set_unit(const Coordinates& x, Unit& unit) const {
  const OperatingCondition at = condition(x);
  const bandwright::BipolarParameters& sheet = population_.device;
  unit.network = {widen(population_.printed), at.supply, &unit.device, 1};
  unit.ambient = at.ambient;
  unit.device.log_saturation_current = sheet.log_saturation_current;
  unit.device.inverse_early_voltage = sheet.inverse_early_voltage;
  unit.device.cutoff_current = sheet.cutoff_current;
  for (std::size_t k = 0; k < causes_.size(); ++k) {
    const double f = factor(causes_[k], x[k], at.ambient);
    if (causes_[k] < kResistorRoles) unit.network.parts[causes_[k]] *= f;
    if (causes_[k] == index(Cause::current_gain)) unit.network.gain_multiplier = f;
    if (causes_[k] == index(Cause::early_voltage)) unit.device.inverse_early_voltage /= f;
    if (causes_[k] == index(Cause::cutoff_current)) unit.device.cutoff_current *= f;
    if (causes_[k] == index(Cause::base_emitter_voltage))
      unit.device.log_saturation_current -= f / static_cast<double>(kThermalVoltage);
  }
}

Loads UnitLoads::loads(const Unit& unit, const Bias& b) const {
  const Real sign = population_.device.pnp ? -1 : 1;
  const auto ohms = [&](Role role) { return unit.network.parts[index(role)]; };
  const Real i_e = b.i_c + b.i_b, v_junction = i_e * ohms(Role::emitter_bypassed);
  const Real v_e = v_junction + i_e * ohms(Role::emitter);
  const std::map<std::string, Real> node = {{"ground", 0},
                                            {"supply", sign * unit.network.supply},
                                            {"junction", sign * v_junction},
                                            {"base", sign * (v_e + b.v_be)},
                                            {"emitter", sign * v_e},
                                            {"collector", sign * (v_e + b.v_ce)},
                                            {"source", source_dc_},
                                            {"output", load_dc_}};
  Loads l;
  l.saturated = b.state == bandwright::BiasState::saturated;
  l.i_c = b.i_c;
  l.v_ce = b.v_ce;
  l.dissipation = b.v_ce * b.i_c + b.v_be * b.i_b;
  l.junction = unit.ambient + population_.device.thermal_resistance * l.dissipation;
  for (const bandwright::RoleInfo& role : bandwright::roles()) {
    const auto& ends = bandwright::nodes(role.role);
    const Real volts = node.at(ends[0]) - node.at(ends[1]);
    l.volts[index(role.role)] = volts;
    if (ohms(role.role) > 0) l.watts[index(role.role)] = volts * volts / ohms(role.role);
  }
  return l;
}

Loads UnitLoads::at(const Coordinates& x) {
  if (guess_ == 0) unit_.device = population_.device;
  set_unit(x, unit_);
  const Bias b = Equations(unit_.network, unit_.ambient + population_.junction_rise).solve(guess_ == 0 ? -7 : guess_);
  guess_ = std::log(b.i_c);
  return loads(unit_, b);
}

Loads UnitLoads::at_by_bisection(const Coordinates& x) const {
  Unit unit;
  unit.device = population_.device;
  set_unit(x, unit);
  return loads(unit, solve_bias(unit.network, unit.ambient + population_.junction_rise));
}

}  // namespace oracle
