// Polynomial<T, D>: coefficients of rising powers of s, degree at most D, known when compiled.
//
// Products and sums give the degree they need, so that a transfer function reads like its formula.
#pragma once

#include <array>
#include <cstddef>

namespace bandwright {

template <class T, int D>
struct Polynomial {
  std::array<T, D + 1> c{};
};

template <class T, int A, int B>
Polynomial<T, A + B> operator*(const Polynomial<T, A>& a, const Polynomial<T, B>& b) {
  Polynomial<T, A + B> p;
  for (int k = 0; k <= A + B; ++k) {
    const int first = k > B ? k - B : 0;
    T sum = a.c[first] * b.c[k - first];
    for (int i = first + 1; i <= A && i <= k; ++i) sum = sum + a.c[i] * b.c[k - i];
    p.c[k] = sum;
  }
  return p;
}

template <class T, int A, int B>
Polynomial<T, (A > B ? A : B)> operator+(const Polynomial<T, A>& a, const Polynomial<T, B>& b) {
  constexpr int kDegree = A > B ? A : B;
  Polynomial<T, kDegree> p;
  for (int k = 0; k <= kDegree; ++k) {
    if (k <= A && k <= B) {
      p.c[k] = a.c[k] + b.c[k];
    } else {
      p.c[k] = k <= A ? a.c[k <= A ? k : 0] : b.c[k <= B ? k : 0];
    }
  }
  return p;
}

template <class T, int D>
Polynomial<T, D> operator*(const T& factor, const Polynomial<T, D>& a) {
  Polynomial<T, D> p;
  for (int k = 0; k <= D; ++k) p.c[k] = factor * a.c[k];
  return p;
}

/// s C p(s): the product with a capacitor's admittance.
template <class T, int D>
Polynomial<T, D + 1> times_s(const T& capacitance, const Polynomial<T, D>& a) {
  Polynomial<T, D + 1> p;
  p.c[0] = T(0.0);
  for (int k = 0; k <= D; ++k) p.c[k + 1] = capacitance * a.c[k];
  return p;
}

/// g + s C.
template <class T>
Polynomial<T, 1> admittance(const T& conductance, const T& capacitance) {
  return {{conductance, capacitance}};
}

}  // namespace bandwright
