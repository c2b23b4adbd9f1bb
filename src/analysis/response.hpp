// |H|^2 over u = omega^2, from even and odd parts of numerator and denominator, for every kind of number.
#pragma once

#include "stage/common_emitter.hpp"

namespace bandwright {

/// A sum of squares and its derivative by u.
template <class T>
struct Squared {
  T value;
  T slope;
};

/// |p(j omega)|^2 = E(u)^2 + u O(u)^2, u = omega^2.
template <class T, int D>
Squared<T> squared(const Polynomial<T, D>& p, const T& u) {
  T even(p.c[D & ~1]), even_slope(0.0), odd(p.c[(D - 1) | 1]), odd_slope(0.0);
  // Horner in -u over every second coefficient, value and derivative together
  for (int i = (D & ~1) - 2; i >= 0; i -= 2) {
    even_slope = -(even + u * even_slope);
    even = p.c[i] - u * even;
  }
  for (int i = ((D - 1) | 1) - 2; i >= 1; i -= 2) {
    odd_slope = -(odd + u * odd_slope);
    odd = p.c[i] - u * odd;
  }
  const T odd_squared = odd * odd;
  return {even * even + u * odd_squared, T(2.0) * even * even_slope + odd_squared + T(2.0) * u * odd * odd_slope};
}

/// |p(j omega)|^2 alone.
template <class T, int D>
T squared_value(const Polynomial<T, D>& p, const T& u) {
  T even(p.c[D & ~1]), odd(p.c[(D - 1) | 1]);
  for (int i = (D & ~1) - 2; i >= 0; i -= 2) even = p.c[i] - u * even;
  for (int i = ((D - 1) | 1) - 2; i >= 1; i -= 2) odd = p.c[i] - u * odd;
  return even * even + u * (odd * odd);
}

/// |H|^2 at u; s^2 in front of N gives u^2.
template <class T>
T gain_squared(const Transfer<T>& h, const T& u) {
  return u * u * squared_value(h.numerator, u) / squared_value(h.denominator, u);
}

/// One Newton step in u for |H(u)|^2 = level, from a converged u: exact to first order in the parameters.
template <class T>
T crossing_step(const Transfer<T>& h, const T& level, double u) {
  const T at(u);
  const Squared<T> n = squared(h.numerator, at), d = squared(h.denominator, at);
  const T residual = at * at * n.value - level * d.value;
  const double slope = first_value(T(2.0) * at * n.value + at * at * n.slope - level * d.slope);
  return at - residual / T(slope);
}

/// Scan, peak and cutoffs of a response, in double: u at the reference and at the crossings of A^2/2 (NaN: none).
struct Crossings {
  double reference = 0;
  double gain_squared = 0;
  double lower = 0;
  double upper = 0;
};

/// `reference_u` > 0: A is taken there; 0: at the highest peak.
Crossings find_crossings(const Transfer<double>& h, double reference_u);

/// True where |H| rises to one peak and falls from it, on the samples of the scan.
bool has_single_peak(const Transfer<double>& h);

}  // namespace bandwright
