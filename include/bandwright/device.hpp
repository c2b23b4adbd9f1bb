// Device: the parameters of the transistor equations, derived from data-sheet figures.
//
// At 25 °C (T0 = 298.15 K), magnitudes, both polarities alike. Equations (src/device/):
//   IC = IS exp(VBE/VT) (1 + VCE/VA)            IB = IS exp(VBE/VT)/beta0 - ICBO (1 + 1/beta0)
//   beta = beta0 (1 + VCE/VA)                   gm = IC/VT, rpi = beta/gm, ro = (VA + VCE)/IC
//   Cmu = Cmu0/(1 + VCB/0.75 V)^0.33            Cpi = gm tauF + Cje
//   1/(2 pi fT) = tauF + (VT/IC)(Cje + Cmu)     at the published point
// Source: hybrid-pi model as in Gray, Hurst, Lewis, Meyer, Analysis and Design of Analog Integrated Circuits;
// the exponents, the 0.75 V and the 1.206 V gap are conventions, from memory.
#pragma once

#include <array>
#include <bandwright/catalogue.hpp>
#include <bandwright/cause.hpp>
#include <string>
#include <vector>

namespace bandwright {

/// beta0 over collector current: a monotone cubic through points in ln IC and ln beta0, constant beyond its ends.
struct GainCurve {
  static constexpr int kMaxPoints = 8;
  int points = 1;  ///< 1: constant
  std::array<double, kMaxPoints> log_current{};
  std::array<double, kMaxPoints> log_gain{};
  std::array<double, kMaxPoints> slope{};  ///< d ln beta0 / d ln IC at the points
};

/// How far units of a type lie from its nominal value at most: as logarithm, VBE in volts.
struct DeviceLimits {
  double below = 0;
  double above = 0;
  bool below_published = false;  ///< false: assumed
  bool above_published = false;
};

/// Parameters at 25 °C.
struct BipolarParameters {
  std::string type;
  bool pnp = false;
  GainCurve gain;      ///< nominal beta0
  GainCurve gain_min;  ///< lowest beta0 of the type
  GainCurve gain_max;
  double log_saturation_current = 0;  ///< ln(IS / 1 A)
  double inverse_early_voltage = 0;   ///< 1/V; 0: VA infinite
  double base_resistance = 0;         ///< rbb', ohm
  double transit_time = 0;            ///< tauF, s
  double emitter_capacitance = 0;     ///< Cje, forward biased, F
  double feedback_capacitance = 0;    ///< Cmu at VCB = 0, F
  double built_in_potential = 0.75;   ///< V
  double grading_exponent = 0.33;
  double saturation_current_exponent = 3;  ///< IS over temperature
  double gain_exponent = 1.5;              ///< beta0 over temperature
  double bandgap = 1.206;                  ///< V, extrapolated to 0 K
  double cutoff_current = 0;               ///< ICBO, A
  double saturation_voltage = 0.2;         ///< VCE(sat), V
  double thermal_resistance = 0;           ///< K/W
  // how a unit's tauF follows from its own fT and capacitances at the published point of fT
  double transit_delay = 0;      ///< 1/(2 pi fT), s
  double emitter_charging = 0;   ///< Cje VT/IC, s
  double feedback_charging = 0;  ///< Cmu VT/IC, s
  double transit_deficit = 0;    ///< s by which the nominal difference of these was below 0 before it was taken as 0
  double base_emitter_voltage = 0.65;              ///< at the published point, V
  std::array<DeviceLimits, kCauseCount> limits{};  ///< of the causes that lie in the device; hFE: gain_min, gain_max
  // limits, not part of the equations
  double breakdown_voltage = 0;             ///< VCEO, V
  double current_limit = 0;                 ///< A
  double power_limit = 0;                   ///< W
  double junction_limit = 0;                ///< K
  double highest_transition_frequency = 0;  ///< Hz, the largest figure stated (or assumed)
};

/// A parameter that rests on memory or assumption, and how to shift it to see what that is worth.
struct WeakInput {
  std::string name;         ///< "base resistance rbb'"
  std::string description;  ///< "110 Ω, from memory"
  BipolarParameters low;    ///< halved (VBE: 50 mV lower)
  BipolarParameters high;   ///< doubled (VBE: 50 mV higher)
};

struct DerivedDevice {
  BipolarParameters parameters;
  std::vector<std::string> assumptions;  ///< "2N5088 hFE: typical taken as sqrt(min max), assumed"
  std::vector<WeakInput> weak_inputs;    ///< figures from memory among those used
};

/// Derives the parameters from a catalogue entry. Throws InputError where a needed figure is missing.
DerivedDevice derive_parameters(const Transistor& transistor);

}  // namespace bandwright
