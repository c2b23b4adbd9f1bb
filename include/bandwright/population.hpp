// Population: all units that are built to one design, and the conditions they must work under.
//
// A unit is one draw of every cause. Its deviation d = centre + x * (x < 0 ? below : above), x between -1 and 1: normal
// with 3 sigma at the ends and truncated there, or uniform. The deviation acts as the cause's scale says. Parts also
// drift with temperature: value (1 + c (T - 25 °C)), c uniform within the family's temperature coefficient.
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/cause.hpp>
#include <string>
#include <vector>

namespace bandwright {

/// How one cause varies in one design.
struct CauseSpread {
  double centre = 0;  ///< of the deviation: a share, a logarithm or volts
  double below = 0;   ///< from the centre to the low end, not negative
  double above = 0;   ///< from the centre to the high end, not negative; both 0: it does not vary
  std::string basis;  ///< what the limits rest on: "tolerance of the part", "published", "assumed", "spec"
  double low() const { return centre - below; }
  double high() const { return centre + above; }
  bool varies() const { return below > 0 || above > 0; }
};

/// Two parts in one role, each with its own deviation.
struct PairSpread {
  bool is_pair = false;
  bool adds_up = true;  ///< the values add up; false: their reciprocals do
  double weight = 1;    ///< of the first part: its share of the value, or of the reciprocal
  std::array<Tolerance, 2> tolerance{};
};

/// A supply and an ambient temperature at which every unit must meet the requirements.
struct OperatingCondition {
  double supply = 0;   ///< V, magnitude
  double ambient = 0;  ///< K
};

struct Population {
  BipolarParameters device;
  PartValues printed{};                                                   ///< values printed on the parts; 0: absent
  std::array<double, kRoleCount> bias_factor{1, 1, 1, 1, 1, 1, 1, 1, 1};  ///< what DC voltage leaves of the capacitance
  std::array<double, kRoleCount> cold_loss{};                ///< 1/K: capacitance lost for each kelvin below 20 °C
  std::array<double, kRoleCount> temperature_coefficient{};  ///< 1/K, two-sided
  Surroundings around;                                       ///< at the nominal condition
  std::array<CauseSpread, kCauseCount> spread{};             ///< of a pair: both parts at their ends
  std::array<PairSpread, kRoleCount> pairs{};
  bool uniform = false;
  double junction_rise = 0;  ///< K, of the nominal unit at the nominal condition, held
  GainDefinition definition;
  std::vector<OperatingCondition> conditions;  ///< the nominal one first, then the distinct corners
};

/// The parts' values at work at a temperature, without any deviation: cold electrolytics lose capacitance.
PartValues values_at_work(const Population& population, double ambient);

/// The nominal unit at a condition. It points into the population.
Stage nominal_stage(const Population& population, const OperatingCondition& condition);

}  // namespace bandwright
