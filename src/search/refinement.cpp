#include "search/refinement.hpp"

#include <set>
#include <vector>

namespace bandwright {

namespace {

/// A change of one part, or of two.
struct Move {
  std::int8_t first = 0, first_step = 0;
  std::int8_t second = -1, second_step = 0;
};

/// Moves of single parts first, then of pairs: the plateau that one coarse capacitor makes needs two at once.
std::vector<Move> moves(const DesignSpace& space) {
  std::vector<std::int8_t> roles_free;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.is_free(i)) roles_free.push_back(static_cast<std::int8_t>(i));
  }
  std::vector<Move> list;
  for (std::int8_t a : roles_free) {
    for (int s : kSteps) list.push_back({a, static_cast<std::int8_t>(s), -1, 0});
  }
  for (std::size_t i = 0; i < roles_free.size(); ++i) {
    for (std::size_t k = i + 1; k < roles_free.size(); ++k) {
      for (int s : kSteps) {
        for (int t : kSteps) {
          list.push_back({roles_free[i], static_cast<std::int8_t>(s), roles_free[k], static_cast<std::int8_t>(t)});
        }
      }
    }
  }
  return list;
}

bool step(const DesignSpace& space, GridPoint& p, int role, int by) {
  p[role] = static_cast<std::int16_t>(p[role] + by);
  return p[role] >= 0 && p[role] < static_cast<int>(space.offered[role]->size());
}

bool apply(const DesignSpace& space, const Move& m, GridPoint& p) {
  return step(space, p, m.first, m.first_step) && (m.second < 0 || step(space, p, m.second, m.second_step));
}

/// The sensitivity is computed only where the error alone does not decide.
bool improves(const Evaluator& evaluator, Evaluator::Trial& candidate, Evaluator::Trial& current, RankBy by) {
  const int a = leading_class(candidate.key.error, by), b = leading_class(current.key.error, by);
  if (a != b) return a < b;
  evaluator.add_sensitivity(candidate);
  evaluator.add_sensitivity(current);
  return comes_before(candidate.key, current.key, by);
}

bool find_better(Evaluator& evaluator, const std::vector<Move>& list, Evaluator::Trial& trial, RankBy by,
                 std::size_t& next_move, const std::function<bool()>& stop) {
  for (std::size_t tried = 0; tried < list.size(); ++tried) {
    const Move& m = list[next_move];
    next_move = (next_move + 1) % list.size();
    GridPoint p = trial.point;
    if (!apply(evaluator.space(), m, p)) continue;
    Evaluator::Trial candidate = evaluator.evaluate(p);
    if (improves(evaluator, candidate, trial, by)) {
      trial = candidate;
      return true;
    }
    if (tried % 64 == 63 && stop && stop()) return false;
  }
  return false;
}

}  // namespace

bool find_better(Evaluator& evaluator, Evaluator::Trial& trial, RankBy by, std::size_t& next_move) {
  const std::vector<Move> list = moves(evaluator.space());
  return !list.empty() && find_better(evaluator, list, trial, by, next_move, nullptr);
}

Evaluator::Trial refine(Evaluator& evaluator, const GridPoint& start, RankBy by, const std::function<bool()>& stop) {
  const std::vector<Move> list = moves(evaluator.space());
  Evaluator::Trial best = evaluator.evaluate(start);
  std::size_t next_move = 0;
  while (!list.empty() && find_better(evaluator, list, best, by, next_move, stop)) {
  }
  evaluator.add_sensitivity(best);
  return best;
}

}  // namespace bandwright
