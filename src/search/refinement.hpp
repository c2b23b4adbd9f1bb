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

  /// Any other value in one role, and in any two: for small lists, such as a drawer's.
  static Neighbourhood whole(const DesignSpace& space);

  /// Descends from `start` until it comes before all its neighbours, or `stop` says so.
  Ranked refine(Evaluator& evaluator, const GridPoint& start, RankBy by, const std::function<bool()>& stop) const;

  /// True where no neighbour comes before the point.
  bool is_best(Evaluator& evaluator, const Ranked& point, RankBy by) const;

private:
  struct Move {
    std::int8_t first = 0, first_step = 0;
    std::int8_t second = -1, second_step = 0;
  };
  Neighbourhood() = default;
  void add_moves(const DesignSpace& space, const std::vector<std::int8_t>& steps);
  bool apply(const DesignSpace& space, const Move& move, GridPoint& point) const;

  std::vector<Move> moves_;
};

/// Distinct local optima, best first.
class Pool {
public:
  Pool(RankBy by, std::size_t kept) : by_(by), kept_(kept) {}
  void add(const Ranked& r);
  const std::vector<Ranked>& list() const { return list_; }

private:
  RankBy by_;
  std::size_t kept_;
  std::vector<Ranked> list_;
};

/// The search of one design space.
class LocalSearch {
public:
  LocalSearch(const Spec& spec, const DesignSpace& space, RankBy by, std::size_t kept);

  void refine(const std::vector<GridPoint>& starts, const std::function<bool()>& stop);

  /// Every point of the space, for small ones.
  void enumerate(const std::function<bool()>& stop);

  /// Until no change of one part, nor of any two, to any other value improves the best optimum.
  void exchange(const std::function<bool()>& stop);

  /// Kicks and refines until `budget` analyses are spent since the last call.
  void kick(std::uint64_t seed, std::size_t budget, const std::function<bool()>& stop);

  const std::vector<Ranked>& optima() const { return pool_.list(); }
  Evaluator& evaluator() { return evaluator_; }

private:
  RankBy by_;
  Evaluator evaluator_;
  Neighbourhood neighbourhood_;
  Pool pool_;
};

}  // namespace bandwright
