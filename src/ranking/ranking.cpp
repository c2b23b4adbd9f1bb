#include <algorithm>
#include <bandwright/ranking.hpp>
#include <cmath>
#include <limits>
#include <tuple>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr double kErrorStep = 0.05;
constexpr double kSensitivityStep = 1.05;
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

int distinct_values(const PartValues& values) {
  int count = 0;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const auto kind = values.begin() + (i < kResistorRoles ? 0 : kResistorRoles);
    count += values[i] > 0 && std::find(kind, values.begin() + i, values[i]) == values.begin() + i;
  }
  return count;
}

bool comes_before(const RankKey& a, const RankKey& b, RankBy by) {
  const auto order = [by](const RankKey& k) {
    return std::tuple(leading_class(k.error, by), sensitivity_class(k.tolerance_sensitivity), error_class(k.error),
                      k.distinct_values, k.series_sum);
  };
  const auto ka = order(a), kb = order(b);
  if (ka != kb) return ka < kb;
  return a.values < b.values;
}

bool comes_before(const Standing& a, const Standing& b, RankBy by) {
  if (comes_before(a.key, b.key, by)) return true;
  if (comes_before(b.key, a.key, by)) return false;
  return std::tie(a.device, a.variant) < std::tie(b.device, b.variant);
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
    double (*measure)(const Standing&);  // smaller is better
  };
  static constexpr Title kTitles[] = {
      {"most exact", [](const Standing& s) { return s.key.error; }},
      {"least sensitive", [](const Standing& s) { return s.key.tolerance_sensitivity; }},
      {"lowest current", [](const Standing& s) { return s.collector_current; }},
      {"highest input resistance", [](const Standing& s) { return -s.input_resistance; }},
      {"fewest distinct values", [](const Standing& s) { return double(s.key.distinct_values); }},
      {"smallest capacitors", [](const Standing& s) { return s.total_capacitance; }},
  };
  std::vector<std::vector<std::string>> titles(list.size());
  if (list.size() < 2) return titles;  // nothing to be best among
  for (const Title& t : kTitles) {
    const auto best = std::min_element(
        list.begin(), list.end(), [&](const Standing& a, const Standing& b) { return t.measure(a) < t.measure(b); });
    if (best != list.end()) titles[best - list.begin()].push_back(t.name);
  }
  return titles;
}

}  // namespace bandwright
