#include <tbb/info.h>
#include <tbb/parallel_for.h>
#include <tbb/task_arena.h>

#include <algorithm>
#include <atomic>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <memory>
#include <mutex>
#include <tuple>

#include "search/centring.hpp"
#include "search/found.hpp"
#include "search/pairing.hpp"
#include "search/refinement.hpp"
#include "search/relaxation.hpp"
#include "search/starts.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kRelaxations = 384;  // over all spaces together
constexpr std::size_t kLeastStarts = 1;    // in each space
constexpr std::size_t kMostStarts = 64;
constexpr std::size_t kRefinements = 96;   // relaxed points refined, over all spaces
constexpr std::size_t kStartsInSpace = 2;  // refined in one space at least
constexpr std::size_t kRefinedSpaces = 30;
constexpr std::size_t kKickedSpaces = 8;     // of the most promising, searched on by kicks
constexpr std::size_t kKickBudget = 400000;  // analyses, over all of them
constexpr double kEnumerated = 20000;        // combinations of a space that is looked at whole
constexpr std::size_t kKeptOptima = 24;      // of one space
// Where the most producible stages are sought, the most exact ones are where the centring starts.
constexpr std::size_t kExactBudget = 120000;    // kicks that look for them
constexpr std::size_t kCentredSpaces = 16;      // centred and refined
constexpr std::size_t kCentredInSpace = 3;      // starts of the centring
constexpr std::size_t kCentredBudget = 120000;  // kicks after the centring, over all spaces

/// Runs tasks on TBB's threads, each writing its own slot, so that the answer does not depend on their number.
class Workers {
public:
  Workers(const SearchOptions& options, double first_share, double last_share, std::size_t tasks,
          std::atomic<bool>& stop)
      : options_(options), first_(first_share), span_(last_share - first_share), tasks_(tasks), stop_(stop) {}

  template <class Task>
  void run(const Task& task) {
    const int most = tbb::info::default_concurrency();
    tbb::task_arena arena(options_.threads > 0 ? std::min(options_.threads, most) : most);
    arena.execute([&] {
      tbb::parallel_for(
          std::size_t(0), tasks_,
          [&](std::size_t i) {
            if (stopped()) return;
            task(i);
            ++done_;
          },
          tbb::simple_partitioner());
    });
  }

  /// Asks the caller from one thread at a time.
  bool stopped() {
    if (stop_) return true;
    std::unique_lock<std::mutex> one(ask_, std::try_to_lock);
    if (one.owns_lock() && options_.keep_going) {
      const double share =
          first_ + span_ * static_cast<double>(done_) / static_cast<double>(std::max<std::size_t>(tasks_, 1));
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

/// The part of the progress that a stage of the search makes.
struct Span {
  double first, last;
  double at(double share) const { return first + (last - first) * share; }
};

/// A relaxed start, or a place that was not reached before the search was stopped.
struct Seed {
  std::size_t space = 0;
  Relaxed relaxed;
  bool reached = false;
};

std::vector<Seed> relax_all(const Spec& spec, const DesignSpaces& all, const SearchOptions& options, Span span,
                            std::atomic<bool>& stop) {
  const std::size_t starts =
      std::clamp(kRelaxations / std::max<std::size_t>(all.spaces.size(), 1), kLeastStarts, kMostStarts);
  const std::vector<Choices> choices = sobol_choices(starts, spec.seed);
  std::vector<Seed> seeds(all.spaces.size() * starts);
  Workers workers(options, span.first, span.last, seeds.size(), stop);
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

/// The spaces worth refining and the starts in each, by error class and sensitivity of their relaxed points.
struct Task {
  std::size_t space = 0;
  std::vector<GridPoint> starts;
};

std::vector<Task> plan(std::vector<Seed> seeds, const DesignSpaces& all, RankBy by) {
  const auto order = [&](const Seed& s) {
    const DesignSpace& space = all.spaces[s.space];
    return std::tuple(leading_class(s.relaxed.error, by), space.has_stock && !space.device_in_stock,
                      s.relaxed.tolerance_sensitivity);
  };
  std::stable_sort(seeds.begin(), seeds.end(), [&](const Seed& a, const Seed& b) { return order(a) < order(b); });
  const std::size_t most = std::max(kStartsInSpace, kRefinements / std::max<std::size_t>(all.spaces.size(), 1));
  std::vector<Task> tasks;
  for (const Seed& s : seeds) {
    auto task = std::find_if(tasks.begin(), tasks.end(), [&](const Task& t) { return t.space == s.space; });
    if (task == tasks.end()) {
      if (tasks.size() == kRefinedSpaces) continue;
      task = tasks.insert(tasks.end(), Task{s.space, {}});
    }
    if (task->starts.size() < most) task->starts.push_back(snap(all.spaces[s.space], s.relaxed.values));
  }
  return tasks;
}

using LocalSearches = std::vector<std::unique_ptr<LocalSearch>>;

/// Best first, by the best optimum of each.
void sort_by_best(LocalSearches& searches, RankBy by) {
  std::stable_sort(searches.begin(), searches.end(), [by](const auto& a, const auto& b) {
    return comes_before(a->optima().front().key, b->optima().front().key, by);
  });
}

/// Kicks, spent on the spaces that came out best.
void kick_best(const Spec& spec, LocalSearches& searches, std::size_t budget, const SearchOptions& options, Span span,
               std::atomic<bool>& stop) {
  const std::size_t chosen = std::min(searches.size(), kKickedSpaces);
  Workers kickers(options, span.first, span.last, chosen, stop);
  kickers.run(
      [&](std::size_t i) { searches[i]->kick(spec.seed + i, budget / chosen, [&] { return kickers.stopped(); }); });
}

/// A small space is known whole.
void enumerate_small(LocalSearches& searches, const std::atomic<bool>& stop) {
  for (const auto& s : searches) {
    if (combinations(s->evaluator().space()) <= kEnumerated) s->enumerate([&] { return stop.load(); });
  }
}

/// Refines the starts of every task, then kicks.
LocalSearches search_spaces(const Spec& spec, const DesignSpaces& all, const std::vector<Task>& tasks, RankBy by,
                            std::size_t budget, const SearchOptions& options, Span span, std::atomic<bool>& stop) {
  LocalSearches searches;
  for (const Task& t : tasks) {
    searches.push_back(std::make_unique<LocalSearch>(spec, all.spaces[t.space], by, kKeptOptima));
  }
  Workers refiners(options, span.first, span.at(0.25), tasks.size(), stop);
  const auto refine = [&](std::size_t i) { searches[i]->refine(tasks[i].starts, [&] { return refiners.stopped(); }); };
  refiners.run(refine);
  // once the caller has stopped the search, what is at hand is snapped and returned as it is
  for (std::size_t i = 0; i < tasks.size(); ++i) {
    if (searches[i]->optima().empty()) refine(i);
  }
  sort_by_best(searches, by);
  kick_best(spec, searches, budget, options, {span.at(0.25), span.last}, stop);
  enumerate_small(searches, stop);
  sort_by_best(searches, by);
  return searches;
}

/// Centres the best of each space and refines what comes out, in the order that is asked for.
LocalSearches centre_spaces(const Spec& spec, const LocalSearches& exact, const SearchOptions& options, Span span,
                            std::atomic<bool>& stop) {
  LocalSearches searches;
  const RankBy by = options.rank_by;
  for (std::size_t i = 0; i < std::min(exact.size(), kCentredSpaces); ++i) {
    searches.push_back(std::make_unique<LocalSearch>(spec, exact[i]->evaluator().space(), by, kKeptOptima));
  }
  Workers workers(options, span.first, span.at(0.5), searches.size(), stop);
  const auto centre = [&](std::size_t i) {
    std::vector<GridPoint> starts;
    for (const Ranked& r : exact[i]->optima()) {
      if (starts.size() == kCentredInSpace) break;
      starts.push_back(workers.stopped() ? r.point : centred(spec, searches[i]->evaluator(), r.point, by));
    }
    searches[i]->refine(starts, [&] { return workers.stopped(); });
  };
  workers.run(centre);
  for (std::size_t i = 0; i < searches.size(); ++i) {
    if (searches[i]->optima().empty()) centre(i);
  }
  sort_by_best(searches, by);
  kick_best(spec, searches, kCentredBudget, options, {span.at(0.5), span.last}, stop);
  enumerate_small(searches, stop);
  return searches;
}

/// The one with the smallest error, with its key in the order that is asked for.
Found most_exact(const Spec& spec, const LocalSearches& searches, RankBy by) {
  const Ranked* best = nullptr;
  const DesignSpace* space = nullptr;
  for (const auto& s : searches) {
    for (const Ranked& r : s->optima()) {
      if (best != nullptr && r.key.error >= best->key.error) continue;
      best = &r;
      space = &s->evaluator().space();
    }
  }
  Evaluator evaluator(spec, *space, by);
  return found_from(evaluator, {best->point, evaluator.key(best->point)});
}

/// All that the search finds in a set of spaces.
std::vector<Found> searched(const Spec& spec, const DesignSpaces& all, const SearchOptions& options, Span span,
                            std::atomic<bool>& stop) {
  const bool centring = wants_capability(options.rank_by);
  const RankBy first_by = centring ? RankBy::error : options.rank_by;
  const std::vector<Task> tasks = plan(relax_all(spec, all, options, {span.first, span.at(0.2)}, stop), all, first_by);
  LocalSearches searches = search_spaces(spec, all, tasks, first_by, centring ? kExactBudget : kKickBudget, options,
                                         {span.at(0.2), span.at(centring ? 0.5 : 1.0)}, stop);
  std::vector<Found> found;
  if (centring && !searches.empty()) {
    LocalSearches centred_searches = centre_spaces(spec, searches, options, {span.at(0.5), span.last}, stop);
    found.push_back(most_exact(spec, searches, options.rank_by));
    searches = std::move(centred_searches);
  }
  if (spec.parts.stock_only && !searches.empty() && !stop) {
    sort_by_best(searches, options.rank_by);
    searches.front()->exchange([&] { return stop.load(); });
  }
  for (const auto& s : searches) {
    for (const Ranked& r : s->optima()) found.push_back(found_from(s->evaluator(), r));
  }
  if (!spec.parts.pairs || stop) return found;
  std::vector<Found> with_pairs = paired(spec, all, found, options.rank_by);
  found.insert(found.end(), with_pairs.begin(), with_pairs.end());
  return found;
}

/// The same with nothing but the stock, its transistors where it holds any.
std::vector<Found> searched_at_hand(Spec spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices,
                                    const SearchOptions& options, std::atomic<bool>& stop) {
  spec.parts.stock_only = true;
  DesignSpaces own = design_spaces(spec, catalogue, devices);
  if (holds_transistors(catalogue.stock))
    std::erase_if(own.spaces, [](const DesignSpace& s) { return !s.device_in_stock; });
  return own.spaces.empty() ? std::vector<Found>() : searched(spec, own, options, {0.0, 0.5}, stop);
}

}  // namespace

SearchOutcome search(const Spec& spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices,
                     const SearchOptions& options) {
  std::atomic<bool> stop{false};
  const DesignSpaces all = design_spaces(spec, catalogue, devices);
  std::vector<Found> found;
  // what is at hand is a small world of its own, which is known better when it is searched alone
  const bool preferred = !catalogue.stock.parts.empty() && !spec.parts.stock_only;
  if (preferred) found = searched_at_hand(spec, catalogue, devices, options, stop);
  std::vector<Found> more = searched(spec, all, options, {preferred ? 0.5 : 0.0, 1.0}, stop);
  found.insert(found.end(), more.begin(), more.end());

  SearchOutcome outcome;
  outcome.interrupted = stop;
  std::stable_sort(found.begin(), found.end(), [&](const Found& a, const Found& b) {
    return comes_before(a.standing, b.standing, options.rank_by);
  });
  if (found.empty() || !found.front().allowed) {
    if (stop) return outcome;
    outcome.nearest_miss =
        found.empty() ? "no combination of values is offered" : nearest_miss(found.front(), spec, devices);
    return outcome;
  }
  std::erase_if(found, [](const Found& f) { return !f.allowed; });
  outcome.found = std::move(found);
  return outcome;
}

}  // namespace bandwright
