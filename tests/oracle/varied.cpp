#include "varied.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>

namespace oracle {

using bandwright::BipolarParameters;
using bandwright::Cause;
using bandwright::index;
using bandwright::kRoleCount;
using bandwright::Surroundings;

namespace {

constexpr double kThermalVoltage = 1.380649e-23 * 298.15 / 1.602176634e-19;  // at 25 °C, the constants exact by the SI

/// 1/(2 pi fT) = tauF + (VT/IC)(Cje + Cmu) at the published point of fT.
void set_transit_time(BipolarParameters& q) {
  q.transit_time = std::max(0.0, q.transit_delay - q.emitter_charging - q.feedback_charging);
}

struct DeviceRow {
  Cause cause;
  void (*apply)(BipolarParameters& q, double factor);
};
const DeviceRow kDevice[] = {
    {Cause::current_gain,
     [](BipolarParameters& q, double f) {
       for (double& log_gain : q.gain.log_gain) log_gain += std::log(f);
     }},
    {Cause::early_voltage, [](BipolarParameters& q, double f) { q.inverse_early_voltage /= f; }},
    {Cause::feedback_capacitance,
     [](BipolarParameters& q, double f) {
       q.feedback_capacitance *= f;
       q.feedback_charging *= f;
       set_transit_time(q);
     }},
    {Cause::emitter_capacitance,
     [](BipolarParameters& q, double f) {
       q.emitter_capacitance *= f;
       q.emitter_charging *= f;
       set_transit_time(q);
     }},
    {Cause::transition_frequency,
     [](BipolarParameters& q, double f) {
       q.transit_delay /= f;
       set_transit_time(q);
     }},
    {Cause::base_resistance, [](BipolarParameters& q, double f) { q.base_resistance *= f; }},
    {Cause::cutoff_current, [](BipolarParameters& q, double f) { q.cutoff_current *= f; }},
    {Cause::base_emitter_voltage,
     [](BipolarParameters& q, double f) {
       q.log_saturation_current -= q.base_emitter_voltage * (f - 1) / kThermalVoltage;
     }},
};

struct SurroundingsRow {
  Cause cause;
  void (*apply)(Surroundings& s, double factor);
};
const SurroundingsRow kSurroundings[] = {
    {Cause::source_resistance, [](Surroundings& s, double f) { s.source_resistance *= f; }},
    {Cause::source_capacitance, [](Surroundings& s, double f) { s.source_capacitance *= f; }},
    {Cause::load_resistance, [](Surroundings& s, double f) { s.load_conductance /= f; }},
    {Cause::load_capacitance, [](Surroundings& s, double f) { s.load_capacitance *= f; }},
    {Cause::stray_input, [](Surroundings& s, double f) { s.stray.input *= f; }},
    {Cause::stray_output, [](Surroundings& s, double f) { s.stray.output *= f; }},
    {Cause::stray_feedback, [](Surroundings& s, double f) { s.stray.feedback *= f; }},
};

static_assert(kRoleCount + std::size(kDevice) + std::size(kSurroundings) == bandwright::kCauseCount);

template <class Rows, class Target>
void apply(const Rows& rows, Cause cause, Target& target, double factor) {
  for (const auto& row : rows)
    if (row.cause == cause) row.apply(target, factor);
}

}  // namespace

bool is_there(const RandomCircuit& c, Cause cause) {
  return index(cause) >= kRoleCount || c.stage.parts[index(cause)] > 0;
}

RandomCircuit varied(const RandomCircuit& c, Cause cause, double factor) {
  RandomCircuit v = c;
  const auto device = std::make_shared<BipolarParameters>(*c.device);
  if (index(cause) < kRoleCount) v.stage.parts[index(cause)] *= factor;
  apply(kDevice, cause, *device, factor);
  apply(kSurroundings, cause, v.stage.around, factor);
  v.device = device;
  v.stage.device = device.get();
  return v;
}

RandomCircuit held_at(const RandomCircuit& c, double junction) {
  RandomCircuit held = c;
  const auto device = std::make_shared<BipolarParameters>(*c.device);
  device->thermal_resistance = 0;
  held.device = device;
  held.stage.device = device.get();
  held.stage.around.ambient = junction;
  return held;
}

}  // namespace oracle
