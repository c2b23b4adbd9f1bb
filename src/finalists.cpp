#include "finalists.hpp"

#include <tbb/info.h>
#include <tbb/parallel_for.h>
#include <tbb/task_arena.h>

#include <algorithm>

#include "assemble.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kSpare = 6;  // finalists beyond those listed: the simulation may change their order

bool is_active(const Candidate& c) { return c.analysis.point.state == BiasState::active; }

std::size_t most_exact(const std::vector<Standing>& list) {
  const auto best = std::min_element(list.begin(), list.end(),
                                     [](const Standing& a, const Standing& b) { return a.key.error < b.key.error; });
  return static_cast<std::size_t>(best - list.begin());
}

template <class Task>
void side_by_side(int threads, std::size_t tasks, const Task& task) {
  const int most = tbb::info::default_concurrency();
  tbb::task_arena arena(threads > 0 ? std::min(threads, most) : most);
  arena.execute([&] { tbb::parallel_for(std::size_t(0), tasks, task); });
}

/// The order now looks at what was simulated.
void take_assessment(Candidate& c) {
  Standing& s = c.standing;
  s.key.capability = c.assessment ? c.assessment->capability : 0;
  s.yield = c.assessment ? c.assessment->yield.share() : 0;
  if (c.assessment && c.assessment->worst_case_margin == c.assessment->worst_case_margin)
    s.worst_case_margin = c.assessment->worst_case_margin;
}

}  // namespace

std::vector<std::size_t> finalists_of(const std::vector<Standing>& found, RankBy by, std::size_t listed) {
  if (found.empty()) return {};
  // before anything is simulated the estimated capability stands for all that needs it
  const RankBy known = wants_capability(by) ? RankBy::capability : by;
  std::vector<std::size_t> list = alternatives(found, known, listed + kSpare);
  const std::size_t exact = most_exact(found);
  if (std::find(list.begin(), list.end(), exact) == list.end()) list.push_back(exact);
  return list;
}

std::vector<Candidate> assemble_all(const Spec& spec, const Catalogue& catalogue,
                                    const std::vector<DerivedDevice>& devices, const std::vector<Found>& found,
                                    int threads) {
  std::vector<Candidate> list(found.size());
  side_by_side(threads, found.size(), [&](std::size_t i) {
    list[i] = assemble(spec, devices[found[i].device], catalogue, found[i].parts);
    list[i].standing = found[i].standing;
  });
  return list;
}

void assess_all(const Spec& spec, const DesignOptions& options, std::vector<Candidate>& candidates) {
  side_by_side(options.threads, candidates.size(), [&](std::size_t i) {
    Candidate& c = candidates[i];
    if (is_active(c)) {
      c.assessment =
          assess(spec, population_of(spec, c.parameters, c.offered, c.analysis), c.analysis, {options.with_response});
    }
    take_assessment(c);
  });
}

void rank(DesignResult& result, std::vector<Candidate> finalists) {
  if (finalists.empty()) return;
  std::vector<Standing> standings;
  for (const Candidate& c : finalists) standings.push_back(c.standing);
  const std::size_t listed = std::min(finalists.size(), static_cast<std::size_t>(result.spec.candidates));
  std::vector<std::size_t> order = alternatives(standings, result.ranked_by, listed);
  const std::size_t exact = most_exact(standings);
  if (std::find(order.begin(), order.end(), exact) == order.end()) {
    if (order.size() == listed && listed > 1) order.pop_back();
    if (order.size() < listed) order.push_back(exact);
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
      return comes_before(standings[a], standings[b], result.ranked_by);
    });
  }
  std::vector<Standing> kept;
  for (std::size_t i : order) kept.push_back(standings[i]);
  const auto titles = best_at(kept);
  const auto marks = non_dominated(kept);
  for (std::size_t k = 0; k < order.size(); ++k) {
    Candidate& c = finalists[order[k]];
    c.rank = static_cast<int>(k) + 1;
    c.best_at = titles[k];
    c.non_dominated = kept.size() > 1 && marks[k];
    result.candidates.push_back(std::move(c));
  }
}

void allocate(const Spec& spec, const Catalogue& catalogue, DesignResult& result) {
  if (result.candidates.empty() || !is_active(result.candidates.front())) return;
  Candidate& c = result.candidates.front();
  c.allocation = allocate_tolerances(spec, catalogue, c.parameters, c.offered, c.analysis);
}

}  // namespace bandwright
