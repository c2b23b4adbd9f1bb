// Random designs with all that varies in them: parts of the families that are sold, a transistor with its limits,
// surroundings with tolerances, ranges of supply and ambient temperature. Made by the library's own population_of.
#pragma once

#include <bandwright/catalogue.hpp>
#include <bandwright/population.hpp>

#include "random_circuits.hpp"

namespace oracle {

struct RandomDesign {
  bandwright::Spec spec;
  bandwright::BipolarParameters device;
  bandwright::OfferedParts parts;
  bandwright::Population population;
};

class PopulationSource {
public:
  explicit PopulationSource(std::uint64_t seed) : circuits_(seed, Breadth::ordinary), dice_(seed + 1) {}

  /// Of the next design that is active at its nominal condition, 25 °C.
  bandwright::Population next() { return next_design().population; }
  RandomDesign next_design();

  /// The same with source and load at a DC voltage, often near that of the node on the other side of the capacitor, and
  /// spreads wider, narrower or off.
  RandomDesign next_with_dc();

private:
  bandwright::Spec pick_spec(const RandomCircuit& circuit);
  bandwright::BipolarParameters pick_limits(const RandomCircuit& circuit);

  CircuitSource circuits_;
  Dice dice_;
};

}  // namespace oracle
