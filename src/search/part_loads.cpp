#include "search/part_loads.hpp"

#include <algorithm>
#include <cmath>

#include "analysis/operating_point.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

double beyond(double value, double allowed) { return allowed > 0 && value > allowed ? value / allowed - 1 : 0; }

void add_stock_parts(const OfferedValue& part, std::vector<const StockPart*>& used) {
  if (part.stock != nullptr) used.push_back(part.stock);
  for (const PairedPart& half : part.pair)
    if (half.stock != nullptr) used.push_back(half.stock);
}

/// The ends of a resistor at any ambient of a spec.
void add_ends(const Spec& spec, const OfferedValue& part, std::size_t role, ResistorEnds& ends) {
  const double c = spec.assess.temperature_coefficient.value_or(part.family->temperature_coefficient);
  const double warmth = std::max(std::fabs(spec.ambient.min - kReferenceTemperature),
                                 std::fabs(spec.ambient.max - kReferenceTemperature));
  const Tolerance t = spec.assess.causes[role].value_or(part.tolerance);
  ends.low[role] = part.value * (1 - t.below) * (1 - c * warmth);
  ends.high[role] = part.value * (1 + t.above) * (1 + c * warmth);
}

}  // namespace

PartLoads::PartLoads(const Spec& spec, const DesignSpace& space, Population units)
    : spec_(spec), space_(space), units_(std::move(units)) {
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space.has(i)) continue;
    for (const OfferedValue& part : *space.offered[i]) {
      ResistorEnds ends;
      if (i < kResistorRoles) add_ends(spec, part, i, ends);
      always_holds_[i].push_back(part_excess(part, i, rail_bounds(spec, ends, 0)) == 0);
      has_bias_loss_ = has_bias_loss_ || part.family->bias_loss > 0;
      std::vector<const StockPart*> used;
      add_stock_parts(part, used);
      has_limited_stock_ = has_limited_stock_ || std::any_of(used.begin(), used.end(), [](const StockPart* s) {
                             return s->quantity.has_value();
                           });
    }
  }
}

ResistorEnds PartLoads::resistor_ends(const GridPoint& point) const {
  ResistorEnds ends;
  for (std::size_t i = 0; i < kResistorRoles; ++i)
    if (space_.has(i)) add_ends(spec_, space_.at(i, point), i, ends);
  return ends;
}

bool PartLoads::resistors_are_clear(const GridPoint& point) const {
  const LoadBounds rail = rail_bounds(spec_, resistor_ends(point), units_.device.thermal_resistance);
  for (std::size_t i = 0; i < kResistorRoles; ++i) {
    if (!space_.has(i) || always_holds_[i][static_cast<std::size_t>(point[i])]) continue;
    if (part_excess(space_.at(i, point), i, rail) > 0) return false;
  }
  return transistor_excess(rail) == 0;
}

bool PartLoads::capacitors_are_clear(const GridPoint& point) const {
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i)
    if (space_.has(i) && !always_holds_[i][static_cast<std::size_t>(point[i])]) return false;
  return true;
}

double PartLoads::transistor_excess(const LoadBounds& b) const {
  const BipolarParameters& device = units_.device;
  const Derating& d = spec_.parts.derating;
  return std::max({beyond(b.collector_emitter_voltage, d.transistor_voltage * device.breakdown_voltage),
                   beyond(b.collector_current, d.transistor_current * device.current_limit),
                   beyond(b.dissipation, d.transistor_power * device.power_limit),
                   beyond(b.junction_temperature, device.junction_limit - d.junction_margin)});
}

/// Of a pair each part, as if all of the load stood across it.
bool PartLoads::holds_rating(const OfferedValue& part, double volts, double watts) const {
  if (part.connection == Connection::single)
    return rating_that_holds(part, spec_.parts.derating, volts, watts).has_value();
  return std::all_of(part.pair.begin(), part.pair.end(), [&](const PairedPart& half) {
    OfferedValue one = part;
    one.stock = half.stock;
    return rating_that_holds(one, spec_.parts.derating, volts, watts).has_value();
  });
}

double PartLoads::part_excess(const OfferedValue& part, std::size_t role, const LoadBounds& b) const {
  const double volts = b.largest(role), watts = b.watts_in(role);
  if (part.family->polarised && b.low[role] < 0 && b.high[role] > 0 &&
      (part.stock != nullptr || part.unpolarised == nullptr))
    return 1;
  if (holds_rating(part, volts, watts)) return 0;
  const auto largest = [](const std::vector<double>& list) { return list.empty() ? 0 : list.back(); };
  const double over_volts =
      beyond(volts, voltage_share(spec_.parts.derating, *part.family) * largest(part.family->voltage_ratings));
  const double over_watts = beyond(watts, spec_.parts.derating.resistor_power * largest(part.family->power_ratings));
  return std::max({over_volts, over_watts, 1e-3});
}

const LoadBounds& PartLoads::bounds(const GridPoint& point, const OperatingPoint& nominal) {
  if (is_known_ && std::equal(known_.begin(), known_.end(), point.begin())) return bounds_;
  std::copy_n(point.begin(), kResistorRoles, known_.begin());
  is_known_ = true;
  units_.junction_rise = nominal.junction_temperature - spec_.ambient.nominal;
  if (!spec_.assess.causes[index(Cause::current_gain)]) {
    const auto limits = gain_limits(units_.device, nominal.collector_current);
    const double low = ln(limits[0] / nominal.gain_at_zero_vce), high = ln(limits[1] / nominal.gain_at_zero_vce);
    CauseSpread& spread = units_.spread[index(Cause::current_gain)];
    spread.centre = (low + high) / 2;
    spread.below = spread.above = (high - low) / 2;
  }
  return bounds_ = load_bounds(spec_, units_, resistor_ends(point), nominal);
}

double PartLoads::shortage(const GridPoint& point) const {
  if (!has_limited_stock_) return 0;
  std::vector<const StockPart*> used;
  for (std::size_t i = 0; i < kRoleCount; ++i)
    if (space_.has(i)) add_stock_parts(space_.at(i, point), used);
  double missing = 0;
  for (const StockPart* own : used) {
    if (!own->quantity) continue;
    const auto uses = std::count(used.begin(), used.end(), own);
    const double lacking = static_cast<double>(uses * spec_.parts.boards - *own->quantity);
    missing = std::max(missing, lacking / spec_.parts.boards);
  }
  return missing;
}

double PartLoads::excess(const GridPoint& point, const OperatingPoint& nominal, bool resistors_clear) {
  if (resistors_clear && capacitors_are_clear(point)) return 0;
  const LoadBounds& b = bounds(point, nominal);
  double worst = transistor_excess(b);
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space_.has(i) || always_holds_[i][static_cast<std::size_t>(point[i])]) continue;
    worst = std::max(worst, part_excess(space_.at(i, point), i, b));
  }
  return worst;
}

PartValues PartLoads::bias_factors(const GridPoint& point, const OperatingPoint& nominal) {
  PartValues factors;
  factors.fill(1);
  const LoadBounds& b = bounds(point, nominal);
  const Stage stage{working_values(space_, point), &space_.device->parameters, surroundings(spec_)};
  const Stress s = stress(stage, nominal, spec_.supply_magnitude(), spec_.source.dc, spec_.load.dc);
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i) {
    if (space_.has(i)) factors[i] = bias_factor(space_.at(i, point), spec_.parts.derating, s.volts[i], b.largest(i));
  }
  return factors;
}

}  // namespace bandwright
