#include "search/relaxation.hpp"

#include <algorithm>
#include <bandwright/analysis.hpp>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <cmath>
#include <nlopt.hpp>

#include "analysis/operating_point.hpp"
#include "search/evaluator.hpp"

namespace bandwright {

namespace {

constexpr int kPoleModelSteps = 40, kExactSteps = 25;  // evaluations at most
constexpr double kGoodEnough = 1e-6;                   // sum of squared deviations: the grid is far coarser
constexpr double kDistance = 1.05;                     // constraints are kept this factor inside

/// One relaxation: what NLopt's callbacks need, and the best allowed point seen (the library's own may break a
/// constraint).
class Problem {
public:
  Problem(const Spec& spec, const DesignSpace& space, const PartValues& start)
      : spec_(spec), space_(space), definition_(gain_definition(spec)) {
    stage_ = {start, &space.device->parameters, surroundings(spec)};
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (space.is_free(i)) free_.push_back(i);
    }
  }

  PartValues run(const PartValues& start, ResponseModel model, int steps);

private:
  /// Analysis at x, kept for the constraints that ask for the same point.
  void look(const std::vector<double>& x);
  double objective(const std::vector<double>& x, std::vector<double>& gradient);
  double constraint(const std::vector<double>& x, std::vector<double>& gradient, bool collector_drop);
  double log_derivative(Figure f, std::size_t role) const { return slopes_[index(f)][role]; }

  const Spec& spec_;
  const DesignSpace& space_;
  GainDefinition definition_;
  Stage stage_;
  std::vector<std::size_t> free_;
  ResponseModel model_ = ResponseModel::exact;
  std::vector<double> at_;
  Analysis analysis_;
  Sensitivity slopes_{};
  PartValues best_{};
  double best_value_ = 0;
};

void Problem::look(const std::vector<double>& x) {
  if (x == at_) return;
  at_ = x;
  for (std::size_t k = 0; k < free_.size(); ++k) stage_.parts[free_[k]] = e_to(x[k]);
  analysis_ = analyse(stage_, definition_, model_);
  slopes_ = sensitivity(stage_, analysis_, definition_, model_);
}

double Problem::objective(const std::vector<double>& x, std::vector<double>& gradient) {
  look(x);
  std::fill(gradient.begin(), gradient.end(), 0.0);
  if (analysis_.point.state != BiasState::active) return kWorstError;
  double sum = 0;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec_.requirement(f.figure);
    const double value = analysis_.figures[index(f.figure)];
    if (!r || !(value > 0)) continue;
    const Deviation d = deviation(*r, f, value);
    sum += d.value * d.value;
    for (std::size_t k = 0; k < gradient.size(); ++k) {
      gradient[k] += 2 * d.value * d.slope * log_derivative(f.figure, free_[k]);
    }
  }
  const bool allowed = violation(analysis_, stage_.parts, *stage_.device) == 0;
  const double value = allowed ? sum : sum + kWorstError;
  if (value < best_value_) {
    best_value_ = value;
    best_ = stage_.parts;
  }
  return sum;
}

/// ln(needed/value) <= 0, for VCE and for IC RC.
double Problem::constraint(const std::vector<double>& x, std::vector<double>& gradient, bool collector_drop) {
  look(x);
  const OperatingPoint& p = analysis_.point;
  const bool active = p.state == BiasState::active;
  const double drop = p.collector_current * stage_.parts[index(Role::collector)];
  const double needed =
      collector_drop ? kLeastCollectorDrop
                     : std::max(kLeastCollectorEmitter, least_active_voltage(*stage_.device, p.base_emitter_voltage));
  const double value = collector_drop ? drop : std::max(p.collector_emitter_voltage, 1e-3);
  for (std::size_t k = 0; k < gradient.size(); ++k) {
    const Figure f = collector_drop ? Figure::collector_current : Figure::collector_emitter_voltage;
    const bool own = collector_drop && free_[k] == index(Role::collector);
    gradient[k] = active ? -log_derivative(f, free_[k]) - (own ? 1.0 : 0.0) : 0.0;
  }
  return ln(kDistance * needed / value);
}

PartValues Problem::run(const PartValues& start, ResponseModel model, int steps) {
  model_ = model;
  at_.clear();
  stage_.parts = best_ = start;
  best_value_ = std::numeric_limits<double>::infinity();
  if (free_.empty()) return start;

  std::vector<double> x, low, high;
  for (std::size_t role : free_) {
    const auto& offered = *space_.offered[role];
    low.push_back(ln(offered.front().working_value));
    high.push_back(ln(offered.back().working_value));
    x.push_back(std::clamp(ln(start[role]), low.back(), high.back()));
  }
  struct Side {
    Problem* problem;
    bool collector_drop;
  };
  Side sides[] = {{this, false}, {this, true}};
  nlopt::opt optimiser(nlopt::LD_SLSQP, static_cast<unsigned>(x.size()));
  optimiser.set_lower_bounds(low);
  optimiser.set_upper_bounds(high);
  optimiser.set_min_objective([](const std::vector<double>& p, std::vector<double>& g,
                                 void* self) { return static_cast<Problem*>(self)->objective(p, g); },
                              this);
  for (Side& side : sides) {
    optimiser.add_inequality_constraint(
        [](const std::vector<double>& p, std::vector<double>& g, void* data) {
          const Side& s = *static_cast<Side*>(data);
          return s.problem->constraint(p, g, s.collector_drop);
        },
        &side, 1e-6);
  }
  optimiser.set_maxeval(steps);
  optimiser.set_stopval(kGoodEnough);
  optimiser.set_xtol_rel(1e-6);
  double value = 0;
  try {
    optimiser.optimize(x, value);
  } catch (const std::exception&) {
    // NLopt reports a halt on rounding as an exception; the best point is kept here
  }
  return best_;
}

}  // namespace

Relaxed relax(const Spec& spec, const DesignSpace& space, const PartValues& start) {
  Problem problem(spec, space, start);
  const PartValues rough = problem.run(start, ResponseModel::pole_model, kPoleModelSteps);
  Relaxed r;
  r.values = problem.run(rough, ResponseModel::exact, kExactSteps);
  const Stage stage{r.values, &space.device->parameters, surroundings(spec)};
  Analysis a = analyse(stage, gain_definition(spec));
  a.figures[index(Figure::cost)] = unit_cost(space, snap(space, r.values));
  r.error = search_error(spec, a, r.values, *stage.device);
  if (r.error < kWorstError) {
    const Sensitivity slopes = sensitivity(stage, a, gain_definition(spec));
    r.tolerance_sensitivity = tolerance_sensitivity(
        spec, slopes, cause_widths(spec, space, snap(space, r.values), a.point.collector_current));
  }
  return r;
}

}  // namespace bandwright
