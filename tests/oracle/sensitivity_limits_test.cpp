// Sensitivities of stages so simple that they are known in closed form, and the limits to which these tend.
//
// Closed forms: Gray, Hurst, Lewis, Meyer, Analysis and Design of Analog Integrated Circuits, from memory: the
// common-emitter stage with emitter degeneration, A = gm RC/(1 + T), T = gm RE1 (1 + 1/beta), and
// Ro = ro (1 + gm RE1/(1 + gm RE1/beta)) from an ideal source; zero-value time constants, R_pi = rpi || rbb',
// R_mu = R_pi + RC + gm R_pi RC. The operating point: Vth - VBE = IB (Rth + RE) + IC RE, VBE moving by VT d ln IC.
#include <cmath>
#include <numbers>

#include "catch.hpp"
#include "random_circuits.hpp"

using bandwright::Analysis;
using bandwright::BipolarParameters;
using bandwright::Cause;
using bandwright::Figure;
using bandwright::index;
using bandwright::Role;
using bandwright::Stage;

namespace {

// The gain's peak lies fL/fH under the midband gain, and each cutoff sees as much of the other: at most 1e-9 here.
constexpr double kClosedForm = 1e-8;

// Of forms that drop RE1 and RC against ro: 1.5 and 5 against 100 kilohm.
constexpr double kSmallAgainstOne = 0.02;

constexpr double kThermalVoltage = 1.380649e-23 * 298.15 / 1.602176634e-19;  // at 25 °C
constexpr double kSupply = 15, kCollector = 5e3, kEmitters = 1.5e3;          // V, ohm: about 1 mA
constexpr double kBeta = 200;
constexpr double kHuge = 1e4, kTiny = 1e-16;  // F

/// A constant current gain, no rbb', no leakage, VA infinite, no capacitances.
BipolarParameters ideal_device() {
  BipolarParameters q;
  q.gain.log_gain[0] = std::log(kBeta);
  q.log_saturation_current = std::log(1e-3) - 0.65 / kThermalVoltage;
  return q;
}

/// No source resistance, no load, and RE1 unbypassed.
Stage simple_stage(const BipolarParameters& q, double unbypassed, double divider_scale = 1) {
  Stage s;
  s.device = &q;
  s.around.supply = kSupply;
  const auto set = [&s](Role role, double value) { s.parts[index(role)] = value; };
  set(Role::upper_divider, 51e3 * divider_scale);
  set(Role::lower_divider, 8.7e3 * divider_scale);
  set(Role::collector, kCollector);
  set(Role::emitter, unbypassed);
  if (unbypassed < kEmitters) {
    set(Role::emitter_bypassed, kEmitters - unbypassed);
    set(Role::bypass, kHuge);
  }
  set(Role::input_coupling, kHuge);
  set(Role::output_coupling, kHuge);
  set(Role::shunt, kTiny);
  return s;
}

/// A stage with what its closed forms are made of.
struct Solved {
  explicit Solved(const Stage& s)
      : stage(s),
        analysis(analyse(s, {})),
        sensitivity(
            bandwright::sensitivity(s, analysis, {}, bandwright::ResponseModel::exact, bandwright::all_causes())) {
    REQUIRE(analysis.point.state == bandwright::BiasState::active);
    g_m = analysis.small.transconductance;
    beta = g_m / analysis.small.input_conductance;
  }
  double operator()(Figure figure, Cause cause) const { return sensitivity[index(figure)][index(cause)]; }
  double part(Role role) const { return stage.parts[index(role)]; }

  /// T = gm RE1 (1 + 1/beta).
  double loop_gain() const { return g_m * part(Role::emitter) * (1 + 1 / beta); }

  double divider() const {
    const double r1 = part(Role::upper_divider), r2 = part(Role::lower_divider);
    return r1 * r2 / (r1 + r2);
  }

  /// d ln IC where the voltages around the loop of base and emitter are out by `volts`.
  double log_current(double volts) const {
    const double i_c = analysis.point.collector_current;
    return volts / (kThermalVoltage + i_c / beta * (divider() + kEmitters) + i_c * kEmitters);
  }

  /// The sum of a figure's sensitivities to all capacitances.
  double to_capacitances(Figure figure) const {
    double sum = 0;
    for (const Cause cause : {Cause::input_coupling, Cause::output_coupling, Cause::bypass, Cause::shunt,
                              Cause::feedback_capacitance, Cause::emitter_capacitance})
      sum += (*this)(figure, cause);
    return sum;
  }

  Stage stage;
  Analysis analysis;
  bandwright::Sensitivity sensitivity;
  double g_m = 0, beta = 0;
};

}  // namespace

TEST_CASE("gain follows the collector resistor of an unloaded stage", "[oracle][sensitivity]") {
  BipolarParameters q = ideal_device();
  for (const double r_e1 : {0.0, 100.0, 1500.0})
    CHECK(Solved(simple_stage(q, r_e1))(Figure::gain, Cause::collector) == Approx(1).epsilon(kClosedForm));

  // With ro the gain is Gm (RC || Ro): 1 - S is RC/(RC + Ro), which falls as 1/(1 + T). VCE falls by IC RC, and with
  // it, by the share RC/ro, each of ro, beta, and IC: the last by as much less as RE holds it.
  q.inverse_early_voltage = 1 / 100.0;
  q.gain.log_gain[0] = std::log(1000);
  double last = 1;
  for (const double r_e1 : {0.0, 50.0, 200.0, 800.0, 1500.0}) {
    const Solved s(simple_stage(q, r_e1, 0.1));
    const double r_o = 1 / s.analysis.small.output_conductance, t = s.loop_gain(), g_r = s.g_m * r_e1;
    const double by_signal = kCollector / (kCollector + r_o * (1 + g_r / (1 + g_r / s.beta)));
    const double by_voltage = by_signal + t / (1 + t) / s.beta + s.log_current(kThermalVoltage) / (1 + t);
    const double expected = by_signal + kCollector / r_o * by_voltage;
    const double short_of_1 = 1 - s(Figure::gain, Cause::collector);
    INFO("RE1 " << r_e1);
    CHECK(short_of_1 == Approx(expected).epsilon(kSmallAgainstOne));
    CHECK(short_of_1 < last);
    last = short_of_1;
  }
  CHECK(last < 1e-3);
}

TEST_CASE("gain falls as the unbypassed emitter resistor rises", "[oracle][sensitivity]") {
  const BipolarParameters q = ideal_device();
  for (const double r_e1 : {5.0, 50.0, 500.0, 1500.0}) {
    const Solved s(simple_stage(q, r_e1));
    const double t = s.loop_gain();
    // signal: -T/(1 + T); bias: S of A to gm, 1/(1 + T), times that of IC
    const double v_e1 = s.analysis.point.collector_current * (1 + 1 / kBeta) * r_e1;
    const double expected = -(t + s.log_current(v_e1)) / (1 + t);
    CHECK(s(Figure::gain, Cause::emitter) == Approx(expected).epsilon(kClosedForm));
    CHECK(std::fabs(s(Figure::gain, Cause::emitter) + 1) < 1 / (1 + t));
  }
}

TEST_CASE("gain from a stiff divider does not know the current gain", "[oracle][sensitivity]") {
  const BipolarParameters q = ideal_device();
  double last = 1;
  for (const double divider_scale : {10.0, 1.0, 0.1, 0.01}) {
    const Solved s(simple_stage(q, 1000, divider_scale));
    const double t = s.loop_gain(), i_b = s.analysis.point.collector_current / kBeta;
    // bias: IB (Rth + RE) moves with beta; signal: RE (1 + 1/beta)
    const double by_bias = s.log_current(i_b * (s.divider() + kEmitters)) / (1 + t);
    const double expected = by_bias + t / (1 + kBeta) / (1 + t);
    const double found = s(Figure::gain, Cause::current_gain);
    CHECK(found == Approx(expected).epsilon(0).margin(kClosedForm));
    CHECK(found < last);
    last = found;
  }
  CHECK(last < 1.01 / kBeta);
}

TEST_CASE("upper cutoff follows the shunt capacitor where it dominates", "[oracle][sensitivity]") {
  BipolarParameters q = ideal_device();
  CHECK(Solved(simple_stage(q, 0))(Figure::upper_cutoff, Cause::shunt) == Approx(-1).epsilon(kClosedForm));

  q.base_resistance = 200;
  q.emitter_capacitance = 20e-12;
  q.feedback_capacitance = 2e-12;
  q.grading_exponent = 0;
  for (const double shunt : {100e-12, 1e-9, 10e-9, 100e-9}) {
    Stage stage = simple_stage(q, 0);
    stage.parts[index(Role::shunt)] = shunt;
    const Solved s(stage);
    const double r_pi = 1 / (s.analysis.small.input_conductance + 1 / q.base_resistance);
    const double r_mu = r_pi + kCollector + s.g_m * r_pi * kCollector;
    const double others = r_pi * q.emitter_capacitance + r_mu * q.feedback_capacitance, own = kCollector * shunt;
    const double short_of_1 = 1 + s(Figure::upper_cutoff, Cause::shunt);
    INFO("C4 " << shunt << ": 1 + S " << short_of_1 << ", others' share " << others / (others + own));
    // 1/(2 pi sum) less what the second pole gives back, which is of the same order
    CHECK(short_of_1 > 0);
    CHECK(short_of_1 < others / (others + own));
    // what the dominated ones have together is the rest
    CHECK(s.to_capacitances(Figure::upper_cutoff) == Approx(-1).epsilon(kClosedForm));
    CHECK(s.to_capacitances(Figure::gain) == Approx(0).margin(kClosedForm));
    if (shunt > 50e-9) CHECK(short_of_1 < 1e-3);
  }
}

TEST_CASE("lower cutoff follows the input coupling capacitor where it dominates", "[oracle][sensitivity]") {
  const BipolarParameters q = ideal_device();
  Stage stage = simple_stage(q, kEmitters);
  stage.around.source_resistance = 600;
  stage.parts[index(Role::input_coupling)] = 1e-6;
  CHECK(Solved(stage)(Figure::lower_cutoff, Cause::input_coupling) == Approx(-1).epsilon(kClosedForm));

  // two corners that do not see each other: (1 + (f1/f)^2)(1 + (f2/f)^2) = 2
  stage.around.load_conductance = 1 / 10e3;
  for (const double output_coupling : {1e-6, 10e-6, 100e-6, 1e-3}) {
    stage.parts[index(Role::output_coupling)] = output_coupling;
    const Solved s(stage);
    const double r_b = kBeta / s.g_m + (kBeta + 1) * kEmitters;
    const double r_in = 1 / (1 / r_b + 1 / s.divider());
    const auto corner = [](double ohm, double farad) { return 1 / (2 * std::numbers::pi * ohm * farad); };
    const double f_1 = corner(600 + r_in, 1e-6), f_2 = corner(kCollector + 10e3, output_coupling);
    const double f = s.analysis.band.lower;
    const double a = f_1 * f_1 / (f * f), b = f_2 * f_2 / (f * f);
    CHECK((1 + a) * (1 + b) == Approx(2).epsilon(kClosedForm));
    const double expected = -a * (1 + b) / (a * (1 + b) + b * (1 + a));
    CHECK(s(Figure::lower_cutoff, Cause::input_coupling) == Approx(expected).epsilon(kClosedForm));
    CHECK(s(Figure::lower_cutoff, Cause::output_coupling) == Approx(-1 - expected).epsilon(0).margin(kClosedForm));
    CHECK(1 + expected < 2.1 * b);
  }
}

TEST_CASE("causes that are dominated do not count", "[oracle][sensitivity]") {
  // Many decades of bandwidth, one capacitor at the upper end.
  BipolarParameters q = ideal_device();
  q.base_resistance = 100;
  q.emitter_capacitance = 1e-12;
  q.feedback_capacitance = 0.1e-12;
  q.transit_time = q.transit_delay = 1e-11;
  Stage stage = simple_stage(q, 500, 0.1);
  stage.around.stray = {1e-12, 1e-12, 0.1e-12};
  stage.around.load_conductance = 1e-6;
  stage.around.load_capacitance = 1e-12;
  stage.parts[index(Role::shunt)] = 100e-9;
  const Solved s(stage);
  constexpr double kNearly = 1e-3;
  struct Row {
    Figure figure;
    std::vector<Cause> dominated;
  };
  const Row rows[] = {
      {Figure::gain,
       {Cause::input_coupling, Cause::output_coupling, Cause::bypass, Cause::shunt, Cause::emitter_capacitance,
        Cause::feedback_capacitance, Cause::transition_frequency, Cause::base_resistance, Cause::stray_input,
        Cause::stray_output, Cause::stray_feedback, Cause::load_capacitance}},
      {Figure::lower_cutoff,
       {Cause::shunt, Cause::emitter_capacitance, Cause::feedback_capacitance, Cause::transition_frequency,
        Cause::stray_input, Cause::stray_output, Cause::stray_feedback, Cause::load_capacitance}},
      {Figure::upper_cutoff,
       {Cause::input_coupling, Cause::output_coupling, Cause::bypass, Cause::emitter_capacitance,
        Cause::feedback_capacitance, Cause::transition_frequency, Cause::base_resistance, Cause::stray_input,
        Cause::stray_output, Cause::stray_feedback, Cause::load_capacitance}},
  };
  for (const Row& row : rows) {
    for (const Cause cause : row.dominated) {
      INFO(info(row.figure).key << " to " << info(cause).key << ": " << s(row.figure, cause));
      CHECK(std::fabs(s(row.figure, cause)) < kNearly);
    }
  }
}
