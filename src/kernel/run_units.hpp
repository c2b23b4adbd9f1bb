// Runs blocks of units on the best lanes of this machine. The bytes are the same on all of them.
#pragma once

#include <vector>

#include "kernel/unit_task.hpp"

namespace bandwright {

/// How many units stand side by side, and in which instructions.
enum class LaneKind { one, any_machine, avx2 };

/// Those of this machine, the fastest last.
const std::vector<LaneKind>& usable_lanes();

/// What became of a block of units.
struct UnitBlock {
  std::size_t units = 0;
  std::size_t stride = 0;
  std::size_t figures = 0;
  std::vector<double> values;
  std::size_t probes = 0;
  std::vector<double> ratios;
  std::vector<UnitOutcome> outcomes;
  std::size_t solved_alone = 0;  ///< units at a condition that were left over by the lanes

  double value(std::size_t condition, std::size_t figure, std::size_t unit) const {
    return values[(condition * figures + figure) * stride + unit];
  }
  /// 2 |H|^2/A^2 at a probe: at least 1 where a lower cutoff lies at or under it, or an upper one at or above it.
  double ratio(std::size_t condition, std::size_t probe, std::size_t unit) const {
    return ratios[(condition * probes + probe) * stride + unit];
  }
  UnitOutcome outcome(std::size_t condition, std::size_t unit) const { return outcomes[condition * stride + unit]; }
};

/// The units of one population, by number.
class UnitRunner {
public:
  /// `figures`: those wanted, in the order in which they are returned. Cutoffs are solved only where one of these needs
  /// them; `probes` tell their side of a frequency without.
  UnitRunner(const Population& population, std::vector<Figure> figures, std::vector<Probe> probes = {},
             LaneKind lanes = usable_lanes().back());

  /// Units `first` to `first + count - 1` of a seed, at every condition. A figure that does not exist is NaN; the
  /// values of a unit that is not active say nothing.
  void run(std::uint64_t seed, std::uint64_t first, std::size_t count, UnitBlock& block);

  /// Unit by unit, at one condition: everything that is known of it.
  Analysis analyse(std::uint64_t seed, std::uint64_t unit, std::size_t condition);

  const std::vector<WarmStart>& conditions() const { return conditions_; }

private:
  void draw(std::uint64_t seed, std::uint64_t first, std::size_t count, std::size_t stride);
  Analysis alone(std::size_t unit, std::size_t condition, std::size_t stride) const;
  void solve_left_over(UnitBlock& block) const;

  const Population& population_;
  std::vector<Figure> figures_;
  std::vector<Probe> probes_;
  LaneKind lanes_;
  std::vector<WarmStart> conditions_;
  std::vector<double> draws_;
};

}  // namespace bandwright
