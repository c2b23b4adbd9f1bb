#include "sample_result.hpp"

#include <cmath>

#include "sample_assessment.hpp"

namespace bandwright::test {

namespace {

constexpr double kThird = 1.0 / 3;  // needs all its digits

Part part(Role role, double value, const char* code, const char* family) {
  Part made;
  made.designator = info(role).designator;
  made.kind = info(role).kind;
  made.role = role;
  made.value = value;
  made.code = code;
  made.series = "E6";
  made.tolerance = {0.1, 0.1};
  made.family = family;
  made.nodes = nodes(role);
  made.voltage_rating = 63;
  made.volts = 5.5;
  made.unit_cost = 0.02;
  made.invented_cost = true;
  if (info(role).kind == PartKind::resistor) {
    made.power_rating = 0.25;
    made.watts = 0.0123;
  }
  return made;
}

std::vector<Part> parts() {
  std::vector<Part> list = {part(Role::upper_divider, 47e3, "47K", "metal film resistor"),
                            part(Role::lower_divider, 10e3, "10K", "metal film resistor"),
                            part(Role::collector, 4700, "4K7", "metal film resistor"),
                            part(Role::emitter, 68, "68R", "metal film resistor"),
                            part(Role::emitter_bypassed, 1000, "1K0", "metal film resistor"),
                            part(Role::input_coupling, 1e-6, "1u0", "polyester film capacitor"),
                            part(Role::output_coupling, 4.7e-6, "4u7", "aluminium electrolytic capacitor"),
                            part(Role::bypass, 100e-6, "100u", "aluminium electrolytic capacitor")};
  list[6].polarity = "+ to collector";
  list[6].tolerance = {0.2, 0.5};
  list[7].polarity = "+ to junction";
  return list;
}

void fill_figures(Candidate& c) {
  c.analysis.figures.fill(kNotComputed);
  const auto set = [&c](Figure f, double value) { c.analysis.figures[index(f)] = value; };
  set(Figure::gain, 49.0 + kThird);
  set(Figure::lower_cutoff, 41.7);
  set(Figure::upper_cutoff, 20123.25);
  set(Figure::bandwidth, 20081.55);
  set(Figure::input_resistance, 5600);
  set(Figure::output_resistance, 4600);
  set(Figure::output_swing, 2.25);
  set(Figure::input_overload, 0.0456);
  set(Figure::supply_current, 1.25e-3);
  set(Figure::collector_current, 1.03e-3);
  set(Figure::collector_emitter_voltage, 5.9);
  set(Figure::dissipation, 6.1e-3);
  set(Figure::base_voltage, 1.75);
  set(Figure::emitter_voltage, 1.1);
  set(Figure::collector_voltage, 7.0);
  set(Figure::junction_temperature, 300.0);
  set(Figure::midband_gain, 49.9);
  set(Figure::swing_to_cutoff, 2.25);
  set(Figure::swing_to_saturation, 3.5);
  set(Figure::stability_factor, 8.1);
  set(Figure::divider_current_ratio, 33);
  set(Figure::emitter_voltage_share, 0.0917);
  set(Figure::collector_emitter_share, 0.4917);
}

void fill_pole_model(Candidate& c) {
  c.poles_estimate.midband_gain = 49.9;
  c.poles_estimate.textbook_gain = 50.5;
  c.poles_estimate.lower_cutoff = 44.1;
  c.poles_estimate.upper_cutoff = 19000;
  c.poles_estimate.miller_upper_cutoff = 18500;
  c.poles_estimate.low = {{"C1 input coupling", 5600, 5.6e-3, 28.42, 0.25}, {"C3 bypass", 90, 9e-3, 17.68, 0.75}};
  c.poles_estimate.high = {{"Cmu", 200e3, 8e-6, 19894, 1}};
  c.poles.poles = {{-12.5, 0}, {-20e3, 1e3}, {-20e3, -1e3}};
  c.poles.zeros = {{0, 0}, {0, 0}, {-1.59, 0}};
}

void fill_device(Candidate& c) {
  c.device = "BC547B";
  c.transistor.designator = "Q1";
  c.transistor.kind = PartKind::transistor;
  c.transistor.code = "BC547B";
  c.transistor.family = "NPN transistor";
  c.transistor.voltage_rating = 45;
  c.transistor.power_rating = 0.5;
  c.transistor.unit_cost = 0.08;
  c.transistor.invented_cost = true;
  c.parameters.type = "BC547B";
  c.parameters.log_saturation_current = -32.1;
  c.parameters.inverse_early_voltage = 1 / 74.0;
  c.parameters.base_resistance = 110;
  c.parameters.thermal_resistance = 200;
  c.gain_limits = {200, 450};
  c.analysis.point.state = BiasState::active;
  c.analysis.point.collector_emitter_voltage = 5.9;
  c.analysis.point.gain_at_zero_vce = 290;
  c.packages = {{"TO-92", "C-B-E (1-2-3)", "", Provenance::memory, {}}};
}

Spec sample_spec() {
  Spec spec;
  spec.title = "Tide gauge preamplifier";
  spec.supply = {12, 11.4, 12.6};
  spec.ambient = {298.15, 273.15, 333.15};
  spec.load = {1e-4, 0, 0};
  spec.requirements[index(Figure::gain)] = Requirement{50, 44.6, 56.1};
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{40, kNotComputed, 50};
  spec.requirements[index(Figure::upper_cutoff)] = Requirement{kNotComputed, 20e3, kNotComputed};
  return spec;
}

}  // namespace

Candidate sample_candidate() {
  Candidate c;
  c.best_at = {"most exact"};
  c.variant = "split emitter";
  fill_device(c);
  c.parts = parts();
  for (const Part& one : c.parts) c.working_values[index(one.role)] = one.value;
  fill_figures(c);
  fill_pole_model(c);
  for (auto& row : c.sensitivity) row.fill(-kThird);
  c.error = 0.1 + 0.2;  // not 0.3: shows lost digits
  c.tolerance_sensitivity = 0.87;
  c.margins.fill(kNotComputed);
  c.margins[index(Figure::gain)] = 0.9;
  c.margins[index(Figure::lower_cutoff)] = 0.81;
  c.margins[index(Figure::upper_cutoff)] = 0.006;
  c.assessment = sample_assessment(c);
  c.non_dominated = true;
  return c;
}

DesignResult sample_result() {
  DesignResult result;
  result.spec = sample_spec();
  result.met = true;
  result.definitions = {"gain: source EMF to load, at the peak of the response"};
  result.assumptions = {"the junction is as warm at every condition"};
  result.from_memory = {"BC547B base resistance rbb' 110 Ω, from memory: halved or doubled, gain moves 0.2 dB"};
  result.dropped = {"BFR92A: VCEO 15 V is under the highest supply"};
  Candidate second = sample_candidate();
  second.rank = 2;
  second.non_dominated = false;
  second.best_at = {"lowest current", "smallest capacitors"};
  second.analysis.figures[index(Figure::upper_cutoff)] = 18e3;
  second.shortfalls = {{Figure::upper_cutoff, 18e3, 20e3, "upper cutoff: 18 kHz, needs at least 20 kHz (10 % short)"}};
  second.assessment->capability = -0.2;
  second.assessment->yield = {20000, 18200, 0.9059, 0.9139, 7, 0, 0};
  second.assessment->nominal_met = false;
  second.assessment->verdict = "not met";
  result.candidates = {sample_candidate(), second};
  return result;
}

}  // namespace bandwright::test
