// The bipolar transistor at its junction temperature, for every kind of number.
//
// Equations as in <bandwright/device.hpp>; temperature laws: IS (T/T0)^3 exp((q VG0/k)(1/T0 - 1/T)),
// beta0 (T/T0)^1.5, ICBO doubling every 10 K; all else constant.
#pragma once

#include <bandwright/device.hpp>

#include "device/gain_curve.hpp"
#include "device/unit_factors.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

template <class T>
struct Bipolar {
  const BipolarParameters* sheet = nullptr;  ///< what is the same for every unit: hFE's curve, exponents, VCE(sat)
  T inverse_early_voltage;
  T base_resistance;
  T transit_time;
  T emitter_capacitance;
  T feedback_capacitance;    ///< at VCB = 0
  T thermal_voltage;         ///< kT/q, V
  T log_saturation_current;  ///< ln(IS / 1 A) at the junction temperature
  T log_gain_shift;          ///< ln of the multiplier on beta0: unit times temperature
  T cutoff_current;          ///< ICBO at the junction temperature, A
};

/// tauF of a unit: its fT at the published point, less what its own capacitances take there.
template <class T>
T transit_time(const BipolarParameters& sheet, const UnitFactors<T>& unit) {
  const T one(1.0);
  const T delay = T(sheet.transit_delay) * (one / unit[Cause::transition_frequency] - one);
  const T charging = T(sheet.emitter_charging) * (unit[Cause::emitter_capacitance] - one) +
                     T(sheet.feedback_charging) * (unit[Cause::feedback_capacitance] - one);
  return larger(T(sheet.transit_time - sheet.transit_deficit) + delay - charging, T(0.0));
}

/// The unit at its junction temperature. A higher VBE at the published point is a smaller IS.
template <class T>
Bipolar<T> at_temperature(const BipolarParameters& sheet, const T& junction, const UnitFactors<T>& unit = {}) {
  const T ratio = junction / T(kReferenceTemperature);
  const T log_ratio = ln(ratio);
  const T gap =
      T(sheet.bandgap * kElementaryCharge / kBoltzmann) * (T(1.0 / kReferenceTemperature) - T(1.0) / junction);
  constexpr double kPerVolt = kElementaryCharge / (kBoltzmann * kReferenceTemperature);
  Bipolar<T> device;
  device.sheet = &sheet;
  device.inverse_early_voltage = T(sheet.inverse_early_voltage) / unit[Cause::early_voltage];
  device.base_resistance = T(sheet.base_resistance) * unit[Cause::base_resistance];
  device.transit_time = transit_time(sheet, unit);
  device.emitter_capacitance = T(sheet.emitter_capacitance) * unit[Cause::emitter_capacitance];
  device.feedback_capacitance = T(sheet.feedback_capacitance) * unit[Cause::feedback_capacitance];
  device.thermal_voltage = junction * T(kBoltzmann / kElementaryCharge);
  device.log_saturation_current = T(sheet.log_saturation_current) - T(kPerVolt) * unit[Cause::base_emitter_voltage] +
                                  T(sheet.saturation_current_exponent) * log_ratio + gap;
  device.log_gain_shift = ln(unit[Cause::current_gain]) + T(sheet.gain_exponent) * log_ratio;
  device.cutoff_current = T(sheet.cutoff_current) * unit[Cause::cutoff_current] *
                          e_to((junction - T(kReferenceTemperature)) * T(kLn2 / 10.0));
  return device;
}

/// Hybrid-pi elements at an operating point.
template <class T>
struct HybridPi {
  T transconductance;      ///< gm
  T input_conductance;     ///< gpi
  T output_conductance;    ///< go
  T input_capacitance;     ///< Cpi
  T feedback_capacitance;  ///< Cmu
  T base_resistance;       ///< rbb'
};

/// `gain` is beta0 at the operating point, multiplier and temperature included; beta = beta0 (1 + VCE/VA).
template <class T>
HybridPi<T> hybrid_pi(const Bipolar<T>& device, const T& i_c, const T& v_be, const T& v_ce, const T& gain) {
  const BipolarParameters& sheet = *device.sheet;
  const T early = T(1.0) + device.inverse_early_voltage * v_ce;
  const T v_cb = larger(v_ce - v_be, T(0.0));
  const T g_m = i_c / device.thermal_voltage;
  HybridPi<T> h;
  h.transconductance = g_m;
  h.input_conductance = g_m / (gain * early);
  h.output_conductance = i_c * device.inverse_early_voltage / early;
  h.input_capacitance = g_m * device.transit_time + device.emitter_capacitance;
  h.feedback_capacitance =
      device.feedback_capacitance * e_to(T(-sheet.grading_exponent) * ln(T(1.0) + v_cb / T(sheet.built_in_potential)));
  h.base_resistance = device.base_resistance;
  return h;
}

}  // namespace bandwright
