#include <algorithm>
#include <array>
#include <bandwright/ranking.hpp>
#include <cmath>
#include <functional>
#include <limits>
#include <tuple>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr double kErrorStep = 0.05;
constexpr double kSensitivityStep = 1.05;
constexpr double kCurrentStep = 1.02;  // supply currents closer than this are alike
constexpr double kCostStep = 1e-6;     // of a cost: closer ones differ by rounding
constexpr double kCurrentApart = 1.5;
constexpr double kPartApart = 1.2;
constexpr int kPartsApart = 3;

bool apart(double a, double b, double ratio) {
  if ((a > 0) != (b > 0)) return true;
  return a > 0 && (a > b * ratio || b > a * ratio);
}

}  // namespace

int error_class(double error) {
  const double c = std::floor(error / kErrorStep + 0.5);
  return c < 1e9 ? static_cast<int>(c) : 1000000000;
}

int sensitivity_class(double s) {
  if (!(s < 1e100)) return std::numeric_limits<int>::max();
  return static_cast<int>(std::lround(ln(std::max(s, 1e-100)) / ln(kSensitivityStep)));
}

int leading_class(double error, RankBy by) {
  if (by == RankBy::error) return error_class(error);
  return error <= 1 ? 0 : 1 + error_class(error);
}

const std::vector<RankOrder>& rank_orders() {
  static const std::vector<RankOrder> rows = {
      {RankBy::capability, "capability", "highest capability first, ties by error"},
      {RankBy::error, "error", "smallest error in steps of 0.05 first, then the smaller tolerance sensitivity"},
      {RankBy::sensitivity, "sensitivity", "smallest tolerance sensitivity first"},
      {RankBy::yield, "yield", "largest share of units that pass first, then the higher capability"},
      {RankBy::worst_case, "worst-case", "largest margin at the worst corner first"},
      {RankBy::current, "current", "smallest supply current first"},
      {RankBy::parts, "parts", "fewest parts first, then the fewest distinct values"},
      {RankBy::cost, "cost", "lowest cost of all parts first"},
  };
  return rows;
}

const RankOrder& info(RankBy by) { return rank_orders()[static_cast<std::size_t>(by)]; }

bool wants_capability(RankBy by) { return by == RankBy::capability || by == RankBy::yield || by == RankBy::worst_case; }

double measure(const RankKey& k, RankBy by) {
  switch (by) {
    case RankBy::error:
      return 0;
    case RankBy::sensitivity:
      return sensitivity_class(k.tolerance_sensitivity);
    case RankBy::current:
      return std::floor(ln(std::max(k.supply_current, 1e-12)) / ln(kCurrentStep) + 0.5);
    case RankBy::parts:
      return 100 * k.parts + k.distinct_values;
    case RankBy::cost:
      return std::isnan(k.cost) ? std::numeric_limits<double>::max() : std::floor(k.cost / kCostStep + 0.5);
    case RankBy::capability:
    case RankBy::yield:
    case RankBy::worst_case:
      break;
  }
  return -k.capability;
}

double measure(const Standing& s, RankBy by) {
  if (by == RankBy::yield) return -s.yield;
  return by == RankBy::worst_case ? -s.worst_case_margin : measure(s.key, by);
}

int distinct_values(const PartValues& values) {
  int count = 0;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const auto kind = values.begin() + (i < kResistorRoles ? 0 : kResistorRoles);
    count += values[i] > 0 && std::find(kind, values.begin() + i, values[i]) == values.begin() + i;
  }
  return count;
}

namespace {

/// -1: a first, 1: b first, 0: what follows the measure is equal too.
int compare_rest(const RankKey& a, const RankKey& b, RankBy by) {
  const auto order = [by](const RankKey& k) {
    const int sensitivity = sensitivity_class(k.tolerance_sensitivity);
    return std::tuple(by == RankBy::yield || by == RankBy::worst_case ? -k.capability : 0.0, error_class(k.error),
                      sensitivity, k.distinct_values, k.series_sum);
  };
  const auto ka = order(a), kb = order(b);
  if (ka != kb) return ka < kb ? -1 : 1;
  return a.values < b.values ? -1 : b.values < a.values ? 1 : 0;
}

/// Fewer parts to buy come first; where the capability leads, only among stages that are producible at all.
int buying_class(const RankKey& k, RankBy by) {
  if (k.to_buy < 0) return 0;
  const bool producible = !wants_capability(by) || k.capability >= kProducible;
  return producible ? k.to_buy : std::numeric_limits<int>::max();
}

template <class Item>
int compare(const Item& a, const Item& b, const RankKey& ka, const RankKey& kb, RankBy by) {
  const int la = leading_class(ka.error, by), lb = leading_class(kb.error, by);
  if (la != lb) return la < lb ? -1 : 1;
  const int ba = buying_class(ka, by), bb = buying_class(kb, by);
  if (ba != bb) return ba < bb ? -1 : 1;
  const double ma = measure(a, by), mb = measure(b, by);
  if (ma != mb) return ma < mb ? -1 : 1;
  return compare_rest(ka, kb, by);
}

}  // namespace

bool comes_before(const RankKey& a, const RankKey& b, RankBy by) { return compare(a, b, a, b, by) < 0; }

bool comes_before(const Standing& a, const Standing& b, RankBy by) {
  const int order = compare(a, b, a.key, b.key, by);
  return order != 0 ? order < 0 : std::tie(a.device, a.variant) < std::tie(b.device, b.variant);
}

std::vector<bool> non_dominated(const std::vector<Standing>& list) {
  const auto costs = [](const Standing& s) {
    return std::array<double, 4>{s.key.error, -s.key.capability, s.key.supply_current, double(s.key.parts)};
  };
  const auto dominates = [&](const Standing& a, const Standing& b) {
    const auto x = costs(a), y = costs(b);
    return x != y && std::equal(x.begin(), x.end(), y.begin(), std::less_equal<>());
  };
  std::vector<bool> marks;
  for (const Standing& s : list) {
    marks.push_back(std::none_of(list.begin(), list.end(), [&](const Standing& other) { return dominates(other, s); }));
  }
  return marks;
}

bool differ(const Standing& a, const Standing& b) {
  if (a.device != b.device || a.variant != b.variant) return true;
  if (apart(a.collector_current, b.collector_current, kCurrentApart)) return true;
  int parts = 0;
  for (std::size_t i = 0; i < kRoleCount; ++i) parts += apart(a.key.values[i], b.key.values[i], kPartApart);
  return parts >= kPartsApart;
}

std::vector<std::size_t> alternatives(const std::vector<Standing>& all, RankBy by, std::size_t count) {
  std::vector<std::size_t> order(all.size());
  for (std::size_t i = 0; i < order.size(); ++i) order[i] = i;
  std::stable_sort(order.begin(), order.end(),
                   [&](std::size_t a, std::size_t b) { return comes_before(all[a], all[b], by); });
  std::vector<std::size_t> kept;
  for (std::size_t i : order) {
    if (kept.size() == count) break;
    const bool is_new = std::all_of(kept.begin(), kept.end(), [&](std::size_t k) { return differ(all[i], all[k]); });
    if (is_new) kept.push_back(i);
  }
  return kept;
}

std::vector<std::vector<std::string>> best_at(const std::vector<Standing>& list) {
  struct Title {
    const char* name;
    double (*measure)(const Standing&);                      // smaller is better
    double least = std::numeric_limits<double>::infinity();  // must be under this
  };
  static constexpr Title kTitles[] = {
      {"most exact", [](const Standing& s) { return s.key.error; }},
      {"most producible", [](const Standing& s) { return -s.key.capability; }, 0},
      {"highest yield", [](const Standing& s) { return -s.yield; }, 0},
      {"best worst case", [](const Standing& s) { return -s.worst_case_margin; }, 1e299},
      {"least sensitive", [](const Standing& s) { return s.key.tolerance_sensitivity; }},
      {"lowest current", [](const Standing& s) { return s.key.supply_current; }},
      {"fewest parts", [](const Standing& s) { return double(s.key.parts); }},
      {"highest input resistance", [](const Standing& s) { return -s.input_resistance; }},
      {"fewest distinct values", [](const Standing& s) { return double(s.key.distinct_values); }},
      {"smallest capacitors", [](const Standing& s) { return s.total_capacitance; }},
  };
  std::vector<std::vector<std::string>> titles(list.size());
  if (list.size() < 2) return titles;  // nothing to be best among
  for (const Title& t : kTitles) {
    const auto [best, worst] = std::minmax_element(
        list.begin(), list.end(), [&](const Standing& a, const Standing& b) { return t.measure(a) < t.measure(b); });
    // where all are alike, or the best has none, there is nothing to be named for
    const bool earned = t.measure(*best) < t.measure(*worst) && t.measure(*best) < t.least;
    if (earned) titles[static_cast<std::size_t>(best - list.begin())].push_back(t.name);
  }
  return titles;
}

}  // namespace bandwright
