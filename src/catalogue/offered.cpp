// The values that can be bought for a role, and how a value of a role is bought.
//
// The order of families. Where the spec names families, a value is offered from each of them that is made at it, in the
// order named. Where it names none, each value comes from the family that is first choice there; below the lowest and
// above the highest first choice, the outermost family serves as far as it is made.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

#include "catalogue/choice.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

// The values of a series between two limits, rising. A decade is a power of ten that double holds exactly (or the
// nearest quotient by one), so that each value equals its printed decimal.
void add_series(const Series& series, const ValueRange& range, std::vector<double>& values) {
  const double scale = series.digits == 2 ? 10 : 100;
  const int first = static_cast<int>(std::floor(std::log10(range.min))) - 1;
  const int last = static_cast<int>(std::floor(std::log10(range.max))) + 1;
  for (int decade = first; decade <= last; ++decade) {
    const int power = decade - (series.digits == 2 ? 1 : 2);
    for (const double number : decade_values(series)) {
      const double significant = std::round(number * scale);
      const double value = power < 0 ? significant / std::pow(10.0, -power) : significant * std::pow(10.0, power);
      if (at_least(value, range.min) && at_most(value, range.max)) values.push_back(value);
    }
  }
}

// What a role may take: the role's own range, else the limits of its kind, else the families' first choices.
ValueRange allowed_range(const Spec& spec, const Choice& choice, Role role) {
  if (const auto& own = spec.parts.ranges[index(role)]) return *own;
  const ValueRange usual = choice.usual_range();
  const PartRules& rules = rules_for(spec, role);
  return {rules.min.value_or(usual.min), rules.max.value_or(usual.max)};
}

bool in_family_series(const Family& family, const PartRules& rules, double value) {
  const Series* limit = rules.series.empty() ? nullptr : find_series(rules.series);
  if (limit != nullptr && !in_series(*limit, value)) return false;
  return std::any_of(family.series.begin(), family.series.end(), [&](const std::string& name) {
    const Series* made = find_series(name);
    return made != nullptr && in_series(*made, value);
  });
}

double at_work(const Family& family, double value, double ambient) {
  if (family.cold_loss <= 0 || ambient >= kColdBegins) return value;
  return value * (1 - family.cold_loss * (kColdBegins - ambient));
}

OfferedValue offer(const OfferedFamily& from, double value, const Spec& spec) {
  return {value, at_work(*from.family, value, spec.ambient.nominal), from.family, from.tolerance,
          coarsest_series(value)};
}

std::vector<double> candidate_values(const Choice& choice, const ValueRange& range) {
  std::vector<double> values;
  if (!(range.min > 0) || !(range.max >= range.min) || !std::isfinite(range.max)) return values;
  std::vector<std::string> names;
  for (const OfferedFamily& f : choice.families()) {
    names.insert(names.end(), f.family->series.begin(), f.family->series.end());
  }
  for (const Series& s : series()) {
    if (std::find(names.begin(), names.end(), s.name) != names.end()) add_series(s, range, values);
  }
  std::sort(values.begin(), values.end());
  values.erase(std::unique(values.begin(), values.end(), same_value), values.end());
  return values;
}

}  // namespace

std::vector<OfferedValue> offered_values(const Catalogue& catalogue, const Spec& spec, Role role) {
  const PartRules& rules = rules_for(spec, role);
  const Choice choice(catalogue, rules, info(role).kind);
  const auto& pinned = spec.parts.pinned[index(role)];
  std::vector<OfferedValue> offered;
  const auto offer_all = [&](double value) {
    for (const OfferedFamily* from : choice.all_at(value)) {
      if (pinned || in_family_series(*from->family, rules, value)) offered.push_back(offer(*from, value, spec));
    }
  };
  if (pinned) {
    offer_all(*pinned);
    if (offered.empty()) offered.push_back(resolve_value(catalogue, spec, role, *pinned));
    return offered;
  }
  for (const double value : candidate_values(choice, allowed_range(spec, choice, role))) offer_all(value);
  // In deep cold the smallest electrolytic may work below the largest film capacitor.
  std::stable_sort(offered.begin(), offered.end(),
                   [](const OfferedValue& x, const OfferedValue& y) { return x.working_value < y.working_value; });
  return offered;
}

OfferedValue resolve_value(const Catalogue& catalogue, const Spec& spec, Role role, double value,
                           std::string_view family) {
  if (!(value > 0)) return {};  // the part is absent
  const PartRules& rules = rules_for(spec, role);
  const PartKind kind = info(role).kind;
  const Choice choice(catalogue, rules, kind);
  for (const OfferedFamily& from : choice.families()) {
    if (from.family->name == family || from.family->key == family) return offer(from, value, spec);
  }
  if (const OfferedFamily* from = choice.nearest(value)) return offer(*from, value, spec);
  // No family is as tight as asked for: the part is what it is, at its tightest.
  const Choice loose = Choice::tightest(catalogue, rules, kind);
  if (const OfferedFamily* from = loose.nearest(value)) return offer(*from, value, spec);
  return {value, value, nullptr, {}, coarsest_series(value)};
}

}  // namespace bandwright
