// Discrete refinement: changes of one part and of pairs of parts by one or two neighbouring values, until none improves
// the order; and an iterated local search that kicks several parts at once and refines again.
//
// Source: iterated local search, Lourenço, Martin & Stützle, Handbook of Metaheuristics, 2003 (from memory).
#pragma once

#include <cstdint>
#include <functional>
#include <vector>

#include "search/evaluator.hpp"

namespace bandwright {

/// A grid point with its place in the order.
struct Ranked {
  GridPoint point{};
  RankKey key;
};

/// Moves of one part by -2..2 values, then of every pair of parts.
class Neighbourhood {
public:
  explicit Neighbourhood(const DesignSpace& space);

  /// Descends from `start` until it comes before all its neighbours, or `stop` says so.
  Ranked refine(Evaluator& evaluator, const GridPoint& start, RankBy by, const std::function<bool()>& stop) const;

  /// True where no neighbour comes before the point.
  bool is_best(Evaluator& evaluator, const Ranked& point, RankBy by) const;

private:
  struct Move {
    std::int8_t first = 0, first_step = 0;
    std::int8_t second = -1, second_step = 0;
  };
  bool apply(const DesignSpace& space, const Move& move, GridPoint& point) const;

  std::vector<Move> moves_;
};

/// Refines the starts, then kicks and refines until `budget` analyses are spent. Returns distinct local optima, best first,
/// at most `kept`.
std::vector<Ranked> iterated_local_search(Evaluator& evaluator, const std::vector<GridPoint>& starts, RankBy by,
                                          std::uint64_t seed, std::size_t budget, std::size_t kept,
                                          const std::function<bool()>& stop);

}  // namespace bandwright
