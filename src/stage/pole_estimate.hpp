// The one-capacitor-at-a-time estimates in closed form, for every kind of number.
//
// Low side: short-circuit time constants, each coupling capacitor with the others shorted. High side: open-circuit time
// constants. Source: Gray & Searle, Electronic Principles, 1969. ro is kept (midband.hpp).
#pragma once

#include "stage/midband.hpp"

namespace bandwright {

/// Capacitors of the high side, in the order of PoleEstimate::high.
enum class HighCapacitor { base_emitter, feedback, shunt, load, source, stray_input, stray_output, stray_feedback };
inline constexpr std::size_t kHighCapacitors = 8;

/// Resistance seen and capacitance.
template <class T>
struct SeenBy {
  T resistance;
  T capacitance;
};

template <class T>
struct PoleEstimate {
  T gain;
  T lower;                       ///< Hz, sum of the corner frequencies
  T upper;                       ///< Hz, 1/(2 pi sum of time constants)
  std::array<SeenBy<T>, 3> low;  ///< input coupling, output coupling, bypass
  std::array<SeenBy<T>, kHighCapacitors> high;
};

template <class T>
std::array<SeenBy<T>, 3> low_side(const Circuit<T>& c, const Midband<T>& m) {
  const T r_source = source_side(m, c.source_resistance);
  const T r_b = m.r_pi + m.r_bb + r_source;
  const T emitter_g = T(1.0) / r_b + m.g_c * (m.beta / r_b + m.g_o) / (m.g_c + m.g_o);
  const T into_emitter = c[Role::emitter] + T(1.0) / emitter_g;
  const T r_load = T(1.0) / c.load_conductance;
  return {{{c.source_resistance + m.r_in, c[Role::input_coupling]},
           {r_load + output_resistance(c, m), c[Role::output_coupling]},
           {parallel(c[Role::emitter_bypassed], into_emitter), c[Role::bypass]}}};
}

template <class T>
std::array<SeenBy<T>, kHighCapacitors> high_side(const Circuit<T>& c, const HybridPi<T>& h, const Midband<T>& m) {
  const T one(1.0);
  const T r_p = source_side(m, c.source_resistance), r_s = r_p + m.r_bb;
  const T z_b = r_p + m.r_base;
  const T leak = m.r_e * m.g_o / m.d_c;
  const T own = (one + m.g_o * m.r_e) / m.d_c;
  const T i_mu = (r_s + leak) / z_b, i_wf = (r_p + leak) / z_b;
  const T r_pi = m.r_pi * (r_s + m.r_e * (m.g_c + m.g_o) / m.d_c) / z_b;
  const T r_mu = r_s * (one - i_mu) + own + i_mu * m.transfer;
  const T r_wf = r_p * (one - i_wf) + own + i_wf * m.transfer;
  const T r_c = own + leak / z_b * m.transfer;
  const T r_base = r_p * m.r_base / (r_p + m.r_base);
  return {{{r_pi, h.input_capacitance},
           {r_mu, h.feedback_capacitance},
           {r_c, c[Role::shunt]},
           {r_c, c.load_capacitance},
           {r_base, c.source_capacitance},
           {r_base, c.stray_input},
           {r_c, c.stray_output},
           {r_wf, c.stray_feedback}}};
}

template <class T>
PoleEstimate<T> pole_estimate(const Circuit<T>& c, const HybridPi<T>& h) {
  const Midband<T> m = midband(c, h);
  PoleEstimate<T> e;
  e.gain = midband_gain(m, c.source_resistance);
  e.low = low_side(c, m);
  e.high = high_side(c, h, m);
  T omega(0.0), tau(0.0);
  for (std::size_t i = 0; i < e.low.size(); ++i) {
    const bool present = first_value(e.low[i].capacitance) > 0;
    if (present) omega = omega + T(1.0) / (e.low[i].resistance * e.low[i].capacitance);
  }
  for (const SeenBy<T>& s : e.high) tau = tau + s.resistance * s.capacitance;
  e.lower = omega * T(1.0 / (2 * kPi));
  e.upper = T(1.0 / (2 * kPi)) / tau;
  return e;
}

}  // namespace bandwright
