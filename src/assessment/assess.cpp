#include <algorithm>
#include <bandwright/assessment.hpp>
#include <bandwright/margins.hpp>
#include <cmath>
#include <limits>

#include "analysis/unit.hpp"
#include "assessment/pictures.hpp"
#include "assessment/simulation.hpp"
#include "assessment/variance.hpp"
#include "assessment/worst_case.hpp"

namespace bandwright {

namespace {

/// Figures with a worst case: what is required, the band, and the operating point.
std::vector<Figure> bounded(const Spec& spec) {
  constexpr std::array kAlways = {Figure::gain,         Figure::lower_cutoff,      Figure::upper_cutoff,
                                  Figure::output_swing, Figure::collector_current, Figure::collector_emitter_voltage};
  std::vector<Figure> list(kAlways.begin(), kAlways.end());
  for (const FigureInfo& f : figures()) {
    const bool listed = std::find(list.begin(), list.end(), f.figure) != list.end();
    if (spec.requirement(f.figure) && varies(f.figure) && !listed) list.push_back(f.figure);
  }
  return list;
}

/// The smallest margin over the requirements at the ends of their worst cases; NaN where one has none.
double margin_at_worst(const Spec& spec, const Assessment& a) {
  double smallest = std::numeric_limits<double>::infinity();
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (!r) continue;
    for (double x : {a.worst_case[index(f.figure)].min, a.worst_case[index(f.figure)].max}) {
      const double margin = requirement_margin(*r, f, x);
      if (std::isnan(margin)) return kNotComputed;
      smallest = std::min(smallest, margin);
    }
  }
  return std::isfinite(smallest) ? smallest : kNotComputed;
}

bool holds_at_worst(const Spec& spec, const Assessment& a) {
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    const WorstCase& w = a.worst_case[index(f.figure)];
    if (r && !(meets(*r, w.min) && meets(*r, w.max))) return false;
  }
  return true;
}

/// What is the same in every unit: it meets its requirement in all of them, or in none.
void add_fixed_figures(const Spec& spec, const Analysis& nominal, Assessment& a) {
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (!r || varies(f.figure)) continue;
    const double x = nominal.figures[index(f.figure)];
    a.worst_case[index(f.figure)] = {x, x, "every unit", "every unit", x, x, ""};
    FigureSpread& s = a.spread[index(f.figure)];
    s.mean = x;
    s.sigma = 0;
    s.capability = meets(*r, x) ? kHighestCapability : -kHighestCapability;
    s.failed = meets(*r, x) ? 0 : a.yield.units;
    a.capability = std::min(a.capability, s.capability);
  }
}

std::string verdict(const Spec& spec, const Assessment& a) {
  const bool any = std::any_of(spec.requirements.begin(), spec.requirements.end(), [](const auto& r) { return r; });
  if (!any) return "";
  if (!a.nominal_met) return "not met";
  if (a.worst_case_met) return "pass";
  return a.yield.share() >= spec.assess.yield ? "pass with notes" : "not met";
}

}  // namespace

Assessment assess(const Spec& spec, Population population, const Analysis& nominal, const AssessOptions& options) {
  Assessment a;
  a.population = std::move(population);
  const Population& p = a.population;
  for (const OperatingCondition& c : p.conditions) {
    a.at_condition.push_back(
        analyse_unit({nominal_stage(p, c), {}, c.ambient + p.junction_rise}, p.definition).figures);
  }
  const Stage stage = nominal_stage(p, p.conditions.front());
  const Sensitivity s = sensitivity(stage, nominal, p.definition, ResponseModel::exact, all_causes());
  a.share = variance_shares(s, relative_widths(p, p.conditions.front().ambient));
  a.worst_case = worst_cases(p, bounded(spec));
  simulate(spec, a, options.with_response);
  add_fixed_figures(spec, nominal, a);
  a.nominal_met = meets_all(spec, nominal.figures);
  a.worst_case_margin = margin_at_worst(spec, a);
  a.worst_case_met = holds_at_worst(spec, a);
  a.verdict = verdict(spec, a);
  if (options.with_response) add_pictures(spec, nominal, a);
  return a;
}

}  // namespace bandwright
