// A small random stream: the same numbers everywhere.
//
// Source: SplitMix64, Steele, Lea & Flood, Fast splittable pseudorandom number generators, OOPSLA 2014 (from memory).
#pragma once

#include <cstdint>

namespace bandwright {

inline constexpr std::uint64_t kRandomStep = 0x9e3779b97f4a7c15ull;  ///< from one state of the stream to the next

/// The finaliser of SplitMix64: the random bits that belong to a state.
inline std::uint64_t mixed_bits(std::uint64_t z) {
  z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9ull;
  z = (z ^ (z >> 27)) * 0x94d049bb133111ebull;
  return z ^ (z >> 31);
}

class RandomStream {
public:
  explicit RandomStream(std::uint64_t seed) : state_(seed) {}

  std::uint64_t next() { return mixed_bits(state_ += kRandomStep); }
  double uniform() { return static_cast<double>(next() >> 11) * 0x1p-53; }  ///< 0 <= x < 1
  int below(int n) { return static_cast<int>(uniform() * n); }              ///< 0 .. n-1

private:
  std::uint64_t state_;
};

}  // namespace bandwright
