// Pack<N>: N doubles side by side, over the compiler's vector extension.
//
// The explicit alignment keeps the layout the same whatever instruction set a translation unit is built for.
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

template <std::size_t N>
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

}  // namespace bandwright
