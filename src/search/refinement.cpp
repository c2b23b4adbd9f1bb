#include "search/refinement.hpp"

#include <algorithm>
#include <cmath>

#include "numeric/random.hpp"

namespace bandwright {

namespace {

constexpr std::int8_t kNextAtHand = 127;  // to the next value that the stock holds
constexpr int kLargestKick = 2;           // values a kicked part moves at most
constexpr int kFewestKicked = 2;          // parts in one kick
constexpr int kMostKicked = 4;
// One or two values of one or two parts change the reach of a figure's spread by less than this share.
constexpr double kSpreadMoves = 0.25;
constexpr int kPatience = 10;                    // kicks without a gain before another optimum is taken up
constexpr std::size_t kTakenUp = 12;             // of the best optima, to go on from
constexpr std::size_t kEvaluationsPerKick = 40;  // at least: a small space is known whole before its budget is spent

std::vector<std::int8_t> free_roles(const DesignSpace& space) {
  std::vector<std::int8_t> list;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.is_free(i)) list.push_back(static_cast<std::int8_t>(i));
  }
  return list;
}

bool step(const DesignSpace& space, GridPoint& p, int role, int by) {
  if (by == kNextAtHand || by == -kNextAtHand) {
    p[role] = static_cast<std::int16_t>(next_at_hand(space, static_cast<std::size_t>(role), p[role], by > 0 ? 1 : -1));
    return p[role] >= 0;
  }
  p[role] = static_cast<std::int16_t>(p[role] + by);
  return p[role] >= 0 && p[role] < static_cast<int>(space.offered[role]->size());
}

/// The stage from which neighbours are judged: where the capability is sought, with its distances from the limits.
struct Base {
  Ranked ranked;
  Evaluator::Outlook outlook;

  Base(Evaluator& evaluator, const Ranked& r, RankBy by) : ranked(r) {
    if (wants_capability(by) && r.key.meets()) outlook = evaluator.outlook(r.point);
  }
};

/// True where a neighbour that meets the spec cannot come before the base, whatever its sensitivities are.
bool is_hopeless(Evaluator& evaluator, const GridPoint& p, double error, const Base& base) {
  const RankKey& key = base.ranked.key;
  // parts at hand may come first from a capability of 1 on
  const bool any_will_do = key.to_buy > 0 && key.capability > kProducible;
  if (key.capability >= kHighestCapability && !any_will_do) return error_class(error) > error_class(key.error);
  const double least = any_will_do ? kProducible : key.capability;
  return !base.outlook.distances.empty() &&
         evaluator.capability_near(p, base.outlook) < least - kSpreadMoves * std::fabs(least);
}

/// Sensitivities are computed only where the error alone does not decide.
bool improves(Evaluator& evaluator, const GridPoint& p, const Base& base, RankBy by) {
  const RankKey& key = base.ranked.key;
  const double error = evaluator.error(p);
  const int a = leading_class(error, by), b = leading_class(key.error, by);
  if (a != b) return a < b;
  if (wants_capability(by) && key.meets() && is_hopeless(evaluator, p, error, base)) return false;
  return comes_before(evaluator.key(p), key, by);
}

GridPoint kicked(const DesignSpace& space, const std::vector<std::int8_t>& roles_free, GridPoint p,
                 RandomStream& random) {
  const int parts =
      std::min<int>(kFewestKicked + random.below(kMostKicked - kFewestKicked + 1), static_cast<int>(roles_free.size()));
  for (int i = 0; i < parts; ++i) {
    const int role = roles_free[random.below(static_cast<int>(roles_free.size()))];
    const int by = (1 + random.below(kLargestKick)) * (random.below(2) == 0 ? 1 : -1);
    const int last = static_cast<int>(space.offered[role]->size()) - 1;
    p[role] = static_cast<std::int16_t>(std::clamp(p[role] + by, 0, last));
  }
  return p;
}

}  // namespace

Neighbourhood::Neighbourhood(const DesignSpace& space) {
  std::vector<std::int8_t> steps = {-1, 1, -2, 2};
  if (space.has_stock) steps.insert(steps.end(), {-kNextAtHand, kNextAtHand});
  add_moves(space, steps);
}

Neighbourhood Neighbourhood::whole(const DesignSpace& space) {
  int most = 0;
  for (std::int8_t role : free_roles(space)) most = std::max(most, static_cast<int>(space.offered[role]->size()) - 1);
  std::vector<std::int8_t> steps;
  for (int s = 1; s <= std::min(most, kNextAtHand - 1); ++s)
    steps.insert(steps.end(), {static_cast<std::int8_t>(-s), static_cast<std::int8_t>(s)});
  Neighbourhood all;
  all.add_moves(space, steps);
  return all;
}

void Neighbourhood::add_moves(const DesignSpace& space, const std::vector<std::int8_t>& steps) {
  const std::vector<std::int8_t> roles_free = free_roles(space);
  for (std::int8_t a : roles_free) {
    for (std::int8_t s : steps) moves_.push_back({a, s, -1, 0});
  }
  // the plateau that one coarse capacitor makes needs two parts changed at once
  for (std::size_t i = 0; i < roles_free.size(); ++i) {
    for (std::size_t k = i + 1; k < roles_free.size(); ++k) {
      for (std::int8_t s : steps) {
        for (std::int8_t t : steps) moves_.push_back({roles_free[i], s, roles_free[k], t});
      }
    }
  }
}

bool Neighbourhood::apply(const DesignSpace& space, const Move& m, GridPoint& p) const {
  return step(space, p, m.first, m.first_step) && (m.second < 0 || step(space, p, m.second, m.second_step));
}

Ranked Neighbourhood::refine(Evaluator& evaluator, const GridPoint& start, RankBy by,
                             const std::function<bool()>& stop) const {
  Base best(evaluator, {start, evaluator.key(start)}, by);
  std::size_t next = 0;
  for (std::size_t left = moves_.size(); left > 0; --left) {
    const Move& move = moves_[next];
    next = (next + 1) % moves_.size();
    if (next % 64 == 0 && stop && stop()) break;
    GridPoint p = best.ranked.point;
    if (!apply(evaluator.space(), move, p) || !improves(evaluator, p, best, by)) continue;
    best = Base(evaluator, {p, evaluator.key(p)}, by);
    left = moves_.size() + 1;  // every move is open again
  }
  return best.ranked;
}

bool Neighbourhood::is_best(Evaluator& evaluator, const Ranked& point, RankBy by) const {
  const Base base(evaluator, point, by);
  return std::none_of(moves_.begin(), moves_.end(), [&](const Move& m) {
    GridPoint p = point.point;
    return apply(evaluator.space(), m, p) && improves(evaluator, p, base, by);
  });
}

void Pool::add(const Ranked& r) {
  const auto place = std::lower_bound(list_.begin(), list_.end(), r, [this](const Ranked& a, const Ranked& b) {
    return comes_before(a.key, b.key, by_);
  });
  if (place != list_.end() && place->point == r.point) return;
  list_.insert(place, r);
  if (list_.size() > kept_) list_.pop_back();
}

LocalSearch::LocalSearch(const Spec& spec, const DesignSpace& space, RankBy by, std::size_t kept)
    : by_(by), evaluator_(spec, space, by), neighbourhood_(space), pool_(by, kept) {}

void LocalSearch::refine(const std::vector<GridPoint>& starts, const std::function<bool()>& stop) {
  for (const GridPoint& start : starts) pool_.add(neighbourhood_.refine(evaluator_, start, by_, stop));
}

namespace {

/// Advances a point like an odometer, capacitors fastest, so that operating points are reused; false after the last.
bool advance(const DesignSpace& space, GridPoint& p) {
  for (std::size_t i = kRoleCount; i-- > 0;) {
    if (!space.has(i)) continue;
    if (++p[i] < static_cast<int>(space.offered[i]->size())) return true;
    p[i] = 0;
  }
  return false;
}

}  // namespace

void LocalSearch::enumerate(const std::function<bool()>& stop) {
  if (optima().empty()) return;
  const DesignSpace& space = evaluator_.space();
  Base best(evaluator_, optima().front(), by_);
  GridPoint p;
  for (std::size_t i = 0; i < kRoleCount; ++i) p[i] = space.has(i) ? 0 : -1;
  std::size_t looked_at = 0;
  do {
    if (++looked_at % 64 == 0 && stop && stop()) break;
    if (improves(evaluator_, p, best, by_)) best = Base(evaluator_, {p, evaluator_.key(p)}, by_);
  } while (advance(space, p));
  pool_.add(best.ranked);
}

void LocalSearch::exchange(const std::function<bool()>& stop) {
  if (optima().empty()) return;
  const GridPoint best = optima().front().point;
  pool_.add(Neighbourhood::whole(evaluator_.space()).refine(evaluator_, best, by_, stop));
}

void LocalSearch::kick(std::uint64_t seed, std::size_t budget, const std::function<bool()>& stop) {
  const DesignSpace& space = evaluator_.space();
  const std::vector<std::int8_t> roles_free = free_roles(space);
  if (roles_free.empty() || optima().empty()) return;
  RandomStream random(seed);
  Ranked current = optima().front();
  int without_gain = 0;
  const std::size_t last = evaluator_.evaluations() + budget;
  for (std::size_t kicks = 0; evaluator_.evaluations() < last && kicks < budget / kEvaluationsPerKick; ++kicks) {
    if (stop && stop()) break;
    const GridPoint start = kicked(space, roles_free, current.point, random);
    const Ranked next = neighbourhood_.refine(evaluator_, start, by_, stop);
    const bool gain = comes_before(next.key, current.key, by_);
    pool_.add(next);
    if (gain) current = next;
    without_gain = gain ? 0 : without_gain + 1;
    if (without_gain >= kPatience) {
      current = optima()[random.below(static_cast<int>(std::min(kTakenUp, optima().size())))];
      without_gain = 0;
    }
  }
}

}  // namespace bandwright
