#include <bandwright/analysis.hpp>
#include <cmath>

#include "analysis/figure_equations.hpp"
#include "analysis/response.hpp"
#include "numeric/dual.hpp"
#include "stage/pole_estimate.hpp"

namespace bandwright {

namespace {

/// Two directions side by side: what every x86-64 offers.
constexpr std::size_t kDirections = 2;
using Lanes = Pack<kDirections>;
using Number = Dual<Lanes>;

/// From the converged doubles one Newton step a crossing carries the exact derivative; the peak needs none, since |H|
/// is stationary there (envelope theorem).
BandOf<Number> exact_band(const Analysis& a, const Circuit<Number>& circuit, const HybridPi<Number>& h) {
  const Transfer<Number> response = transfer(circuit, h);
  const Number gain_2 = gain_squared(response, Number(omega_squared(a.band.reference)));
  const auto crossing = [&](double frequency) {
    if (std::isnan(frequency)) return Number(kNotComputed);
    return hertz(crossing_step(response, Number(0.5) * gain_2, omega_squared(frequency)));
  };
  return {square_root(gain_2), crossing(a.band.lower), crossing(a.band.upper)};
}

/// Figures in dual numbers; the operating point too takes one Newton step from the converged one.
FigureArray<Number> dual_figures(const Stage& stage, const Analysis& a, const GainDefinition& definition,
                                 ResponseModel model, const Circuit<Number>& circuit, const Number& multiplier) {
  const Bipolar<Number> device = at_temperature(*stage.device, Number(a.point.junction_temperature), multiplier);
  const Number log_start(ln(a.point.collector_current));
  const BiasTrial<Number> start = bias_trial(circuit, device, log_start);
  const Number log_i_c = log_start - start.residual / Number(first_value(start.slope));
  const BiasTrial<Number> t = bias_trial(circuit, device, log_i_c);
  const HybridPi<Number> h = hybrid_pi(device, t.i_c, t.v_be, t.v_ce, t.gain);
  const Circuit<Number> driven = gain_circuit(circuit, definition);
  BandOf<Number> band;
  if (model == ResponseModel::exact) {
    band = exact_band(a, driven, h);
  } else {
    const PoleEstimate<Number> e = pole_estimate(driven, h);
    band = {e.gain, e.lower, e.upper};
  }
  return stage_figures(circuit, t, h, band, definition, *stage.device, a.point.junction_temperature);
}

}  // namespace

Sensitivity sensitivity(const Stage& stage, const Analysis& analysis, const GainDefinition& definition,
                        ResponseModel model) {
  Sensitivity s;
  for (auto& row : s) row.fill(kNotComputed);
  if (analysis.point.state != BiasState::active) return s;
  for (std::size_t first = 0; first < kSensitivityCauses; first += kDirections) {
    Circuit<Number> circuit = circuit_of<Number>(stage);
    Number multiplier(1.0);
    // a slope equal to the value makes every derivative relative: x dy/dx
    for (std::size_t lane = 0; lane < kDirections && first + lane < kSensitivityCauses; ++lane) {
      const std::size_t cause = first + lane;
      Number& x = cause < kRoleCount ? circuit.part[cause] : multiplier;
      x.slope.set(lane, first_value(x.value));
    }
    const FigureArray<Number> f = dual_figures(stage, analysis, definition, model, circuit, multiplier);
    for (std::size_t i = 0; i < kFigureCount; ++i) {
      for (std::size_t lane = 0; lane < kDirections && first + lane < kSensitivityCauses; ++lane) {
        s[i][first + lane] = f[i].slope[lane] / f[i].value[lane];
      }
    }
  }
  return s;
}

}  // namespace bandwright
