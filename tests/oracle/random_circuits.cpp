#include "random_circuits.hpp"

#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

#include "bias.hpp"

namespace oracle {

using bandwright::BipolarParameters;
using bandwright::index;
using bandwright::PartValues;
using bandwright::Role;
using bandwright::Surroundings;

namespace {

double clamp_ohm(double ohm) { return std::clamp(ohm, 1.0, 10e6); }

bandwright::GainCurve random_curve(Dice& dice) {
  bandwright::GainCurve curve;
  curve.points = 1 + dice.below(bandwright::GainCurve::kMaxPoints);
  double log_current = std::log(dice.log_between(1e-6, 1e-3));
  const double log_gain = std::log(dice.log_between(15, 1500));
  for (std::size_t i = 0; i < static_cast<std::size_t>(curve.points); ++i) {
    curve.log_current[i] = log_current;
    curve.log_gain[i] = log_gain + dice.between(-0.4, 0.4);
    log_current += dice.between(0.4, 3);
  }
  set_slopes(curve);
  return curve;
}

/// fT as if it were published at 10 mA with 5 V across the collector junction. Where tauF is 0, fT and the capacitances
/// give less than 0.
void publish_transition(BipolarParameters& q) {
  constexpr double kEmitterResistance = 2.5693;  // ohm: VT at 25 °C over 10 mA
  constexpr double kReverse = 5;                 // V
  q.emitter_charging = kEmitterResistance * q.emitter_capacitance;
  q.feedback_charging =
      kEmitterResistance * q.feedback_capacitance * std::pow(1 + kReverse / q.built_in_potential, -q.grading_exponent);
  const double charging = q.emitter_charging + q.feedback_charging;
  q.transit_deficit = q.transit_time > 0 ? 0 : charging / 2;
  q.transit_delay = q.transit_time + charging - q.transit_deficit;
}

/// A transistor that no maker sells: the ends of every parameter, and the zeros.
BipolarParameters random_device(Dice& dice) {
  BipolarParameters q;
  q.type = "random";
  q.pnp = dice.chance(0.3);
  q.gain = q.gain_min = q.gain_max = random_curve(dice);
  const double v_be = dice.between(0.5, 0.8);
  q.base_emitter_voltage = v_be;
  q.log_saturation_current = std::log(1e-3) - v_be / 0.025693;
  q.inverse_early_voltage = dice.chance(0.35) ? 0 : 1 / dice.log_between(15, 400);
  q.base_resistance = dice.chance(0.4) ? 0 : dice.log_between(1, 1000);
  q.transit_time = dice.chance(0.1) ? 0 : dice.log_between(5e-12, 5e-9);
  q.emitter_capacitance = dice.log_between(0.3e-12, 100e-12);
  q.feedback_capacitance = dice.log_between(0.1e-12, 30e-12);
  publish_transition(q);
  q.cutoff_current = dice.chance(0.3) ? 0 : dice.log_between(1e-12, 1e-6);
  q.thermal_resistance = dice.chance(0.2) ? 0 : dice.log_between(30, 600);
  return q;
}

}  // namespace

double Dice::log_between(double low, double high) { return std::exp(between(std::log(low), std::log(high))); }

CircuitSource::CircuitSource(std::uint64_t seed, Breadth breadth) : dice_(seed), breadth_(breadth) {
  for (const bandwright::Transistor& t : bandwright::built_in_catalogue().transistors)
    catalogue_.push_back(std::make_shared<BipolarParameters>(bandwright::derive_parameters(t).parameters));
}

std::shared_ptr<const BipolarParameters> CircuitSource::pick_device() {
  if (dice_.chance(0.4)) return std::make_shared<BipolarParameters>(random_device(dice_));
  const auto& listed = catalogue_[static_cast<std::size_t>(dice_.below(static_cast<int>(catalogue_.size())))];
  if (!dice_.chance(0.15)) return listed;
  auto changed = std::make_shared<BipolarParameters>(*listed);
  (dice_.chance(0.5) ? changed->base_resistance : changed->inverse_early_voltage) = 0;
  return changed;
}

void CircuitSource::pick_resistors(PartValues& p, double supply) {
  const bool ordinary = breadth_ == Breadth::ordinary;
  if (!ordinary && dice_.chance(0.2)) {
    for (std::size_t r = 0; r < bandwright::kResistorRoles; ++r) p[r] = dice_.log_between(1, 10e6);
    return;
  }
  const double i_c = ordinary ? dice_.log_between(50e-6, 20e-3) : dice_.log_between(0.1e-6, 0.2);
  const double v_e = supply * dice_.between(ordinary ? 0.08 : 0.01, 0.35);
  const double v_rc = (supply - v_e) * dice_.between(ordinary ? 0.3 : 0.05, ordinary ? 0.7 : 0.9);
  const double r_e = v_e / i_c;
  const double divider = i_c * dice_.log_between(ordinary ? 0.05 : 0.005, ordinary ? 0.5 : 2);
  const double v_b = std::min(v_e + dice_.between(0.55, 0.7), 0.9 * supply);
  const double share = dice_.log_between(ordinary ? 0.02 : 1e-4, 0.9);
  p[index(Role::collector)] = clamp_ohm(v_rc / i_c);
  p[index(Role::emitter)] = clamp_ohm(r_e * share);
  p[index(Role::emitter_bypassed)] = clamp_ohm(r_e * (1 - share));
  p[index(Role::lower_divider)] = clamp_ohm(v_b / divider);
  p[index(Role::upper_divider)] = clamp_ohm((supply - v_b) / divider);
}

void CircuitSource::pick_capacitors(PartValues& p) {
  const bool ordinary = breadth_ == Breadth::ordinary;
  const double least = ordinary ? 10e-9 : 1e-12, most = ordinary ? 470e-6 : 4.7e-3;
  for (const Role role : {Role::input_coupling, Role::output_coupling, Role::bypass})
    p[index(role)] = dice_.log_between(least, most);
  p[index(Role::shunt)] = dice_.log_between(1e-12, ordinary ? 10e-9 : dice_.chance(0.5) ? 100e-9 : 4.7e-3);
}

PartValues CircuitSource::pick_parts(double supply) {
  PartValues p{};
  pick_resistors(p, supply);
  pick_capacitors(p);
  switch (dice_.below(3)) {
    case 0:  // bypass complete
      p[index(Role::emitter_bypassed)] = clamp_ohm(p[index(Role::emitter)] + p[index(Role::emitter_bypassed)]);
      p[index(Role::emitter)] = 0;
      break;
    case 1:  // no bypass
      p[index(Role::emitter)] = clamp_ohm(p[index(Role::emitter)] + p[index(Role::emitter_bypassed)]);
      p[index(Role::emitter_bypassed)] = p[index(Role::bypass)] = 0;
      break;
    default:  // split
      break;
  }
  if (dice_.chance(0.5)) p[index(Role::shunt)] = 0;
  return p;
}

Surroundings CircuitSource::pick_surroundings() {
  const bool ordinary = breadth_ == Breadth::ordinary;
  Surroundings s;
  s.supply = ordinary ? dice_.log_between(5, 48) : dice_.log_between(1.5, 60);
  s.ambient = dice_.between(233.15, 358.15);
  s.source_resistance = dice_.chance(0.25) ? 0 : dice_.log_between(1, ordinary ? 50e3 : 1e6);
  s.source_capacitance = dice_.chance(0.5) ? 0 : dice_.log_between(1e-12, ordinary ? 1e-9 : 100e-9);
  s.load_conductance = dice_.chance(0.25) ? 0 : 1 / dice_.log_between(ordinary ? 500 : 10, 10e6);
  s.load_capacitance = dice_.chance(0.4) ? 0 : dice_.log_between(1e-12, ordinary ? 1e-9 : 100e-9);
  s.stray.input = dice_.chance(0.5) ? 0 : dice_.log_between(0.1e-12, 50e-12);
  s.stray.output = dice_.chance(0.5) ? 0 : dice_.log_between(0.1e-12, 50e-12);
  s.stray.feedback = dice_.chance(0.5) ? 0 : dice_.log_between(0.05e-12, 10e-12);
  return s;
}

RandomCircuit CircuitSource::next() {
  RandomCircuit c;
  c.device = pick_device();
  c.stage.device = c.device.get();
  c.stage.around = pick_surroundings();
  c.stage.parts = pick_parts(c.stage.around.supply);
  c.definition.from_input = dice_.chance(0.2);
  if (dice_.chance(0.1)) c.definition.frequency = dice_.log_between(10, 100e3);
  return c;
}

void Census::count(const RandomCircuit& c) {
  const Surroundings& s = c.stage.around;
  const PartValues& p = c.stage.parts;
  const BipolarParameters& q = *c.device;
  ++circuits;
  no_source_resistance += s.source_resistance == 0;
  no_source_capacitance += s.source_capacitance == 0;
  no_base_resistance += q.base_resistance == 0;
  no_unbypassed += p[index(Role::emitter)] == 0;
  no_bypass += p[index(Role::bypass)] == 0;
  split += p[index(Role::emitter)] != 0 && p[index(Role::bypass)] != 0;
  open_load += s.load_conductance == 0;
  no_shunt += p[index(Role::shunt)] == 0;
  no_stray += s.stray.input == 0 && s.stray.output == 0 && s.stray.feedback == 0;
  early_infinite += q.inverse_early_voltage == 0;
  no_cutoff_current += q.cutoff_current == 0;
  large_cutoff_current += q.cutoff_current > 1e-8;
  from_input += c.definition.from_input;
  at_frequency += c.definition.frequency > 0;
  catalogue_device += q.type != "random";
}

std::vector<std::pair<const char*, int>> Census::rows() const {
  return {{"RS = 0", no_source_resistance},
          {"Cs = 0", no_source_capacitance},
          {"rbb' = 0", no_base_resistance},
          {"RE1 = 0", no_unbypassed},
          {"no CE", no_bypass},
          {"split emitter", split},
          {"RL open", open_load},
          {"no shunt", no_shunt},
          {"no strays", no_stray},
          {"VA infinite", early_infinite},
          {"ICBO = 0", no_cutoff_current},
          {"ICBO > 10 nA", large_cutoff_current},
          {"gain from the input node", from_input},
          {"gain at a frequency", at_frequency},
          {"device of the catalogue", catalogue_device}};
}

}  // namespace oracle
