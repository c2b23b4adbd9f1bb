#include "search/pairing.hpp"

#include <algorithm>
#include <optional>

#include "catalogue/pairs.hpp"
#include "search/found.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kTaken = 8;  // of the stages found
constexpr int kMostPairs = 4;      // in one stage
constexpr double kReach = 2.2;     // a pair lies within this factor of the single value

const DesignSpace* space_of(const DesignSpaces& all, const Found& f) {
  for (const DesignSpace& space : all.spaces)
    if (space.device_index == f.device && space.variant == f.variant) return &space;
  return nullptr;
}

/// The stage's own parts alone; one role at a time is opened.
class Pairing {
public:
  Pairing(const Spec& spec, const DesignSpace& space, const Found& start, RankBy by)
      : spec_(spec), by_(by), all_(space), space_(space) {
    point_.fill(-1);
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (!space.has(i)) continue;
      lists_[i] = {start.parts[i]};
      space_.offered[i] = &lists_[i];
      point_[i] = 0;
    }
    best_ = start;
  }

  /// One part after another, to any single value or pair that helps most, until the spec is met or none helps.
  Found run() {
    while (!best_.standing.key.meets()) {
      std::optional<Found> better;
      for (std::size_t role = 0; role < kRoleCount; ++role)
        if (space_.has(role)) try_values(role, better);
      if (!better) break;
      best_ = *better;
      for (std::size_t i = 0; i < kRoleCount; ++i)
        if (space_.has(i)) lists_[i] = {best_.parts[i]};
    }
    return best_;
  }

private:
  /// Every pair within reach, where the stage may have one more, and every single value.
  std::vector<OfferedValue> values_for(std::size_t role) const {
    std::vector<OfferedValue> list;
    const auto is_pair = [](const OfferedValue& o) { return o.connection != Connection::single; };
    const bool may_pair =
        is_pair(best_.parts[role]) || std::count_if(best_.parts.begin(), best_.parts.end(), is_pair) < kMostPairs;
    const double value = best_.parts[role].working_value;
    if (may_pair) list = pairs_between(*all_.offered[role], spec_.parts.boards, value / kReach, value * kReach);
    list.insert(list.end(), all_.offered[role]->begin(), all_.offered[role]->end());
    return list;
  }

  void try_values(std::size_t role, std::optional<Found>& better) {
    const std::vector<OfferedValue> kept = lists_[role];
    lists_[role] = values_for(role);
    Evaluator evaluator(spec_, space_, by_);
    GridPoint p = point_;
    for (std::size_t i = 0; i < lists_[role].size(); ++i) {
      p[role] = static_cast<std::int16_t>(i);
      const double least = (better ? *better : best_).standing.key.error;
      if (evaluator.error(p) < least) better = found_from(evaluator, {p, evaluator.key(p)});
    }
    lists_[role] = kept;
  }

  const Spec& spec_;
  RankBy by_;
  const DesignSpace& all_;
  DesignSpace space_;
  OfferedByRole lists_;
  GridPoint point_{};
  Found best_;
};

}  // namespace

std::vector<Found> paired(const Spec& spec, const DesignSpaces& all, const std::vector<Found>& found, RankBy by) {
  std::vector<Found> list;
  const auto meets = [](const Found& f) { return f.standing.key.meets(); };
  if (std::any_of(found.begin(), found.end(), meets)) return list;
  std::vector<Found> best = found;
  std::stable_sort(best.begin(), best.end(),
                   [](const Found& a, const Found& b) { return a.standing.key.error < b.standing.key.error; });
  for (std::size_t i = 0; i < std::min(best.size(), kTaken); ++i) {
    const DesignSpace* space = best[i].allowed ? space_of(all, best[i]) : nullptr;
    if (space == nullptr) continue;
    Found f = Pairing(spec, *space, best[i], by).run();
    if (f.standing.key.error < best[i].standing.key.error) list.push_back(std::move(f));
  }
  return list;
}

}  // namespace bandwright
