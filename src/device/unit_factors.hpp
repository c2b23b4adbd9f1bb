// What makes one unit differ from the nominal one: a factor for each cause, for every kind of number.
#pragma once

#include <bandwright/cause.hpp>

namespace bandwright {

/// 1 for every cause of the nominal unit; volts to add, 0, for the base-emitter voltage.
template <class T>
struct UnitFactors {
  std::array<T, kCauseCount> of;

  UnitFactors() {
    for (std::size_t i = 0; i < kCauseCount; ++i) of[i] = T(1.0);
    of[index(Cause::base_emitter_voltage)] = T(0.0);
  }
  const T& operator[](Cause cause) const { return of[index(cause)]; }
  T& operator[](Cause cause) { return of[index(cause)]; }
};

}  // namespace bandwright
