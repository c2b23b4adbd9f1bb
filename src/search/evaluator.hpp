// Evaluates stages of one design space against a spec; keeps operating points while only capacitors change.
#pragma once

#include <cstdint>
#include <unordered_map>

#include <bandwright/analysis.hpp>
#include <bandwright/assessment.hpp>
#include <bandwright/ranking.hpp>
#include <bandwright/spec.hpp>

#include "analysis/bias_reuse.hpp"
#include "search/design_space.hpp"

namespace bandwright {

/// How far a stage is from the conditions of the search: 0 where it meets them.
double violation(const Analysis& analysis, const PartValues& working, const BipolarParameters& device);

/// Error of a stage; past kWorstError, rising with the violation, where it breaks a condition of the search.
double search_error(const Spec& spec, const Analysis& analysis, const PartValues& working,
                    const BipolarParameters& device);

class Evaluator {
public:
  Evaluator(const Spec& spec, const DesignSpace& space);

  /// A grid point with its error; the tolerance sensitivity is left out (NaN) until asked for.
  struct Trial {
    GridPoint point;
    RankKey key;
    Analysis analysis;
  };
  Trial evaluate(const GridPoint& point);
  void add_sensitivity(Trial& trial) const;

  Stage stage_at(const PartValues& working) const;
  const DesignSpace& space() const { return space_; }
  const Spec& spec() const { return spec_; }
  const GainDefinition& definition() const { return definition_; }

private:
  const NominalBias& bias(const GridPoint& point, const Stage& stage, const Circuit<double>& circuit);

  const Spec& spec_;
  const DesignSpace& space_;
  GainDefinition definition_;
  Surroundings around_;
  std::unordered_map<std::uint64_t, NominalBias> solved_;  // by the resistors' indices
};

}  // namespace bandwright
