// What sensitivities promise of a design's capability before any unit is simulated: each requirement's distance from
// its limit at the most adverse condition over three sigma of the first-order spread.
#pragma once

#include <bandwright/assessment.hpp>
#include <vector>

#include "analysis/operating_point.hpp"

namespace bandwright {

/// How the nominal unit moves between the conditions. Cheap: gain and cutoffs move as the pole model says.
struct ConditionShifts {
  FigureValues up{};    ///< ln of the largest factor by which a figure rises at a condition, at least 0
  FigureValues down{};  ///< ln of the smallest one, at most 0
  double headroom = 0;  ///< V, the least VCE above what the active region needs
  double leakage = 0;   ///< ln of the least IC/(100 ICBO)
};

/// `biases`: the nominal unit at each condition of `conditions`; `values`: its parts at work there.
ConditionShifts condition_shifts(const Stage& stage, const Analysis& nominal,
                                 const std::vector<OperatingCondition>& conditions,
                                 const std::vector<NominalBias>& biases, const std::vector<PartValues>& values,
                                 const GainDefinition& definition);

/// First-order widths of all causes, and where the middle of hFE lies from its nominal value (ln).
struct FirstOrderSpread {
  CauseWidths widths{};
  double gain_centre = 0;
};

/// One limit of a requirement, or the edge of the active region.
struct LimitDistance {
  Figure figure = Figure::gain;
  double toward = 1;    ///< +1: an upper limit
  double distance = 0;  ///< of the middle unit at the condition nearest the limit; ln, or V
  double reach = 1;     ///< three sigma
  double per_ln = 1;    ///< d distance / d ln figure, without its sign
  double capability() const { return distance / reach; }
};
std::vector<LimitDistance> limit_distances(const Spec& spec, const Analysis& nominal, const Sensitivity& sensitivity,
                                           const FirstOrderSpread& spread, const ConditionShifts& shifts);

/// The same of a population, all of it computed here.
std::vector<LimitDistance> limit_distances(const Spec& spec, const Population& population, const Analysis& nominal,
                                           const Sensitivity& sensitivity);

/// The distances of a stage whose figures differ, spread and shifts taken as the same.
std::vector<LimitDistance> moved(std::vector<LimitDistance> distances, const FigureValues& from,
                                 const FigureValues& to);

/// The least of them, at most kHighestCapability, as the simulated one.
double estimated_capability(const std::vector<LimitDistance>& distances);

}  // namespace bandwright
