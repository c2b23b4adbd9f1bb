#include "numeric/proportion.hpp"

#include <cassert>

#include "numeric/elementary.hpp"

namespace bandwright {
namespace {

constexpr double kRounding = 0x1p-53;
constexpr double kTwoPi = 6.283185307179586477;

/// ln(1 + t) - t without cancellation, by 2 atanh(t / (2 + t)); `ratio` is 1 + t, known better than t far from 0.
double bend_of_ln(double t, double ratio) {
  if (t < -0.5 || t > 0.5) return ln(ratio) - t;
  const double r = t / (2.0 + t);
  double sum = 0.0, power = 2.0 * r * r * r;
  for (double j = 3.0; larger(power, -power) > kRounding * t * t; j += 2.0, power *= r * r) sum += power / j;
  return sum - r * t;
}

/// What Stirling's formula leaves of ln Gamma: ln Gamma(z) - ((z - 1/2) ln z - z + ln(2 pi)/2), for z >= 1.
///
/// Source: DLMF 5.11.1 from z = 16 on, where the terms left out are below 1e-16; below, the recurrence 5.5.1 in
/// Gudermann's form, whose steps are (z + 1/2) ln(1 + 1/z) - 1.
double stirling_rest(double z) {
  double rest = 0.0;
  for (; z < 16.0; z += 1.0) {
    const double r2 = 1.0 / ((2.0 * z + 1.0) * (2.0 * z + 1.0));
    for (double j = 3.0, power = r2; power > kRounding * r2; j += 2.0, power *= r2) rest += power / j;
  }
  const double w = 1.0 / (z * z);
  const double series = 1.0 / 12 - w * (1.0 / 360 - w * (1.0 / 1260 - w * (1.0 / 1680 - w / 1188)));
  return rest + series / z;
}

/// The beta distribution of x with a, b >= 1, by the odds x / (1 - x), which keep small x and small 1 - x alike.
class Beta {
public:
  Beta(double a, double b)
      : a_(a),
        b_(b),
        ln_at_mean_(0.5 * ln(a / (a + b) * b / kTwoPi) + stirling_rest(a + b) - stirling_rest(a) - stirling_rest(b)) {}

  double odds_of_mean() const { return a_ / b_; }

  /// ln of x^a (1-x)^b / B(a, b), the density of ln(odds), as its distance from the value at the mean: the large
  /// terms of ln Gamma and of the powers cancel on paper.
  double ln_density(double odds) const {
    const double lead = (odds * b_ - a_) / (1.0 + odds);  // (a + b) (x - mean)
    const double share = (a_ + b_) / (1.0 + odds);
    return ln_at_mean_ + a_ * bend_of_ln(lead / a_, odds * share / a_) + b_ * bend_of_ln(-lead / b_, share / b_);
  }

  /// I_x(a, b) over that density: the continued fraction DLMF 8.17.22 in its even part, whose terms are positive below
  /// the mean and end after b of them, forward by Lentz's method.
  /// Source of this form: A. R. DiDonato & A. H. Morris, Algorithm 708, ACM Trans. Math. Softw. 18(3), 1992 (from
  /// memory).
  double integral_over_density(double odds) const {
    const double x = odds / (1.0 + odds), y = 1.0 / (1.0 + odds);
    const double lag = (a_ - odds * b_) / (1.0 + odds);  // (a + b) (mean - x)
    double value = a_ * (lag + 1.0) / (a_ + 1.0), above = value, below = 0.0;
    for (double m = 1.0, change = 0.0; larger(change - 1.0, 1.0 - change) > 4.0 * kRounding; m += 1.0) {
      const double last = a_ + 2.0 * m - 1.0;
      const double alpha = (a_ + m - 1.0) / last * x * ((a_ + b_ + m - 1.0) / last) * x * m * (b_ - m);
      const double beta = m + m * (b_ - m) * x / last + (a_ + m) / (last + 2.0) * (lag + 1.0 + m * (1.0 + y));
      below = 1.0 / (beta + alpha * below);
      above = beta + alpha / above;
      change = above * below;
      value *= change;
    }
    return 1.0 / value;
  }

private:
  double a_, b_;
  double ln_at_mean_;
};

/// The odds x / (1 - x) with I_x(a, b) = tail, for tail <= 1/2.
///
/// Newton's method on ln I against ln(odds). The density of ln(odds) is log-concave and so is its integral; a tangent
/// then lies above the curve, and from the second step on the odds rise to the root and never pass it.
double beta_quantile_odds(double a, double b, double tail) {
  constexpr int kMostSteps = 100;
  constexpr double kLastStep = 1e-12;  // steps shrink by squares: the one after this is below rounding
  const Beta beta(a, b);
  double odds = beta.odds_of_mean();
  for (int i = 0; i < kMostSteps; ++i) {
    const double ratio = beta.integral_over_density(odds);
    const double step = ratio * (beta.ln_density(odds) + ln(ratio) - ln(tail));
    odds *= e_to(-step);
    if (larger(step, -step) < kLastStep) break;
  }
  return odds;
}

}  // namespace

Interval clopper_pearson(std::size_t passed, std::size_t units, double confidence) {
  assert(passed <= units && confidence > 0.0 && confidence < 1.0);
  const double tail = (1.0 - confidence) / 2.0;
  const double in = static_cast<double>(passed), out = static_cast<double>(units - passed);
  Interval interval{0.0, 1.0};
  if (passed > 0) {
    const double odds = beta_quantile_odds(in, out + 1.0, tail);
    interval.low = odds / (1.0 + odds);
  }
  if (passed < units) interval.high = 1.0 / (1.0 + beta_quantile_odds(out, in + 1.0, tail));
  return interval;
}

}  // namespace bandwright
