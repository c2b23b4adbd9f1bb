#include <algorithm>
#include <bandwright/stage.hpp>

namespace bandwright {

const std::vector<Variant>& variants() {
  // R1, R2, RC, RE1, RE2, Cin, Cout, CE, Csh
  static const std::vector<Variant> kVariants = {
      {"bypassed emitter", "one emitter resistor, wholly bypassed", {1, 1, 1, 0, 1, 1, 1, 1, 0}},
      {"bypassed emitter, shunt", "the same with a shunt capacitor at the collector", {1, 1, 1, 0, 1, 1, 1, 1, 1}},
      {"split emitter", "two emitter resistors, one of them bypassed", {1, 1, 1, 1, 1, 1, 1, 1, 0}},
      {"split emitter, shunt", "the same with a shunt capacitor at the collector", {1, 1, 1, 1, 1, 1, 1, 1, 1}},
      {"unbypassed emitter", "one emitter resistor, no bypass", {1, 1, 1, 1, 0, 1, 1, 0, 0}},
      {"unbypassed emitter, shunt", "the same with a shunt capacitor at the collector", {1, 1, 1, 1, 0, 1, 1, 0, 1}},
  };
  return kVariants;
}

const Variant* variant_of(const PartValues& values) {
  for (const Variant& v : variants()) {
    if (std::equal(values.begin(), values.end(), v.present.begin(), [](double x, bool p) { return (x > 0) == p; })) {
      return &v;
    }
  }
  return nullptr;
}

Surroundings surroundings(const Spec& spec) {
  Surroundings s;
  s.supply = spec.supply_magnitude();
  s.ambient = spec.ambient.nominal;
  s.source_resistance = spec.source.resistance;
  s.source_capacitance = spec.source.capacitance;
  s.load_conductance = spec.load.conductance;
  s.load_capacitance = spec.load.capacitance;
  s.stray = spec.stray;
  return s;
}

}  // namespace bandwright
