#include "device/chosen_figures.hpp"

#include <algorithm>
#include <cmath>

#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

// What stands in where a sheet is silent: assumed, typical of small-signal transistors, from memory.
constexpr double kAssumedBaseEmitter = 0.65;      // V at 1 mA
constexpr double kAssumedBaseEmitterAt = 1e-3;    // A
constexpr double kAssumedEarly = 100;             // V
constexpr double kAssumedBaseResistance = 100;    // ohm
constexpr double kAssumedInput = 10e-12;          // F at VEB = 0
constexpr double kAssumedSaturation = 0.2;        // V
constexpr double kAssumedJunctionLimit = 423.15;  // K: 150 °C

// Nominal value from a lone limit: assumed.
constexpr LoneLimit kTransitionLimit{1.5, kNotComputed};
constexpr LoneLimit kCapacitanceLimit{kNotComputed, 0.7};
constexpr LoneLimit kCutoffLimit{kNotComputed, 0.1};
constexpr LoneLimit kAsItIs{1.0, 1.0};

constexpr double kTransitionCurrent = 5e-3;   // A: where fT is best stated for a stage of this kind
constexpr double kBaseEmitterCurrent = 1e-3;  // A

Nominal assumed(double value) { return {value, Provenance::assumed, false, "not stated"}; }

// Of a limit the value itself, whichever side it is printed on.
Nominal limit_or(const SheetFigure& figure, Dimension dimension, double otherwise) {
  Nominal value = nominal(point_of(figure), kAsItIs, dimension);
  if (!value.stated()) return assumed(otherwise);
  if (value.by_factor) value.rule.clear();
  value.by_factor = false;
  return value;
}

ChosenPoint chosen(const FigurePoint& point, const Nominal& value) {
  return {value,
          point.collector_current,
          point.collector_emitter_voltage,
          std::isnan(point.reverse_voltage) ? 0.0 : point.reverse_voltage,
          point.min.value,
          point.max.value};
}

double distance_in_ln(double a, double b) {
  return std::isnan(a) ? 0.0 : std::fabs(ln(a / b));  // a figure that holds at any current is never far
}

// The point whose nominal needs no factor, then the one nearest `current` in ln IC, then the lower current.
ChosenPoint best_point(const std::vector<SheetFigure>& entries, const LoneLimit& lone, Dimension dimension,
                       double current) {
  ChosenPoint best;
  const auto better = [&](const ChosenPoint& a, const ChosenPoint& b) {
    if (a.nominal.by_factor != b.nominal.by_factor) return b.nominal.by_factor;
    const double off_a = distance_in_ln(a.collector_current, current);
    const double off_b = distance_in_ln(b.collector_current, current);
    if (off_a != off_b) return off_a < off_b;
    return a.collector_current < b.collector_current;
  };
  for (const FigurePoint& point : points_of(entries)) {
    const ChosenPoint next = chosen(point, nominal(point, lone, dimension));
    if (next.nominal.stated() && (!best.nominal.stated() || better(next, best))) best = next;
  }
  return best;
}

ChosenPoint base_emitter_point(const Transistor& transistor) {
  // A lone limit is a limit, not a point.
  ChosenPoint point = best_point(transistor.base_emitter_voltage, {}, Dimension::voltage, kBaseEmitterCurrent);
  if (!point.nominal.stated()) {
    point = {assumed(kAssumedBaseEmitter), kAssumedBaseEmitterAt, kUnstatedVoltage, 0, kNotComputed, kNotComputed};
  }
  return point;
}

Nominal stated_or(const SheetFigure& figure, Dimension dimension, double otherwise) {
  const Nominal value = nominal(point_of(figure), {}, dimension);
  return value.stated() ? value : limit_or(figure, dimension, otherwise);
}

void need(const Transistor& transistor, const char* key, bool stated, std::vector<Fault>& faults) {
  if (!stated) faults.push_back({transistor.type + ": " + key, "", "this figure: the derivation needs it", ""});
}

void check_needs(const Transistor& transistor, const ChosenFigures& chosen, std::vector<Fault>& faults) {
  const auto limit = [](const SheetFigure& figure) { return !std::isnan(limit_of(figure)); };
  need(transistor, "collector_emitter_breakdown", limit(transistor.collector_emitter_breakdown), faults);
  need(transistor, "collector_current_limit", limit(transistor.collector_current_limit), faults);
  need(transistor, "power_limit", limit(transistor.power_limit), faults);
  need(transistor, "current_gain, min", !chosen.gain.min.empty(), faults);
  need(transistor, "transition_frequency", chosen.transition.nominal.stated(), faults);
  need(transistor, "output_capacitance", chosen.output_capacitance.nominal.stated(), faults);
  if (shape_points(chosen.gain) > std::size_t{GainCurve::kMaxPoints}) {
    faults.push_back({transistor.type + ": current_gain", std::to_string(shape_points(chosen.gain)) + " points",
                      "at most " + std::to_string(GainCurve::kMaxPoints) + " points of one kind", ""});
  }
}

}  // namespace

double limit_of(const SheetFigure& figure) { return std::fmin(std::fmin(figure.min, figure.typ), figure.max); }

double junction_limit_of(const Transistor& transistor) {
  const double limit = limit_of(transistor.junction_limit);
  return std::isnan(limit) ? kAssumedJunctionLimit : limit;
}

ChosenFigures choose_figures(const Transistor& t, std::vector<Fault>& faults) {
  ChosenFigures c;
  c.gain = gain_lists(t.current_gain);
  c.early_voltage = stated_or(t.early_voltage, Dimension::voltage, kAssumedEarly);
  c.base_resistance = stated_or(t.base_resistance, Dimension::resistance, kAssumedBaseResistance);
  c.saturation_voltage = stated_or(t.saturation_voltage, Dimension::voltage, kAssumedSaturation);
  c.thermal_resistance = stated_or(t.thermal_resistance, Dimension::thermal_resistance,
                                   (junction_limit_of(t) - kReferenceTemperature) / limit_of(t.power_limit));
  c.base_emitter = base_emitter_point(t);
  c.transition = best_point(t.transition_frequency, kTransitionLimit, Dimension::frequency, kTransitionCurrent);
  c.output_capacitance = best_point(t.output_capacitance, kCapacitanceLimit, Dimension::capacitance, 0);
  c.input_capacitance = best_point(t.input_capacitance, kCapacitanceLimit, Dimension::capacitance, 0);
  if (!c.input_capacitance.nominal.stated())
    c.input_capacitance = {assumed(kAssumedInput), 0, 0, 0, kNotComputed, kNotComputed};
  c.cutoff = best_point(t.cutoff_current, kCutoffLimit, Dimension::current, 0);
  if (!c.cutoff.nominal.stated()) c.cutoff = {assumed(0), 0, 0, 0, kNotComputed, kNotComputed};
  check_needs(t, c, faults);
  return c;
}

}  // namespace bandwright
