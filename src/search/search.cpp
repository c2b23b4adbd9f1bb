#include <bandwright/search.hpp>

#include <algorithm>
#include <atomic>
#include <cmath>
#include <mutex>
#include <numeric>

#include <tbb/global_control.h>
#include <tbb/parallel_for.h>
#include <tbb/task_arena.h>

#include <bandwright/margins.hpp>

#include "search/refinement.hpp"
#include "search/relaxation.hpp"
#include "search/starts.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kRelaxations = 384;       // over all spaces together
constexpr std::size_t kLeastStarts = 3;         // in each space
constexpr std::size_t kMostStarts = 64;
constexpr std::size_t kRefinements = 48;        // of the best relaxed points
constexpr std::size_t kPerSpace = 6;            // of them in one space, while others are left

/// Runs tasks on TBB's threads, each writing its own slot, so that the answer does not depend on their number.
class Workers {
public:
  Workers(const SearchOptions& options, double first_share, double last_share, std::size_t tasks, std::atomic<bool>& stop)
      : options_(options), first_(first_share), span_(last_share - first_share), tasks_(tasks), stop_(stop) {}

  template <class Task>
  void run(const Task& task) {
    const int threads = options_.threads > 0 ? options_.threads : tbb::task_arena::automatic;
    tbb::task_arena arena(threads);
    arena.execute([&] {
      tbb::parallel_for(std::size_t(0), tasks_, [&](std::size_t i) {
        if (stopped()) return;
        task(i);
        ++done_;
      }, tbb::simple_partitioner());
    });
  }

  /// Asks the caller from one thread at a time.
  bool stopped() {
    if (stop_) return true;
    std::unique_lock<std::mutex> one(ask_, std::try_to_lock);
    if (one.owns_lock() && options_.keep_going) {
      const double share = first_ + span_ * static_cast<double>(done_) / static_cast<double>(std::max<std::size_t>(tasks_, 1));
      if (!options_.keep_going(share)) stop_ = true;
    }
    return stop_;
  }

private:
  const SearchOptions& options_;
  double first_, span_;
  std::size_t tasks_;
  std::atomic<bool>& stop_;
  std::atomic<std::size_t> done_{0};
  std::mutex ask_;
};

/// A relaxed start, or a place that was not reached before the search was stopped.
struct Seed {
  std::size_t space = 0;
  Relaxed relaxed;
  bool reached = false;
};

std::vector<Seed> relax_all(const Spec& spec, const DesignSpaces& all, const SearchOptions& options,
                            std::atomic<bool>& stop) {
  const std::size_t starts =
      std::clamp(kRelaxations / std::max<std::size_t>(all.spaces.size(), 1), kLeastStarts, kMostStarts);
  const std::vector<Choices> choices = sobol_choices(starts, spec.seed);
  std::vector<Seed> seeds(all.spaces.size() * starts);
  Workers workers(options, 0.0, 0.4, seeds.size(), stop);
  workers.run([&](std::size_t i) {
    Seed& s = seeds[i];
    s.space = i / starts;
    const DesignSpace& space = all.spaces[s.space];
    const std::size_t k = i % starts;
    s.relaxed = relax(spec, space, start_point(spec, space, choices[k], k == 0));
    s.reached = true;
  });
  std::erase_if(seeds, [](const Seed& s) { return !s.reached; });
  return seeds;
}

/// The seeds worth refining: smallest error class first, in turn over the spaces so that none crowds out the others.
std::vector<Seed> choose_seeds(std::vector<Seed> seeds, std::size_t spaces) {
  std::stable_sort(seeds.begin(), seeds.end(), [](const Seed& a, const Seed& b) {
    return error_class(a.relaxed.error) < error_class(b.relaxed.error);
  });
  std::vector<Seed> chosen, rest;
  std::vector<std::size_t> taken(spaces, 0);
  for (const Seed& s : seeds) {
    const bool room = chosen.size() < kRefinements && taken[s.space] < kPerSpace;
    if (room) ++taken[s.space];
    (room ? chosen : rest).push_back(s);
  }
  for (const Seed& s : rest) {
    if (chosen.size() < kRefinements) chosen.push_back(s);
  }
  return chosen;
}

Found found_from(const Evaluator::Trial& t, const DesignSpace& space) {
  Found f;
  f.device = space.device_index;
  f.variant = space.variant;
  f.parts = offered_parts(space, t.point);
  f.allowed = t.key.error <= kWorstError;
  f.standing.key = t.key;
  f.standing.device = space.device->parameters.type;
  f.standing.variant = space.variant->key;
  f.standing.collector_current = t.analysis.point.collector_current;
  f.standing.input_resistance = t.analysis.figures[index(Figure::input_resistance)];
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i) f.standing.total_capacitance += t.key.values[i];
  return f;
}

std::string describe_miss(const Found& f, const DesignSpaces& all, const Spec& spec) {
  for (const DesignSpace& space : all.spaces) {
    if (space.device_index != f.device || space.variant != f.variant) continue;
    PartValues v{};
    for (std::size_t i = 0; i < kRoleCount; ++i) v[i] = f.parts[i].working_value;
    const Stage stage{v, &space.device->parameters, surroundings(spec)};
    const Analysis a = analyse(stage, gain_definition(spec));
    const double drop = a.point.collector_current * v[index(Role::collector)];
    return "no combination of the offered values is active with VCE of at least 1 V and IC RC of at least 0.5 V within "
           "the transistor's limits; the nearest (" + f.standing.device + ") has VCE " +
           format_quantity(a.point.collector_emitter_voltage, Dimension::voltage, 3) + ", IC RC " +
           format_quantity(drop, Dimension::voltage, 3) + ", IC " +
           format_quantity(a.point.collector_current, Dimension::current, 3);
  }
  return "no combination of values is offered";
}

}  // namespace

SearchOutcome search(const Spec& spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices,
                     const SearchOptions& options) {
  const DesignSpaces all = design_spaces(spec, catalogue, devices);
  std::atomic<bool> stop{false};
  const std::vector<Seed> seeds = choose_seeds(relax_all(spec, all, options, stop), all.spaces.size());

  std::vector<Found> found(seeds.size());
  Workers workers(options, 0.4, 1.0, seeds.size(), stop);
  // once the caller has stopped the search, what is at hand is snapped and returned unrefined
  const auto refine_seed = [&](std::size_t i) {
    const DesignSpace& space = all.spaces[seeds[i].space];
    Evaluator evaluator(spec, space);
    const GridPoint start = snap(space, seeds[i].relaxed.values);
    found[i] = found_from(refine(evaluator, start, options.rank_by, [&] { return workers.stopped(); }), space);
  };
  workers.run(refine_seed);
  for (std::size_t i = 0; i < seeds.size() && stop; ++i) {
    if (!found[i].variant) refine_seed(i);
  }

  SearchOutcome outcome;
  outcome.interrupted = stop;
  std::stable_sort(found.begin(), found.end(), [&](const Found& a, const Found& b) {
    return comes_before(a.standing, b.standing, options.rank_by);
  });
  if (found.empty() || !found.front().allowed) {
    outcome.nearest_miss = found.empty() ? "no combination of values is offered" : describe_miss(found.front(), all, spec);
    return outcome;
  }
  std::erase_if(found, [](const Found& f) { return !f.allowed; });
  outcome.found = std::move(found);
  return outcome;
}

}  // namespace bandwright
