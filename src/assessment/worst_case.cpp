// Corner worst case: from the sensitivities' signs at the nominal unit to a corner, from the signs at that corner to
// the next one, until none improves; where a sensitivity at the best corner points into the box (its sign differs
// between the two ends), a bounded local search goes on from there, over the causes, supply and ambient.
//
// Source: extreme value and root-sum-square analysis as in ECSS-Q-HB-30-01; vertex search by signs, Bandler, Liu &
// Chen, IEEE Trans. MTT-23(8), 1975 (both secondary).
#include "assessment/worst_case.hpp"

#include <algorithm>
#include <cmath>
#include <nlopt.hpp>
#include <numeric>

#include "assessment/unit_box.hpp"
#include "assessment/variance.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr int kMostCorners = 8;       // visited one after the other at one condition
constexpr int kPolishSteps = 60;      // evaluations at most
constexpr double kInward = 1e-9;      // of ln y over the whole range: less pointing inwards is rounding
constexpr double kNamedShare = 0.05;  // causes that make less of the excursion are not named
constexpr std::size_t kMostNamed = 5;

/// What has been found in one direction of one figure.
struct Extreme {
  BoxPoint point;
  double value = kNotComputed;
  FigureValues unused{};
  std::string failure;  ///< a corner without a value
};

class Climber {
public:
  Climber(const UnitBox& box, Figure figure, double sign, bool polish)
      : box_(box), figure_(figure), sign_(sign), polish_(polish) {}

  /// From the nominal unit at a condition to a corner that no sign contradicts.
  Extreme corner(const OperatingCondition& at, const std::vector<FigureValues>& slopes) const {
    Extreme e;
    e.point = box_.nominal(at);
    step_to_corner(slopes, e.point);
    if (!look(e)) return e;
    for (int i = 0; i < kMostCorners; ++i) {
      Extreme next = e;
      const Analysis a = box_.analyse(e.point);
      if (!step_to_corner(box_.slopes(e.point, a, false), next.point)) break;
      if (!look(next)) return next;
      if (!better(next.value, e.value)) break;
      e = next;
    }
    return e;
  }

  bool better(double a, double b) const { return std::isnan(b) || sign_ * (a - b) > 0; }

  /// Bounded local search where the corner is not yet the extreme.
  Extreme polished(const Extreme& from) const {
    if (!polish_ || !points_inward(from.point)) return from;
    Search search{this, from, {}};
    return search.run();
  }

private:
  /// A bounded search over shares, supply and ambient, that keeps its own best point.
  struct Search {
    const Climber* climber;
    Extreme best;
    BoxPoint at;

    Extreme run() {
      const UnitBox& box = climber->box_;
      const std::size_t n = box.varying().size();
      std::vector<double> x;
      for (std::size_t i : box.varying()) x.push_back(best.point.z[i]);
      for (const auto& side : climber->sides()) x.push_back(side.share_of(best.point.at));
      at = best.point;
      nlopt::opt optimiser(nlopt::LD_SLSQP, static_cast<unsigned>(x.size()));
      optimiser.set_lower_bounds(0.0);
      optimiser.set_upper_bounds(1.0);
      optimiser.set_maxeval(kPolishSteps);
      optimiser.set_xtol_rel(1e-9);
      optimiser.set_max_objective([](const std::vector<double>& p, std::vector<double>& g,
                                     void* self) { return static_cast<Search*>(self)->objective(p, g); },
                                  this);
      double value = 0;
      try {
        if (n > 0) optimiser.optimize(x, value);
      } catch (const std::exception&) {
        // NLopt reports a halt on rounding as an exception; the best point is kept here
      }
      return best;
    }

    double objective(const std::vector<double>& x, std::vector<double>& gradient) {
      const UnitBox& box = climber->box_;
      const std::size_t n = box.varying().size();
      for (std::size_t k = 0; k < n; ++k) at.z[box.varying()[k]] = x[k];
      const auto sides = climber->sides();
      for (std::size_t k = 0; k < sides.size(); ++k) sides[k].set(at.at, x[n + k]);
      std::fill(gradient.begin(), gradient.end(), 0.0);
      Extreme here{at, kNotComputed, {}, ""};
      const Analysis a = box.analyse(at);
      here.value = a.figures[index(climber->figure_)];
      if (std::isnan(here.value)) return -1e3;
      if (climber->better(here.value, best.value)) best = here;
      const std::vector<FigureValues> s = box.slopes(at, a, true);
      for (std::size_t k = 0; k < n + sides.size(); ++k) {
        const double scale = k < n ? 1 : sides[k - n].span();
        if (k < gradient.size()) gradient[k] = climber->sign_ * scale * s[k][index(climber->figure_)];
      }
      return climber->sign_ * ln(std::fabs(here.value));
    }
  };

  /// Supply and ambient as shares of their ranges.
  struct Side {
    double OperatingCondition::*member;
    double low, high;
    double span() const { return high - low; }
    double share_of(const OperatingCondition& c) const { return span() > 0 ? (c.*member - low) / span() : 0; }
    void set(OperatingCondition& c, double share) const { c.*member = low + share * span(); }
  };
  std::array<Side, 2> sides() const {
    std::array<Side, 2> list = {Side{&OperatingCondition::supply, 1e300, -1e300},
                                Side{&OperatingCondition::ambient, 1e300, -1e300}};
    for (const OperatingCondition& c : box_.population().conditions) {
      for (Side& s : list) {
        s.low = std::min(s.low, c.*(s.member));
        s.high = std::max(s.high, c.*(s.member));
      }
    }
    return list;
  }

  /// Every share to the end its slope asks for; true where one changed.
  bool step_to_corner(const std::vector<FigureValues>& slopes, BoxPoint& point) const {
    bool changed = false;
    for (std::size_t k = 0; k < box_.varying().size(); ++k) {
      double& z = point.z[box_.varying()[k]];
      const double slope = sign_ * slopes[k][index(figure_)];
      const double end = slope > 0 ? 1.0 : slope < 0 ? 0.0 : z > 0.5 ? 1.0 : 0.0;
      changed = changed || end != z;
      z = end;
    }
    return changed;
  }

  bool look(Extreme& e) const {
    const Analysis a = box_.analyse(e.point);
    e.value = a.figures[index(figure_)];
    if (!std::isnan(e.value)) return true;
    const UnitPoint unit = box_.unit(e.point);
    e.failure = why_absent(a, unit.stage, box_.population().definition, figure_);
    return false;
  }

  bool points_inward(const BoxPoint& p) const {
    const std::vector<FigureValues> s = box_.slopes(p, box_.analyse(p), true);
    const std::size_t n = box_.varying().size();
    const auto inward = [&](double share, double span, double slope) {
      const double pull = sign_ * slope * span;
      return (share < 1 && pull > kInward) || (share > 0 && pull < -kInward);
    };
    for (std::size_t k = 0; k < n; ++k) {
      if (inward(p.z[box_.varying()[k]], 1, s[k][index(figure_)])) return true;
    }
    const auto two = sides();
    for (std::size_t k = 0; k < two.size(); ++k) {
      if (inward(two[k].share_of(p.at), two[k].span(), s[n + k][index(figure_)])) return true;
    }
    return false;
  }

  const UnitBox& box_;
  Figure figure_;
  double sign_;
  bool polish_;
};

/// "hFE min, R3 max, 60 °C, 11.4 V"
std::string corner_name(const UnitBox& box, Figure figure, const BoxPoint& p) {
  const Analysis a = box.analyse(p);
  const std::vector<FigureValues> s = box.slopes(p, a, false);
  const BoxPoint centre = box.nominal(p.at);
  std::vector<std::pair<double, std::size_t>> parts;
  double sum = 0;
  for (std::size_t k = 0; k < box.varying().size(); ++k) {
    const std::size_t i = box.varying()[k];
    const double excursion = std::fabs(s[k][index(figure)] * (p.z[i] - centre.z[i]));
    parts.emplace_back(excursion, i);
    sum += excursion;
  }
  std::stable_sort(parts.begin(), parts.end(), [](const auto& x, const auto& y) { return x.first > y.first; });
  std::string name;
  for (std::size_t k = 0; k < std::min(parts.size(), kMostNamed); ++k) {
    if (!(parts[k].first > kNamedShare * sum)) break;
    const double z = p.z[parts[k].second];
    name += causes()[parts[k].second].symbol;
    name += z == 0 ? " min, " : z == 1 ? " max, " : " inside its limits, ";
  }
  return name + format_quantity(p.at.ambient, Dimension::temperature) + ", " +
         format_quantity(p.at.supply, Dimension::voltage);
}

/// The corners of supply and ambient; where neither varies, the nominal condition.
std::vector<OperatingCondition> corners(const Population& p) {
  if (p.conditions.size() == 1) return p.conditions;
  return {p.conditions.begin() + 1, p.conditions.end()};
}

}  // namespace

std::array<WorstCase, kFigureCount> worst_cases(const Population& population, const std::vector<Figure>& figures,
                                                const WorstCaseOptions& options) {
  std::array<WorstCase, kFigureCount> list{};
  const UnitBox box(population);
  const std::vector<OperatingCondition> conditions = corners(population);
  std::vector<std::vector<FigureValues>> slopes;
  for (const OperatingCondition& c : conditions) {
    const BoxPoint p = box.nominal(c);
    const Analysis a = box.analyse(p);
    if (a.point.state != BiasState::active) {
      const std::string reason = "the nominal unit at " + format_quantity(c.ambient, Dimension::temperature) + ", " +
                                 format_quantity(c.supply, Dimension::voltage) + ": " +
                                 why_absent(a, nominal_stage(population, c), population.definition, Figure::gain);
      for (Figure f : figures) list[index(f)].reason = reason;
      return list;
    }
    slopes.push_back(box.slopes(p, a, false));
  }
  for (Figure f : figures) {
    WorstCase& w = list[index(f)];
    for (double sign : {-1.0, 1.0}) {
      const Climber climber(box, f, sign, options.polish);
      Extreme best;
      for (std::size_t q = 0; q < conditions.size() && w.reason.empty(); ++q) {
        const Extreme e = climber.corner(conditions[q], slopes[q]);
        if (!e.failure.empty()) {
          w.reason = "a unit at a corner (" + format_quantity(e.point.at.ambient, Dimension::temperature) + ", " +
                     format_quantity(e.point.at.supply, Dimension::voltage) + ") has no value: " + e.failure;
        } else if (climber.better(e.value, best.value)) {
          best = e;
        }
      }
      if (!w.reason.empty() || std::isnan(best.value)) break;
      best = climber.polished(best);
      (sign < 0 ? w.min : w.max) = best.value;
      (sign < 0 ? w.at_min : w.at_max) = corner_name(box, f, best.point);
    }
    if (!w.reason.empty()) w.min = w.max = kNotComputed, w.at_min.clear(), w.at_max.clear();
  }
  add_root_sum_squares(population, figures, list);
  return list;
}

}  // namespace bandwright
