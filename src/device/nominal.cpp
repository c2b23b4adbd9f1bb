#include "device/nominal.hpp"

#include <algorithm>
#include <cmath>

#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kSameCondition = 1e-9;  // relative: floating noise of a decimal fraction

bool same(double a, double b) {
  if (std::isnan(a) || std::isnan(b)) return std::isnan(a) && std::isnan(b);
  return std::fabs(a - b) <= kSameCondition * std::max(std::fabs(a), std::fabs(b));
}

bool same_conditions(const FigurePoint& a, const FigurePoint& b) {
  return same(a.collector_current, b.collector_current) &&
         same(a.collector_emitter_voltage, b.collector_emitter_voltage) && same(a.reverse_voltage, b.reverse_voltage);
}

void take_better(MarkedValue& kept, const MarkedValue& other) {
  if (other.stated() && (!kept.stated() || other.provenance < kept.provenance)) kept = other;
}

bool at_reference(const SheetFigure& entry) {
  constexpr double kNear = 0.5;  // K
  return std::isnan(entry.temperature) || std::fabs(entry.temperature - kReferenceTemperature) <= kNear;
}

std::string factor_rule(double factor, const char* limit, double value, Dimension dimension) {
  return format_quantity(factor, Dimension::gain) + " times the published " + limit + " of " +
         format_quantity(value, dimension);
}

}  // namespace

FigurePoint point_of(const SheetFigure& entry) {
  FigurePoint point;
  point.min = {entry.min, entry.provenance};
  point.typ = {entry.typ, entry.provenance};
  point.max = {entry.max, entry.provenance};
  point.collector_current = entry.collector_current;
  point.collector_emitter_voltage = entry.collector_emitter_voltage;
  if (std::isnan(point.collector_emitter_voltage)) point.collector_emitter_voltage = kUnstatedVoltage;
  point.reverse_voltage = entry.reverse_voltage;
  return point;
}

std::vector<FigurePoint> points_of(const std::vector<SheetFigure>& entries) {
  std::vector<FigurePoint> points;
  for (const SheetFigure& entry : entries) {
    if (!at_reference(entry)) continue;
    const FigurePoint next = point_of(entry);
    const auto old =
        std::find_if(points.begin(), points.end(), [&](const FigurePoint& p) { return same_conditions(p, next); });
    if (old == points.end()) {
      points.push_back(next);
      continue;
    }
    take_better(old->min, next.min);
    take_better(old->typ, next.typ);
    take_better(old->max, next.max);
  }
  return points;
}

Nominal nominal(const FigurePoint& point, const LoneLimit& lone, Dimension dimension) {
  if (point.typ.stated()) return {point.typ.value, point.typ.provenance, false, ""};
  if (point.min.stated() && point.max.stated()) {
    return {std::sqrt(point.min.value * point.max.value), std::max(point.min.provenance, point.max.provenance), false,
            "the geometric mean of " + format_quantity(point.min.value, dimension) + " and " +
                format_quantity(point.max.value, dimension)};
  }
  if (point.min.stated() && !std::isnan(lone.on_min)) {
    return {lone.on_min * point.min.value, point.min.provenance, true,
            factor_rule(lone.on_min, "minimum", point.min.value, dimension)};
  }
  if (point.max.stated() && !std::isnan(lone.on_max)) {
    return {lone.on_max * point.max.value, point.max.provenance, true,
            factor_rule(lone.on_max, "maximum", point.max.value, dimension)};
  }
  return {};
}

}  // namespace bandwright
