// Stages as textbooks print them, put before the library's own functions.
//
// Sources stand beside each example: author, title, edition, example; read through a transcription, book not opened.
// Two kinds of number are compared. Printed: the book's, within the rounding of its digits. Full: the example's circuit
// by another nodal solve with a half-power search, made when the transcription was checked.
#pragma once

#include <bandwright/analysis.hpp>
#include <cmath>
#include <complex>

#include "analysis/operating_point.hpp"
#include "analysis/response.hpp"
#include "catch.hpp"
#include "stage/first_estimates.hpp"

namespace reference {

using namespace bandwright;

/// Two solvers of one circuit agree far closer; what is left is the rounding of the other solver's printed digits.
inline constexpr double kFull = 0.002;

inline constexpr double kShort = 1;            // F: a capacitor that the example takes as a short, corner below 1 Hz
inline constexpr double kOpen = 1e12;          // ohm: a resistor that the example does not have
inline constexpr double kNoBaseCurrent = 1e9;  // beta of an example that neglects the base current

/// A stage of an example. What it leaves out is left out here.
struct BookStage {
  double supply = 0;
  double upper_divider = kOpen, lower_divider = kOpen, collector = kOpen;
  double emitter = 0, emitter_bypassed = 0;
  double input_coupling = kShort, output_coupling = kShort, bypass = kShort;
  double source = 0, load = INFINITY;
  double load_capacitance = 0, stray_input = 0, stray_output = 0;
};

inline Stage stage_of(const BookStage& b) {
  Stage s;
  s.parts = {b.upper_divider,  b.lower_divider,   b.collector, b.emitter, b.emitter_bypassed,
             b.input_coupling, b.output_coupling, b.bypass,    0};
  s.around.supply = b.supply;
  s.around.source_resistance = b.source;
  s.around.load_conductance = 1 / b.load;
  s.around.load_capacitance = b.load_capacitance;
  s.around.stray.input = b.stray_input;
  s.around.stray.output = b.stray_output;
  return s;
}

inline Circuit<double> circuit_of_book(const BookStage& b) { return circuit_of<double>(stage_of(b)); }

/// gm and rpi of an example, with VT = 26 mV, gm = 1/re or h-parameters as it has them.
inline HybridPi<double> transistor(double g_m, double r_pi, double c_pi = 0, double c_mu = 0) {
  return {g_m, 1 / r_pi, 0, c_pi, c_mu, 0};
}
inline HybridPi<double> from_re(double r_e, double beta, double c_pi = 0, double c_mu = 0) {
  return transistor(1 / r_e, beta * r_e, c_pi, c_mu);
}
inline HybridPi<double> from_h(double h_ie, double h_fe, double c_pi = 0, double c_mu = 0) {
  return transistor(h_fe / h_ie, h_ie, c_pi, c_mu);
}

/// Books that write re + R/beta for what the emitter shows have beta where the model has beta + 1: rpi is kept and the
/// transistor given one less of beta.
inline HybridPi<double> with_beta_for_beta_plus_one(HybridPi<double> h) {
  h.transconductance -= h.input_conductance;
  return h;
}

/// VT = kT/q is 25 or 26 mV in books: the junction temperature that gives it.
inline double junction_for(double thermal_voltage) { return thermal_voltage * kElementaryCharge / kBoltzmann; }

/// Constant beta, VA infinite, no capacitances, no leakage.
inline BipolarParameters ideal_transistor(double beta) {
  BipolarParameters p;
  p.gain.log_gain[0] = std::log(beta);
  return p;
}

/// The bias network solved with VBE constant, as books hold it: IS is moved until the junction shows just that voltage
/// at the current that is found.
inline BiasTrial<double> bias_at_constant_vbe(const BookStage& book, double beta, double v_be, double leakage = 0) {
  constexpr double kVolts = 1e-9;
  BipolarParameters sheet = ideal_transistor(beta);
  sheet.cutoff_current = leakage;
  const Circuit<double> circuit = circuit_of_book(book);
  const double v_t = kBoltzmann * kReferenceTemperature / kElementaryCharge;
  sheet.log_saturation_current = std::log(1e-3) - v_be / v_t;
  BiasSolution solved;
  for (int i = 0; i < 100; ++i) {
    solved = solve_bias(circuit, at_temperature(sheet, kReferenceTemperature));
    if (std::fabs(solved.trial.v_be - v_be) < kVolts) break;
    sheet.log_saturation_current += (solved.trial.v_be - v_be) / v_t;
  }
  REQUIRE(solved.reached);
  REQUIRE(std::fabs(solved.trial.v_be - v_be) < kVolts);
  return solved.trial;
}

inline double emitter_current(const BiasTrial<double>& t) { return t.i_c + t.i_b; }

/// Gain from the source's EMF at midband: everything that couples or bypasses shorted.
inline double midband_gain_of(const BookStage& b, const HybridPi<double>& h) {
  return midband_gain(midband(circuit_of_book(b), h), b.source);
}

inline TransferFunction response(const BookStage& b, const HybridPi<double>& h) {
  const Transfer<double> t = transfer(circuit_of_book(b), h);
  return {t.numerator.c, t.denominator.c};
}

/// Gain and half-power frequencies of the exact response; the gain at its peak, or at a stated frequency.
inline Band band_of(const BookStage& b, const HybridPi<double>& h, double frequency = 0) {
  const double omega = 2 * kPi * frequency;
  const Crossings c = find_crossings(transfer(circuit_of_book(b), h), omega * omega);
  const auto hertz = [](double u) { return std::sqrt(u) / (2 * kPi); };
  return {hertz(c.reference), std::sqrt(c.gain_squared), hertz(c.lower), hertz(c.upper)};
}

/// Examples of the low side have no upper corner, so no peak: the gain is taken far above every lower corner.
inline Band band_without_top(const BookStage& b, const HybridPi<double>& h) {
  constexpr double kFarAbove = 1e9;  // Hz
  return band_of(b, h, kFarAbove);
}

/// The published one-at-a-time forms for a transistor given by its small-signal elements.
inline PoleModel textbook(const BookStage& b, const HybridPi<double>& h) {
  Analysis a;
  a.point.state = BiasState::active;
  a.small = {h.transconductance,  h.input_conductance,    h.output_conductance,
             h.input_capacitance, h.feedback_capacitance, h.base_resistance};
  return pole_model(stage_of(b), a, {});
}

inline PoleEstimate<double> estimate(const BookStage& b, const HybridPi<double>& h) {
  return pole_estimate(circuit_of_book(b), h);
}

/// The corner of one capacitor with the others shorted (low side).
inline double corner(const SeenBy<double>& seen) { return 1 / (2 * kPi * seen.resistance * seen.capacitance); }

}  // namespace reference
