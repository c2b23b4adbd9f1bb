#include "catalogue/choice.hpp"

#include <algorithm>
#include <cmath>

namespace bandwright {

namespace {

bool fits(const Tolerance& offered, const Tolerance& wanted) {
  return at_most(offered.below, wanted.below) && at_most(offered.above, wanted.above);
}

double width(const Tolerance& t) { return t.below + t.above; }

std::vector<const Family*> allowed(const Catalogue& catalogue, const PartRules& rules, PartKind kind) {
  std::vector<const Family*> list;
  const auto usable = [&](const Family& f) { return f.kind == kind && !f.tolerances.empty(); };
  for (const std::string& key : rules.families) {
    const Family* family = catalogue.find_family(key);
    if (family != nullptr && usable(*family)) list.push_back(family);
  }
  if (!rules.families.empty()) return list;
  for (const Family& family : catalogue.families) {
    if (usable(family) && family.first_choice.max > 0) list.push_back(&family);
  }
  std::stable_sort(list.begin(), list.end(),
                   [](const Family* a, const Family* b) { return a->first_choice.min < b->first_choice.min; });
  return list;
}

// How far a value lies outside a range, as a ratio in ln; 0 inside.
double distance(const ValueRange& range, double value) {
  return std::max({0.0, std::log(range.min / value), std::log(value / range.max)});
}

}  // namespace

std::optional<Tolerance> bought_tolerance(const Family& family, const std::optional<Tolerance>& wanted) {
  std::optional<Tolerance> widest;
  for (const Tolerance& t : family.tolerances) {
    if (wanted && !fits(t, *wanted)) continue;
    if (&t == &family.tolerances.front()) return t;
    if (!widest || width(t) > width(*widest)) widest = t;
  }
  return widest;
}

Choice::Choice(const Catalogue& catalogue, const PartRules& rules, PartKind kind) : named_(!rules.families.empty()) {
  for (const Family* family : allowed(catalogue, rules, kind)) {
    if (const auto tolerance = bought_tolerance(*family, rules.tolerance)) families_.push_back({family, *tolerance});
  }
}

Choice Choice::tightest(const Catalogue& catalogue, const PartRules& rules, PartKind kind) {
  Choice choice;
  choice.named_ = !rules.families.empty();
  for (const Family* family : allowed(catalogue, rules, kind)) {
    const auto tolerance = std::min_element(family->tolerances.begin(), family->tolerances.end(),
                                            [](const Tolerance& a, const Tolerance& b) { return width(a) < width(b); });
    choice.families_.push_back({family, *tolerance});
  }
  return choice;
}

const OfferedFamily* Choice::at(double value) const {
  for (const OfferedFamily& f : families_) {
    if (holds(own_range(f), value)) return &f;
  }
  if (families_.empty() || named_) return nullptr;
  const ValueRange usual = usual_range();
  const OfferedFamily* lowest = &families_.front();
  const OfferedFamily* highest = &*std::max_element(
      families_.begin(), families_.end(),
      [](const auto& a, const auto& b) { return a.family->first_choice.max < b.family->first_choice.max; });
  if (value < usual.min && holds(lowest->family->made, value)) return lowest;
  if (value > usual.max && holds(highest->family->made, value)) return highest;
  return nullptr;
}

std::vector<const OfferedFamily*> Choice::all_at(double value) const {
  std::vector<const OfferedFamily*> list;
  for (const OfferedFamily& f : families_) {
    if (named_ && holds(own_range(f), value)) list.push_back(&f);
  }
  if (const OfferedFamily* one = at(value); one != nullptr && !named_) list.push_back(one);
  return list;
}

const OfferedFamily* Choice::nearest(double value) const {
  if (const OfferedFamily* serving = at(value)) return serving;
  const auto nearer = [&](const OfferedFamily& a, const OfferedFamily& b) {
    return distance(own_range(a), value) < distance(own_range(b), value);
  };
  const auto best = std::min_element(families_.begin(), families_.end(), nearer);
  return best == families_.end() ? nullptr : &*best;
}

ValueRange Choice::usual_range() const {
  ValueRange usual;
  for (const OfferedFamily& f : families_) {
    const ValueRange& own = own_range(f);
    usual.min = usual.max == 0 ? own.min : std::min(usual.min, own.min);
    usual.max = std::max(usual.max, own.max);
  }
  return usual;
}

}  // namespace bandwright
