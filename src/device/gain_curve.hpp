// beta0 over collector current, for every kind of number: Hermite cubic in ln IC and ln beta0, constant outside.
#pragma once

#include <bandwright/device.hpp>

#include "numeric/select.hpp"

namespace bandwright {

/// ln beta0 and d ln beta0 / d ln IC at ln(IC / 1 A).
template <class T>
struct GainPoint {
  T log_gain;
  T slope;
};

template <class T>
GainPoint<T> gain_point(const GainCurve& curve, const T& log_current) {
  if (curve.points == 1) return {T(curve.log_gain[0]), T(0.0)};
  const int last = curve.points - 1;
  T x0(curve.log_current[0]), y0(curve.log_gain[0]), d0(curve.slope[0]);
  T x1(curve.log_current[1]), y1(curve.log_gain[1]), d1(curve.slope[1]);
  for (int i = 1; i < last; ++i) {
    const auto beyond = less(T(curve.log_current[i]), log_current);
    x0 = select(beyond, T(curve.log_current[i]), x0);
    y0 = select(beyond, T(curve.log_gain[i]), y0);
    d0 = select(beyond, T(curve.slope[i]), d0);
    x1 = select(beyond, T(curve.log_current[i + 1]), x1);
    y1 = select(beyond, T(curve.log_gain[i + 1]), y1);
    d1 = select(beyond, T(curve.slope[i + 1]), d1);
  }
  const T inside = smaller(larger(log_current, T(curve.log_current[0])), T(curve.log_current[last]));
  const T h = x1 - x0;
  const T t = (inside - x0) / h;
  const T rise = (y1 - y0) / h;
  // y = y0 + (x - x0) (d0 + t (c2 + t c3)), Fritsch & Carlson, SIAM J. Numer. Anal. 17(2), 1980, for the slopes
  const T c2 = T(3.0) * rise - T(2.0) * d0 - d1;
  const T c3 = d0 + d1 - T(2.0) * rise;
  const T value = y0 + (inside - x0) * (d0 + t * (c2 + t * c3));
  const T slope = d0 + t * (T(2.0) * c2 + t * T(3.0) * c3);
  const auto outside_low = less(log_current, T(curve.log_current[0]));
  const auto outside_high = less(T(curve.log_current[last]), log_current);
  return {value, select(outside_low, T(0.0), select(outside_high, T(0.0), slope))};
}

}  // namespace bandwright
