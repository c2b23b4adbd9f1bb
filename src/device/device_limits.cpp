#include "device/device_limits.hpp"

#include <cmath>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

// Spreads where no limit is published, as factors about the nominal value: assumed, no source.
constexpr double kEarlyVoltage = 1.5;
constexpr double kCapacitance = 1.3;
constexpr double kTransition = 1.3;
constexpr double kBaseResistance = 1.5;
constexpr double kCutoffCurrent = 10;   // the nominal value is a tenth of a lone published max
constexpr double kBaseEmitter = 0.040;  // V

DeviceLimits about(double factor) { return {ln(factor), ln(factor), false, false}; }

// The usual factor, but the published limit on the side where there is one beyond the nominal value.
DeviceLimits by_ratio(double factor, double nominal, double min, double max) {
  DeviceLimits l = about(factor);
  if (min > 0 && min < nominal) l.below = ln(nominal / min), l.below_published = true;
  if (max > nominal) l.above = ln(max / nominal), l.above_published = true;
  return l;
}

DeviceLimits base_emitter(const ChosenPoint& point) {
  DeviceLimits l{kBaseEmitter, kBaseEmitter, false, false};
  const double nominal = point.nominal.value;
  if (point.min < nominal) l.below = nominal - point.min, l.below_published = true;
  if (point.max > nominal) l.above = point.max - nominal, l.above_published = true;
  return l;
}

DeviceLimits cutoff(const ChosenPoint& point) {
  if (!(point.nominal.value > 0)) return {};
  if (!(point.max > point.nominal.value)) return about(kCutoffCurrent);
  const double span = ln(point.max / point.nominal.value);
  return {span, span, false, true};
}

}  // namespace

std::array<DeviceLimits, kCauseCount> device_limits(const ChosenFigures& c) {
  std::array<DeviceLimits, kCauseCount> limits{};
  const auto of = [&limits](Cause cause) -> DeviceLimits& { return limits[index(cause)]; };
  if (std::isfinite(c.early_voltage.value)) of(Cause::early_voltage) = about(kEarlyVoltage);
  of(Cause::feedback_capacitance) =
      by_ratio(kCapacitance, c.output_capacitance.nominal.value, kNotComputed, c.output_capacitance.max);
  of(Cause::emitter_capacitance) =
      by_ratio(kCapacitance, c.input_capacitance.nominal.value, kNotComputed, c.input_capacitance.max);
  of(Cause::transition_frequency) = by_ratio(kTransition, c.transition.nominal.value, c.transition.min, kNotComputed);
  of(Cause::base_resistance) = about(kBaseResistance);
  of(Cause::cutoff_current) = cutoff(c.cutoff);
  of(Cause::base_emitter_voltage) = base_emitter(c.base_emitter);
  of(Cause::current_gain).below_published = true;
  of(Cause::current_gain).above_published = !c.gain.max.empty();
  return limits;
}

}  // namespace bandwright
