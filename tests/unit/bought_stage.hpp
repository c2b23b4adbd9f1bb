// A stage that is bought: parts of the built-in families, an invented transistor, the stress of its worst corner.
#pragma once

#include <bandwright/assessment.hpp>
#include <bandwright/purchase.hpp>
#include <cmath>
#include <stdexcept>

namespace bandwright::test {

// Voltages and powers come from one solution that stops at 1e-12 of the Thevenin voltage.
inline constexpr double kSolved = 1e-9;

// An invented transistor of beta 200, VBE about 0.65 V at 1 mA.
inline BipolarParameters transistor(bool pnp) {
  BipolarParameters device;
  device.type = "invented";
  device.pnp = pnp;
  for (GainCurve* curve : {&device.gain, &device.gain_min, &device.gain_max}) {
    curve->points = 1;
    curve->log_current[0] = std::log(1e-3);
    curve->log_gain[0] = std::log(200.0);
  }
  device.log_saturation_current = std::log(1e-14);
  device.inverse_early_voltage = 1.0 / 80;
  device.transit_time = 5e-10;
  device.emitter_capacitance = 15e-12;
  device.feedback_capacitance = 5e-12;
  return device;
}

inline constexpr PartValues kSplit = {47e3, 10e3, 4700, 68, 1000, 10e-6, 10e-6, 100e-6, 0};
inline constexpr PartValues kBypassed = {47e3, 10e3, 4700, 0, 1000, 10e-6, 10e-6, 100e-6, 220e-12};
inline constexpr PartValues kUnbypassed = {47e3, 10e3, 4700, 1000, 0, 10e-6, 10e-6, 0, 0};

struct Bought {
  Analysis analysis;
  WorstStress stress;
  std::vector<Part> parts;
  std::string reason;

  const Part& operator[](Role role) const {
    for (const Part& part : parts)
      if (part.role == role) return part;
    throw std::logic_error("no such part");
  }
};

inline Spec supplied(double volts) {
  Spec spec;
  spec.supply = {volts, volts, volts};
  spec.ambient = {298.15, 298.15, 298.15};
  spec.load.conductance = 1e-4;
  return spec;
}

/// Every unit is the nominal one.
inline Spec exact(double volts) {
  Spec spec = supplied(volts);
  for (auto& cause : spec.assess.causes) cause = Tolerance{};
  spec.assess.temperature_coefficient = 0;
  return spec;
}

inline OfferedParts offered(const Spec& spec, const PartValues& values) {
  OfferedParts parts;
  for (const RoleInfo& role : roles())
    parts[index(role.role)] = resolve_value(built_in_catalogue(), spec, role.role, {values[index(role.role)]});
  return parts;
}

inline Bought buy(const Spec& spec, OfferedParts parts) {
  Bought bought;
  const BipolarParameters device = transistor(spec.pnp());
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = parts[i].value;
  bought.analysis = analyse({values, &device, surroundings(spec)}, {});
  const bool active = bought.analysis.point.state == BiasState::active;
  bought.stress =
      active ? worst_stress(spec, population_of(spec, device, parts, bought.analysis)) : rail_to_rail(spec, values);
  parts = with_settled_polarity(spec, parts, bought.stress);
  bought.parts = parts_list(spec, parts, bought.stress, &bought.reason);
  return bought;
}

inline Bought buy(const Spec& spec, const PartValues& values) { return buy(spec, offered(spec, values)); }

/// Two parts of one family as one value; both at the ends of 1 % and 10 %.
inline OfferedValue paired(OfferedValue part, double first, double second, Connection connection, double value) {
  part.connection = connection;
  part.value = part.working_value = value;
  part.pair[0] = {first, part.tolerance, nullptr, nullptr, 0.02};
  part.pair[1] = {second, part.tolerance, nullptr, nullptr, 0.03};
  return part;
}

}  // namespace bandwright::test
