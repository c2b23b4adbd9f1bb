// Pass or fail of simulated units, and when to stop.
#include <algorithm>
#include <bandwright/margins.hpp>
#include <cmath>

#include "assessment/simulation.hpp"
#include "kernel/run_units.hpp"
#include "numeric/proportion.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kLookedAtEvery = 1000;  // units between looks at the interval

/// What decides on a unit: figures with their requirements, and the limits of the cutoffs as probes.
struct Demands {
  std::vector<Figure> figures;
  std::vector<Probe> probes;
  std::vector<bool> is_upper;  ///< of each probe: an upper limit

  explicit Demands(const Spec& spec) {
    for (const FigureInfo& f : bandwright::figures()) {
      const auto& r = spec.requirement(f.figure);
      if (!r || !varies(f.figure)) continue;
      if (f.figure != Figure::lower_cutoff && f.figure != Figure::upper_cutoff) {
        figures.push_back(f.figure);
        continue;
      }
      for (double limit : {r->lower, r->upper}) {
        if (std::isnan(limit)) continue;
        probes.push_back({f.figure, limit});
        is_upper.push_back(limit == r->upper);
      }
    }
  }

  bool met(const Spec& spec, const UnitBlock& block, std::size_t condition, std::size_t unit) const {
    if (block.outcome(condition, unit) != UnitOutcome::active) return false;
    for (std::size_t k = 0; k < figures.size(); ++k) {
      if (!meets(*spec.requirement(figures[k]), block.value(condition, k, unit))) return false;
    }
    for (std::size_t k = 0; k < probes.size(); ++k) {
      if (!meets_at_limit(probes[k].cutoff, is_upper[k], block.ratio(condition, k, unit))) return false;
    }
    return true;
  }
};

}  // namespace

bool is_enough(const Spec& spec, const Yield& y) {
  if (y.units >= static_cast<std::size_t>(spec.assess.units)) return true;
  return y.units > 0 && spec.assess.interval > 0 && y.high - y.low < spec.assess.interval;
}

std::size_t next_block(const Spec& spec, const Yield& y) {
  return std::min(kLookedAtEvery, static_cast<std::size_t>(spec.assess.units) - y.units);
}

Yield yield_of(const Spec& spec, std::size_t units, std::size_t passed) {
  Yield y;
  y.units = units;
  y.passed = passed;
  y.seed = spec.seed;
  const Interval interval = clopper_pearson(passed, units);
  y.low = interval.low;
  y.high = interval.high;
  return y;
}

Yield simulated_yield(const Spec& spec, const Population& population) {
  const Demands demands(spec);
  UnitRunner runner(population, demands.figures, demands.probes);
  UnitBlock block;
  Yield y;
  while (!is_enough(spec, y)) {
    runner.run(spec.seed, y.units, next_block(spec, y), block);
    std::size_t passed = y.passed;
    for (std::size_t unit = 0; unit < block.units; ++unit) {
      bool all = true;
      for (std::size_t c = 0; c < population.conditions.size() && all; ++c) all = demands.met(spec, block, c, unit);
      passed += all;
    }
    y = yield_of(spec, y.units + block.units, passed);
  }
  return y;
}

}  // namespace bandwright
