#include "search/found.hpp"

#include <algorithm>
#include <bandwright/margins.hpp>
#include <bandwright/stress.hpp>

namespace bandwright {

Found found_from(Evaluator& evaluator, const Ranked& r) {
  const DesignSpace& space = evaluator.space();
  const Analysis a = evaluator.analysis(r.point);
  Found f;
  f.device = space.device_index;
  f.variant = space.variant;
  f.parts = offered_parts(space, r.point);
  f.allowed = r.key.error <= kWorstError;
  f.standing.key = r.key;
  f.standing.device = space.device->parameters.type;
  f.standing.variant = space.variant->key;
  f.standing.collector_current = a.point.collector_current;
  f.standing.input_resistance = a.figures[index(Figure::input_resistance)];
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i) f.standing.total_capacitance += r.key.values[i];
  return f;
}

namespace {

/// The first part of the stock of which more are needed than it holds; empty: it has enough.
std::string shortage_of(const Found& f, const Spec& spec) {
  for (const OfferedValue& part : f.parts) {
    if (part.stock == nullptr || !part.stock->quantity) continue;
    const auto uses = std::count_if(f.parts.begin(), f.parts.end(),
                                    [&](const OfferedValue& other) { return other.stock == part.stock; });
    const long needed = uses * spec.parts.boards;
    const Dimension dimension = part.stock->kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
    if (needed > *part.stock->quantity)
      return "the stock holds " + std::to_string(*part.stock->quantity) + " of " +
             format_quantity(part.value, dimension) + ", " + std::to_string(needed) + " are needed";
  }
  return "";
}

/// The first load at its worst corner that no rating holds; empty: all hold.
std::string overload_of(const Found& f, const Spec& spec, const BipolarParameters& device, const Analysis& nominal) {
  const WorstStress w = worst_stress(spec, population_of(spec, device, f.parts, nominal));
  const Derating& d = spec.parts.derating;
  struct Row {
    const char* what;
    Dimension dimension;
    const StressRange& range;
    double allowed;
  };
  const Row rows[] = {
      {"VCE", Dimension::voltage, w.collector_emitter_voltage, d.transistor_voltage * device.breakdown_voltage},
      {"IC", Dimension::current, w.collector_current, d.transistor_current * device.current_limit},
      {"dissipation", Dimension::power, w.dissipation, d.transistor_power * device.power_limit},
      {"junction temperature", Dimension::temperature, w.junction_temperature,
       device.junction_limit - d.junction_margin}};
  for (const Row& r : rows) {
    if (r.allowed <= 0 || r.range.max <= r.allowed) continue;
    return std::string(r.what) + " comes to " + format_quantity(r.range.max, r.dimension, 3) + " at " + r.range.at_max +
           ", derated to " + format_quantity(r.allowed, r.dimension, 3);
  }
  for (const RoleInfo& r : roles()) {
    const std::size_t i = index(r.role);
    const double watts = i < kResistorRoles ? w.watts[i].max : 0;
    const bool holds =
        !(f.parts[i].value > 0) || rating_that_holds(f.parts[i], d, w.volts[i].largest(), watts).has_value();
    if (!holds)
      return std::string(r.designator) + " would stand " +
             format_quantity(w.volts[i].largest(), Dimension::voltage, 3) +
             (i < kResistorRoles ? " and " + format_quantity(watts, Dimension::power, 3) : "") +
             ", and no rating holds that after derating";
  }
  return "";
}

}  // namespace

std::string nearest_miss(const Found& f, const Spec& spec, const std::vector<DerivedDevice>& devices) {
  PartValues v{};
  for (std::size_t i = 0; i < kRoleCount; ++i) v[i] = f.parts[i].working_value;
  const BipolarParameters& device = devices[f.device].parameters;
  const Analysis a = analyse({v, &device, surroundings(spec)}, gain_definition(spec));
  const auto volts = [](double x) { return format_quantity(x, Dimension::voltage, 3); };
  const double drop = a.point.collector_current * v[index(Role::collector)];
  const bool active = a.point.state == BiasState::active;
  const bool has_room =
      active && a.point.collector_emitter_voltage >= kLeastCollectorEmitter && drop >= kLeastCollectorDrop;
  const std::string shortage = shortage_of(f, spec);
  const std::string overload = !shortage.empty() ? shortage : has_room ? overload_of(f, spec, device, a) : "";
  const std::string head = "no combination of the offered values is active with VCE of at least " +
                           volts(kLeastCollectorEmitter) + " and IC RC of at least " + volts(kLeastCollectorDrop) +
                           " within the transistor's limits, with a rating that holds at every corner and enough in "
                           "stock; the nearest (" +
                           f.standing.device + ") has VCE ";
  return head + volts(a.point.collector_emitter_voltage) + ", IC RC " + volts(drop) + ", IC " +
         format_quantity(a.point.collector_current, Dimension::current, 3) + (overload.empty() ? "" : "; " + overload);
}

}  // namespace bandwright
