// The values that can be bought for a role, and how a value of a role is bought.
//
// The order of families. Where the spec names families, a value is offered from each of them that is made at it, in the
// order named. Where it names none, each value comes from the family that is first choice there; below the lowest and
// above the highest first choice, the outermost family serves as far as it is made.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

#include "catalogue/offer.hpp"
#include "catalogue/pairs.hpp"
#include "catalogue/stock_offers.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kLoosest = 1.4;  // a cutoff that must be better than this either way takes no class 2 ceramic

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

/// The family that takes the place of a polarised one: the one it names, else the first that has no polarity and no
/// loss under bias; nullptr where none is made at the value.
const Family* unpolarised_at(const Catalogue& catalogue, const Family& family, double value) {
  if (!family.polarised) return nullptr;
  const Family* named = catalogue.find_family(family.unpolarised);
  if (named != nullptr && holds(named->made, value)) return named;
  for (const Family& f : catalogue.families) {
    if (f.kind == family.kind && !f.polarised && f.bias_loss == 0 && holds(f.made, value)) return &f;
  }
  return nullptr;
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

/// Each value from every family that may serve it, as sold.
std::vector<OfferedValue> sold_values(const Catalogue& catalogue, const Spec& spec, Role role, const Choice& choice,
                                      const std::vector<double>& values, bool pinned) {
  std::vector<OfferedValue> list;
  for (const double value : values) {
    for (const OfferedFamily* from : choice.all_at(value)) {
      const bool made = pinned || in_family_series(*from->family, rules_for(spec, role), value);
      if (made && !is_too_loose(*from->family, spec, role)) list.push_back(offer(catalogue, spec, *from, value));
    }
  }
  return list;
}

/// True where the stock holds enough of a part that is at least as tight: nobody would buy it.
bool is_at_hand(const OfferedValue& sold, const std::vector<OfferedValue>& at_hand, int boards) {
  return std::any_of(at_hand.begin(), at_hand.end(), [&](const OfferedValue& own) {
    const bool enough = !own.stock->quantity || *own.stock->quantity >= static_cast<long>(kRoleCount) * boards;
    return enough && same_value(own.value, sold.value) && own.tolerance.below <= sold.tolerance.below &&
           own.tolerance.above <= sold.tolerance.above && std::isnan(own.stock->voltage_rating);
  });
}

}  // namespace

OfferedValue offer(const Catalogue& catalogue, const Spec& spec, const OfferedFamily& from, double value) {
  OfferedValue o;
  o.value = value;
  o.working_value = at_work(*from.family, value, spec.ambient.nominal);
  o.family = from.family;
  o.unpolarised = unpolarised_at(catalogue, *from.family, value);
  o.tolerance = from.tolerance;
  o.series = coarsest_series(value);
  o.unit_cost = from.family->unit_cost + from.family->unit_cost_per_value * value;
  o.invented_cost = from.family->invented_cost;
  return o;
}

bool is_too_loose(const Family& family, const Spec& spec, Role role) {
  if (family.bias_loss == 0) return false;
  const auto& cutoff = spec.requirement(role == Role::shunt ? Figure::upper_cutoff : Figure::lower_cutoff);
  // a limit on one side alone is met with capacitance to spare
  return cutoff && cutoff->upper / cutoff->lower < kLoosest * kLoosest;
}

std::vector<OfferedValue> offered_values(const Catalogue& catalogue, const Spec& spec, Role role) {
  const Choice choice(catalogue, rules_for(spec, role), info(role).kind);
  const auto& pinned = spec.parts.pinned[index(role)];
  const ValueRange range = pinned ? ValueRange{*pinned, *pinned} : allowed_range(spec, choice, role);
  std::vector<OfferedValue> offered = stock_values(catalogue, spec, role, range);
  if (!spec.parts.stock_only) {
    const std::vector<double> values = pinned ? std::vector{*pinned} : candidate_values(choice, range);
    std::vector<OfferedValue> sold = sold_values(catalogue, spec, role, choice, values, pinned.has_value());
    std::erase_if(sold, [&](const OfferedValue& o) { return is_at_hand(o, offered, spec.parts.boards); });
    offered.insert(offered.end(), sold.begin(), sold.end());
    if (pinned && offered.empty()) offered.push_back(resolve_value(catalogue, spec, role, {*pinned}));
  }
  // In deep cold the smallest electrolytic may work below the largest film capacitor.
  std::stable_sort(offered.begin(), offered.end(),
                   [](const OfferedValue& x, const OfferedValue& y) { return x.working_value < y.working_value; });
  return offered;
}

PartChoices choices_of(const PartValues& values) {
  PartChoices choices;
  for (std::size_t i = 0; i < kRoleCount; ++i) choices[i].value = values[i];
  return choices;
}

OfferedValue resolve_value(const Catalogue& catalogue, const Spec& spec, Role role, const PartChoice& wanted) {
  if (!(wanted.value > 0)) return {};  // the part is absent
  if (wanted.connection != Connection::single) return resolve_pair(catalogue, spec, role, wanted);
  const PartRules& rules = rules_for(spec, role);
  const PartKind kind = info(role).kind;
  if (const StockPart* own = wanted.from_stock ? find_stock(catalogue, kind, wanted) : nullptr)
    return stock_offer(catalogue, spec, *own);
  const Choice choice(catalogue, rules, kind);
  for (const OfferedFamily& from : choice.families()) {
    const bool named = from.family->name == wanted.family || from.family->key == wanted.family;
    if (named) return offer(catalogue, spec, from, wanted.value);
  }
  // a bipolar part stands in a polarised one's place, though no rule names it
  for (const Family& f : catalogue.families) {
    const bool named = f.kind == kind && (f.name == wanted.family || f.key == wanted.family);
    if (const auto tolerance = named ? bought_tolerance(f, rules.tolerance) : std::nullopt)
      return offer(catalogue, spec, {&f, *tolerance}, wanted.value);
  }
  if (const OfferedFamily* from = choice.nearest(wanted.value)) return offer(catalogue, spec, *from, wanted.value);
  // No family is as tight as asked for: the part is what it is, at its tightest.
  const Choice loose = Choice::tightest(catalogue, rules, kind);
  if (const OfferedFamily* from = loose.nearest(wanted.value)) return offer(catalogue, spec, *from, wanted.value);
  OfferedValue unknown;
  unknown.value = unknown.working_value = wanted.value;
  unknown.series = coarsest_series(wanted.value);
  return unknown;
}

}  // namespace bandwright
