#include "device/gain_lists.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>

#include "device/gain_curve.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr double kMiddleCurrent = 1e-3;  // A: where a stage of this kind usually works
constexpr double kMaxOverMin = 3.0;      // of hFE where no max is published: assumed
constexpr double kSameCurrent = 1e-9;    // relative

double distance_in_ln(double a, double b) { return std::fabs(ln(a / b)); }

void add(std::vector<GainEntry>& list, const FigurePoint& point, const MarkedValue& value) {
  if (!value.stated()) return;
  const GainEntry entry{point.collector_current, point.collector_emitter_voltage, value};
  const auto same = std::find_if(list.begin(), list.end(), [&](const GainEntry& e) {
    return distance_in_ln(e.collector_current, entry.collector_current) < kSameCurrent;
  });
  const auto off = [](const GainEntry& e) { return std::fabs(e.collector_emitter_voltage - kUnstatedVoltage); };
  if (same == list.end()) {
    list.push_back(entry);
  } else if (off(entry) < off(*same)) {
    *same = entry;
  }
}

void sort_by_current(std::vector<GainEntry>& list) {
  std::sort(list.begin(), list.end(),
            [](const GainEntry& a, const GainEntry& b) { return a.collector_current < b.collector_current; });
}

// The first of the nearest: the list rises, so the lower current of two equally near.
const GainEntry& nearest(const std::vector<GainEntry>& list, double current) {
  return *std::min_element(list.begin(), list.end(), [&](const GainEntry& a, const GainEntry& b) {
    return distance_in_ln(a.collector_current, current) < distance_in_ln(b.collector_current, current);
  });
}

const std::vector<GainEntry>& shape_list(const GainLists& lists) {
  return lists.typ.size() >= 2 ? lists.typ : lists.min;
}

// ln beta0 of a point.
double log_gain(const GainEntry& e, double inverse_early_voltage) {
  return ln(e.value.value / (1 + e.collector_emitter_voltage * inverse_early_voltage));
}

GainCurve constant(double log_gain) {
  GainCurve curve;
  curve.log_gain[0] = log_gain;
  return curve;
}

GainCurve moved(GainCurve curve, double rise) {
  for (int i = 0; i < curve.points; ++i) curve.log_gain[static_cast<std::size_t>(i)] += rise;
  return curve;
}

GainCurve through(const GainCurve& shape, const GainEntry& anchor, double inverse_early_voltage) {
  const double there = gain_point<double>(shape, ln(anchor.collector_current)).log_gain;
  return moved(shape, log_gain(anchor, inverse_early_voltage) - there);
}

// The geometric mean of two curves over the same points, or of a curve and a constant.
GainCurve mean(GainCurve a, const GainCurve& b) {
  for (int i = 0; i < a.points; ++i) {
    const auto at = static_cast<std::size_t>(i);
    const auto other = b.points == 1 ? 0 : at;
    a.log_gain[at] = (a.log_gain[at] + b.log_gain[other]) / 2;
    a.slope[at] = (a.slope[at] + (b.points == 1 ? 0.0 : b.slope[other])) / 2;
  }
  return a;
}

// With several published maxima: the one at a current where a min is published too, and of those nearest 1 mA.
const GainEntry& main_max(const GainLists& lists) {
  std::vector<GainEntry> paired;
  for (const GainEntry& e : lists.max) {
    if (distance_in_ln(nearest(lists.min, e.collector_current).collector_current, e.collector_current) < kSameCurrent) {
      paired.push_back(e);
    }
  }
  const GainEntry& chosen = nearest(paired.empty() ? lists.max : paired, kMiddleCurrent);
  return nearest(lists.max, chosen.collector_current);
}

double slope_between(double h0, double rise0, double h1, double rise1) {
  if (rise0 * rise1 <= 0) return 0;
  const double w0 = 2 * h1 + h0;
  const double w1 = h1 + 2 * h0;
  return (w0 + w1) / (w0 / rise0 + w1 / rise1);
}

}  // namespace

GainLists gain_lists(const std::vector<SheetFigure>& entries) {
  GainLists lists;
  for (const FigurePoint& point : points_of(entries)) {
    add(lists.min, point, point.min);
    add(lists.typ, point, point.typ);
    add(lists.max, point, point.max);
  }
  for (auto* list : {&lists.min, &lists.typ, &lists.max}) sort_by_current(*list);
  return lists;
}

GainCurve monotone_cubic(const std::vector<std::pair<double, double>>& points) {
  assert(!points.empty() && points.size() <= std::size_t{GainCurve::kMaxPoints});
  GainCurve curve;
  curve.points = static_cast<int>(points.size());
  for (std::size_t i = 0; i < points.size(); ++i) {
    curve.log_current[i] = points[i].first;
    curve.log_gain[i] = points[i].second;
  }
  for (std::size_t i = 1; i + 1 < points.size(); ++i) {
    const double h0 = points[i].first - points[i - 1].first;
    const double h1 = points[i + 1].first - points[i].first;
    curve.slope[i] = slope_between(h0, (points[i].second - points[i - 1].second) / h0, h1,
                                   (points[i + 1].second - points[i].second) / h1);
  }
  return curve;
}

std::size_t shape_points(const GainLists& lists) { return shape_list(lists).size(); }

GainCurves gain_curves(const GainLists& lists, double inverse_early_voltage) {
  std::vector<std::pair<double, double>> points;
  for (const GainEntry& e : shape_list(lists)) {
    points.emplace_back(ln(e.collector_current), log_gain(e, inverse_early_voltage));
  }
  const GainCurve shape = monotone_cubic(points);
  const bool shape_is_typ = lists.typ.size() >= 2;
  GainCurves curves;
  if (lists.max.empty()) {
    curves.min = through(shape, nearest(lists.min, kMiddleCurrent), inverse_early_voltage);
    curves.max = moved(curves.min, ln(kMaxOverMin));
  } else {
    const GainEntry& max = main_max(lists);
    curves.min = through(shape, nearest(lists.min, max.collector_current), inverse_early_voltage);
    curves.max =
        shape_is_typ ? through(shape, max, inverse_early_voltage) : constant(log_gain(max, inverse_early_voltage));
  }
  curves.nominal =
      lists.typ.empty() ? mean(curves.min, curves.max) : through(shape, lists.typ.front(), inverse_early_voltage);
  return curves;
}

}  // namespace bandwright
