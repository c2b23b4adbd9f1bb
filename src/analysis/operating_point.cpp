#include "analysis/operating_point.hpp"

#include <algorithm>
#include <cmath>

namespace bandwright {

namespace {

constexpr double kResidual = 1e-12;  // of Vth

/// ln IC of the textbook solution, VBE taken once from the exponential law.
double first_guess(const Circuit<double>& c, const Bipolar<double>& device, double high) {
  const double r1 = c[Role::upper_divider], r2 = c[Role::lower_divider];
  const double v_th = c.supply * r2 / (r1 + r2), r_th = r1 * r2 / (r1 + r2);
  const GainCurve& curve = device.sheet->gain;
  const double gain = e_to(curve.log_gain[curve.points / 2] + device.log_gain_shift);
  const double r_e = c[Role::emitter] + c[Role::emitter_bypassed] + r_th / gain;
  const auto log_current = [&](double v_be) { return std::min(ln(std::max(v_th - v_be, 0.02) / r_e), high); };
  const double rough = log_current(0.6);
  return log_current(device.thermal_voltage * (rough - device.log_saturation_current));
}

/// ln of the collector current at which VCE comes to 0. Leakage out of the base adds to what RE carries.
double highest_current(const Circuit<double>& c, const Bipolar<double>& device) {
  const double r_e = c[Role::emitter] + c[Role::emitter_bypassed], r_total = c[Role::collector] + r_e;
  const double without_leakage = ln(c.supply / r_total);
  const double gain = e_to(gain_point(device.sheet->gain, without_leakage).log_gain + device.log_gain_shift);
  return ln((c.supply + device.cutoff_current * (1 + 1 / gain) * r_e) / r_total);
}

}  // namespace

BiasSolution solve_bias(const Circuit<double>& c, const Bipolar<double>& device, double guess) {
  double high = ln(c.supply / (c[Role::collector] + c[Role::emitter] + c[Role::emitter_bypassed]));
  double low = std::min(device.log_saturation_current, high) - 50;
  const double tolerance =
      kResidual * c.supply * c[Role::lower_divider] / (c[Role::upper_divider] + c[Role::lower_divider]);
  BiasSolution s;
  bool bracketed = false;  // high is known to lie above the root
  double x = std::isnan(guess) ? first_guess(c, device, high) : std::clamp(guess, low, high);
  for (int i = 0; i < 200; ++i) {
    s.trial = bias_trial(c, device, x);
    s.log_current = x;
    const double step = -s.trial.residual / s.trial.slope;
    // the residual is met and the last Newton step no longer moves IC
    if (std::fabs(s.trial.residual) <= tolerance && std::fabs(step) <= 1e-13) break;
    if (s.trial.residual > 0 && x >= high) {
      const double with_leakage = highest_current(c, device);
      if (!(with_leakage > high)) return s;  // VCE would fall below 0 first
      low = x;
      x = high = with_leakage;
      continue;
    }
    bracketed = bracketed || s.trial.residual <= 0;
    (s.trial.residual > 0 ? low : high) = x;
    double next = x + step;
    if (next >= high && !bracketed)
      next = high;
    else if (!(next > low && next < high))
      next = 0.5 * (low + high);
    if (next == x) break;
    x = next;
  }
  s.reached = true;
  return s;
}

double least_active_voltage(const BipolarParameters& device, double v_be) {
  return std::max(device.saturation_voltage + kActiveMargin, v_be);
}

BiasState bias_state(const BiasSolution& s, const Bipolar<double>& device) {
  if (!s.reached || s.trial.v_ce < least_active_voltage(*device.sheet, s.trial.v_be)) return BiasState::saturated;
  if (s.trial.i_c < kLeakageRatio * device.cutoff_current) return BiasState::cut_off;
  return BiasState::active;
}

NominalBias bias_at(const Stage& stage, const Circuit<double>& c, double junction, double guess,
                    const UnitFactors<double>& unit) {
  NominalBias n;
  n.device = at_temperature(*stage.device, junction, unit);
  n.solution = solve_bias(c, n.device, guess);
  const BiasTrial<double>& t = n.solution.trial;
  OperatingPoint& p = n.point;
  p.state = bias_state(n.solution, n.device);
  p.junction_temperature = junction;
  p.collector_current = t.i_c;
  p.base_current = t.i_b;
  p.base_emitter_voltage = t.v_be;
  p.collector_emitter_voltage = t.v_ce;
  p.emitter_voltage = t.v_e;
  p.base_voltage = t.v_be + t.v_e;
  p.gain_at_zero_vce = e_to(t.log_gain_25);
  return n;
}

NominalBias nominal_bias(const Stage& stage, const Circuit<double>& c) {
  const NominalBias cold = bias_at(stage, c, stage.around.ambient);
  const OperatingPoint& p = cold.point;
  const double watts = p.collector_emitter_voltage * p.collector_current + p.base_emitter_voltage * p.base_current;
  const double rise = stage.device->thermal_resistance * std::max(watts, 0.0);
  return bias_at(stage, c, stage.around.ambient + rise, cold.solution.log_current);
}

}  // namespace bandwright
