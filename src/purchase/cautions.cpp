// Cautions: what a person must know before building a stage from a parts list. The wording is our own; the 60 V DC
// limit is the widest agreed figure for parts that may be touched (IEC 60335-1 3.4.2 and IEC 61140, read as excerpts).
#include <bandwright/purchase.hpp>

namespace bandwright {

const std::vector<Caution>& cautions() {
  static const std::vector<Caution> list = {
      {"paper_design",
       "This is a paper design from typical and limit figures: build it and measure it before relying on it."},
      {"highest_voltage", "Keep every two nodes within 60 V DC of each other, power-up and faults included."},
      {"isolated_supply",
       "Feed the stage from a battery or from a certified supply isolated from the mains, above all where people touch "
       "the source."},
      {"polarity", "Fit every polarised capacitor the way the list states; a reversed one can vent or burst."},
      {"rating", "Fit parts of at least the voltage and power rating listed; an overstressed part can burst or burn."},
      {"eye_protection", "Wear eye protection at first power-up and limit the supply current."},
      {"discharge",
       "Before touching, switch off, discharge the capacitors through a resistor and check with a meter that no "
       "voltage is left."},
      {"hot_parts", "Transistors and resistors may be hot enough to burn skin; let them cool before touching."},
      {"not_safety_related", "Not for medical, life-support or other safety-related use."},
      {"local_rules",
       "Local electrical codes, and the people licensed to work under them, come first wherever they differ from "
       "this."},
  };
  return list;
}

}  // namespace bandwright
