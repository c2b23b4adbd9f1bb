// First estimates: the textbook design of a stage, in closed form, from wanted voltages, spread and corner frequencies.
// They start the search; the exact response decides.
//
// Sources: four-resistor bias by divider current, Sedra & Smith, Microelectronic Circuits; bias by stability factor,
// Millman & Halkias, Integrated Electronics, ch. 9; capacitors by short-circuit time constants with a share of the
// cutoff each, Sedra & Smith (all read through transcriptions, books not opened).
#pragma once

#include <array>

#include "stage/pole_estimate.hpp"

namespace bandwright {

/// The bias resistors of a stage, ohm.
struct BiasResistors {
  double upper_divider = 0;
  double lower_divider = 0;
  double collector = 0;
  double emitter = 0;  ///< RE1 + RE2
};

/// A wanted operating point, magnitudes.
struct WantedBias {
  double supply = 0;             ///< VCC
  double collector_current = 0;  ///< IC
  double collector_drop = 0;     ///< IC RC
  double emitter_voltage = 0;    ///< VE
  double base_emitter_voltage = 0;
};

/// Divider current given: R2 = VB/I, R1 = (VCC - VB)/(I + IB). `base_current` 0 neglects it, as many books do.
BiasResistors bias_by_divider_current(const WantedBias& wanted, double divider_current, double base_current);

/// The stability factor that keeps IC within low..high while beta runs over beta_low..beta_high:
/// S2 = (dIC/dbeta) beta1 (1 + beta2)/IC1.
double stability_factor(double current_low, double current_high, double beta_low, double beta_high);

/// The divider that gives stability factor S at beta_stated and IC at `beta`: RB = (S - 1)(1 + beta_stated) RE/(1 +
/// beta_stated - S), V = VBE + (RB + (1 + beta) RE) IC/beta, R1 = RB VCC/V, R2 = RB VCC/(VCC - V). RC and RE of
/// `resistors` are kept.
BiasResistors divider_by_stability(BiasResistors resistors, double supply, double v_be, double stability,
                                   double beta_stated, double collector_current, double beta);

/// Input coupling, output coupling and bypass capacitor, farad, from their shares of a lower cutoff (shares sum to 1).
std::array<double, 3> low_side_capacitors(const std::array<SeenBy<double>, 3>& seen, double lower_cutoff,
                                          const std::array<double, 3>& shares);

/// The shunt capacitor that brings the sum of open-circuit time constants to 1/(2 pi fH); 0 where the stage alone is
/// slower already.
double shunt_capacitor(const PoleEstimate<double>& without_shunt, double upper_cutoff);

/// The unbypassed emitter resistor (0..total) that brings the midband gain to the wanted one; 0 where even that is too
/// low.
double unbypassed_resistor(Circuit<double> circuit, const HybridPi<double>& h, double gain, double total);

}  // namespace bandwright
