// Every computed figure of an active stage, for every kind of number. Definitions stand in the figure table.
#pragma once

#include <bandwright/analysis.hpp>

#include "stage/midband.hpp"

namespace bandwright {

template <class T>
using FigureArray = std::array<T, kFigureCount>;

/// Gain and cutoffs (Hz) as solved; NaN where there is none.
template <class T>
struct BandOf {
  T gain, lower, upper;
};

template <class T>
FigureArray<T> stage_figures(const Circuit<T>& c, const BiasTrial<T>& t, const HybridPi<T>& h, const BandOf<T>& band,
                             const GainDefinition& definition, const BipolarParameters& device, const T& junction) {
  const T one(1.0);
  FigureArray<T> f;
  f.fill(T(kNotComputed));
  const auto set = [&f](Figure figure, const T& value) { f[index(figure)] = value; };
  const Midband<T> m = midband(c, h);
  const T r_ac = one / m.g_c;
  const T to_cutoff = t.i_c * r_ac;
  const T to_saturation = (t.v_ce - T(device.saturation_voltage)) * r_ac / (r_ac + m.r_e);
  const T swing = smaller(to_cutoff, to_saturation);
  const T v_b = t.v_be + t.v_e;
  const T r_e = c[Role::emitter] + c[Role::emitter_bypassed];
  const T sign(device.pnp ? -1.0 : 1.0);

  set(Figure::gain, band.gain);
  set(Figure::lower_cutoff, band.lower);
  set(Figure::upper_cutoff, band.upper);
  set(Figure::bandwidth, band.upper - band.lower);
  set(Figure::input_resistance, m.r_in);
  set(Figure::output_resistance, output_resistance(c, m));
  set(Figure::output_swing, swing);
  set(Figure::input_overload, swing / band.gain);
  set(Figure::supply_current, t.i_c + (c.supply - v_b) / c[Role::upper_divider]);
  set(Figure::collector_current, t.i_c);
  set(Figure::collector_emitter_voltage, t.v_ce);
  set(Figure::dissipation, t.v_ce * t.i_c + t.v_be * t.i_b);
  set(Figure::base_voltage, sign * v_b);
  set(Figure::emitter_voltage, sign * t.v_e);
  set(Figure::collector_voltage, sign * (t.v_ce + t.v_e));
  set(Figure::junction_temperature, junction);
  set(Figure::midband_gain, midband_gain(m, definition.from_input ? T(0.0) : c.source_resistance));
  set(Figure::swing_to_cutoff, to_cutoff);
  set(Figure::swing_to_saturation, to_saturation);
  // textbook stability factor at constant VBE, Millman & Halkias, Integrated Electronics
  set(Figure::stability_factor, (one + m.beta) / (one + m.beta * r_e / (r_e + m.r_divider)));
  set(Figure::divider_current_ratio, v_b / c[Role::lower_divider] / t.i_b);
  set(Figure::emitter_voltage_share, t.v_e / c.supply);
  set(Figure::collector_emitter_share, t.v_ce / c.supply);
  return f;
}

/// The circuit that the gain is defined on: without RS and Cs where it is taken from the input node.
template <class T>
Circuit<T> gain_circuit(Circuit<T> c, const GainDefinition& definition) {
  if (definition.from_input) {
    c.source_resistance = T(0.0);
    c.source_capacitance = T(0.0);
  }
  return c;
}

inline double omega_squared(double frequency) {
  const double omega = 2 * kPi * frequency;
  return omega * omega;
}

template <class T>
T hertz(const T& u) {
  return square_root(u) * T(1.0 / (2 * kPi));
}

}  // namespace bandwright
