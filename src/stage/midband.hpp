// The resistive networks behind the textbook figures, for every kind of number.
//
// Midband: Cin, Cout, CE short, every other capacitor open. ro is kept. With GC = 1/RC + 1/RL, RE the emitter
// resistance that is not bypassed, Dc = GC + go + go RE GC:
//   v_c = -i_b (beta - go RE)/Dc,   resistance into the base rbb' + rpi + RE (go + (1 + beta) GC)/Dc.
// Derived from Kirchhoff's current law at base, emitter and collector; with go = 0 these are the published forms
// (Gray, Hurst, Lewis, Meyer, Analysis and Design of Analog Integrated Circuits).
#pragma once

#include "stage/common_emitter.hpp"

namespace bandwright {

template <class T>
T parallel(const T& a, const T& b) {
  return a * b / (a + b);
}

template <class T>
struct Midband {
  T r_pi, beta, g_o;
  T r_e;        ///< emitter resistance not bypassed
  T g_c;        ///< conductance from collector to 0 V: RC and RL
  T d_c;        ///< Dc above
  T r_divider;  ///< R1||R2
  T r_base;     ///< into the base terminal
  T r_in;       ///< R1||R2||r_base: the input resistance
  T r_bb;
  T transfer;  ///< -v_c/i_b, ohm
};

/// `bypassed`: the bypass capacitor is there and shorts RE2.
template <class T>
Midband<T> midband(const Circuit<T>& c, const HybridPi<T>& h) {
  Midband<T> m;
  m.r_pi = T(1.0) / h.input_conductance;
  m.beta = h.transconductance * m.r_pi;
  m.g_o = h.output_conductance;
  const T r_e1 = c[Role::emitter];
  m.r_e = select(less(T(0.0), c[Role::bypass]), r_e1, r_e1 + c[Role::emitter_bypassed]);
  m.g_c = T(1.0) / c[Role::collector] + c.load_conductance;
  m.d_c = m.g_c + m.g_o + m.g_o * m.r_e * m.g_c;
  m.r_bb = h.base_resistance;
  m.r_divider = parallel(c[Role::upper_divider], c[Role::lower_divider]);
  m.r_base = m.r_bb + m.r_pi + m.r_e * (m.g_o + (T(1.0) + m.beta) * m.g_c) / m.d_c;
  m.r_in = parallel(m.r_divider, m.r_base);
  m.transfer = (m.beta - m.g_o * m.r_e) / m.d_c;
  return m;
}

/// Gain of the resistive network from the source's EMF (its resistance `r_s`) to the load.
template <class T>
T midband_gain(const Midband<T>& m, const T& r_s) {
  return m.r_in / (m.r_in + r_s) * m.transfer / m.r_base;
}

/// RS || R1 || R2.
template <class T>
T source_side(const Midband<T>& m, const T& r_s) {
  return r_s * m.r_divider / (r_s + m.r_divider);
}

/// Into the output with the load removed and RS in place of the source.
template <class T>
T output_resistance(const Circuit<T>& c, const Midband<T>& m) {
  const T r_b = m.r_pi + m.r_bb + source_side(m, c.source_resistance);
  const T g = m.g_o * (T(1.0) + m.r_e / r_b) / (T(1.0) + m.r_e * (m.g_o + (T(1.0) + m.beta) / r_b));
  return T(1.0) / (T(1.0) / c[Role::collector] + g);
}

}  // namespace bandwright
