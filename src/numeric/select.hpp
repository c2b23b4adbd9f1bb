// The comparisons that every kind of number offers, for double. No `if` is taken on a number in the equations:
// they choose with select(less(a, b), x, y), so that one formula serves double, lanes and dual numbers.
#pragma once

namespace bandwright {

inline bool less(double a, double b) { return a < b; }
inline double select(bool condition, double yes, double no) { return condition ? yes : no; }

/// The plain double behind a number, for choices that hold for all its lanes.
inline double first_value(double x) { return x; }

template <class T>
T smaller(const T& a, const T& b) {
  return select(less(b, a), b, a);
}
template <class T>
T larger(const T& a, const T& b) {
  return select(less(a, b), b, a);
}

}  // namespace bandwright
