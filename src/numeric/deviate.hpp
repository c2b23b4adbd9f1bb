// Random deviates of built units: numbers by seed, unit and draw, and the distributions made of them.
//
// A draw depends on its three indices alone, so that units may be built in any order and on any number of threads.
// The distributions are templates over the number type (double, Pack, Dual); they choose with select.
//
//   const double u = unit_uniform(seed, unit, draw);
//   const double resistance = nominal * (1 + tolerance * truncated_normal(u));
#pragma once

#include <cstdint>

#include "numeric/elementary.hpp"
#include "numeric/random.hpp"

namespace bandwright {

namespace detail {

/// The index-th number, from 0, that RandomStream(seed) gives.
inline std::uint64_t bits_at(std::uint64_t seed, std::uint64_t index) {
  return mixed_bits(seed + (index + 1) * kRandomStep);
}

/// Bits as a number of the open interval (0, 1), an odd multiple of 2^-53.
inline double uniform_of(std::uint64_t bits) {
  return (static_cast<double>(bits >> 12) + 0.5) * 0x1p-52;  // 52 bits: with 53, the largest would round to 1
}

/// The centre, |p - 1/2| <= 0.425: q R(0.425^2 - q^2), q = p - 1/2.
template <class T>
T central_normal_quantile(const T& q) {
  constexpr double kAbove[] = {3.3871328727963666080, 133.14166789178437745, 1971.5909503065514427,
                               13731.693765509461125, 45921.953931549871457, 67265.770927008700853,
                               33430.575583588128105, 2509.0809287301226727};
  constexpr double kBelow[] = {1.0,
                               42.313330701600911252,
                               687.18700749205790830,
                               5394.1960214247511077,
                               21213.794301586595867,
                               39307.895800092710610,
                               28729.085735721942674,
                               5226.4952788528545610};
  const T r = T(0.180625) - q * q;
  return q * four_chains(kAbove, r) / four_chains(kBelow, r);
}

/// The upper tail as far as e^-25: R(s - 1.6), s = sqrt(-ln beyond), for the probability beyond the quantile.
template <class T>
T outer_normal_quantile(const T& beyond) {
  constexpr double kAbove[] = {1.42343711074968357734,   4.63033784615654529590,   5.76949722146069140550,
                               3.64784832476320460504,   1.27045825245236838258,   0.241780725177450611770,
                               0.0227238449892691845833, 7.74545014278341407640e-4};
  constexpr double kBelow[] = {1.0,
                               2.05319162663775882187,
                               1.67638483018380384940,
                               0.689767334985100004550,
                               0.148103976427480074590,
                               0.0151986665636164571966,
                               5.47593808499534494600e-4,
                               1.05075007164441684324e-9};
  const T r = square_root(-ln(beyond)) - T(1.6);
  return four_chains(kAbove, r) / four_chains(kBelow, r);
}

}  // namespace detail

/// The z below which a standard normal number falls with probability p, for 1e-10 < p < 1 - 1e-10.
///
/// Relative error below 1e-15. Source: M. J. Wichura, Algorithm AS 241 (PPND16), Applied Statistics 37(3), 1988,
/// pp. 477-484, its central and its intermediate range; the far tails, beyond e^-25 = 1.4e-11, are not needed here.
/// Each lane takes both ranges through arguments that are safe in either: the smaller tail is never above 1/2.
template <class T>
T normal_quantile(const T& p) {
  const T q = p - T(0.5);
  const T magnitude = detail::outer_normal_quantile(smaller(p, T(1.0) - p));
  const T outer = select(less(q, T(0.0)), -magnitude, magnitude);
  return select(less(T(0.425), larger(q, -q)), outer, detail::central_normal_quantile(q));
}

/// A normal number truncated at its 3 sigma points and divided by 3 sigma, in [-1, 1], of u uniform in (0, 1).
///
/// Times a tolerance: a deviation whose 3 sigma is the tolerance, with the 0.27 % beyond it removed.
template <class T>
T truncated_normal(const T& u) {
  constexpr double kBeyond = 0.0013498980316300945;  // probability beyond 3 sigma, on one side
  const T p = T(kBeyond) + u * T(1.0 - 2.0 * kBeyond);
  return smaller(larger(normal_quantile(p) / T(3.0), T(-1.0)), T(1.0));  // rounding must not pass the tolerance
}

/// A uniform number in (-1, 1), of u uniform in (0, 1).
template <class T>
T symmetric_uniform(const T& u) {
  return u + u - T(1.0);
}

/// The draw-th number of one unit's stream, uniform in the open interval (0, 1).
///
/// The seed starts a SplitMix64 stream whose numbers start the streams of the units, so that neighbours share nothing.
inline double unit_uniform(std::uint64_t seed, std::uint64_t unit, std::uint64_t draw) {
  const std::uint64_t units = detail::bits_at(seed, 0);
  return detail::uniform_of(detail::bits_at(detail::bits_at(units, unit), draw));
}

}  // namespace bandwright
