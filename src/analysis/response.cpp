#include "analysis/response.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <vector>

namespace bandwright {

namespace {

constexpr double kStep = 1.7782794100389228;  // of u = omega^2: eight samples a decade of frequency
constexpr double kRim = 16;                   // scan beyond the outermost break, in u
constexpr double kBeyond = 1e16;              // how far past the rim a cutoff is sought, in u
constexpr double kFar = 1e12;                 // beyond the rim, in u: as good as infinite frequency
constexpr double kEqualPeaks = 2e-9;          // of |H|^2: peaks closer than this are equal
constexpr int kMaxSamples = 320;              // forty decades of frequency
constexpr std::size_t kLanes = 2;             // frequencies side by side: what every x86-64 offers

struct Interval {
  double low, high;
};

/// Widens `range` (of omega) by the moduli that the polynomial's roots can have. Positive coefficients:
/// Enestrom-Kakeya, roots lie between the smallest and the largest ratio of neighbours; any signs: twice that (Kojima).
template <int D>
void cover_roots(const Polynomial<double, D>& p, double slack, Interval& range) {
  for (int i = 0; i < D; ++i) {
    if (p.c[i] == 0 || p.c[i + 1] == 0) continue;
    const double ratio = std::fabs(p.c[i] / p.c[i + 1]);
    range.low = std::min(range.low, ratio / slack);
    range.high = std::max(range.high, ratio * slack);
  }
}

Interval scan_range(const Transfer<double>& h) {
  Interval omega{1e300, 1e-300};
  cover_roots(h.denominator, 1.0, omega);
  cover_roots(h.numerator, 2.0, omega);
  return {omega.low * omega.low / kRim, omega.high * omega.high * kRim};
}

struct Samples {
  int count = 0;
  std::array<double, kMaxSamples + kLanes> u{}, h{};
};

void take_samples(const Transfer<double>& h, const Interval& range, Samples& s) {
  const double wanted = std::ceil(ln(range.high / range.low) / ln(kStep)) + 1;
  s.count = static_cast<int>(std::clamp(wanted, 3.0, double(kMaxSamples)));
  using Lanes = Pack<kLanes>;
  Transfer<Lanes> lanes;
  for (int i = 0; i <= 4; ++i) lanes.numerator.c[i] = Lanes(h.numerator.c[i]);
  for (int i = 0; i <= 7; ++i) lanes.denominator.c[i] = Lanes(h.denominator.c[i]);
  Lanes u;
  double next = range.low;
  for (int i = 0; i < s.count; i += kLanes) {
    for (std::size_t k = 0; k < kLanes; ++k, next *= kStep) u.set(k, next);
    const Lanes value = gain_squared(lanes, u);
    for (std::size_t k = 0; k < kLanes; ++k) {
      s.u[i + k] = u[k];
      s.h[i + k] = value[k];
    }
  }
}

/// d ln|H|^2 / d ln u.
double log_slope(const Transfer<double>& h, double u) {
  const Squared<double> n = squared(h.numerator, u), d = squared(h.denominator, u);
  return 2 + u * n.slope / n.value - u * d.slope / d.value;
}

/// The maximum of |H|^2 between a and b, by regula falsi on its log slope (Illinois: the end that stays twice counts
/// half). A slope of 1e-12 leaves |H| exact to its square.
double peak_between(const Transfer<double>& h, double a, double b, double start) {
  double slope_a = log_slope(h, a), slope_b = log_slope(h, b);
  if (!(slope_a > 0) || !(slope_b < 0)) return start;
  double u = start;
  int stayed = 0;  // +1: b stayed, -1: a stayed
  for (int i = 0; i < 80 && b - a > 1e-13 * u; ++i) {
    const double s = log_slope(h, u);
    if (std::fabs(s) < 1e-12) break;
    if (s > 0) {
      a = u, slope_a = s;
      if (stayed > 0) slope_b *= 0.5;
      stayed = 1;
    } else {
      b = u, slope_b = s;
      if (stayed < 0) slope_a *= 0.5;
      stayed = -1;
    }
    u = (a * slope_b - b * slope_a) / (slope_b - slope_a);
    if (!(u > a && u < b)) u = std::sqrt(a * b);
  }
  return u;
}

/// |H|^2 = level between `above` (|H|^2 over level) and `below`, by Newton in u kept inside the bracket. A step of
/// 1e-10 leaves an error of its square.
double crossing_between(const Transfer<double>& h, double level, double above, double below) {
  double u = std::sqrt(above * below);
  for (int i = 0; i < 100; ++i) {
    const Squared<double> n = squared(h.numerator, u), d = squared(h.denominator, u);
    const double residual = u * u * n.value - level * d.value;
    const double slope = 2 * u * n.value + u * u * n.slope - level * d.slope;
    (residual > 0 ? above : below) = u;
    const double low = std::min(above, below), high = std::max(above, below);
    double next = u - residual / slope;
    if (!(next >= low && next <= high)) next = std::sqrt(low * high);
    const bool done = std::fabs(next - u) <= 1e-10 * u;
    u = next;
    if (done) break;
  }
  return u;
}

/// Highest peak among the samples; peaks equal within 1e-9 in |H|: the lower frequency.
void highest_peak(const Transfer<double>& h, const Samples& s, double& peak_u, double& peak_h) {
  const double top = *std::max_element(s.h.begin(), s.h.begin() + s.count);
  peak_h = 0;
  for (int i = 0; i < s.count; ++i) {
    const double left = i > 0 ? s.h[i - 1] : 0, right = i + 1 < s.count ? s.h[i + 1] : 0;
    if (s.h[i] < 0.8 * top || s.h[i] < left || s.h[i] < right) continue;
    const double u = peak_between(h, s.u[std::max(i - 1, 0)], s.u[std::min(i + 1, s.count - 1)], s.u[i]);
    const double value = gain_squared(h, u);
    if (value > peak_h * (1 + kEqualPeaks)) peak_u = u, peak_h = value;
  }
  // where a capacitive divider is left at infinite frequency the response may be highest there
  const double far_u = s.u[s.count - 1] * kFar, far_h = gain_squared(h, far_u);
  if (far_h > peak_h * (1 + kEqualPeaks)) peak_u = far_u, peak_h = far_h;
}

/// From `reference` outwards along the samples to the first one under the level, then the crossing itself.
double crossing_outwards(const Transfer<double>& h, const Samples& s, double reference, double level, int first,
                         int direction) {
  double inner = reference;
  for (int i = first; i >= 0 && i < s.count; i += direction) {
    if (s.h[i] < level) return crossing_between(h, level, inner, s.u[i]);
    inner = s.u[i];
  }
  const double factor = direction > 0 ? kStep : 1 / kStep;
  for (double reach = 1; reach < kBeyond; reach *= kStep) {
    const double u = inner * factor;
    if (gain_squared(h, u) < level) return crossing_between(h, level, inner, u);
    inner = u;
  }
  return kNotComputed;
}

}  // namespace

Crossings find_crossings(const Transfer<double>& h, double reference_u) {
  Samples s;
  take_samples(h, scan_range(h), s);
  double peak_u = s.u[0], peak_h = 0;
  highest_peak(h, s, peak_u, peak_h);

  Crossings c;
  c.reference = reference_u > 0 ? reference_u : peak_u;
  c.gain_squared = reference_u > 0 ? gain_squared(h, reference_u) : peak_h;
  c.lower = c.upper = kNotComputed;
  const double level = c.gain_squared / 2;
  if (c.gain_squared < peak_h / 2 || !(level > 0)) return c;
  const auto next = std::upper_bound(s.u.begin(), s.u.begin() + s.count, c.reference);
  const int first_above = static_cast<int>(next - s.u.begin());
  c.lower = crossing_outwards(h, s, c.reference, level, first_above - 1, -1);
  c.upper = crossing_outwards(h, s, c.reference, level, first_above, +1);
  return c;
}

bool has_single_peak(const Transfer<double>& h) {
  Samples s;
  take_samples(h, scan_range(h), s);
  const auto first = s.h.begin(), last = s.h.begin() + s.count;
  const auto top = std::max_element(first, last);
  return std::is_sorted(first, top) && std::is_sorted(top, last, std::greater<>());
}

}  // namespace bandwright
