// ln, exp and square root for double and Pack, the same bytes on every machine: no library function is called but
// the exactly rounded square root.
//
// Method: argument reduction to powers of two; exp by its Taylor series to the 13th power, ln by 2 atanh((m-1)/(m+1))
// to the 21st. Worst errors are below 2 units in the last place over the range used (|x| < 700; normal positive x).
#pragma once

#include <bit>
#include <cmath>
#include <cstddef>
#include <cstdint>

#include "numeric/pack.hpp"

namespace bandwright {

namespace detail {

inline std::uint64_t to_bits(double x) { return std::bit_cast<std::uint64_t>(x); }
inline double from_bits(std::uint64_t b, double) { return std::bit_cast<double>(b); }
template <std::size_t N, class Isa>
typename Pack<N, Isa>::Bits to_bits(const Pack<N, Isa>& x) {
  return (typename Pack<N, Isa>::Bits)x.lanes;
}
template <std::size_t N, class Isa>
Pack<N, Isa> from_bits(typename Pack<N, Isa>::Bits b, const Pack<N, Isa>&) {
  return Pack<N, Isa>((typename Pack<N, Isa>::Vector)b);
}

inline constexpr double kRoundShift = 6755399441055744.0;  // 1.5 * 2^52: adding it rounds to an integer in the low bits
inline constexpr double kLn2High = 6.93147180369123816490e-01;  // upper bits of ln 2, exact times any |k| < 2^11
inline constexpr double kLn2Low = 1.90821492927058770002e-10;

/// c[0] + c[1] x + ... + c[n-1] x^(n-1) in four interleaved chains, so that no term waits for all others.
template <std::size_t N, class T>
T four_chains(const double (&c)[N], const T& x) {
  const T x2 = x * x, x4 = x2 * x2;
  T chain[4] = {T(0.0), T(0.0), T(0.0), T(0.0)};
  for (std::size_t k = 0; k < 4; ++k) {
    std::size_t i = k + (N - 1 - k) / 4 * 4;
    chain[k] = T(c[i]);
    for (; i >= 4; i -= 4) chain[k] = chain[k] * x4 + T(c[i - 4]);
  }
  return (chain[0] + x * chain[1]) + x2 * (chain[2] + x * chain[3]);
}

template <class T>
T exponential(const T& x) {
  const T shifted = x * T(1.4426950408889634) + T(kRoundShift);
  const T k = shifted - T(kRoundShift);
  const T r = (x - k * T(kLn2High)) - k * T(kLn2Low);
  // 1/i!; the first two terms are added last, where rounding counts
  constexpr double kTail[] = {1.0 / 2,       1.0 / 6,        1.0 / 24,        1.0 / 120,
                              1.0 / 720,     1.0 / 5040,     1.0 / 40320,     1.0 / 362880,
                              1.0 / 3628800, 1.0 / 39916800, 1.0 / 479001600, 1.0 / 6227020800.0};
  const T p = T(1.0) + (r + r * r * four_chains(kTail, r));
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
  constexpr double kTail[] = {1.0 / 3,  1.0 / 5,  1.0 / 7,  1.0 / 9,  1.0 / 11,
                              1.0 / 13, 1.0 / 15, 1.0 / 17, 1.0 / 19, 1.0 / 21};
  const T twice = f + f;
  return k * T(kLn2High) + (twice + (twice * s * four_chains(kTail, s) + k * T(kLn2Low)));
}

}  // namespace detail

inline double ln(double x) { return detail::logarithm(x); }
inline double e_to(double x) { return detail::exponential(x); }
inline double square_root(double x) { return std::sqrt(x); }

template <std::size_t N, class Isa>
Pack<N, Isa> ln(const Pack<N, Isa>& x) {
  return detail::logarithm(x);
}
template <std::size_t N, class Isa>
Pack<N, Isa> e_to(const Pack<N, Isa>& x) {
  return detail::exponential(x);
}
template <std::size_t N, class Isa>
Pack<N, Isa> square_root(const Pack<N, Isa>& x) {
  Pack<N, Isa> y;
  for (std::size_t i = 0; i < N; ++i) y.set(i, std::sqrt(x[i]));
  return y;
}

}  // namespace bandwright
