// ln, exp and square root for double and Pack, the same bytes on every machine: no library function is called but
// the exactly rounded square root.
//
// Method: argument reduction to powers of two; exp by its Taylor series to the 13th power, ln by 2 atanh((m-1)/(m+1))
// to the 21st. Worst errors are below 2 units in the last place over the range used (|x| < 700; normal positive x).
#pragma once

#include <bit>
#include <cmath>
#include <cstdint>

#include "numeric/pack.hpp"

namespace bandwright {

namespace detail {

inline std::uint64_t to_bits(double x) { return std::bit_cast<std::uint64_t>(x); }
inline double from_bits(std::uint64_t b, double) { return std::bit_cast<double>(b); }
template <std::size_t N>
typename Pack<N>::Bits to_bits(const Pack<N>& x) {
  return (typename Pack<N>::Bits)x.lanes;
}
template <std::size_t N>
Pack<N> from_bits(typename Pack<N>::Bits b, const Pack<N>&) {
  return Pack<N>((typename Pack<N>::Vector)b);
}

inline constexpr double kRoundShift = 6755399441055744.0;  // 1.5 * 2^52: adding it rounds to an integer in the low bits
inline constexpr double kLn2High = 6.93147180369123816490e-01;  // upper bits of ln 2, exact times any |k| < 2^11
inline constexpr double kLn2Low = 1.90821492927058770002e-10;

template <class T>
T exponential(const T& x) {
  const T shifted = x * T(1.4426950408889634) + T(kRoundShift);
  const T k = shifted - T(kRoundShift);
  const T r = (x - k * T(kLn2High)) - k * T(kLn2Low);
  constexpr double kInverseFactorial[] = {1.0,           1.0,           1.0 / 2,        1.0 / 6,         1.0 / 24,
                                          1.0 / 120,     1.0 / 720,     1.0 / 5040,     1.0 / 40320,     1.0 / 362880,
                                          1.0 / 3628800, 1.0 / 39916800, 1.0 / 479001600, 1.0 / 6227020800.0};
  T p = T(kInverseFactorial[13]);
  for (int i = 12; i >= 0; --i) p = p * r + T(kInverseFactorial[i]);
  return from_bits(to_bits(p) + (to_bits(shifted) << 52), x);
}

template <class T>
T logarithm(const T& x) {
  constexpr std::uint64_t kRootHalf = 0x3fe6a09e667f3bcdull;  // bits of sqrt(1/2)
  constexpr std::uint64_t kBias = 1024ull << 52;
  const auto exponent = (to_bits(x) - kRootHalf + kBias) >> 52;  // binary exponent + 1024
  const T m = from_bits(to_bits(x) - ((exponent - 1024) << 52), x);
  const T k = from_bits(exponent + std::bit_cast<std::uint64_t>(kRoundShift), x) - T(kRoundShift + 1024);
  const T f = (m - T(1)) / (m + T(1));
  const T s = f * f;
  T p = T(1.0 / 21);
  for (int i = 19; i >= 3; i -= 2) p = p * s + T(1.0 / i);
  const T twice = f + f;
  return k * T(kLn2High) + (twice + (twice * s * p + k * T(kLn2Low)));
}

}  // namespace detail

inline double ln(double x) { return detail::logarithm(x); }
inline double e_to(double x) { return detail::exponential(x); }
inline double square_root(double x) { return std::sqrt(x); }

template <std::size_t N>
Pack<N> ln(const Pack<N>& x) {
  return detail::logarithm(x);
}
template <std::size_t N>
Pack<N> e_to(const Pack<N>& x) {
  return detail::exponential(x);
}
template <std::size_t N>
Pack<N> square_root(const Pack<N>& x) {
  Pack<N> y;
  for (std::size_t i = 0; i < N; ++i) y.set(i, std::sqrt(x[i]));
  return y;
}

}  // namespace bandwright
