// Solves units side by side, for every kind of number: the operating point, the peak and both crossings of the exact
// response, each by a few Newton steps from the nominal unit's. A lane that has converged stands still, so that its
// result never depends on its neighbours: the same bytes for double and for lanes of any width. A lane that does not
// converge is left to be solved one by one with scan and bracket.
#pragma once

#include <bandwright/population.hpp>

#include "analysis/figure_equations.hpp"
#include "analysis/response.hpp"
#include "analysis/unit.hpp"
#include "kernel/unit_task.hpp"
#include "numeric/deviate.hpp"

namespace bandwright {

/// A value that is improved step by step until it stands. `open` is 1 while it moves.
template <class T>
struct Settling {
  T x;
  T open{1.0};

  /// Moves by `step` where still open; closes where the step is within `tolerance`, so that the next one would vanish.
  void move(const T& step, const T& tolerance) {
    const auto moving = less(T(0.5), open);
    x = select(moving, x + step, x);
    const T size = larger(step, -step);
    open = select(less(size, tolerance), T(0.0), open);
  }
  bool any_open() const {
    for (std::size_t i = 0; i < kLaneCount<T>; ++i) {
      if (lane(open, i) > 0.5) return true;
    }
    return false;
  }
};

inline constexpr int kMostSteps = 8;
inline constexpr double kCurrentStep = 1e-8;   // of ln IC: Newton's next step is its square
inline constexpr double kCrossingStep = 1e-7;  // relative, of u: the same
inline constexpr double kPeakGain = 1e-15;     // relative gain still to be won by the step

/// What a unit is drawn to be.
template <class T>
struct UnitDraw {
  UnitFactors<T> factors;
  std::array<T, kRoleCount> drift;  ///< 1/K
};

template <class T>
T loaded(const double* from) {
  T x(0.0);
  for (std::size_t i = 0; i < kLaneCount<T>; ++i) set_lane(x, i, from[i]);
  return x;
}

template <class T>
T factor_of(const CauseSpread& spread, CauseScale scale, const T& x) {
  const T d = T(spread.centre) + x * select(less(x, T(0.0)), T(spread.below), T(spread.above));
  if (scale == CauseScale::logarithm) return e_to(d);
  return scale == CauseScale::share ? T(1.0) + d : d;
}

/// What two parts of a pair make together, over their nominal value.
template <class T>
T pair_factor(const PairSpread& pair, bool uniform, const T& first, const T& second) {
  const auto part = [&](const Tolerance& t, const T& u) {
    const T x = uniform ? symmetric_uniform(u) : truncated_normal(u);
    return T(1.0) + x * select(less(x, T(0.0)), T(t.below), T(t.above));
  };
  const T a = part(pair.tolerance[0], first), b = part(pair.tolerance[1], second);
  const T w(pair.weight), rest(1.0 - pair.weight);
  return pair.adds_up ? w * a + rest * b : T(1.0) / (w / a + rest / b);
}

/// The unit whose uniform numbers start at `draws`; `scales` as in the table of causes.
template <class T>
UnitDraw<T> draw_unit(const Population& p, const CauseScale* scales, const double* draws, std::size_t stride) {
  UnitDraw<T> unit;
  for (std::size_t i = 0; i < kCauseCount; ++i) {
    if (!p.spread[i].varies()) {
      if (p.spread[i].centre != 0) unit.factors.of[i] = factor_of(p.spread[i], scales[i], T(0.0));
      continue;
    }
    const T u = loaded<T>(draws + i * stride);
    unit.factors.of[i] = factor_of(p.spread[i], scales[i], p.uniform ? symmetric_uniform(u) : truncated_normal(u));
  }
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!p.pairs[i].is_pair) continue;
    const T first = loaded<T>(draws + i * stride);
    const T second = loaded<T>(draws + (kCauseCount + kRoleCount + i) * stride);
    unit.factors.of[i] = pair_factor(p.pairs[i], p.uniform, first, second);
  }
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    const bool drifts = p.temperature_coefficient[i] > 0 && p.printed[i] > 0;
    unit.drift[i] =
        drifts ? T(p.temperature_coefficient[i]) * symmetric_uniform(loaded<T>(draws + (kCauseCount + i) * stride))
               : T(0.0);
  }
  return unit;
}

/// The factors at a temperature that lies `warmth` kelvin above 25 °C.
template <class T>
UnitFactors<T> factors_at(const UnitDraw<T>& unit, double warmth) {
  UnitFactors<T> f = unit.factors;
  if (warmth == 0) return f;
  for (std::size_t i = 0; i < kRoleCount; ++i) f.of[i] = f.of[i] * (T(1.0) + T(warmth) * unit.drift[i]);
  return f;
}

template <class T>
Settling<T> settle_current(const Circuit<T>& c, const Bipolar<T>& device, double log_current) {
  Settling<T> s{T(log_current)};
  for (int i = 0; i < kMostSteps && s.any_open(); ++i) {
    const BiasTrial<T> t = bias_trial(c, device, s.x);
    s.move(-(t.residual / t.slope), T(kCurrentStep));
  }
  return s;
}

/// u F(u), F = d ln|H|^2/d ln u: about linear in u^2, exactly so with one pole a side.
template <class T>
T peak_residual(const Transfer<T>& h, const T& u) {
  const Squared<T> n = squared(h.numerator, u), d = squared(h.denominator, u);
  return u * (T(2.0) + u * (n.slope * d.value - d.slope * n.value) / (n.value * d.value));
}

/// The peak by secants in u^2, the first along the nominal unit's slope.
template <class T>
Settling<T> settle_peak(const Transfer<T>& h, const WarmStart& from) {
  Settling<T> s{T(from.peak * from.peak)};
  T slope(from.peak_slope), before(0.0), residual_before(0.0);
  for (int i = 0; i < kMostSteps && s.any_open(); ++i) {
    const T u = square_root(larger(s.x, T(0.0)));
    const T residual = peak_residual(h, u);
    if (i > 0) {
      const T run = s.x - before, rise = residual - residual_before;
      const auto useful = less(T(0.0), -(rise * run));
      slope = select(useful, rise / select(useful, run, T(1.0)), slope);
    }
    const T step = -(residual / slope);
    before = s.x;
    residual_before = residual;
    // the gain still to be won, d ln|H|^2 = F d ln u: (residual/u) (step/(2 u^2))
    const T won = residual * step;
    const T u_cubed = u * s.x;
    const auto worth_it = less(T(kPeakGain) * u_cubed, larger(won, -won));
    const auto moving = less(T(0.5), s.open);
    s.x = select(moving, select(worth_it, s.x + step, s.x), s.x);
    s.open = select(worth_it, s.open, T(0.0));
  }
  return s;
}

/// The lower crossing of |H|^2 = level in 1/u, the upper one in u: level/|H|^2 is about linear there, exactly so with
/// one pole.
template <class T>
Settling<T> settle_crossing(const Transfer<T>& h, const T& level, double start, bool lower) {
  const T one(1.0);
  Settling<T> s{T(lower ? 1.0 / start : start)};
  for (int i = 0; i < kMostSteps && s.any_open(); ++i) {
    const T u = lower ? one / s.x : s.x;
    const Squared<T> n = squared(h.numerator, u), d = squared(h.denominator, u);
    // y = level D/(u^2 N) - 1; dy/d ln u = (y + 1) (u D'/D - u N'/N - 2)
    const T u2n = u * u * n.value;
    const T share = level * d.value;
    const T log_slope = level * (u * d.slope) - share * (T(2.0) + u * n.slope / n.value);
    const T step = (u2n - share) / log_slope;  // of ln u
    s.move(lower ? -(s.x * step) : s.x * step, T(kCrossingStep) * s.x);
  }
  return s;
}

template <class T>
bool is_open(const Settling<T>& s, std::size_t i) {
  return lane(s.open, i) > 0.5;
}

template <class T>
void store(const T& value, const UnitTask& task, double* row, std::size_t first) {
  for (std::size_t i = 0; i < kLaneCount<T> && first + i < task.units; ++i) row[first + i] = lane(value, i);
}

/// |H|^2 over half of A^2 at a probe; where the probe lies beyond the peak, the peak's: the cutoff lies before it.
template <class T>
T probed(const Transfer<T>& h, const Probe& probe, const T& u_peak, const T& level) {
  const T at(omega_squared(probe.frequency));
  const T u = probe.cutoff == Figure::lower_cutoff ? smaller(at, u_peak) : larger(at, u_peak);
  return gain_squared(h, u) / level;
}

/// Peak and crossings of a pack.
template <class T>
struct SettledBand {
  Settling<T> peak;
  Settling<T> lower{T(kNotComputed), T(0.0)};  ///< 1/u
  Settling<T> upper{T(kNotComputed), T(0.0)};  ///< u
  T u_peak, highest;                           ///< omega squared and |H|^2 at the peak
  T gain_2;                                    ///< A^2

  BandOf<T> band() const { return {square_root(gain_2), hertz(T(1.0) / lower.x), hertz(upper.x)}; }

  /// Settled, the gain's frequency inside the pass band, each crossing on its own side of the peak: in a narrow band a
  /// step may leap over it.
  bool holds(std::size_t i, bool crossings) const {
    if (is_open(peak, i) || 2 * lane(gain_2, i) < lane(highest, i)) return false;
    if (!crossings) return true;
    const double u = lane(u_peak, i);
    return !is_open(lower, i) && !is_open(upper, i) && lane(lower.x, i) * u > 1 && lane(upper.x, i) > u;
  }
};

template <class T>
SettledBand<T> settle_band(const Transfer<T>& response, const WarmStart& from, double frequency, bool crossings) {
  SettledBand<T> s;
  s.peak = settle_peak(response, from);
  s.u_peak = square_root(larger(s.peak.x, T(0.0)));
  s.highest = gain_squared(response, s.u_peak);
  s.gain_2 = frequency > 0 ? gain_squared(response, T(omega_squared(frequency))) : s.highest;
  if (!crossings) return s;
  const T level = T(0.5) * s.gain_2;
  s.lower = settle_crossing(response, level, from.lower, true);
  s.upper = settle_crossing(response, level, from.upper, false);
  return s;
}

/// True where a pack's lane is in the active region.
template <class T>
bool is_active(const Bipolar<T>& device, const BiasTrial<T>& t, std::size_t i) {
  const double needed = larger(device.sheet->saturation_voltage + kActiveMargin, lane(t.v_be, i));
  return lane(t.v_ce, i) >= needed && lane(t.i_c, i) >= kLeakageRatio * lane(device.cutoff_current, i);
}

/// One pack of units at one condition; figures only of those that are solved and active.
template <class T>
void solve_at(const UnitTask& task, const WarmStart& from, const UnitDraw<T>& unit, std::size_t condition,
              std::size_t first) {
  const Population& p = *task.population;
  const UnitFactors<T> factors = factors_at(unit, from.warmth);
  const Circuit<T> circuit = unit_circuit(from.stage, factors);
  const Bipolar<T> device = at_temperature(p.device, T(from.junction), factors);
  const Settling<T> current = settle_current(circuit, device, from.log_current);
  const BiasTrial<T> t = bias_trial(circuit, device, current.x);
  const HybridPi<T> h = hybrid_pi(device, t.i_c, t.v_be, t.v_ce, t.gain);
  const Transfer<T> response = transfer(gain_circuit(circuit, p.definition), h);
  const SettledBand<T> settled = settle_band(response, from, p.definition.frequency, task.crossings);

  UnitOutcome* outcomes = task.outcomes + condition * task.stride + first;
  for (std::size_t i = 0; i < kLaneCount<T> && first + i < task.units; ++i) {
    const bool found = !is_open(current, i);
    outcomes[i] = found && settled.holds(i, task.crossings) ? UnitOutcome::active : UnitOutcome::unsolved;
    if (found && !is_active(device, t, i)) outcomes[i] = UnitOutcome::not_active;
  }
  for (std::size_t k = 0; k < task.probe_count; ++k) {
    const T ratio = probed(response, task.probes[k], settled.u_peak, T(0.5) * settled.gain_2);
    store(ratio, task, task.ratios + (condition * task.probe_count + k) * task.stride, first);
  }
  const BandOf<T> band = settled.band();
  FigureArray<T> f;
  if (task.band_only) {
    f[index(Figure::gain)] = band.gain;
    f[index(Figure::lower_cutoff)] = band.lower;
    f[index(Figure::upper_cutoff)] = band.upper;
  } else {
    f = stage_figures(circuit, t, h, band, p.definition, p.device, T(from.junction));
  }
  for (std::size_t k = 0; k < task.figure_count; ++k) {
    const T& value = f[static_cast<std::size_t>(task.figures[k])];
    store(value, task, task.values + (condition * task.figure_count + k) * task.stride, first);
  }
}

/// All units of a task at all its regular conditions.
template <class T>
void solve_units(const UnitTask& task, const CauseScale* scales) {
  for (std::size_t first = 0; first < task.units; first += kLaneCount<T>) {
    const UnitDraw<T> unit = draw_unit<T>(*task.population, scales, task.draws + first, task.stride);
    for (std::size_t c = 0; c < task.condition_count; ++c) {
      if (task.conditions[c].regular) solve_at(task, task.conditions[c], unit, c, first);
    }
  }
}

}  // namespace bandwright
