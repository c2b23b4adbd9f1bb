#include "random_populations.hpp"

#include <algorithm>
#include <bandwright/assessment.hpp>
#include <bandwright/catalogue.hpp>
#include <cmath>

namespace oracle {

using bandwright::BipolarParameters;
using bandwright::Cause;
using bandwright::CauseKind;
using bandwright::DeviceLimits;
using bandwright::index;
using bandwright::OfferedParts;
using bandwright::OfferedValue;
using bandwright::Population;
using bandwright::Spec;
using bandwright::Tolerance;

namespace {

constexpr double kRoom = 298.15;  // K

/// A value of a vector, each as likely.
template <class T>
const T& one_of(Dice& dice, const std::vector<T>& list) {
  return list[static_cast<std::size_t>(dice.below(static_cast<int>(list.size())))];
}

const char* family_of(bandwright::PartKind kind, double value) {
  if (kind == bandwright::PartKind::resistor) return "metal-film";
  return value >= 1e-6 ? "electrolytic" : value >= 10e-9 ? "film" : "c0g";
}

/// A part as an engineer might buy it: resistors of 1 to 5 %, capacitors of 5 to 20 %, electrolytics of -20/+50 % too.
OfferedValue offered(Dice& dice, const bandwright::RoleInfo& row, double value) {
  static const std::vector<Tolerance> kResistors = {{0.01, 0.01}, {0.02, 0.02}, {0.05, 0.05}};
  static const std::vector<Tolerance> kCapacitors = {{0.05, 0.05}, {0.1, 0.1}, {0.2, 0.2}};
  static const std::vector<Tolerance> kElectrolytics = {{0.2, 0.2}, {0.2, 0.5}};
  OfferedValue part;
  part.value = part.working_value = value;
  if (!(value > 0)) return part;
  part.family = bandwright::built_in_catalogue().find_family(family_of(row.kind, value));
  const bool resistor = row.kind == bandwright::PartKind::resistor;
  part.tolerance = one_of(dice, resistor ? kResistors : part.family->polarised ? kElectrolytics : kCapacitors);
  return part;
}

OfferedParts pick_offered(Dice& dice, const bandwright::PartValues& values) {
  OfferedParts parts;
  for (const bandwright::RoleInfo& row : bandwright::roles())
    parts[index(row.role)] = offered(dice, row, values[index(row.role)]);
  return parts;
}

void shift(bandwright::GainCurve& curve, double by) {
  for (double& log_gain : curve.log_gain) log_gain += by;
}

}  // namespace

/// Devices of the catalogue have their limits; a random one gets such as are usual.
BipolarParameters PopulationSource::pick_limits(const RandomCircuit& c) {
  BipolarParameters q = *c.device;
  if (q.type != "random") return q;
  shift(q.gain_min, -dice_.between(0.2, 0.7));
  shift(q.gain_max, dice_.between(0.2, 0.7));
  const auto set = [&](Cause cause, double below, double above) { q.limits[index(cause)] = {below, above, false}; };
  set(Cause::early_voltage, 0.4, 0.4);
  set(Cause::feedback_capacitance, 0.25, dice_.between(0.2, 0.5));
  set(Cause::emitter_capacitance, 0.25, dice_.between(0.2, 0.5));
  set(Cause::transition_frequency, dice_.between(0.2, 0.5), 0.25);
  set(Cause::base_resistance, 0.4, 0.4);
  set(Cause::cutoff_current, 2, 2);
  set(Cause::base_emitter_voltage, 0.04, dice_.between(0.03, 0.06));
  return q;
}

Spec PopulationSource::pick_spec(const RandomCircuit& c) {
  const bandwright::Surroundings& s = c.stage.around;
  Spec spec;
  const double sign = c.device->pnp ? -1 : 1, width = dice_.between(0.05, 0.10);
  const double low = sign * s.supply * (1 - width), high = sign * s.supply * (1 + width);
  spec.supply = {sign * s.supply, std::min(low, high), std::max(low, high)};
  static const std::vector<bandwright::Condition> kAmbients = {
      {kRoom, 273.15, 318.15}, {kRoom, 263.15, 333.15}, {kRoom, 288.15, 308.15}, {kRoom, kRoom, kRoom}};
  spec.ambient = one_of(dice_, kAmbients);
  spec.source = {s.source_resistance, s.source_capacitance, 0};
  spec.load = {s.load_conductance, s.load_capacitance, 0};
  spec.stray = s.stray;
  spec.gain_from_input = c.definition.from_input;
  if (c.definition.frequency > 0) spec.gain_at = c.definition.frequency;
  spec.assess.uniform = dice_.chance(0.5);
  for (const bandwright::CauseInfo& row : bandwright::causes()) {
    if (row.kind != CauseKind::surroundings || dice_.chance(0.5)) continue;
    const double t = dice_.between(0.02, 0.2);
    spec.assess.causes[index(row.cause)] = Tolerance{t, t};
  }
  return spec;
}

RandomDesign PopulationSource::next_design() {
  for (;;) {
    RandomCircuit c = circuits_.next();
    c.stage.around.ambient = kRoom;
    RandomDesign d{pick_spec(c), pick_limits(c), pick_offered(dice_, c.stage.parts), {}};
    const bandwright::Analysis nominal = analyse(c.stage, c.definition);
    if (nominal.point.state != bandwright::BiasState::active) continue;
    d.population = population_of(d.spec, d.device, d.parts, nominal);
    return d;
  }
}

RandomDesign PopulationSource::next_with_dc() {
  RandomDesign d = next_design();
  const bandwright::Analysis nominal =
      analyse(nominal_stage(d.population, d.population.conditions.front()), d.population.definition);
  const double sign = d.spec.pnp() ? -1 : 1;
  const auto near = [&](double node) {
    if (dice_.chance(0.4)) return 0.0;
    return dice_.chance(0.4) ? sign * node * dice_.between(0.9, 1.1) : d.spec.supply_magnitude() * dice_.between(-1, 1);
  };
  d.spec.source.dc = near(nominal.point.base_voltage);
  d.spec.load.dc = near(nominal.point.emitter_voltage + nominal.point.collector_emitter_voltage);
  for (bandwright::CauseSpread& spread : d.population.spread) {
    const double factor = dice_.chance(0.15) ? 0 : dice_.between(0.3, 1.3);
    spread.below *= factor;
    spread.above *= factor;
  }
  for (OfferedValue& part : d.parts) {
    if (part.family != nullptr && part.family->polarised)
      part.unpolarised = bandwright::built_in_catalogue().find_family(part.family->unpolarised);
  }
  return d;
}

}  // namespace oracle
