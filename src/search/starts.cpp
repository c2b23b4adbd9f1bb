#include "search/starts.hpp"

#include <algorithm>
#include <bandwright/search.hpp>
#include <boost/random/sobol.hpp>
#include <cmath>

#include "numeric/random.hpp"
#include "stage/first_estimates.hpp"

namespace bandwright {

namespace {

constexpr double kLowestCurrent = 20e-6, kHighestCurrent = 30e-3;  // A, where starts are sought
constexpr double kOpenLoad = 50e3;                                 // ohm: collector resistors without a load to compare
constexpr double kShareSpread = 3.0;                               // ln of the largest ratio between weights of corners

/// Between a and b, evenly in the logarithm.
double spread(double a, double b, double u) { return b > a ? a * e_to(u * ln(b / a)) : a; }

ValueRange offered_range(const DesignSpace& space, Role role) {
  const auto& values = *space.offered[index(role)];
  return {values.front().working_value, values.back().working_value};
}

WantedBias wanted_bias(const Spec& spec, const DesignSpace& space, const Choices& u) {
  const BipolarParameters& device = space.device->parameters;
  WantedBias w;
  w.supply = spec.supply_magnitude();
  w.base_emitter_voltage = 0.65;
  const double spare = w.supply - kLeastCollectorEmitter - kLeastCollectorDrop;
  w.emitter_voltage = std::max(spread(0.03, 0.35, u[0]) * w.supply, 0.05);
  w.emitter_voltage = std::min(w.emitter_voltage, std::max(0.6 * spare, 0.02));
  const double left = w.supply - w.emitter_voltage;
  w.collector_drop = std::clamp((0.25 + 0.5 * u[1]) * left, std::min(kLeastCollectorDrop * 1.1, 0.5 * left),
                                std::max(left - 1.15 * kLeastCollectorEmitter, 0.5 * left));
  // the collector resistor: not far over the load, fast enough for the upper cutoff, within the current's bounds
  const ValueRange offered = offered_range(space, Role::collector);
  double high = spec.load.conductance > 0 ? 2 / spec.load.conductance : kOpenLoad;
  const double f_high = aim(spec, Figure::upper_cutoff);
  const double c_out = spec.load.capacitance + spec.stray.output + device.feedback_capacitance;
  if (f_high > 0 && c_out > 0) high = std::min(high, 1 / (2 * kPi * f_high * c_out));
  const double most = std::min(
      {device.current_limit / 2, kHighestCurrent, device.power_limit / 2 / std::max(left - w.collector_drop, 0.5)});
  double highest_current = most;
  for (Figure f : {Figure::supply_current, Figure::collector_current}) {
    const double limit = aim(spec, f);
    if (limit > 0) highest_current = std::min(highest_current, 0.9 * limit);
  }
  const double low = std::max(offered.min, w.collector_drop / highest_current);
  high = std::max(std::min({high, offered.max, w.collector_drop / kLowestCurrent}), low);
  const double r_c = spread(low, high, u[2]);
  w.collector_current = w.collector_drop / r_c;
  return w;
}

BiasResistors bias_resistors(const BipolarParameters& device, const WantedBias& w, double choice, bool practice) {
  const double log_i = ln(w.collector_current);
  const double beta = e_to(gain_point(device.gain, log_i).log_gain);
  const double i_b = w.collector_current / beta;
  BiasResistors r = bias_by_divider_current(w, 10 * i_b, i_b);
  if (practice) return r;
  const double beta_low = e_to(gain_point(device.gain_min, log_i).log_gain);
  const double beta_high = std::max(e_to(gain_point(device.gain_max, log_i).log_gain), 1.01 * beta_low);
  const double allowed = spread(0.02, 0.5, choice);  // total spread of IC over the transistor's hFE
  const double wanted = stability_factor(w.collector_current * (1 - allowed / 2),
                                         w.collector_current * (1 + allowed / 2), beta_low, beta_high);
  const double s = std::clamp(wanted, 1.2, 0.8 * (1 + beta_high));
  return divider_by_stability(r, w.supply, w.base_emitter_voltage, s, beta_high, w.collector_current, beta);
}

std::array<double, 3> shares_of_cutoff(bool bypassed, double a, double b) {
  std::array<double, 3> s = {e_to(a * kShareSpread), e_to(b * kShareSpread),
                             bypassed ? e_to((1 - 0.5 * (a + b)) * kShareSpread) : 0};
  const double sum = s[0] + s[1] + s[2];
  for (double& x : s) x /= sum;
  return s;
}

}  // namespace

std::vector<Choices> sobol_choices(std::size_t count, std::uint64_t seed) {
  boost::random::sobol sequence(kChoices);
  Choices shift;
  RandomStream random(seed);
  for (double& s : shift) s = random.uniform();
  std::vector<Choices> points(count);
  for (Choices& p : points) {
    for (std::size_t i = 0; i < kChoices; ++i) {
      const double x = static_cast<double>(sequence()) * 0x1p-64 + shift[i];
      p[i] = x - std::floor(x);
    }
  }
  return points;
}

double aim(const Spec& spec, Figure figure) {
  const auto& r = spec.requirement(figure);
  if (!r) return kNotComputed;
  if (!std::isnan(r->target)) return r->target;
  if (!std::isnan(r->lower) && !std::isnan(r->upper)) return std::sqrt(r->lower * r->upper);
  return std::isnan(r->lower) ? r->upper / 1.25 : r->lower * 1.25;
}

PartValues start_point(const Spec& spec, const DesignSpace& space, const Choices& u, bool practice) {
  const BipolarParameters& device = space.device->parameters;
  const WantedBias w = wanted_bias(spec, space, u);
  const BiasResistors r = bias_resistors(device, w, u[3], practice);
  Stage stage{{}, &device, surroundings(spec)};
  PartValues& v = stage.parts;
  v[index(Role::upper_divider)] = r.upper_divider;
  v[index(Role::lower_divider)] = r.lower_divider;
  v[index(Role::collector)] = r.collector;
  v[index(Role::emitter_bypassed)] = r.emitter;
  v[index(Role::bypass)] = 1;  // any: shorts in the midband network

  const Bipolar<double> warm = at_temperature(device, stage.around.ambient);
  const double beta = e_to(gain_point(device.gain, ln(w.collector_current)).log_gain + warm.log_gain_shift);
  const double v_ce = w.supply - w.collector_drop - w.emitter_voltage;
  const HybridPi<double> h = hybrid_pi(warm, w.collector_current, w.base_emitter_voltage, v_ce, beta);
  Circuit<double> c = circuit_of<double>(stage);
  if (spec.gain_from_input) c.source_resistance = c.source_capacitance = 0;

  const bool split = space.has(index(Role::emitter)), bypassed = space.has(index(Role::bypass));
  const double gain = aim(spec, Figure::gain);
  const double most = bypassed ? r.emitter : 10 * r.emitter;
  const double r_e1 = split ? unbypassed_resistor(c, h, gain, most) : 0;
  v[index(Role::emitter)] = r_e1;
  v[index(Role::emitter_bypassed)] = bypassed ? r.emitter - r_e1 : 0;
  c.part = v;
  const PoleEstimate<double> e = pole_estimate(c, h);
  const std::array<double, 3> c_low =
      low_side_capacitors(e.low, aim(spec, Figure::lower_cutoff), shares_of_cutoff(bypassed, u[4], u[5]));
  v[index(Role::input_coupling)] = c_low[0];
  v[index(Role::output_coupling)] = c_low[1];
  v[index(Role::bypass)] = bypassed ? c_low[2] : 0;
  v[index(Role::shunt)] = space.has(index(Role::shunt)) ? shunt_capacitor(e, aim(spec, Figure::upper_cutoff)) : 0;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space.has(i)) continue;
    const ValueRange range = offered_range(space, static_cast<Role>(i));
    v[i] = std::isfinite(v[i]) ? std::clamp(v[i], range.min, range.max) : range.max;
  }
  return v;
}

}  // namespace bandwright
