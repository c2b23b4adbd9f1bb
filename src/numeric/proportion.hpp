// What a count of passing units says of the share that passes.
//
//   const Interval yield = clopper_pearson(1960, 2000);  // 0.9729 to 0.9857 with 95 % confidence
#pragma once

#include <cstddef>

namespace bandwright {

struct Interval {
  double low;
  double high;
};

/// The exact interval for a proportion: at either end the count, or one further off, has probability
/// (1 - confidence) / 2. It covers the true share at least as often as stated, whatever that share is.
///
/// Needs passed <= units and 0 < confidence < 1. Without units nothing is known: 0 to 1. None passed: low is 0; all
/// passed: high is 1. Relative error of either end below 1e-14 up to 10 million units.
/// Source: C. J. Clopper & E. S. Pearson, The use of confidence or fiducial limits illustrated in the case of the
/// binomial, Biometrika 26(4), 1934, pp. 404-413.
Interval clopper_pearson(std::size_t passed, std::size_t units, double confidence = 0.95);

}  // namespace bandwright
