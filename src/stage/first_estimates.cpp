#include "stage/first_estimates.hpp"

#include <algorithm>

namespace bandwright {

BiasResistors bias_by_divider_current(const WantedBias& w, double divider_current, double base_current) {
  const double v_b = w.emitter_voltage + w.base_emitter_voltage;
  return {(w.supply - v_b) / (divider_current + base_current), v_b / divider_current,
          w.collector_drop / w.collector_current, w.emitter_voltage / (w.collector_current + base_current)};
}

double stability_factor(double current_low, double current_high, double beta_low, double beta_high) {
  return (current_high - current_low) / (beta_high - beta_low) * beta_low * (1 + beta_high) / current_low;
}

BiasResistors divider_by_stability(BiasResistors r, double supply, double v_be, double stability, double beta_stated,
                                   double collector_current, double beta) {
  const double r_b = (stability - 1) * (1 + beta_stated) * r.emitter / (1 + beta_stated - stability);
  const double v = v_be + (r_b + (1 + beta) * r.emitter) * collector_current / beta;
  r.upper_divider = r_b * supply / v;
  r.lower_divider = r_b * supply / (supply - v);
  return r;
}

std::array<double, 3> low_side_capacitors(const std::array<SeenBy<double>, 3>& seen, double lower_cutoff,
                                          const std::array<double, 3>& shares) {
  std::array<double, 3> c{};
  for (std::size_t i = 0; i < c.size(); ++i) c[i] = 1 / (2 * kPi * shares[i] * lower_cutoff * seen[i].resistance);
  return c;
}

double shunt_capacitor(const PoleEstimate<double>& without_shunt, double upper_cutoff) {
  const double r_c = without_shunt.high[static_cast<std::size_t>(HighCapacitor::shunt)].resistance;
  const double others = 1 / (2 * kPi * without_shunt.upper);
  return std::max(1 / (2 * kPi * upper_cutoff) - others, 0.0) / r_c;
}

double unbypassed_resistor(Circuit<double> circuit, const HybridPi<double>& h, double gain, double total) {
  double low = 0, high = total;
  for (int i = 0; i < 50; ++i) {
    const double r = 0.5 * (low + high);
    circuit.part[index(Role::emitter)] = r;
    circuit.part[index(Role::emitter_bypassed)] = total - r;
    const bool too_high = midband_gain(midband(circuit, h), circuit.source_resistance) > gain;
    (too_high ? low : high) = r;
  }
  return low;
}

}  // namespace bandwright
