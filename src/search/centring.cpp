// Source: design centring by linearised distances from the limits, after the worst-case distances of Antreich, Graeb &
// Wieser, IEEE Trans. CAD 13(1), 1994 (secondary); here with the spread of each figure held over one round.
#include "search/centring.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <cmath>
#include <nlopt.hpp>

#include "analysis/operating_point.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr int kRounds = 3;
constexpr int kSteps = 25;              // evaluations at most in one round
constexpr double kMostDistance = 4;     // of the least distance in spreads: beyond this nothing is won
constexpr double kDistance = 1.05;      // the conditions of the search are kept this factor inside
constexpr std::size_t kConditions = 2;  // of the search: VCE and IC RC

/// One round: maximises t with t <= distance/reach for every limit, over the logarithms of the free parts.
class Round {
public:
  Round(const Spec& spec, const DesignSpace& space, const Evaluator::Outlook& from, const PartValues& start)
      : space_(space), from_(from), definition_(gain_definition(spec)) {
    stage_ = {start, &space.device->parameters, surroundings(spec)};
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (space.is_free(i)) free_.push_back(i);
    }
  }

  PartValues run() {
    if (free_.empty()) return stage_.parts;
    std::vector<double> x, low, high;
    for (std::size_t role : free_) {
      const auto& offered = *space_.offered[role];
      low.push_back(ln(offered.front().working_value));
      high.push_back(ln(offered.back().working_value));
      x.push_back(std::clamp(ln(stage_.parts[role]), low.back(), high.back()));
    }
    x.push_back(estimated_capability(from_.distances));
    low.push_back(-1e3);
    high.push_back(kMostDistance);
    best_ = stage_.parts;
    nlopt::opt optimiser(nlopt::LD_SLSQP, static_cast<unsigned>(x.size()));
    optimiser.set_lower_bounds(low);
    optimiser.set_upper_bounds(high);
    optimiser.set_max_objective(
        [](const std::vector<double>& p, std::vector<double>& g, void*) {
          std::fill(g.begin(), g.end(), 0.0);
          if (!g.empty()) g.back() = 1;
          return p.back();
        },
        nullptr);
    optimiser.add_inequality_mconstraint([](unsigned m, double* result, unsigned n, const double* p, double* g,
                                            void* self) { static_cast<Round*>(self)->constraints(m, result, n, p, g); },
                                         this, std::vector<double>(from_.distances.size() + kConditions, 1e-6));
    optimiser.set_maxeval(kSteps);
    optimiser.set_xtol_rel(1e-5);
    double value = 0;
    try {
      optimiser.optimize(x, value);
    } catch (const std::exception&) {
      // NLopt reports a halt on rounding as an exception; the best point is kept here
    }
    return best_;
  }

private:
  void constraints(unsigned m, double* result, unsigned n, const double* x, double* gradient) {
    for (std::size_t k = 0; k < free_.size(); ++k) stage_.parts[free_[k]] = e_to(x[k]);
    const Analysis a = analyse(stage_, definition_);
    if (gradient != nullptr) std::fill(gradient, gradient + std::size_t{m} * n, 0.0);
    if (a.point.state != BiasState::active) {
      std::fill(result, result + m, kWorstError);
      return;
    }
    const Sensitivity s = sensitivity(stage_, a, definition_);
    double least = kMostDistance;
    const std::vector<LimitDistance> here = moved(from_.distances, from_.analysis.figures, a.figures);
    for (std::size_t i = 0; i < here.size(); ++i) {
      const LimitDistance& d = here[i];
      const std::size_t f = index(d.figure);
      const double t = d.capability();
      least = std::min(least, t);
      result[i] = x[free_.size()] - t;
      if (gradient == nullptr) continue;
      for (std::size_t k = 0; k < free_.size(); ++k) {
        gradient[i * n + k] = d.toward * d.per_ln * s[f][free_[k]] / d.reach;
      }
      gradient[i * n + free_.size()] = 1;
    }
    keep_allowed(a, s, m, result, n, gradient);
    const bool allowed = result[m - 1] <= 0 && result[m - 2] <= 0;
    if (allowed && least > best_value_) {
      best_value_ = least;
      best_ = stage_.parts;
    }
  }

  /// The last two constraints: ln(needed/value) <= 0 for VCE and for IC RC.
  void keep_allowed(const Analysis& a, const Sensitivity& s, unsigned m, double* result, unsigned n,
                    double* gradient) const {
    const OperatingPoint& p = a.point;
    const double needed =
        std::max(kLeastCollectorEmitter, least_active_voltage(*stage_.device, p.base_emitter_voltage));
    const double drop = p.collector_current * stage_.parts[index(Role::collector)];
    result[m - 2] = ln(kDistance * needed / std::max(p.collector_emitter_voltage, 1e-3));
    result[m - 1] = ln(kDistance * kLeastCollectorDrop / drop);
    if (gradient == nullptr) return;
    for (std::size_t k = 0; k < free_.size(); ++k) {
      const bool own = free_[k] == index(Role::collector);
      gradient[(m - 2) * n + k] = -s[index(Figure::collector_emitter_voltage)][free_[k]];
      gradient[(m - 1) * n + k] = -s[index(Figure::collector_current)][free_[k]] - (own ? 1.0 : 0.0);
    }
  }

  const DesignSpace& space_;
  const Evaluator::Outlook& from_;
  GainDefinition definition_;
  Stage stage_;
  std::vector<std::size_t> free_;
  PartValues best_{};
  double best_value_ = -kWorstError;
};

}  // namespace

GridPoint centred(const Spec& spec, Evaluator& evaluator, const GridPoint& start, RankBy by) {
  Ranked best{start, evaluator.key(start)};
  GridPoint at = start;
  for (int i = 0; i < kRounds; ++i) {
    const Evaluator::Outlook outlook = evaluator.outlook(at);
    if (outlook.distances.empty()) break;
    const DesignSpace& space = evaluator.space();
    const GridPoint next = snap(space, Round(spec, space, outlook, working_values(space, at)).run());
    if (next == at) break;
    at = next;
    const Ranked there{at, evaluator.key(at)};
    if (comes_before(there.key, best.key, by)) best = there;
  }
  return best.point;
}

}  // namespace bandwright
