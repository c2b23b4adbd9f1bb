// Stage: topologies, variants, and a complete stage as the analysis sees it.
#pragma once

#include <array>
#include <bandwright/device.hpp>
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <string_view>
#include <vector>

namespace bandwright {

/// A variant of a topology: which optional parts stand in it.
struct Variant {
  const char* key;    ///< "split emitter"
  const char* about;  ///< one line
  std::array<bool, kRoleCount> present;
};

/// The six variants of the common-emitter stage: bypass complete, split, none; each with and without shunt.
const std::vector<Variant>& variants();

/// The variant that fits a set of values (0 = absent), or nullptr where none does.
const Variant* variant_of(const PartValues& values);

/// What the stage is connected to, at one condition. Magnitudes; SI.
struct Surroundings {
  double supply = 0;        ///< V, magnitude
  double ambient = 298.15;  ///< K
  double source_resistance = 0;
  double source_capacitance = 0;
  double load_conductance = 0;
  double load_capacitance = 0;
  Stray stray;
};

Surroundings surroundings(const Spec& spec);  ///< at the nominal condition

/// A complete stage: working values, device, surroundings.
struct Stage {
  PartValues parts{};
  const BipolarParameters* device = nullptr;  ///< not owned
  Surroundings around;
};

}  // namespace bandwright
