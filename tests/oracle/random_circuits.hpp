// Random stages over the whole range of parts, devices and surroundings; the same on every machine.
#pragma once

#include <bandwright/analysis.hpp>
#include <cstdint>
#include <memory>
#include <random>
#include <vector>

namespace oracle {

/// Uniform numbers from the standard's Mersenne Twister, mapped by hand: std distributions differ between libraries.
class Dice {
public:
  explicit Dice(std::uint64_t seed) : engine_(seed) {}
  double uniform() { return static_cast<double>(engine_() >> 11) * 0x1p-53; }  ///< 0 <= x < 1
  double between(double low, double high) { return low + (high - low) * uniform(); }
  double log_between(double low, double high);
  bool chance(double probability) { return uniform() < probability; }
  int below(int count) { return static_cast<int>(uniform() * count); }

private:
  std::mt19937_64 engine_;
};

struct RandomCircuit {
  std::shared_ptr<const bandwright::BipolarParameters> device;
  bandwright::Stage stage;
  bandwright::GainDefinition definition;
};

enum class Breadth {
  whole_range,  ///< every decade of every part
  ordinary,     ///< parts an engineer might choose: for derivatives, where ill-conditioned stages tell nothing
};

class CircuitSource {
public:
  explicit CircuitSource(std::uint64_t seed, Breadth breadth = Breadth::whole_range);
  RandomCircuit next();

private:
  std::shared_ptr<const bandwright::BipolarParameters> pick_device();
  bandwright::PartValues pick_parts(double supply);
  void pick_resistors(bandwright::PartValues& parts, double supply);
  void pick_capacitors(bandwright::PartValues& parts);
  bandwright::Surroundings pick_surroundings();

  Dice dice_;
  Breadth breadth_;
  std::vector<std::shared_ptr<const bandwright::BipolarParameters>> catalogue_;
};

/// How often each special case occurred.
struct Census {
  int circuits = 0, no_source_resistance = 0, no_source_capacitance = 0, no_base_resistance = 0, no_unbypassed = 0;
  int no_bypass = 0, split = 0, open_load = 0, no_shunt = 0, no_stray = 0, early_infinite = 0, no_cutoff_current = 0;
  int large_cutoff_current = 0, from_input = 0, at_frequency = 0, catalogue_device = 0;
  void count(const RandomCircuit& circuit);
  std::vector<std::pair<const char*, int>> rows() const;
};

}  // namespace oracle
