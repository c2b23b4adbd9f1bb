#include "nodal.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "fifty_digits.hpp"

namespace oracle {

using bandwright::index;
using bandwright::Role;

namespace {

// Slowest possible natural frequency: 1/(2 pi 20 Mohm 4.7 mF) = 1.7e-6 Hz. Fastest: 1 ohm with 0.1 pF, 1.6e12 Hz.
constexpr Real kScanBottom = 1e-8L;
constexpr int kPointsPerDecade = 24;
constexpr int kScanPoints = 22 * kPointsPerDecade + 1;  // to 1e14 Hz
constexpr Real kLimit = 1e20L;                          // Hz: |H| stands at its limit there, if it has one
constexpr Real kTie = 1e-9L;                            // of the definition of the midband gain
constexpr int kBisections = 42;                         // 0.096 in ln f down to 2e-14
constexpr int kGoldenSteps = 44;                        // 0.19 in ln f down to 1e-10: |H| is flat there to 1e-20
constexpr int kNearbySteps = 26;                        // 0.02 in ln f down to 7e-8: flat to 1e-14
constexpr Real kStands = 1e-12L;                        // in ln f: the next step would vanish

enum class Fate { as_it_is, shorted, opened };

struct Treatment {
  Fate cin = Fate::as_it_is, cout = Fate::as_it_is, ce = Fate::as_it_is, small = Fate::as_it_is;
  bool load = true;
};

void place(Network& net, int a, int b, Real farad, Fate fate) {
  if (fate == Fate::shorted)
    net.join(a, b);
  else if (fate == Fate::as_it_is && farad != 0)
    net.capacitor(a, b, farad);
}

void couple(Network& net, int a, int b, Real farad, Fate fate) {
  if (fate == Fate::shorted)
    net.join(a, b);
  else if (fate == Fate::as_it_is)
    net.coupling(a, b, farad);
}

void add_device(Network& net, const HybridPi& q, Fate small) {
  net.resistor(base, inner_base, q.r_bb);
  net.conductance(inner_base, emitter, q.g_pi);
  net.conductance(collector, emitter, q.g_o);
  net.controlled_current(collector, emitter, inner_base, emitter, q.g_m);
  place(net, inner_base, emitter, q.c_pi, small);
  place(net, inner_base, collector, q.c_mu, small);
}

void add_emitter(Network& net, const Parts& p, Fate bypass) {
  net.resistor(emitter, junction, p[index(Role::emitter)]);
  net.resistor(junction, ground, p[index(Role::emitter_bypassed)]);
  if (p[index(Role::bypass)] != 0) place(net, junction, ground, p[index(Role::bypass)], bypass);
}

Network build(const Circuit& x, const Treatment& how) {
  const Parts& p = x.parts;
  Network net(kWires);
  if (x.from_input) {
    net.join(emf, input);
  } else {
    net.resistor(emf, input, x.around.source_resistance);
    place(net, input, ground, x.around.source_capacitance, how.small);
  }
  couple(net, input, base, p[index(Role::input_coupling)], how.cin);
  net.resistor(base, ground, p[index(Role::upper_divider)]);
  net.resistor(base, ground, p[index(Role::lower_divider)]);
  net.resistor(collector, ground, p[index(Role::collector)]);
  add_device(net, x.device, how.small);
  add_emitter(net, p, how.ce);
  place(net, base, ground, x.around.stray.input, how.small);
  place(net, collector, ground, x.around.stray.output, how.small);
  place(net, collector, base, x.around.stray.feedback, how.small);
  place(net, collector, ground, p[index(Role::shunt)], how.small);
  couple(net, collector, output, p[index(Role::output_coupling)], how.cout);
  place(net, output, ground, x.around.load_capacitance, how.small);
  if (how.load && x.around.load_conductance != 0) net.conductance(output, ground, x.around.load_conductance);
  net.close(emf);
  return net;
}

Real log_frequency(int point) { return std::log(kScanBottom) + point * std::numbers::ln10_v<Real> / kPointsPerDecade; }

Real at_log(const Network& net, Real log_f) { return magnitude(net, std::exp(log_f)); }

/// Largest |H| between two log frequencies that enclose one peak, by golden section.
std::pair<Real, Real> refine_peak(const Network& net, Real low, Real high, int steps = kGoldenSteps) {
  constexpr Real kGolden = 0.618033988749894848L;
  Real x1 = high - kGolden * (high - low), x2 = low + kGolden * (high - low);
  Real y1 = at_log(net, x1), y2 = at_log(net, x2);
  for (int step = 0; step < steps; ++step) {
    if (y1 >= y2) {
      high = x2, x2 = x1, y2 = y1;
      x1 = high - kGolden * (high - low), y1 = at_log(net, x1);
    } else {
      low = x1, x1 = x2, y1 = y2;
      x2 = low + kGolden * (high - low), y2 = at_log(net, x2);
    }
  }
  return y1 >= y2 ? std::pair(x1, y1) : std::pair(x2, y2);
}

/// The crossing of `level` between a log frequency where |H| is at or above it and one where it is under it.
Real bisect(const Network& net, Real level, Real above, Real under) {
  for (int step = 0; step < kBisections; ++step) {
    const Real middle = (above + under) / 2;
    (at_log(net, middle) >= level ? above : under) = middle;
  }
  return (above + under) / 2;
}

/// The same over a short way, on which ln|H| is about straight: false position, the end that stays twice at half
/// weight.
Real false_position(const Network& net, Real level, Real above, Real under) {
  const auto excess = [&](Real x) { return std::log(at_log(net, x) / level); };
  Real e_above = excess(above), e_under = excess(under), x = above;
  if (!(e_above >= 0 && e_under < 0)) return NAN;
  for (int step = 0, stayed = 0; step < kBisections; ++step) {
    const Real before = x;
    x = (above * e_under - under * e_above) / (e_under - e_above);
    if (std::abs(x - before) < kStands) break;
    const Real e = excess(x);
    if (e >= 0) {
      above = x, e_above = e;
      if (stayed > 0) e_under /= 2;
      stayed = 1;
    } else {
      under = x, e_under = e;
      if (stayed < 0) e_above /= 2;
      stayed = -1;
    }
  }
  return x;
}

Real slope(const Network& net, Real log_f) {
  constexpr Real kStep = 1e-5L;
  return (std::log(at_log(net, log_f + kStep)) - std::log(at_log(net, log_f - kStep))) / (2 * kStep);
}

/// Walks the scan from the reference in one direction until |H| is under the level, then bisects.
std::optional<Real> crossing(const Network& net, const std::vector<Real>& y, Real reference, Real level, int step) {
  Real above = reference;
  const Real exact = (reference - log_frequency(0)) / (log_frequency(1) - log_frequency(0));
  int point = static_cast<int>(step > 0 ? std::floor(exact) + 1 : std::ceil(exact) - 1);
  for (; point >= 0 && point < kScanPoints; point += step) {
    if (y[static_cast<std::size_t>(point)] < level) return bisect(net, level, above, log_frequency(point));
    above = log_frequency(point);
  }
  return std::nullopt;
}

struct Peak {
  Real log_f = 0, value = 0;
  bool at_infinity = false;
};

/// The highest peak, or the limit at infinite frequency where no peak stands above it.
Peak highest_peak(const Network& net, const std::vector<Real>& y) {
  const Real top = *std::max_element(y.begin(), y.end());
  Peak best;
  for (int i = 1; i + 1 < kScanPoints; ++i) {
    const auto at = static_cast<std::size_t>(i);
    if (y[at] < y[at - 1] || y[at] < y[at + 1] || y[at] < top / 2) continue;
    const auto [log_f, value] = refine_peak(net, log_frequency(i - 1), log_frequency(i + 1));
    if (value > best.value * (1 + kTie)) best = {log_f, value};
  }
  if (y.back() < 0.9L * top) return best;
  const Real limit = magnitude_in_fifty_digits(net, output, kLimit);
  if (limit * (1 + kTie) > best.value) best = {log_frequency(kScanPoints - 1), limit, true};
  return best;
}

}  // namespace

HybridPi widen(const bandwright::SmallSignal& s) {
  return {s.transconductance,  s.input_conductance,    s.output_conductance,
          s.input_capacitance, s.feedback_capacitance, s.base_resistance};
}

Parts widen(const bandwright::PartValues& parts) {
  Parts wide{};
  std::copy(parts.begin(), parts.end(), wide.begin());
  return wide;
}

Network network(const Circuit& circuit) { return build(circuit, {}); }

Network midband_network(const Circuit& circuit, const Midband& how) {
  const auto fate = [&](Role role) { return how.open == role ? Fate::opened : Fate::shorted; };
  return build(circuit,
               {fate(Role::input_coupling), fate(Role::output_coupling), fate(Role::bypass), Fate::opened, how.load});
}

Real magnitude(const Network& net, Real frequency) {
  return std::abs(net.transfer(Complex(0, 2 * std::numbers::pi_v<Real> * frequency), output));
}

Edges edges(const Network& net, Real at) {
  std::vector<Real> y(kScanPoints);
  for (int i = 0; i < kScanPoints; ++i) y[static_cast<std::size_t>(i)] = at_log(net, log_frequency(i));
  const Peak peak = highest_peak(net, y);
  Edges result;
  result.rises_to_the_end = peak.at_infinity;
  const Real log_reference = at > 0 ? std::log(at) : peak.log_f;
  result.reference = std::exp(log_reference);
  result.gain = at > 0 ? magnitude(net, at) : peak.value;
  const Real level = result.gain / std::numbers::sqrt2_v<Real>;
  if (at > 0 && result.gain < peak.value / std::numbers::sqrt2_v<Real>) return result;
  if (const auto low = crossing(net, y, log_reference, level, -1))
    result.lower = std::exp(*low), result.lower_slope = slope(net, *low);
  if (const auto high = crossing(net, y, log_reference, level, 1))
    result.upper = std::exp(*high), result.upper_slope = slope(net, *high);
  return result;
}

Edges edges_near(const Network& net, const Edges& near, Real at) {
  constexpr Real kAround = 0.01L;  // in ln f
  Edges result = near;
  if (at > 0)
    result.gain = magnitude(net, at);
  else if (near.rises_to_the_end)
    result.gain = magnitude_in_fifty_digits(net, output, kLimit);
  else
    result.gain =
        refine_peak(net, std::log(near.reference) - kAround, std::log(near.reference) + kAround, kNearbySteps).second;
  const Real level = result.gain / std::numbers::sqrt2_v<Real>;
  const auto again = [&](const std::optional<Real>& edge, Real inwards) -> std::optional<Real> {
    if (!edge) return std::nullopt;
    return std::exp(false_position(net, level, std::log(*edge) + inwards, std::log(*edge) - inwards));
  };
  result.lower = again(near.lower, kAround);
  result.upper = again(near.upper, -kAround);
  return result;
}

}  // namespace oracle
