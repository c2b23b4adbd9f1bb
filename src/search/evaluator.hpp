// Evaluates grid points of one design space against a spec. Remembers what it has seen, and keeps operating points
// while only capacitors change.
#pragma once

#include <bandwright/analysis.hpp>
#include <bandwright/assessment.hpp>
#include <bandwright/ranking.hpp>
#include <bandwright/spec.hpp>
#include <cstdint>
#include <unordered_map>

#include "analysis/bias_reuse.hpp"
#include "assessment/estimate.hpp"
#include "search/design_space.hpp"
#include "search/part_loads.hpp"

namespace bandwright {

/// How far a stage is from the conditions of the search: 0 where it meets them.
double violation(const Analysis& analysis, const PartValues& working, const BipolarParameters& device);

/// Error of a stage; past kWorstError, rising with the violation, where it breaks a condition of the search.
double search_error(const Spec& spec, const Analysis& analysis, const PartValues& working,
                    const BipolarParameters& device);

/// The tolerances' half-widths at a grid point, and hFE's at a collector current.
CauseWidths cause_widths(const Spec& spec, const DesignSpace& space, const GridPoint& point, double collector_current);

class Evaluator {
public:
  Evaluator(const Spec& spec, const DesignSpace& space, RankBy by);

  double error(const GridPoint& point);
  RankKey key(const GridPoint& point);
  Analysis analysis(const GridPoint& point);

  /// Distances from the limits, as estimated, and the sensitivities behind them.
  struct Outlook {
    Analysis analysis;
    Sensitivity sensitivity;
    std::vector<LimitDistance> distances;
  };
  Outlook outlook(const GridPoint& point);

  /// The capability of a point near `from`, as if all figures spread and shifted as they do there.
  double capability_near(const GridPoint& point, const Outlook& from);

  const DesignSpace& space() const { return space_; }
  std::size_t evaluations() const { return evaluations_; }  ///< analyses made, not remembered ones

private:
  struct Packed {
    std::uint64_t resistors, capacitors;
    friend bool operator==(const Packed&, const Packed&) = default;
  };
  struct Hash {
    std::size_t operator()(const Packed& p) const {
      std::uint64_t z = p.resistors * 0x9e3779b97f4a7c15ull + p.capacitors;
      z = (z ^ (z >> 29)) * 0xbf58476d1ce4e5b9ull;
      return z ^ (z >> 32);
    }
  };
  struct Known {
    double error = kNotComputed;
    double supply_current = kNotComputed;
    double sensitivity = kNotComputed;
    double capability = kNotComputed;
  };
  static Packed pack(const GridPoint& point);
  /// What the resistors alone decide: the operating point, and that nothing can be overloaded whatever it is.
  struct Prepared {
    NominalBias bias;
    bool clear = false;
  };
  const Prepared& prepared(const GridPoint& point, const Stage& stage);
  const std::vector<NominalBias>& at_conditions(const GridPoint& point, const Stage& stage,
                                                const OperatingPoint& nominal);
  void look_ahead(const GridPoint& point, Known& k);
  FirstOrderSpread spread(const GridPoint& point, const OperatingPoint& nominal) const;
  std::vector<PartValues> values_at_conditions(const GridPoint& point, const Stage& stage) const;
  Stage stage_at(const GridPoint& point);
  Known& known(const GridPoint& point);

  const Spec& spec_;
  const DesignSpace& space_;
  RankBy by_;
  GainDefinition definition_;
  Surroundings around_;
  Population units_;            ///< conditions, and the causes that no part decides
  CauseWidths fixed_widths_{};  ///< of these causes
  double warmest_ = 0;          ///< K, the largest distance of an ambient from 25 °C
  std::size_t evaluations_ = 0;
  PartLoads loads_;
  std::unordered_map<std::uint64_t, Prepared> prepared_;  // by the resistors' indices
  std::unordered_map<std::uint64_t, std::vector<NominalBias>> at_conditions_;
  std::unordered_map<Packed, Known, Hash> known_;
};

}  // namespace bandwright
