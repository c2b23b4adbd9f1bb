// Random design problems over catalogues small enough to enumerate whole.
#pragma once

#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <bandwright/spec.hpp>
#include <cstdint>

namespace bandwright::oracle {

struct SmallProblem {
  Spec spec;
  DerivedDevice device;
  double combinations = 0;  ///< over all variants
};

/// A spec whose targets lie near a stage that works, and ranges of a few preferred values round it; at most 1e6
/// combinations over all six variants.
SmallProblem small_problem(std::uint64_t seed);

}  // namespace bandwright::oracle
