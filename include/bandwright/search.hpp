// Search: from a spec to stages of preferred values.
//
// Devices that a closed-form ceiling rules out are dropped. For the others and all six variants a continuous relaxation
// runs from several starts (on the pole model, then on the exact response), its points are snapped to the offered
// values, and the best are refined until no change of one part, nor of any pair of parts, by one or two neighbouring
// values improves the order. The answer depends on spec, catalogue and seed alone, not on the number of threads.
//
// A stage must, nominally, be active, with VCE >= 1 V and IC RC >= 0.5 V, within the transistor's current, power and
// junction limits, and every part must have a rating that holds at the highest supply.
#pragma once

#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <bandwright/ranking.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stage.hpp>
#include <functional>
#include <string>
#include <vector>

namespace bandwright {

inline constexpr double kLeastCollectorEmitter = 1.0;  ///< V
inline constexpr double kLeastCollectorDrop = 0.5;     ///< V, IC RC

/// A stage that the search arrived at.
struct Found {
  std::size_t device = 0;  ///< index into the devices given
  const Variant* variant = nullptr;
  OfferedParts parts;
  Standing standing;
  bool allowed = true;  ///< meets the conditions of the search (active, voltages, limits)
};

struct SearchOptions {
  RankBy rank_by = RankBy::capability;
  int threads = 0;                               ///< 0: as many as there are
  std::function<bool(double share)> keep_going;  ///< false stops early
};

struct SearchOutcome {
  std::vector<Found> found;  ///< best first; empty: no combination meets even the conditions above
  bool interrupted = false;
  std::string nearest_miss;  ///< why, with numbers, where `found` is empty
};

/// Devices that a closed-form ceiling rules out: index and the reason in words with numbers.
struct Dropped {
  std::size_t device = 0;
  std::string reason;
};
std::vector<Dropped> screen_devices(const Spec& spec, const std::vector<DerivedDevice>& devices);

/// Searches over the devices given (already screened).
SearchOutcome search(const Spec& spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices,
                     const SearchOptions& options);

/// Why a requirement cannot be met, where a closed-form ceiling explains it, with numbers.
std::vector<std::string> explain_limits(const Spec& spec, const std::vector<DerivedDevice>& devices);

}  // namespace bandwright
