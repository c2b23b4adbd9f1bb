#include <bandwright/analysis.hpp>
#include <cmath>

#include "analysis/bias_reuse.hpp"
#include "analysis/figure_equations.hpp"
#include "analysis/operating_point.hpp"
#include "analysis/response.hpp"
#include "analysis/unit.hpp"
#include "stage/pole_estimate.hpp"

namespace bandwright {

GainDefinition gain_definition(const Spec& spec) { return {spec.gain_from_input, spec.gain_at.value_or(0.0)}; }

namespace {

/// Band of the exact response; the transfer function is kept in the analysis.
Band exact_band(const Circuit<double>& circuit, const HybridPi<double>& h, double frequency, TransferFunction& kept) {
  const Transfer<double> response = transfer(circuit, h);
  kept = {response.numerator.c, response.denominator.c};
  const Crossings c = find_crossings(response, omega_squared(frequency));
  return {hertz(c.reference), square_root(c.gain_squared), hertz(c.lower), hertz(c.upper)};
}

}  // namespace

Analysis analyse(const Stage& stage, const GainDefinition& definition, ResponseModel model) {
  const Circuit<double> circuit = circuit_of<double>(stage);
  return analyse_response(stage, circuit, nominal_bias(stage, circuit), definition, model);
}

Analysis analyse_response(const Stage& stage, const Circuit<double>& circuit, const NominalBias& bias,
                          const GainDefinition& definition, ResponseModel model) {
  Analysis a;
  a.point = bias.point;
  a.figures.fill(kNotComputed);
  if (a.point.state != BiasState::active) return a;

  const BiasTrial<double>& t = bias.solution.trial;
  const HybridPi<double> h = hybrid_pi(bias.device, t.i_c, t.v_be, t.v_ce, t.gain);
  a.small = {h.transconductance,  h.input_conductance,    h.output_conductance,
             h.input_capacitance, h.feedback_capacitance, h.base_resistance};
  const Circuit<double> driven = gain_circuit(circuit, definition);
  if (model == ResponseModel::exact) {
    a.band = exact_band(driven, h, definition.frequency, a.transfer);
  } else {
    const PoleEstimate<double> e = pole_estimate(driven, h);
    a.band = {kNotComputed, e.gain, e.lower, e.upper};
  }
  a.figures = stage_figures<double>(circuit, t, h, {a.band.gain, a.band.lower, a.band.upper}, definition, *stage.device,
                                    a.point.junction_temperature);
  return a;
}

Analysis analyse_unit(const UnitPoint& unit, const GainDefinition& definition, double guess) {
  const Circuit<double> circuit = unit_circuit(unit.stage, unit.factors);
  return analyse_response(unit.stage, circuit, bias_at(unit.stage, circuit, unit.junction, guess, unit.factors),
                          definition);
}

std::complex<double> TransferFunction::at(double frequency) const {
  using Complex = std::complex<double>;
  const Complex s(0.0, 2 * kPi * frequency);
  Complex n(0.0), d(0.0);
  for (std::size_t i = numerator.size(); i-- > 0;) n = n * s + numerator[i];
  for (std::size_t i = denominator.size(); i-- > 0;) d = d * s + denominator[i];
  return s * s * n / d;
}

}  // namespace bandwright
