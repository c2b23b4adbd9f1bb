#include <bandwright/analysis.hpp>
#include <cmath>

#include "analysis/figure_equations.hpp"
#include "stage/pole_estimate.hpp"

namespace bandwright {

namespace {

constexpr const char* kHighNames[kHighCapacitors] = {
    "base-emitter Cpi",        "collector-base Cmu",      "C4 shunt",
    "load capacitance",        "source capacitance",      "stray, base to 0 V",
    "stray, collector to 0 V", "stray, collector to base"};
constexpr Role kLowRoles[3] = {Role::input_coupling, Role::output_coupling, Role::bypass};

std::string name(Role role) { return std::string(info(role).designator) + " " + info(role).label; }

TimeConstant entry(std::string capacitor, const SeenBy<double>& seen) {
  TimeConstant t;
  t.capacitor = std::move(capacitor);
  t.resistance = seen.resistance;
  t.seconds = seen.resistance * seen.capacitance;
  t.frequency = 1 / (2 * kPi * t.seconds);
  return t;
}

HybridPi<double> hybrid_of(const SmallSignal& s) {
  return {s.transconductance,  s.input_conductance,    s.output_conductance,
          s.input_capacitance, s.feedback_capacitance, s.base_resistance};
}

}  // namespace

PoleModel pole_model(const Stage& stage, const Analysis& analysis, const GainDefinition& definition) {
  PoleModel model;
  if (analysis.point.state != BiasState::active) return model;
  const HybridPi<double> h = hybrid_of(analysis.small);
  const Circuit<double> c = gain_circuit(circuit_of<double>(stage), definition);
  const PoleEstimate<double> e = pole_estimate(c, h);
  const Midband<double> m = midband(c, h);
  model.midband_gain = e.gain;
  model.lower_cutoff = e.lower;
  model.upper_cutoff = e.upper;

  // the published forms: hfe R'L/hie, F = 1 + gm RE1, and the Miller input capacitance
  const double r_l = 1 / (m.g_c + m.g_o), degeneration = 1 + h.transconductance * m.r_e;
  const double h_ie = m.r_bb + m.r_pi;
  model.textbook_gain = m.beta * r_l / h_ie / degeneration * m.r_in / (m.r_in + c.source_resistance);
  const double r_source = source_side(m, c.source_resistance) + m.r_bb;
  const double r_input = parallel(r_source, m.r_pi * degeneration);
  const double c_miller =
      h.input_capacitance / degeneration + h.feedback_capacitance * (1 + h.transconductance * r_l / degeneration);
  model.miller_upper_cutoff = 1 / (2 * kPi * r_input * c_miller);

  for (std::size_t i = 0; i < e.low.size(); ++i) {
    if (!(e.low[i].capacitance > 0) || !std::isfinite(e.low[i].resistance)) continue;
    model.low.push_back(entry(name(kLowRoles[i]), e.low[i]));
    model.low.back().share = model.low.back().frequency / e.lower;
  }
  for (std::size_t i = 0; i < e.high.size(); ++i) {
    if (!(e.high[i].capacitance > 0)) continue;
    model.high.push_back(entry(kHighNames[i], e.high[i]));
    model.high.back().share = model.high.back().seconds * 2 * kPi * e.upper;
  }
  return model;
}

}  // namespace bandwright
