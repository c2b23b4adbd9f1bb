#include "small_problems.hpp"

#include <bandwright/analysis.hpp>
#include <bandwright/stage.hpp>
#include <cmath>
#include <random>

#include "search/design_space.hpp"
#include "search/starts.hpp"

namespace bandwright::oracle {

namespace {

constexpr double kMostCombinations = 1e6;

class Random {
public:
  explicit Random(std::uint64_t seed) : engine_(seed * 7919 + 1) {}
  double uniform() { return static_cast<double>(engine_() >> 11) * 0x1p-53; }
  double log_between(double a, double b) { return a * std::pow(b / a, uniform()); }
  int below(int n) { return static_cast<int>(uniform() * n); }

private:
  std::mt19937_64 engine_;
};

Requirement window(double target, double tolerance) {
  return {target, target / (1 + tolerance), target * (1 + tolerance)};
}

Spec random_spec(Random& random) {
  Spec s;
  const double supply = random.log_between(4, 30);
  s.supply = {supply, supply, supply};
  s.ambient = {298.15, 298.15, 298.15};
  s.source.resistance = random.below(4) == 0 ? 0 : random.log_between(50, 5e3);
  s.load.conductance = random.below(4) == 0 ? 0 : 1 / random.log_between(2e3, 200e3);
  s.load.capacitance = random.below(2) == 0 ? 0 : random.log_between(10e-12, 1e-9);
  s.requirements[index(Figure::gain)] = window(random.log_between(3, 80), 0.122);
  s.requirements[index(Figure::lower_cutoff)] = window(random.log_between(5, 2e3), 0.2);
  s.requirements[index(Figure::upper_cutoff)] = window(random.log_between(2e4, 5e5), 0.2);
  s.seed = 1;
  return s;
}

double combinations(const DesignSpaces& all) {
  double sum = 0;
  for (const DesignSpace& space : all.spaces) {
    double product = 1;
    for (std::size_t i = 0; i < kRoleCount; ++i) product *= space.has(i) ? double(space.offered[i]->size()) : 1.0;
    sum += product;
  }
  return sum;
}

}  // namespace

SmallProblem small_problem(std::uint64_t seed) {
  Random random(seed);
  const Catalogue& catalogue = built_in_catalogue();
  std::vector<const Transistor*> types;
  for (const Transistor& t : catalogue.transistors) {
    if (!t.pnp) types.push_back(&t);
  }
  for (;;) {
    SmallProblem p;
    p.spec = random_spec(random);
    p.device = derive_parameters(*types[random.below(static_cast<int>(types.size()))]);
    if (p.device.parameters.breakdown_voltage < p.spec.highest_supply()) continue;
    const std::vector<DerivedDevice> devices = {p.device};  // the spaces point into it
    const DesignSpaces wide = design_spaces(p.spec, catalogue, devices);
    const DesignSpace& split = wide.spaces[3];  // split emitter with shunt: every role
    Choices choices;
    for (double& c : choices) c = random.uniform();
    const PartValues centre = start_point(p.spec, split, choices, false);
    const Stage stage{centre, &p.device.parameters, surroundings(p.spec)};
    const Analysis a = analyse(stage, gain_definition(p.spec));
    if (std::isnan(a.band.lower) || std::isnan(a.band.upper)) continue;

    // targets near what this stage does, ranges of a few values round its parts
    const double figures[] = {a.band.gain, a.band.lower, a.band.upper};
    for (int i = 0; i < 3; ++i) {
      auto& r = p.spec.requirements[i];
      r = window(figures[i] * random.log_between(0.85, 1.18), i == 0 ? 0.122 : 0.2);
    }
    p.spec.parts.resistors.series = random.below(2) == 0 ? "E6" : "E12";
    const double width = p.spec.parts.resistors.series == std::string("E6") ? 2.15 : 1.5;
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      const double half = i < kResistorRoles ? width : 1.9;
      p.spec.parts.ranges[i] = ValueRange{centre[i] / half, centre[i] * half};
    }
    p.combinations = combinations(design_spaces(p.spec, catalogue, devices));
    if (p.combinations > 2e4 && p.combinations <= kMostCombinations) return p;
  }
}

}  // namespace bandwright::oracle
