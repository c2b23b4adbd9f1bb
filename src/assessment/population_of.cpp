// What varies in a design, and under which conditions.
#include <algorithm>
#include <bandwright/assessment.hpp>
#include <cmath>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

/// What the limits of a device figure rest on.
const char* basis_of(const DeviceLimits& l) {
  if (l.below_published) return l.above_published ? "published" : "minimum published, maximum assumed";
  return l.above_published ? "maximum published, minimum assumed" : "assumed";
}

CauseSpread part_spread(const OfferedValue& part) {
  if (!(part.value > 0)) return {0, 0, 0, "absent"};
  const Tolerance t = tolerance_at_work(part);
  return {0, t.below, t.above, "tolerance of the part"};
}

/// hFE: the type's lowest and highest beta0 at the design's current are the ends, its nominal one need not be their
/// mean.
CauseSpread gain_spread(const BipolarParameters& device, const OperatingPoint& point) {
  const std::array<double, 2> limits = gain_limits(device, point.collector_current);
  const double low = ln(limits[0] / point.gain_at_zero_vce), high = ln(limits[1] / point.gain_at_zero_vce);
  return {(low + high) / 2, (high - low) / 2, (high - low) / 2, basis_of(device.limits[index(Cause::current_gain)])};
}

CauseSpread device_spread(const BipolarParameters& device, Cause cause) {
  const DeviceLimits& l = device.limits[index(cause)];
  return {0, l.below, l.above, basis_of(l)};
}

CauseSpread usual_spread(const CauseInfo& row, const BipolarParameters& device, const OfferedParts& parts,
                         const OperatingPoint& point) {
  if (row.kind == CauseKind::part) return part_spread(parts[index(row.cause)]);
  if (row.kind == CauseKind::surroundings) return {0, 0, 0, "taken as exact"};
  return row.cause == Cause::current_gain ? gain_spread(device, point) : device_spread(device, row.cause);
}

CauseSpread chosen_spread(const CauseInfo& row, const Tolerance& limits) {
  if (limits.below == 0 && limits.above == 0) return {0, 0, 0, "switched off"};
  if (row.scale != CauseScale::logarithm) return {0, limits.below, limits.above, "spec"};
  const double low = ln(1 - limits.below), high = ln(1 + limits.above);
  if (row.cause != Cause::current_gain) return {0, -low, high, "spec"};
  return {(low + high) / 2, (high - low) / 2, (high - low) / 2, "spec"};
}

/// Two parts of one role deviate each by itself.
PairSpread pair_spread(const OfferedValue& part) {
  if (part.connection == Connection::single) return {};
  const bool sum = part.value > part.pair[0].value;  // a sum lies above its terms, a reciprocal sum below
  const double first = part.pair[0].value;
  return {true, sum, sum ? first / part.value : part.value / first, {part.pair[0].tolerance, part.pair[1].tolerance}};
}

std::vector<OperatingCondition> conditions_of(const Spec& spec) {
  const auto magnitude = [](double v) { return std::fabs(v); };
  std::vector<OperatingCondition> list = {{magnitude(spec.supply.nominal), spec.ambient.nominal}};
  const auto [low, high] = std::minmax({magnitude(spec.supply.min), magnitude(spec.supply.max)});
  for (double ambient : {spec.ambient.min, spec.ambient.max}) {
    for (double supply : {low, high}) {
      const bool known = std::any_of(list.begin(), list.end(), [&](const OperatingCondition& c) {
        return c.supply == supply && c.ambient == ambient;
      });
      if (!known) list.push_back({supply, ambient});
    }
  }
  return list;
}

}  // namespace

Population population_of(const Spec& spec, const BipolarParameters& device, const OfferedParts& parts,
                         const Analysis& nominal) {
  Population p;
  p.device = device;
  p.around = surroundings(spec);
  p.uniform = spec.assess.uniform;
  p.junction_rise = nominal.point.junction_temperature - spec.ambient.nominal;
  p.definition = gain_definition(spec);
  p.conditions = conditions_of(spec);
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    p.printed[i] = parts[i].value;
    p.bias_factor[i] = parts[i].bias_factor;
    if (parts[i].family == nullptr) continue;
    p.cold_loss[i] = parts[i].family->cold_loss;
    p.temperature_coefficient[i] =
        spec.assess.temperature_coefficient.value_or(parts[i].family->temperature_coefficient);
  }
  for (const CauseInfo& row : causes()) {
    const auto& chosen = spec.assess.causes[index(row.cause)];
    CauseSpread& spread = p.spread[index(row.cause)];
    spread = usual_spread(row, device, parts, nominal.point);
    const bool is_there = row.kind != CauseKind::part || parts[index(row.cause)].value > 0;
    if (chosen && is_there) spread = chosen_spread(row, *chosen);
    if (row.kind == CauseKind::part && !chosen) p.pairs[index(row.cause)] = pair_spread(parts[index(row.cause)]);
  }
  return p;
}

std::string condition_text(const Population& p, const OperatingCondition& c) {
  return format_quantity(c.ambient, Dimension::temperature) + ", " +
         format_quantity(p.device.pnp ? -c.supply : c.supply, Dimension::voltage);
}

std::string condition_name(const Population& p, std::size_t condition) {
  if (condition == 0) return "nominal";
  const OperatingCondition& c = p.conditions[condition];
  return condition_text(p, c);
}

}  // namespace bandwright
