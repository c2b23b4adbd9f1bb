#include <bandwright/analysis.hpp>
#include <cmath>

#include "analysis/figure_equations.hpp"
#include "analysis/response.hpp"
#include "analysis/unit.hpp"
#include "numeric/dual.hpp"
#include "stage/pole_estimate.hpp"

namespace bandwright {

namespace {

/// Two directions side by side: what every x86-64 offers.
constexpr std::size_t kDirections = 2;
using Lanes = Pack<kDirections>;
using Number = Dual<Lanes>;

/// A unit in dual numbers.
struct Moving {
  Circuit<Number> circuit;
  Bipolar<Number> device;
  Number junction;
  BiasTrial<Number> trial;  ///< where the directions leave the operating point alone
  bool bias_moves = false;
};

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

/// The operating point too takes one Newton step from the converged one.
BiasTrial<Number> moved_trial(const Analysis& a, const Moving& unit) {
  const Number log_start(ln(a.point.collector_current));
  const BiasTrial<Number> start = bias_trial(unit.circuit, unit.device, log_start);
  return bias_trial(unit.circuit, unit.device, log_start - start.residual / Number(first_value(start.slope)));
}

/// Figures in dual numbers.
FigureArray<Number> dual_figures(const Stage& stage, const Analysis& a, const GainDefinition& definition,
                                 ResponseModel model, const Moving& unit) {
  const Bipolar<Number>& device = unit.device;
  const BiasTrial<Number> t = unit.bias_moves ? moved_trial(a, unit) : unit.trial;
  const HybridPi<Number> h = hybrid_pi(device, t.i_c, t.v_be, t.v_ce, t.gain);
  const Circuit<Number> driven = gain_circuit(unit.circuit, definition);
  BandOf<Number> band;
  if (model == ResponseModel::exact) {
    band = exact_band(a, driven, h);
  } else {
    const PoleEstimate<Number> e = pole_estimate(driven, h);
    band = {e.gain, e.lower, e.upper};
  }
  return stage_figures(unit.circuit, t, h, band, definition, *stage.device, unit.junction);
}

Circuit<Number> standing(const Circuit<double>& c) {
  Circuit<Number> n;
  for (std::size_t i = 0; i < kRoleCount; ++i) n.part[i] = Number(c.part[i]);
  n.supply = Number(c.supply);
  n.source_resistance = Number(c.source_resistance);
  n.source_capacitance = Number(c.source_capacitance);
  n.load_conductance = Number(c.load_conductance);
  n.load_capacitance = Number(c.load_capacitance);
  n.stray_input = Number(c.stray_input);
  n.stray_output = Number(c.stray_output);
  n.stray_feedback = Number(c.stray_feedback);
  return n;
}

Bipolar<Number> standing(const Bipolar<double>& d) {
  Bipolar<Number> n;
  n.sheet = d.sheet;
  n.inverse_early_voltage = Number(d.inverse_early_voltage);
  n.base_resistance = Number(d.base_resistance);
  n.transit_time = Number(d.transit_time);
  n.emitter_capacitance = Number(d.emitter_capacitance);
  n.feedback_capacitance = Number(d.feedback_capacitance);
  n.thermal_voltage = Number(d.thermal_voltage);
  n.log_saturation_current = Number(d.log_saturation_current);
  n.log_gain_shift = Number(d.log_gain_shift);
  n.cutoff_current = Number(d.cutoff_current);
  return n;
}

BiasTrial<Number> standing(const BiasTrial<double>& t) {
  return {Number(t.i_c),  Number(t.i_b),         Number(t.v_be),     Number(t.v_ce), Number(t.v_e),
          Number(t.gain), Number(t.log_gain_25), Number(t.residual), Number(t.slope)};
}

/// A unit that stands, from which every pair of directions starts.
struct StandingUnit {
  const UnitPoint& unit;
  Circuit<double> circuit;
  Bipolar<double> device;
  BiasTrial<double> trial;

  StandingUnit(const UnitPoint& u, const Analysis& a)
      : unit(u),
        circuit(unit_circuit(u.stage, u.factors)),
        device(at_temperature(*u.stage.device, u.junction, u.factors)),
        trial(bias_trial(circuit, device, ln(a.point.collector_current))) {}
};

/// What a direction does to the circuit; the device follows where one of its causes or the junction moves.
void tilt(Circuit<Number>& c, const UnitPoint& unit, const Direction& d, std::size_t lane) {
  const Surroundings& a = unit.stage.around;
  const auto by = [&d](Cause cause) { return d.factors[index(cause)]; };
  for (std::size_t i = 0; i < kRoleCount; ++i) c.part[i].slope.set(lane, unit.stage.parts[i] * d.factors[i]);
  c.supply.slope.set(lane, d.supply);
  c.source_resistance.slope.set(lane, a.source_resistance * by(Cause::source_resistance));
  c.source_capacitance.slope.set(lane, a.source_capacitance * by(Cause::source_capacitance));
  const double f = unit.factors[Cause::load_resistance];
  c.load_conductance.slope.set(lane, -a.load_conductance / (f * f) * by(Cause::load_resistance));
  c.load_capacitance.slope.set(lane, a.load_capacitance * by(Cause::load_capacitance));
  c.stray_input.slope.set(lane, a.stray.input * by(Cause::stray_input));
  c.stray_output.slope.set(lane, a.stray.output * by(Cause::stray_output));
  c.stray_feedback.slope.set(lane, a.stray.feedback * by(Cause::stray_feedback));
}

bool moves_device(const Direction& d) {
  if (d.junction != 0) return true;
  for (std::size_t i = index(Cause::current_gain); i <= index(Cause::base_emitter_voltage); ++i) {
    if (d.factors[i] != 0) return true;
  }
  return false;
}

/// Resistors, supply, junction and the causes that hFE, VA, ICBO and VBE are.
bool moves_bias(const Direction& d) {
  if (d.supply != 0 || d.junction != 0) return true;
  for (Cause c : {Cause::upper_divider, Cause::lower_divider, Cause::collector, Cause::emitter, Cause::emitter_bypassed,
                  Cause::current_gain, Cause::early_voltage, Cause::cutoff_current, Cause::base_emitter_voltage}) {
    if (d.factors[index(c)] != 0) return true;
  }
  return false;
}

/// The device of a unit whose directions move some of its causes, or the junction.
Bipolar<Number> moved_device(const UnitPoint& unit, const std::vector<Direction>& directions, std::size_t first,
                             const Number& junction) {
  UnitFactors<Number> factors;
  for (std::size_t i = index(Cause::current_gain); i <= index(Cause::base_emitter_voltage); ++i) {
    factors.of[i] = Number(unit.factors.of[i]);
    for (std::size_t lane = 0; lane < kDirections && first + lane < directions.size(); ++lane)
      factors.of[i].slope.set(lane, directions[first + lane].factors[i]);
  }
  return at_temperature(*unit.stage.device, junction, factors);
}

/// The unit with as many directions in its slopes as there are lanes, from `first` on.
Moving moving(const StandingUnit& from, const std::vector<Direction>& directions, std::size_t first) {
  Moving m{standing(from.circuit), standing(from.device), Number(from.unit.junction), standing(from.trial), false};
  bool device_moves = false;
  for (std::size_t lane = 0; lane < kDirections && first + lane < directions.size(); ++lane) {
    const Direction& d = directions[first + lane];
    tilt(m.circuit, from.unit, d, lane);
    device_moves = device_moves || moves_device(d);
    m.bias_moves = m.bias_moves || moves_bias(d);
    m.junction.slope.set(lane, d.junction);
  }
  if (device_moves) m.device = moved_device(from.unit, directions, first, m.junction);
  return m;
}

bool is_part(std::size_t cause) { return cause < kRoleCount; }

}  // namespace

CauseSet parts_and_gain() {
  CauseSet set{};
  for (std::size_t i = 0; i < kRoleCount; ++i) set[i] = true;
  set[index(Cause::current_gain)] = true;
  return set;
}

CauseSet all_causes() {
  CauseSet set{};
  set.fill(true);
  return set;
}

std::vector<FigureValues> slopes(const UnitPoint& unit, const Analysis& analysis, const GainDefinition& definition,
                                 const std::vector<Direction>& directions, ResponseModel model) {
  std::vector<FigureValues> list(directions.size());
  const StandingUnit from(unit, analysis);
  for (std::size_t first = 0; first < directions.size(); first += kDirections) {
    const FigureArray<Number> f =
        dual_figures(unit.stage, analysis, definition, model, moving(from, directions, first));
    for (std::size_t lane = 0; lane < kDirections && first + lane < directions.size(); ++lane) {
      FigureValues& row = list[first + lane];
      for (std::size_t i = 0; i < kFigureCount; ++i) row[i] = f[i].slope[lane] / f[i].value[lane];
    }
  }
  return list;
}

Sensitivity sensitivity(const Stage& stage, const Analysis& analysis, const GainDefinition& definition,
                        ResponseModel model, const CauseSet& wanted) {
  Sensitivity s;
  const bool active = analysis.point.state == BiasState::active;
  for (auto& row : s) row.fill(active ? 0.0 : kNotComputed);
  if (!active) return s;
  UnitPoint unit{stage, {}, analysis.point.junction_temperature};
  std::vector<std::size_t> columns;
  std::vector<Direction> directions;
  for (bool bias : {true, false}) {  // pairs that leave the operating point alone are cheaper
    for (std::size_t i = 0; i < kCauseCount; ++i) {
      if (!wanted[i] || (is_part(i) && !(stage.parts[i] > 0))) continue;
      Direction d;
      d.factors[i] = i == index(Cause::base_emitter_voltage) ? stage.device->base_emitter_voltage : 1.0;
      if (moves_bias(d) != bias) continue;
      directions.push_back(d);
      columns.push_back(i);
    }
  }
  const std::vector<FigureValues> found = slopes(unit, analysis, definition, directions, model);
  for (std::size_t k = 0; k < columns.size(); ++k) {
    for (std::size_t i = 0; i < kFigureCount; ++i) s[i][columns[k]] = found[k][i];
  }
  return s;
}

}  // namespace bandwright
