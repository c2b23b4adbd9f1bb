// Assessment: what becomes of a design when many units of it are built.
//
// Worst case: the extremes of a figure over the box of all causes at every corner of supply and ambient, polished; the
// corner is named. Yield: the share of simulated units that are active and meet every requirement at the nominal
// condition and at every corner of ambient and supply, with its 95 % Clopper-Pearson interval. Capability, predicted
// from the simulated spread (ISO 22514, non-normal form): per requirement the smaller of (U - X50)/(X99.865 - X50) and
// (X50 - L)/(X50 - X0.135) on ln x (voltages: x), over each unit's value at the condition nearest the limit; below
// 20,000 units mean and 3 sigma stand in place of the quantiles. Capped at 2.
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/catalogue.hpp>
#include <bandwright/population.hpp>
#include <bandwright/spec.hpp>
#include <cstdint>
#include <string>
#include <vector>

namespace bandwright {

/// A capability is capped here: beyond it nothing is known of so few units.
inline constexpr double kHighestCapability = 2;

/// Half-widths t_i of the causes, in the order of Sensitivity's columns.
using CauseWidths = std::array<double, kCauseCount>;

double half_width(const Tolerance& tolerance);

/// beta0 at 25 °C of the lowest and the highest unit of the type, at a collector current.
std::array<double, 2> gain_limits(const BipolarParameters& device, double collector_current);

/// ln(max/min)/2 of beta0 at a collector current.
double gain_half_width(const BipolarParameters& device, double collector_current);

/// The half-width that the spec gives to a part or to hFE in place of the usual one; 0 where it is switched off.
double assessed_half_width(const Spec& spec, Cause cause, double usual);

/// Largest over the required figures of sqrt(sum (S_i t_i)^2)/w over parts and hFE: t_i the relative tolerance of part
/// i (hFE: ln(max/min)/2; asymmetric -a/+b: ln((1+b)/(1-a))/2), w the half-width of the requirement's window in ln x. 1
/// means that the root sum of squares alone fills the window.
double tolerance_sensitivity(const Spec& spec, const Sensitivity& sensitivity, const CauseWidths& widths);

/// All units that are built of the parts given to a spec. `nominal`: the design's analysis at the nominal condition.
Population population_of(const Spec& spec, const BipolarParameters& device, const OfferedParts& parts,
                         const Analysis& nominal);

/// "60 °C, 11.4 V", the supply with its sign.
std::string condition_text(const Population& population, const OperatingCondition& condition);

/// "nominal", or the condition's text.
std::string condition_name(const Population& population, std::size_t condition);

/// Extremes of one figure. NaN where a corner is not active, or the figure has no value there; `reason` says which.
struct WorstCase {
  double min = kNotComputed;
  double max = kNotComputed;
  std::string at_min;  ///< "hFE min, R3 max, 60 °C, 11.4 V": the causes that matter, then the condition
  std::string at_max;
  double rss_min = kNotComputed;  ///< the nominal unit at the worst corner, less the root sum of squares of all causes
  double rss_max = kNotComputed;
  std::string reason;
};

/// What the simulation says of one required figure. NaN where no unit has a value.
struct FigureSpread {
  double mean = kNotComputed;        ///< at the nominal condition, over the active units
  double sigma = kNotComputed;       ///< the same
  double capability = kNotComputed;  ///< at most 2
  std::size_t failed = 0;            ///< units that miss the requirement at any condition
  std::size_t most_failed_at = 0;    ///< the condition at which most of them do
  std::vector<double> edges;         ///< of a histogram at the nominal condition, rising; asked for only
  std::vector<std::size_t> counts;   ///< one fewer than edges
};

struct Yield {
  std::size_t units = 0;  ///< simulated; 0: not simulated
  std::size_t passed = 0;
  double low = kNotComputed;  ///< 95 % interval of the share that passes
  double high = kNotComputed;
  std::uint64_t seed = 1;
  std::size_t not_active = 0;       ///< units that are not active at some condition
  std::size_t least_active_at = 0;  ///< the condition at which most of them are not
  double share() const { return units > 0 ? static_cast<double>(passed) / static_cast<double>(units) : kNotComputed; }
};

/// |H| and phase over frequency: 20 points a decade, from a decade below the lower cutoff to one above the upper.
struct ResponseCurve {
  std::vector<double> frequency;  ///< Hz
  std::vector<double> magnitude;  ///< of the nominal unit at the nominal condition, V/V
  std::vector<double> phase;      ///< degrees, continuous
  /// |H| over all units at all conditions: smallest, 2.5 % and 97.5 % quantiles, largest.
  std::vector<double> min, low, high, max;
};

/// A node's DC voltage to 0 V, with its sign: nominal, and over all active units at all conditions.
struct NodeVoltage {
  std::string node;
  double nominal = kNotComputed, min = kNotComputed, max = kNotComputed;
};

struct Assessment {
  Population population;
  std::vector<FigureValues> at_condition;  ///< the nominal unit at each condition
  Sensitivity share{};  ///< of each figure's variance over the causes at the nominal condition; each row sums to 1
  std::array<WorstCase, kFigureCount> worst_case{};  ///< of the required figures and the operating point
  std::array<FigureSpread, kFigureCount> spread{};   ///< of the required figures
  Yield yield;
  double capability = kNotComputed;         ///< the smallest over the requirements
  bool from_moments = false;                ///< fewer than 20,000 units: mean and 3 sigma in place of quantiles
  double worst_case_margin = kNotComputed;  ///< the smallest margin over the requirements at their worst corners
  bool nominal_met = false;
  bool worst_case_met = false;             ///< every requirement holds at its worst corner
  std::string verdict;                     ///< "pass", "pass with notes" or "not met"; empty where nothing is required
  ResponseCurve response;                  ///< filled on request only
  std::vector<NodeVoltage> node_voltages;  ///< filled on request only
};

/// A class in which a part can be bought: family and tolerance.
struct ToleranceClass {
  std::string family;  ///< words
  Tolerance tolerance;
};

/// One part of a tolerance allocation.
struct AllocatedPart {
  Role role = Role::collector;
  ToleranceClass loosest;                 ///< of the classes it could be bought in
  ToleranceClass needed;                  ///< the loosest that still gives the yield
  double yield_if_looser = kNotComputed;  ///< share that passes with this part one class looser, all others as needed
};

/// What one tightening buys, in the order in which they were made from the loosest classes on.
struct AllocationStep {
  Role role = Role::collector;
  ToleranceClass from, to;
  double yield_before = kNotComputed, yield_after = kNotComputed;
};

/// The loosest tolerance class of each part with which the design still gives spec.assess.yield.
struct Allocation {
  std::vector<AllocatedPart> parts;
  std::vector<AllocationStep> steps;
  Yield yield;           ///< with the classes needed
  bool reached = false;  ///< false: not even the tightest classes give the yield
};

/// `parts` as offered; their families and tolerances are replaced by the classes tried. The units are the same in all
/// trials, so that a difference in yield is the parts' alone.
Allocation allocate_tolerances(const Spec& spec, const Catalogue& catalogue, const BipolarParameters& device,
                               const OfferedParts& parts, const Analysis& nominal);

struct AssessOptions {
  bool with_response = false;  ///< response, envelope, histograms and node voltages too
};

/// Sensitivity shares, worst case and simulation of one design. `nominal`: its analysis at the nominal condition,
/// active.
Assessment assess(const Spec& spec, Population population, const Analysis& nominal, const AssessOptions& options = {});

}  // namespace bandwright
