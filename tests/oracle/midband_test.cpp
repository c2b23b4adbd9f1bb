// Port resistances, midband gain and the time constants of the pole model against the nodal resistive network.
#include <fmt/format.h>

#include <cmath>
#include <iostream>
#include <limits>
#include <map>
#include <numbers>

#include "agreement.hpp"
#include "catch.hpp"
#include "nodal.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::Figure;
using bandwright::index;
using bandwright::PoleModel;
using bandwright::Role;

namespace {

constexpr double kResistive = 1e-9;  // as the exact response: long double nodal solves are trusted to 1e-10
constexpr int kCircuits = 3000;

double apart(double value, Real reference) { return relative_difference(value, static_cast<double>(reference)); }

Circuit circuit_of(const RandomCircuit& c, const Analysis& a, bool from_input = false) {
  return {widen(c.stage.parts), widen(a.small), c.stage.around, from_input};
}

Real into(const Network& net, int a, int b) { return net.impedance(0, a, b).real(); }

/// Looking right from the node between RS and Cin: the source taken away.
Real input_resistance(Circuit x) {
  x.around.source_resistance = std::numeric_limits<double>::infinity();
  return into(midband_network(x), input, ground);
}

Real output_resistance(const Circuit& x) { return into(midband_network(x, {std::nullopt, false}), output, ground); }

Real midband_gain(const Circuit& x) { return std::abs(midband_network(x).transfer(0, output)); }

template <class F>
void on_active_circuits(std::uint64_t seed, F f) {
  CircuitSource source(seed);
  for (int done = 0, drawn = 0; done < kCircuits; ++drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    if (a.point.state != BiasState::active) continue;
    f(c, a, fmt::format("circuit {}", drawn));
    ++done;
  }
}

void report(std::initializer_list<const Agreement*> all) {
  for (const Agreement* a : all) {
    std::cout << "  " << a->summary() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->count() > 0);
    CHECK(a->worst() <= kResistive);
  }
}

struct Port {
  int a, b;
};

struct LowPort {
  Role role;
  Port port;
};
const std::map<std::string, LowPort> kLowPorts = {
    {"C1", {Role::input_coupling, {input, base}}},
    {"C2", {Role::output_coupling, {collector, output}}},
    {"C3", {Role::bypass, {junction, ground}}},
};

/// Circuits with a zero source resistance and those seen from the input node leave some capacitors no resistance.
void compare_resistance(double value, Real reference, Agreement& agreement, const std::string& name) {
  if (reference == 0)
    CHECK(value == 0);
  else
    agreement.add(apart(value, reference), name);
}

/// Every capacitor of the high side with its port; the names are those the pole model shows.
struct HighPort {
  std::string name;
  Port port;
  Real farad;
};

std::vector<HighPort> high_ports(const Circuit& x) {
  return {{"base-emitter Cpi", {inner_base, emitter}, x.device.c_pi},
          {"collector-base Cmu", {inner_base, collector}, x.device.c_mu},
          {"C4 shunt", {collector, ground}, x.parts[index(Role::shunt)]},
          {"load capacitance", {output, ground}, x.around.load_capacitance},
          {"source capacitance", {input, ground}, x.around.source_capacitance},
          {"stray, base to 0 V", {base, ground}, x.around.stray.input},
          {"stray, collector to 0 V", {collector, ground}, x.around.stray.output},
          {"stray, collector to base", {collector, base}, x.around.stray.feedback}};
}

void compare_high(const PoleModel& model, const Circuit& x, const std::string& name, Agreement& seen, Agreement& sum) {
  const Network net = midband_network(x);
  Real tau = 0;
  std::size_t shown = 0;
  for (const HighPort& p : high_ports(x)) {
    if (p.farad == 0) continue;
    INFO(p.name);
    const Real resistance = into(net, p.port.a, p.port.b);
    tau += resistance * p.farad;
    REQUIRE(shown < model.high.size());
    CHECK(model.high[shown].capacitor == p.name);
    compare_resistance(model.high[shown++].resistance, resistance, seen, name + " " + p.name);
  }
  CHECK(shown == model.high.size());
  sum.add(apart(model.upper_cutoff, 1 / (2 * std::numbers::pi_v<Real> * tau)), name);
}

void compare_low(const PoleModel& model, const Circuit& x, const std::string& name, Agreement& seen, Agreement& sum) {
  Real frequency = 0;
  for (const bandwright::TimeConstant& t : model.low) {
    INFO(t.capacitor);
    const auto found = kLowPorts.find(t.capacitor.substr(0, 2));
    REQUIRE(found != kLowPorts.end());
    const auto [role, port] = found->second;
    const Real resistance = into(midband_network(x, {role, true}), port.a, port.b);
    compare_resistance(t.resistance, resistance, seen, name + " " + t.capacitor);
    frequency += 1 / (2 * std::numbers::pi_v<Real> * resistance * x.parts[index(role)]);
  }
  sum.add(apart(model.lower_cutoff, frequency), name);
}

std::size_t present_low(const RandomCircuit& c) {
  // an output coupling into an open load has no corner
  return 1u + (c.stage.around.load_conductance > 0) + (c.stage.parts[index(Role::bypass)] > 0);
}

}  // namespace

TEST_CASE("input and output resistance and midband gain against the resistive network", "[oracle][midband]") {
  Agreement r_in("input resistance"), r_out("output resistance"), gain("midband gain"), model_gain("pole model gain");
  on_active_circuits(3001, [&](const RandomCircuit& c, const Analysis& a, const std::string& name) {
    const Circuit plain = circuit_of(c, a), driven = circuit_of(c, a, c.definition.from_input);
    r_in.add(apart(a.figures[index(Figure::input_resistance)], input_resistance(plain)), name);
    r_out.add(apart(a.figures[index(Figure::output_resistance)], output_resistance(plain)), name);
    gain.add(apart(a.figures[index(Figure::midband_gain)], midband_gain(driven)), name);
    model_gain.add(apart(pole_model(c.stage, a, c.definition).midband_gain, midband_gain(driven)), name);
  });
  std::cout << "resistive midband network\n";
  report({&r_in, &r_out, &gain, &model_gain});
}

TEST_CASE("time constants of the pole model against a test source at each capacitor", "[oracle][midband]") {
  Agreement low("short-circuit resistances"), high("open-circuit resistances"), f_low("sum of corners"),
      f_high("sum of time constants");
  on_active_circuits(3002, [&](const RandomCircuit& c, const Analysis& a, const std::string& name) {
    INFO(name);
    Circuit x = circuit_of(c, a);
    if (c.definition.from_input) x.around.source_resistance = x.around.source_capacitance = 0;
    const PoleModel model = pole_model(c.stage, a, c.definition);
    CHECK(model.low.size() == present_low(c));
    compare_low(model, x, name, low, f_low);
    compare_high(model, x, name, high, f_high);
  });
  std::cout << "pole model\n";
  report({&low, &high, &f_low, &f_high});
}

TEST_CASE("textbook gain and Miller corner of the pole model from the published forms", "[oracle][midband]") {
  Agreement gain("textbook gain"), miller("Miller corner");
  on_active_circuits(3003, [&](const RandomCircuit& c, const Analysis& a, const std::string& name) {
    const Circuit x = circuit_of(c, a);
    const HybridPi& q = x.device;
    const PoleModel model = pole_model(c.stage, a, c.definition);
    const Real r_s = c.definition.from_input ? 0 : x.around.source_resistance;
    const Real g_divider = 1 / x.parts[index(Role::upper_divider)] + 1 / x.parts[index(Role::lower_divider)];
    const Real r_load = 1 / (1 / x.parts[index(Role::collector)] + x.around.load_conductance + q.g_o);
    const Real f = 1 + q.g_m * x.parts[index(Role::emitter)];
    const Real h_ie = q.r_bb + 1 / q.g_pi, r_in = input_resistance(x);
    gain.add(apart(model.textbook_gain, q.g_m / q.g_pi * r_load / h_ie / f * r_in / (r_in + r_s)), name);
    const Real r_drive = r_s / (1 + r_s * g_divider) + q.r_bb;
    const Real c_in = q.c_pi / f + q.c_mu * (1 + q.g_m * r_load / f);
    const Real tau = c_in / (1 / r_drive + q.g_pi / f);
    if (r_drive > 0) miller.add(apart(model.miller_upper_cutoff, 1 / (2 * std::numbers::pi_v<Real> * tau)), name);
  });
  std::cout << "published forms\n";
  report({&gain, &miller});
}
