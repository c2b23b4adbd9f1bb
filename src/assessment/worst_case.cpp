// Corner worst case: the extremes of each figure, their corners named, and the root sum of squares beside them.
//
// Source: extreme value and root-sum-square analysis as in ECSS-Q-HB-30-01 (secondary).
#include "assessment/worst_case.hpp"

#include <algorithm>
#include <cmath>

#include "assessment/extremes.hpp"
#include "assessment/variance.hpp"

namespace bandwright {

namespace {

constexpr double kNamedShare = 0.05;  // causes that make less of the excursion are not named
constexpr std::size_t kMostNamed = 5;

/// "hFE min, R3 max, 60 °C, 11.4 V"
std::string corner_name(const UnitBox& box, Figure figure, const Place& at) {
  const std::vector<FigureValues> slopes = at.slopes.empty() ? box.slopes(at.point, at.analysis, false) : at.slopes;
  const BoxPoint centre = box.nominal(at.point.at);
  std::vector<std::pair<double, std::size_t>> parts;
  double sum = 0;
  for (std::size_t k = 0; k < box.varying().size(); ++k) {
    const std::size_t i = box.varying()[k];
    const double excursion = std::fabs(slopes[k][index(figure)] * (at.point.z[i] - centre.z[i]));
    parts.emplace_back(excursion, i);
    sum += excursion;
  }
  std::stable_sort(parts.begin(), parts.end(), [](const auto& x, const auto& y) { return x.first > y.first; });
  std::string name;
  for (std::size_t k = 0; k < std::min(parts.size(), kMostNamed); ++k) {
    if (!(parts[k].first > kNamedShare * sum)) break;
    const double z = at.point.z[parts[k].second];
    name += causes()[parts[k].second].symbol;
    name += z == 0 ? " min, " : z == 1 ? " max, " : " inside its limits, ";
  }
  return name + condition_text(box.population(), at.point.at);
}

/// The corners of supply and ambient; where neither varies, the nominal condition.
std::vector<OperatingCondition> corners(const Population& p) {
  if (p.conditions.size() == 1) return p.conditions;
  return {p.conditions.begin() + 1, p.conditions.end()};
}

WorstCase worst_case(const UnitBox& box, Figure figure, const std::vector<Place>& nominal, bool polish) {
  WorstCase w;
  const Extremes e = extremes(box, figure, nominal, polish);
  if (e.failed) {
    const Stage stage = box.unit(e.failed->point).stage;
    w.reason = "a unit at a corner (" + condition_text(box.population(), e.failed->point.at) +
               ") has no value: " + why_absent(e.failed->analysis, stage, box.population().definition, figure);
    return w;
  }
  w.min = e.low.value(figure);
  w.max = e.high.value(figure);
  w.at_min = corner_name(box, figure, e.low);
  w.at_max = corner_name(box, figure, e.high);
  return w;
}

}  // namespace

std::array<WorstCase, kFigureCount> worst_cases(const Population& population, const std::vector<Figure>& figures,
                                                const WorstCaseOptions& options) {
  std::array<WorstCase, kFigureCount> list{};
  const UnitBox box(population);
  std::vector<Place> nominal;
  for (const OperatingCondition& c : corners(population)) {
    nominal.push_back(nominal_place(box, c));
    const Analysis& a = nominal.back().analysis;
    if (a.point.state == BiasState::active) continue;
    const std::string why = why_absent(a, nominal_stage(population, c), population.definition, Figure::gain);
    for (Figure f : figures)
      list[index(f)].reason = "the nominal unit at " + condition_text(population, c) + ": " + why;
    return list;
  }
  for (Figure f : figures) list[index(f)] = worst_case(box, f, nominal, options.polish);
  add_root_sum_squares(population, figures, list);
  return list;
}

}  // namespace bandwright
