#include "search/refinement.hpp"

#include <algorithm>
#include <cmath>

#include "numeric/random.hpp"

namespace bandwright {

namespace {

constexpr int kSteps[] = {-1, 1, -2, 2};
constexpr int kLargestKick = 2;   // values a kicked part moves at most
constexpr int kFewestKicked = 2;  // parts in one kick
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
  if (key.capability >= kHighestCapability) return error_class(error) > error_class(key.error);
  return !base.outlook.distances.empty() &&
         evaluator.capability_near(p, base.outlook) < key.capability - kSpreadMoves * std::fabs(key.capability);
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
  const std::vector<std::int8_t> roles_free = free_roles(space);
  for (std::int8_t a : roles_free) {
    for (int s : kSteps) moves_.push_back({a, static_cast<std::int8_t>(s), -1, 0});
  }
  // the plateau that one coarse capacitor makes needs two parts changed at once
  for (std::size_t i = 0; i < roles_free.size(); ++i) {
    for (std::size_t k = i + 1; k < roles_free.size(); ++k) {
      for (int s : kSteps) {
        for (int t : kSteps) {
          moves_.push_back({roles_free[i], static_cast<std::int8_t>(s), roles_free[k], static_cast<std::int8_t>(t)});
        }
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
