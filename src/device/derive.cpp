// From data-sheet figures to the parameters of the transistor equations.
#include <algorithm>
#include <bandwright/device.hpp>
#include <bandwright/fault.hpp>
#include <cmath>

#include "device/chosen_figures.hpp"
#include "device/device_limits.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kThermalVoltage = kBoltzmann * kReferenceTemperature / kElementaryCharge;
constexpr double kForwardOverZeroBias = 2;  // Cje of the forward-biased junction over Cje0: convention, from memory

// (1 + V/phi)^m, by which a depletion capacitance falls under reverse bias.
double depletion(const BipolarParameters& p, double reverse_volts) {
  return e_to(p.grading_exponent * ln(1 + reverse_volts / p.built_in_potential));
}

void set_saturation_current(BipolarParameters& p, const ChosenPoint& point) {
  p.log_saturation_current = ln(point.collector_current) - point.nominal.value / kThermalVoltage -
                             ln(1 + point.collector_emitter_voltage * p.inverse_early_voltage);
}

double base_emitter_at(const BipolarParameters& p, double i_c, double v_ce) {
  return kThermalVoltage * (ln(i_c) - p.log_saturation_current - ln(1 + v_ce * p.inverse_early_voltage));
}

// tauF from 1/(2 pi fT) = tauF + (VT/IC)(Cje + Cmu) at the published point; it may come out negative.
void set_transit_time(BipolarParameters& p, const ChosenPoint& point) {
  if (std::isinf(point.nominal.value)) return;
  const double v_be = base_emitter_at(p, point.collector_current, point.collector_emitter_voltage);
  const double v_cb = std::max(point.collector_emitter_voltage - v_be, 0.0);
  const double r_e = kThermalVoltage / point.collector_current;
  p.transit_delay = 1 / (2 * kPi * point.nominal.value);
  p.emitter_charging = r_e * p.emitter_capacitance;
  p.feedback_charging = r_e * p.feedback_capacitance / depletion(p, v_cb);
  const double tau = p.transit_delay - (p.emitter_charging + p.feedback_charging);
  p.transit_time = std::max(tau, 0.0);
  p.transit_deficit = std::max(-tau, 0.0);
}

double highest_stated(const Transistor& transistor, double chosen) {
  for (const SheetFigure& f : transistor.transition_frequency) {
    chosen = std::fmax(std::fmax(chosen, f.min), std::fmax(f.typ, f.max));
  }
  return chosen;
}

void set_limits(BipolarParameters& p, const Transistor& transistor, const ChosenFigures& c) {
  p.breakdown_voltage = limit_of(transistor.collector_emitter_breakdown);
  p.current_limit = limit_of(transistor.collector_current_limit);
  p.power_limit = limit_of(transistor.power_limit);
  p.junction_limit = junction_limit_of(transistor);
  p.highest_transition_frequency = highest_stated(transistor, c.transition.nominal.value);
}

BipolarParameters parameters_from(const Transistor& transistor, const ChosenFigures& c) {
  BipolarParameters p;
  p.type = transistor.type;
  p.pnp = transistor.pnp;
  p.inverse_early_voltage = 1 / c.early_voltage.value;
  const GainCurves curves = gain_curves(c.gain, p.inverse_early_voltage);
  p.gain = curves.nominal;
  p.gain_min = curves.min;
  p.gain_max = curves.max;
  set_saturation_current(p, c.base_emitter);
  p.base_resistance = c.base_resistance.value;
  p.feedback_capacitance = c.output_capacitance.nominal.value * depletion(p, c.output_capacitance.reverse_voltage);
  p.emitter_capacitance =
      kForwardOverZeroBias * c.input_capacitance.nominal.value * depletion(p, c.input_capacitance.reverse_voltage);
  set_transit_time(p, c.transition);
  p.cutoff_current = c.cutoff.nominal.value;
  p.saturation_voltage = c.saturation_voltage.value;
  p.thermal_resistance = c.thermal_resistance.value;
  p.base_emitter_voltage = c.base_emitter.nominal.value;
  p.limits = device_limits(c);
  set_limits(p, transistor, c);
  return p;
}

bool weak(Provenance provenance) { return provenance >= Provenance::memory; }

Nominal varied(Nominal value, const ChosenName& row, bool up) {
  const double factor = up ? 2 : 0.5;
  value.value = row.shift > 0 ? value.value + (up ? row.shift : -row.shift) : value.value * factor;
  return value;
}

std::string described(double value, Dimension dimension, double current, Provenance provenance) {
  std::string text = format_quantity(value, dimension);
  if (current > 0) text += " at " + format_quantity(current, Dimension::current);
  return text + ", " + describe(provenance);
}

WeakInput weak_figure(const Transistor& transistor, const ChosenFigures& c, const ChosenName& row) {
  const Nominal& value = row.of(c);
  const double current = row.shift > 0 ? c.base_emitter.collector_current : 0;
  WeakInput input{row.name, described(value.value, row.dimension, current, value.provenance), {}, {}};
  ChosenFigures changed = c;
  row.change(changed) = varied(value, row, false);
  input.low = parameters_from(transistor, changed);
  row.change(changed) = varied(value, row, true);
  input.high = parameters_from(transistor, changed);
  return input;
}

// The lists of hFE on which the nominal curve rests.
std::vector<std::vector<GainEntry>*> lists_used(GainLists& lists) {
  if (!lists.typ.empty()) return {&lists.typ};
  return {&lists.min, &lists.max};
}

BipolarParameters with_gain_scaled(const Transistor& transistor, ChosenFigures c, double factor) {
  for (auto* list : lists_used(c.gain)) {
    for (GainEntry& e : *list) {
      if (weak(e.value.provenance)) e.value.value *= factor;
    }
  }
  return parameters_from(transistor, c);
}

void add_weak_gain(const Transistor& transistor, ChosenFigures c, std::vector<WeakInput>& inputs) {
  for (const auto* list : lists_used(c.gain)) {
    const auto entry =
        std::find_if(list->begin(), list->end(), [](const GainEntry& e) { return weak(e.value.provenance); });
    if (entry == list->end()) continue;
    inputs.push_back({"current gain hFE",
                      described(entry->value.value, Dimension::gain, entry->collector_current, entry->value.provenance),
                      with_gain_scaled(transistor, c, 0.5), with_gain_scaled(transistor, c, 2)});
    return;
  }
}

std::vector<WeakInput> weak_inputs(const Transistor& transistor, const ChosenFigures& c) {
  std::vector<WeakInput> inputs;
  for (const ChosenName& row : chosen_names()) {
    const Nominal& value = row.of(c);
    const bool changes = value.value != 0 && std::isfinite(value.value);
    if (row.moves_response && weak(value.provenance) && changes) inputs.push_back(weak_figure(transistor, c, row));
  }
  add_weak_gain(transistor, c, inputs);
  return inputs;
}

}  // namespace

DerivedDevice derive_parameters(const Transistor& transistor) {
  std::vector<Fault> faults;
  const ChosenFigures chosen = choose_figures(transistor, faults);
  if (!faults.empty()) throw InputError(std::move(faults));
  DerivedDevice derived;
  derived.parameters = parameters_from(transistor, chosen);
  derived.assumptions = assumptions_of(transistor.type, chosen);
  if (const double deficit = derived.parameters.transit_deficit; deficit > 0) {
    derived.assumptions.push_back(transistor.type + ": base transit time taken as 0; fT and the capacitances give " +
                                  format_quantity(-deficit, Dimension::time));
  }
  derived.weak_inputs = weak_inputs(transistor, chosen);
  return derived;
}

}  // namespace bandwright
