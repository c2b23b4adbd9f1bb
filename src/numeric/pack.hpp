// Pack<N>: N doubles side by side, over the compiler's vector extension.
//
// The explicit alignment keeps the layout the same whatever instruction set a translation unit is built for. Code that
// is built for a special one names it in `Isa`: every function made for such lanes then has a name of its own, and the
// linker never puts it where another machine's code would run.
#pragma once

#include <cstddef>
#include <cstdint>

#include "numeric/select.hpp"

namespace bandwright {

/// The compiler's vectors of N lanes, named through a trait because g++ 12 treats a dependent vector type inside the
/// class that declares it as its element type.
template <std::size_t N>
struct VectorTypes {
  typedef double Number __attribute__((vector_size(8 * N)));
  typedef std::int64_t Integer __attribute__((vector_size(8 * N)));
  typedef std::uint64_t Word __attribute__((vector_size(8 * N)));
};

/// The instruction set that every machine of the kind has.
struct AnyMachine {};

template <std::size_t N, class Isa = AnyMachine>
struct alignas(8 * N) Pack {
  using Vector = typename VectorTypes<N>::Number;
  using Mask = typename VectorTypes<N>::Integer;
  using Bits = typename VectorTypes<N>::Word;

  Vector lanes;

  Pack() : lanes{} {}
  Pack(double x) : lanes(x - Vector{}) {}  // NOLINT: a plain number stands for all lanes alike
  explicit Pack(Vector v) : lanes(v) {}

  double operator[](std::size_t i) const { return lanes[i]; }
  void set(std::size_t i, double x) { lanes[i] = x; }

  friend Pack operator+(const Pack& a, const Pack& b) { return Pack(a.lanes + b.lanes); }
  friend Pack operator-(const Pack& a, const Pack& b) { return Pack(a.lanes - b.lanes); }
  friend Pack operator*(const Pack& a, const Pack& b) { return Pack(a.lanes * b.lanes); }
  friend Pack operator/(const Pack& a, const Pack& b) { return Pack(a.lanes / b.lanes); }
  friend Pack operator-(const Pack& a) { return Pack(-a.lanes); }

  friend Mask less(const Pack& a, const Pack& b) { return a.lanes < b.lanes; }
  friend Pack select(const Mask& m, const Pack& yes, const Pack& no) {
    return Pack((Vector)((m & (Mask)yes.lanes) | (~m & (Mask)no.lanes)));
  }
  friend double first_value(const Pack& x) { return x.lanes[0]; }
};

/// How many numbers stand side by side in a T, and each of them.
template <class T>
inline constexpr std::size_t kLaneCount = 1;
template <std::size_t N, class Isa>
inline constexpr std::size_t kLaneCount<Pack<N, Isa>> = N;

inline void set_lane(double& x, std::size_t, double value) { x = value; }
template <std::size_t N, class Isa>
void set_lane(Pack<N, Isa>& x, std::size_t i, double value) {
  x.set(i, value);
}

inline double lane(const double& x, std::size_t) { return x; }
template <std::size_t N, class Isa>
double lane(const Pack<N, Isa>& x, std::size_t i) {
  return x[i];
}

}  // namespace bandwright
