#include "search/pairing.hpp"

#include <algorithm>
#include <optional>

#include "catalogue/pairs.hpp"
#include "search/found.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kTaken = 8;  // of the stages found
constexpr int kMostPairs = 3;      // in one stage
constexpr double kReach = 1.6;     // a pair lies within this factor of the single value

const DesignSpace* space_of(const DesignSpaces& all, const Found& f) {
  for (const DesignSpace& space : all.spaces)
    if (space.device_index == f.device && space.variant == f.variant) return &space;
  return nullptr;
}

/// The stage's own parts alone; one role at a time is opened to pairs.
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

  Found run() {
    for (int pairs = 0; pairs < kMostPairs && !best_.standing.key.meets(); ++pairs) {
      std::optional<Found> better;
      for (std::size_t role = 0; role < kRoleCount; ++role) {
        if (space_.has(role) && best_.parts[role].connection == Connection::single) try_pairs(role, better);
      }
      if (!better) break;
      best_ = *better;
      for (std::size_t i = 0; i < kRoleCount; ++i)
        if (space_.has(i)) lists_[i] = {best_.parts[i]};
    }
    return best_;
  }

private:
  void try_pairs(std::size_t role, std::optional<Found>& better) {
    const double value = best_.parts[role].working_value;
    const std::vector<OfferedValue> kept = lists_[role];
    lists_[role] = pairs_between(*all_.offered[role], spec_.parts.boards, value / kReach, value * kReach);
    if (!lists_[role].empty()) {
      Evaluator evaluator(spec_, space_, by_);
      GridPoint p = point_;
      for (std::size_t i = 0; i < lists_[role].size(); ++i) {
        p[role] = static_cast<std::int16_t>(i);
        const double least = (better ? *better : best_).standing.key.error;
        if (evaluator.error(p) >= least) continue;
        better = found_from(evaluator, {p, evaluator.key(p)});
      }
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
