// The range of hFE that a design needs: outwards from the nominal unit, then halved to the limit.
//
// What meets the requirements need not be one interval of hFE: the part that holds the nominal unit is taken, found in
// steps of 4.4 %; a gap narrower than a step would be passed over.
#include <bandwright/design.hpp>
#include <cmath>
#include <limits>
#include <optional>

#include "analysis/unit.hpp"

namespace bandwright {

namespace {

constexpr double kStep = 1.0442737824274138;  // 2^(1/16)
constexpr int kSteps = 160;                   // a factor of 1024 up and down
constexpr int kHalvings = 40;                 // of a step: the end is known to 1e-13

/// Whether the nominal unit with hFE times a factor meets every requirement at every condition.
class GainTest {
public:
  GainTest(const Spec& spec, const Candidate& c)
      : spec_(spec),
        given_(c.analysis.figures),
        population_(population_of(spec, c.parameters, c.offered, c.analysis)) {}

  bool meets(double factor) const {
    for (const OperatingCondition& c : population_.conditions) {
      UnitPoint unit{nominal_stage(population_, c), {}, c.ambient + population_.junction_rise};
      unit.factors[Cause::current_gain] = factor;
      Analysis a = analyse_unit(unit, population_.definition);
      for (const FigureInfo& f : figures())
        if (!varies(f.figure)) a.figures[index(f.figure)] = given_[index(f.figure)];
      if (a.point.state != BiasState::active || !meets_all(spec_, a.figures)) return false;
    }
    return true;
  }

private:
  const Spec& spec_;
  FigureValues given_;  ///< those that no unit changes
  Population population_;
};

/// Between a factor that meets and one that does not, the last one that meets.
double last_inside(const GainTest& test, double inside, double outside) {
  for (int i = 0; i < kHalvings; ++i) {
    const double middle = (inside + outside) / 2;
    (test.meets(middle) ? inside : outside) = middle;
  }
  return inside;
}

/// The end of the connected part around 1; nullopt where there is none within the steps.
std::optional<double> end(const GainTest& test, bool up) {
  double inside = 1;
  for (int i = 0; i < kSteps; ++i) {
    const double next = up ? inside * kStep : inside / kStep;
    if (!test.meets(next)) return last_inside(test, inside, next);
    inside = next;
  }
  return std::nullopt;
}

/// Types whose published hFE lies inside, each with its own Early voltage at the design's operating point.
std::vector<std::string> groups_inside(const Catalogue& catalogue, bool pnp, const GainNeeded& needed) {
  std::vector<std::string> list;
  for (const Transistor& t : catalogue.transistors) {
    if (t.pnp != pnp) continue;
    try {
      const BipolarParameters p = derive_parameters(t).parameters;
      const DeviceLimits& l = p.limits[index(Cause::current_gain)];
      const auto limits = gain_limits(p, needed.collector_current);
      const double rise = 1 + needed.collector_emitter_voltage * p.inverse_early_voltage;
      const bool inside = limits[0] * rise >= needed.min && limits[1] * rise <= needed.max;
      if (l.below_published && l.above_published && inside) list.push_back(t.type);
    } catch (const InputError&) {
      continue;  // a type whose figures are incomplete states no range
    }
  }
  return list;
}

}  // namespace

GainNeeded gain_needed(const Spec& spec, const Catalogue& catalogue, const Candidate& c) {
  GainNeeded needed;
  const OperatingPoint& point = c.analysis.point;
  if (point.state != BiasState::active) return needed;
  needed.collector_current = point.collector_current;
  needed.collector_emitter_voltage = point.collector_emitter_voltage;
  const GainTest test(spec, c);
  if (!test.meets(1)) return needed;
  const double rise = 1 + point.collector_emitter_voltage * c.parameters.inverse_early_voltage;
  const double nominal = point.gain_at_zero_vce * rise;
  needed.min = nominal * end(test, false).value_or(0);
  needed.max = nominal * end(test, true).value_or(std::numeric_limits<double>::infinity());
  needed.groups = groups_inside(catalogue, c.parameters.pnp, needed);
  return needed;
}

}  // namespace bandwright
