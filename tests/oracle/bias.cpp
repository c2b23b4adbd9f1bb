#include "bias.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace oracle {

using bandwright::BipolarParameters;
using bandwright::GainCurve;
using bandwright::index;
using bandwright::Role;

namespace {

// Exact by definition of the SI, 2019.
constexpr Real kBoltzmann = 1.380649e-23L;
constexpr Real kCharge = 1.602176634e-19L;
constexpr Real kT0 = 298.15L;

using Points = std::array<Real, GainCurve::kMaxPoints>;

Real inner_slope(Real h0, Real h1, Real d0, Real d1) {
  if (d0 * d1 <= 0) return 0;
  const Real w0 = 2 * h1 + h0, w1 = h1 + 2 * h0;
  return (w0 + w1) / (w0 / d0 + w1 / d1);
}

Points slopes(const GainCurve& curve) {
  const auto n = static_cast<std::size_t>(curve.points);
  Points h{}, d{}, m{};
  for (std::size_t i = 0; i + 1 < n; ++i) {
    h[i] = Real(curve.log_current[i + 1]) - curve.log_current[i];
    d[i] = (Real(curve.log_gain[i + 1]) - curve.log_gain[i]) / h[i];
  }
  for (std::size_t i = 1; i + 1 < n; ++i) m[i] = inner_slope(h[i - 1], h[i], d[i - 1], d[i]);
  return m;  // 0 at the ends: the curve is constant beyond them, and its derivative has no jump
}

/// Cubic Bernstein form between two points.
Real bernstein(Real x0, Real x1, Real y0, Real y1, Real m0, Real m1, Real x) {
  const Real h = x1 - x0, t = (x - x0) / h, u = 1 - t;
  const Real b1 = y0 + m0 * h / 3, b2 = y1 - m1 * h / 3;
  return u * u * u * y0 + 3 * u * u * t * b1 + 3 * u * t * t * b2 + t * t * t * y1;
}

/// The root of a falling function, to the last bit that bisection can give.
template <class F>
Real falling_root(F f, Real low, Real high) {
  for (int step = 0; step < 200; ++step) {
    const Real middle = (low + high) / 2;
    if (middle == low || middle == high) break;
    (f(middle) > 0 ? low : high) = middle;
  }
  return (low + high) / 2;
}

/// The equations of the stage at one junction temperature.
class Equations {
public:
  Equations(const BiasNetwork& net, Real temperature) : q_(*net.device), t_(temperature), supply_(net.supply) {
    const Real r1 = net.parts[index(Role::upper_divider)], r2 = net.parts[index(Role::lower_divider)];
    v_thevenin_ = supply_ * r2 / (r1 + r2);
    r_thevenin_ = r1 * r2 / (r1 + r2);
    r_c_ = net.parts[index(Role::collector)];
    r_e_ = net.parts[index(Role::emitter)] + net.parts[index(Role::emitter_bypassed)];
    v_t_ = kBoltzmann * t_ / kCharge;
    log_is_ = q_.log_saturation_current + q_.saturation_current_exponent * std::log(t_ / kT0) +
              kCharge * q_.bandgap / kBoltzmann * (1 / kT0 - 1 / t_);
    icbo_ = q_.cutoff_current * std::pow(2.0L, (t_ - kT0) / 10);
    multiplier_ = net.gain_multiplier * std::pow(t_ / kT0, Real(q_.gain_exponent));
  }

  Bias solve() const {
    Real low = std::log(1e-12L), high = std::log(1e-6L);
    while (!(residual(low) > 0)) low -= 5;
    while (!(residual(high) < 0)) high += 2;
    const Real log_ic = falling_root([&](Real x) { return residual(x); }, low, high);
    return at(std::exp(log_ic));
  }

private:
  Real early(Real v_ce) const { return 1 + std::max<Real>(v_ce, 0) * q_.inverse_early_voltage; }
  Real beta0(Real i_c) const { return multiplier_ * gain_at(q_.gain, i_c); }
  Real base_current(Real i_c, Real beta, Real v_ce) const {
    return i_c / (early(v_ce) * beta) - icbo_ * (1 + 1 / beta);
  }

  /// VCE for a collector current: the base current in RE hangs on VCE through the Early factor.
  Real collector_emitter(Real i_c, Real beta) const {
    const auto excess = [&](Real v) { return supply_ - i_c * r_c_ - (i_c + base_current(i_c, beta, v)) * r_e_ - v; };
    const Real most_negative = supply_ - i_c * r_c_ - (i_c + i_c / beta) * r_e_ - 1;
    const Real most_positive = supply_ - i_c * r_c_ - (i_c - icbo_ * (1 + 1 / beta)) * r_e_ + 1;
    return falling_root(excess, most_negative, most_positive);
  }

  Bias at(Real i_c) const {
    Bias b;
    b.temperature = t_;
    b.i_c = i_c;
    b.beta0 = beta0(i_c);
    b.v_ce = collector_emitter(i_c, b.beta0);
    b.i_b = base_current(i_c, b.beta0, b.v_ce);
    b.v_be = v_t_ * (std::log(i_c / early(b.v_ce)) - log_is_);
    if (b.v_ce < std::max(q_.saturation_voltage + 0.3L, b.v_be))
      b.state = bandwright::BiasState::saturated;
    else if (i_c < 100 * icbo_)
      b.state = bandwright::BiasState::cut_off;
    else
      b.state = bandwright::BiasState::active;
    return b;
  }

  Real residual(Real log_ic) const {
    const Bias b = at(std::exp(log_ic));
    return v_thevenin_ - b.i_b * r_thevenin_ - b.v_be - (b.i_c + b.i_b) * r_e_;
  }

  const BipolarParameters& q_;
  Real t_, supply_, v_thevenin_ = 0, r_thevenin_ = 0, r_c_ = 0, r_e_ = 0;
  Real v_t_ = 0, log_is_ = 0, icbo_ = 0, multiplier_ = 1;
};

}  // namespace

Real gain_at(const GainCurve& curve, Real current) {
  const auto n = static_cast<std::size_t>(curve.points);
  const Real x = std::log(current);
  if (n == 1 || x <= curve.log_current[0]) return std::exp(Real(curve.log_gain[0]));
  if (x >= curve.log_current[n - 1]) return std::exp(Real(curve.log_gain[n - 1]));
  std::size_t i = 0;
  while (x > curve.log_current[i + 1]) ++i;
  const Points m = slopes(curve);
  return std::exp(bernstein(curve.log_current[i], curve.log_current[i + 1], curve.log_gain[i], curve.log_gain[i + 1],
                            m[i], m[i + 1], x));
}

void set_slopes(GainCurve& curve) {
  const Points m = slopes(curve);
  for (std::size_t i = 0; i < m.size(); ++i) curve.slope[i] = static_cast<double>(m[i]);
}

Bias solve_bias(const BiasNetwork& network, Real temperature) { return Equations(network, temperature).solve(); }

Bias solve_bias(const bandwright::Stage& stage) {
  const BiasNetwork network{widen(stage.parts), stage.around.supply, stage.device, 1};
  const Bias cold = solve_bias(network, stage.around.ambient);
  const Real dissipation = std::max<Real>(cold.v_ce * cold.i_c + cold.v_be * cold.i_b, 0);  // saturated: no cooling
  return solve_bias(network, stage.around.ambient + stage.device->thermal_resistance * dissipation);
}

HybridPi hybrid_pi(const BipolarParameters& q, const Bias& b) {
  HybridPi small;
  const Real v_t = kBoltzmann * b.temperature / kCharge;
  const Real v_cb = std::max<Real>(b.v_ce - b.v_be, 0);
  small.g_m = b.i_c / v_t;
  small.g_pi = small.g_m / (b.beta0 * (1 + b.v_ce * q.inverse_early_voltage));
  // ro = (VA + VCE)/IC, written so that VA infinite gives 0
  small.g_o = b.i_c * q.inverse_early_voltage / (1 + b.v_ce * q.inverse_early_voltage);
  small.c_pi = small.g_m * q.transit_time + q.emitter_capacitance;
  small.c_mu = q.feedback_capacitance * std::pow(1 + v_cb / q.built_in_potential, -Real(q.grading_exponent));
  small.r_bb = q.base_resistance;
  return small;
}

}  // namespace oracle
