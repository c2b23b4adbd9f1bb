// The divider-biased common-emitter stage, for every kind of number: bias residual and exact transfer function.
//
//  Vsrc -RS-+-Cin-+------ base     collector --+-- Cout --+-- out
//           |     |                 |          |          |
//          Cs    R1 to VCC         RC to VCC  Csh        RL, CL
//                R2 to 0 V        emitter -RE1-+-RE2 to 0 V
//                                              +-CE  to 0 V
//
// An absent emitter resistor, bypass or shunt is a value of 0: no equation branches on it.
#pragma once

#include <array>
#include <bandwright/stage.hpp>

#include "device/bipolar.hpp"
#include "numeric/polynomial.hpp"

namespace bandwright {

/// A stage in numbers of type T, magnitudes, SI.
template <class T>
struct Circuit {
  std::array<T, kRoleCount> part;
  T supply;
  T source_resistance, source_capacitance;
  T load_conductance, load_capacitance;
  T stray_input, stray_output, stray_feedback;

  const T& operator[](Role role) const { return part[index(role)]; }
};

template <class T>
Circuit<T> circuit_of(const Stage& stage) {
  Circuit<T> c;
  for (std::size_t i = 0; i < kRoleCount; ++i) c.part[i] = T(stage.parts[i]);
  const Surroundings& a = stage.around;
  c.supply = T(a.supply);
  c.source_resistance = T(a.source_resistance);
  c.source_capacitance = T(a.source_capacitance);
  c.load_conductance = T(a.load_conductance);
  c.load_capacitance = T(a.load_capacitance);
  c.stray_input = T(a.stray.input);
  c.stray_output = T(a.stray.output);
  c.stray_feedback = T(a.stray.feedback);
  return c;
}

/// The bias network at a trial collector current.
template <class T>
struct BiasTrial {
  T i_c, i_b, v_be, v_ce, v_e;
  T gain;         ///< beta0, multiplier and temperature included
  T log_gain_25;  ///< ln of the nominal beta0 at 25 °C
  T residual;     ///< Vth - IB Rth - VBE - IE RE, volt; 0 at the operating point
  T slope;        ///< d residual / d ln IC, exact, always negative where beta0 rises slower than IC
};

/// Vth = IB Rth + VBE + IE RE with IF (1 + VCE/VA) = IC, IB = IF/beta0 - ICBO (1 + 1/beta0), VCE = VCC - IC RC - IE RE.
/// The forward current IF is the smaller root of a quadratic in IF, written without cancellation.
template <class T>
BiasTrial<T> bias_trial(const Circuit<T>& c, const Bipolar<T>& device, const T& log_i_c) {
  const T r1 = c[Role::upper_divider], r2 = c[Role::lower_divider];
  const T r_th = r1 * r2 / (r1 + r2);
  const T v_th = c.supply * r2 / (r1 + r2);
  const T r_e = c[Role::emitter] + c[Role::emitter_bypassed];
  const T r_ce = c[Role::collector] + r_e;
  const T& g_a = device.inverse_early_voltage;

  const GainPoint<T> curve = gain_point(device.sheet->gain, log_i_c);
  BiasTrial<T> t;
  t.i_c = e_to(log_i_c);
  t.log_gain_25 = curve.log_gain;
  t.gain = e_to(curve.log_gain + device.log_gain_shift);
  const T k = T(1.0) / t.gain;
  const T leak = device.cutoff_current * (T(1.0) + k);
  const T a = T(1.0) + g_a * (c.supply - t.i_c * r_ce + r_e * leak);
  const T root = square_root(larger(a * a - T(4.0) * g_a * r_e * k * t.i_c, T(0.0)));
  const T half_sum = T(0.5) * (a + root);
  const T i_f = t.i_c / half_sum;
  t.i_b = i_f * k - leak;
  t.v_be = device.thermal_voltage * (log_i_c - ln(half_sum) - device.log_saturation_current);
  t.v_e = (t.i_c + t.i_b) * r_e;
  t.v_ce = c.supply - t.i_c * c[Role::collector] - t.v_e;
  t.residual = v_th - t.i_b * r_th - t.v_be - t.v_e;

  // d ln IF/d ln IC = y and d IB/d ln IC = z solve two linear equations
  const T q = g_a / half_sum;
  const T beta_part = curve.slope * k * (device.cutoff_current - i_f);
  const T y = (T(1.0) + q * (t.i_c * r_ce + r_e * beta_part)) / (T(1.0) - q * r_e * i_f * k);
  const T z = i_f * k * y + beta_part;
  t.slope = -(device.thermal_voltage * y + z * (r_th + r_e) + t.i_c * r_e);
  return t;
}

/// H(s) = s^2 N(s)/D(s).
template <class T>
struct Transfer {
  Polynomial<T, 4> numerator;
  Polynomial<T, 7> denominator;
};

/// Every coefficient of D is a sum of positive products: rows combined by Kirchhoff's current law, branches that may be
/// 0 entered as impedances. The one subtraction in N is the physical zero of Cmu against gm.
///
/// Symbols: emitter impedance DE/NE, load branch admittance NL/DL, source branch folded into Y0/D1, Y = gpi + s Cpi,
/// S = Y + gm + go, m = s Cmu.
template <class T>
Transfer<T> transfer(const Circuit<T>& c, const HybridPi<T>& h) {
  using P1 = Polynomial<T, 1>;
  const T one(1.0), zero(0.0);
  const T g_c = one / c[Role::collector];
  const T g_base = one / c[Role::upper_divider] + one / c[Role::lower_divider];
  const T r_s = c.source_resistance, r_bb = h.base_resistance, g_m = h.transconductance, g_o = h.output_conductance;
  const T c_in = c[Role::input_coupling], c_out = c[Role::output_coupling], c_e = c[Role::bypass];
  const T r_e1 = c[Role::emitter], r_e2 = c[Role::emitter_bypassed];
  const T c_mu = h.feedback_capacitance;

  const P1 d1{{one, r_s * (c.source_capacitance + c_in)}};
  const P1 n_e{{one, r_e2 * c_e}};
  const P1 d_e{{r_e1 + r_e2, r_e1 * r_e2 * c_e}};
  const P1 d_l = admittance(c.load_conductance, c_out + c.load_capacitance);
  const Polynomial<T, 2> n_l = times_s(c_out, admittance(c.load_conductance, c.load_capacitance));
  const P1 y = admittance(h.input_conductance, h.input_capacitance);
  const P1 s = admittance(h.input_conductance + g_m + g_o, h.input_capacitance);
  const P1 m = admittance(zero, c_mu);
  const P1 g_o_m = admittance(g_o, c_mu);

  const Polynomial<T, 2> y0 =
      d1 * admittance(g_base, c.stray_input) + times_s(c_in, admittance(one, r_s * c.source_capacitance));
  const Polynomial<T, 2> k = r_bb * y0 + d1;
  const Polynomial<T, 2> x = d_l * admittance(g_c, c[Role::shunt] + c.stray_output) + n_l;

  const Polynomial<T, 2> ds_n = d_e * s + n_e;
  const auto through = times_s(c_mu, ds_n) + y * (g_o * d_e + n_e);
  const auto bridge = ds_n + r_bb * through;
  const auto tail = n_e * (d_l * g_o_m + x);
  const auto n = d_e * (g_o * (y * d_l) + s * (x + d_l * m)) + tail;
  const auto p = d_e * s * x + n_e * (g_o * d_l + x);
  const auto q = g_o * (d_e * x) + tail;
  const auto forward = p + g_m * (n_e * d_l);
  const auto b = times_s(c_mu, forward) + y * q;

  Transfer<T> h_s;
  h_s.denominator =
      y0 * n + k * b + times_s(c.stray_feedback, y0 * d_l * bridge + d1 * (r_bb * b + forward + y * (d_l * n_e)));
  h_s.numerator =
      c_in * c_out *
      (d_e * (g_o * y + times_s(c_mu, s)) + times_s(c_mu, n_e) + T(-g_m) * n_e + times_s(c.stray_feedback, bridge));
  return h_s;
}

}  // namespace bandwright
