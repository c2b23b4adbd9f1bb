// Figures of the operating point, swing and stress from the independent operating point, by hand.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iostream>

#include "agreement.hpp"
#include "bias.hpp"
#include "catch.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::Figure;
using bandwright::index;
using bandwright::Role;

namespace {

// Figures are differences and quotients of the operating point's values, which agree to 1e-10.
constexpr double kFigure = 1e-9;
constexpr int kCircuits = 3000;
constexpr double kLeastCurrent = 1e-9;        // A: below it VBE is next to nothing and a small difference of large ones
constexpr double kHottest = 473.15;           // K: no silicon junction works above
constexpr double kLeastShareOfSupply = 1e-6;  // a smaller voltage, the difference of two node voltages, heats nothing

double apart(double value, Real reference) { return relative_difference(value, static_cast<double>(reference)); }

/// The operating point with the node voltages that follow from it.
struct Nodes {
  Nodes(const RandomCircuit& c, const Bias& bias, Real supply_magnitude) : b(bias), p(widen(c.stage.parts)) {
    supply = supply_magnitude;
    sign = c.device->pnp ? -1 : 1;
    i_e = b.i_c + b.i_b;
    v_e = i_e * (p[index(Role::emitter)] + p[index(Role::emitter_bypassed)]);
    v_b = v_e + b.v_be;
    v_c = v_e + b.v_ce;
  }
  Real operator[](Role role) const { return p[index(role)]; }

  Bias b;
  Parts p;
  Real supply, sign, i_e, v_e, v_b, v_c;
};

struct Swing {
  Real to_cutoff, to_saturation;
};

/// R_ac = RC||RL without ro; the emitter resistance that is not bypassed takes its part of the saturation side.
Swing swing(const RandomCircuit& c, const Nodes& n) {
  const Real r_ac = 1 / (1 / n[Role::collector] + c.stage.around.load_conductance);
  const bool bypassed = n[Role::bypass] > 0;
  const Real r_e = n[Role::emitter] + (bypassed ? 0 : n[Role::emitter_bypassed]);
  return {n.b.i_c * r_ac, (n.b.v_ce - c.device->saturation_voltage) * r_ac / (r_ac + r_e)};
}

Real stability_factor(const RandomCircuit& c, const Nodes& n) {
  const Real beta = n.b.beta0 * (1 + n.b.v_ce * c.device->inverse_early_voltage);
  const Real r_e = n[Role::emitter] + n[Role::emitter_bypassed];
  const Real r_b = 1 / (1 / n[Role::upper_divider] + 1 / n[Role::lower_divider]);
  return (1 + beta) / (1 + beta * r_e / (r_e + r_b));
}

struct Row {
  Figure figure;
  Real expected;
};

std::vector<Row> expected_figures(const RandomCircuit& c, const Analysis& a, const Nodes& n) {
  const Swing s = swing(c, n);
  const Real least = std::min(s.to_cutoff, s.to_saturation);
  return {{Figure::bandwidth, Real(a.band.upper) - a.band.lower},
          {Figure::gain, a.band.gain},
          {Figure::lower_cutoff, a.band.lower},
          {Figure::upper_cutoff, a.band.upper},
          {Figure::output_swing, least},
          {Figure::input_overload, least / a.band.gain},
          {Figure::swing_to_cutoff, s.to_cutoff},
          {Figure::swing_to_saturation, s.to_saturation},
          {Figure::supply_current, n.b.i_c + (n.supply - n.v_b) / n[Role::upper_divider]},
          {Figure::collector_current, n.b.i_c},
          {Figure::collector_emitter_voltage, n.b.v_ce},
          {Figure::dissipation, n.b.v_ce * n.b.i_c + n.b.v_be * n.b.i_b},
          {Figure::base_voltage, n.sign * n.v_b},
          {Figure::emitter_voltage, n.sign * n.v_e},
          {Figure::collector_voltage, n.sign * n.v_c},
          {Figure::junction_temperature, n.b.temperature},
          {Figure::stability_factor, stability_factor(c, n)},
          {Figure::divider_current_ratio, n.v_b / n[Role::lower_divider] / n.b.i_b},
          {Figure::emitter_voltage_share, n.v_e / n.supply},
          {Figure::collector_emitter_share, n.b.v_ce / n.supply}};
}

template <class F>
void on_active_circuits(std::uint64_t seed, F f) {
  CircuitSource source(seed);
  for (int done = 0, drawn = 0; done < kCircuits; ++drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    const Bias b = solve_bias(c.stage);
    if (a.point.state != BiasState::active || b.state != BiasState::active) continue;
    if (b.i_c < kLeastCurrent || b.temperature > kHottest) continue;
    f(c, a, b, fmt::format("circuit {}", drawn));
    ++done;
  }
}

void report(const Agreement& a) {
  std::cout << "  " << a.summary() << "\n";
  INFO(a.summary() << " in " << a.worst_where());
  CHECK(a.worst() <= kFigure);
}

/// A voltage that is a small difference of large ones is held to the supply, not to itself.
double apart_of_supply(double value, Real reference, Real supply) {
  return static_cast<double>(std::abs(value - reference) / supply);
}

struct Expected {
  Role role;
  Real volts;
};

std::vector<Expected> expected_volts(const Nodes& n, Real source_dc, Real load_dc) {
  const Real v_junction = n.i_e * n[Role::emitter_bypassed];
  return {{Role::upper_divider, n.sign * (n.supply - n.v_b)},
          {Role::lower_divider, n.sign * n.v_b},
          {Role::collector, n.sign * (n.supply - n.v_c)},
          {Role::emitter, n.sign * n.i_e * n[Role::emitter]},
          {Role::emitter_bypassed, n.sign * v_junction},
          {Role::input_coupling, source_dc - n.sign * n.v_b},
          {Role::output_coupling, n.sign * n.v_c - load_dc},
          {Role::bypass, n.sign * v_junction},
          {Role::shunt, n.sign * n.v_c}};
}

}  // namespace

TEST_CASE("figures from the operating point by hand", "[oracle][figures]") {
  Agreement all("figures");
  on_active_circuits(5001, [&](const RandomCircuit& c, const Analysis& a, const Bias& b, const std::string& name) {
    const Nodes n(c, b, c.stage.around.supply);
    for (const Row& row : expected_figures(c, a, n))
      all.add(apart(a.figures[index(row.figure)], row.expected), name + " " + info(row.figure).key);
  });
  std::cout << "figures by hand\n";
  report(all);
}

TEST_CASE("voltages and dissipations at another supply against nested bisection", "[oracle][figures]") {
  Agreement volts("voltages over supply"), watts("resistor dissipation");
  Dice dice(5);
  on_active_circuits(5002, [&](const RandomCircuit& c, const Analysis& a, const Bias& b, const std::string& name) {
    const double supply = c.stage.around.supply * dice.between(1, 1.3);
    const double source_dc = dice.between(-5, 5), load_dc = dice.between(-5, 5);
    const Bias other = solve_bias(BiasNetwork{widen(c.stage.parts), supply, c.device.get(), 1}, b.temperature);
    if (other.state != BiasState::active) return;
    const bandwright::Stress s = stress(c.stage, a.point, supply, source_dc, load_dc);
    for (const auto& [role, expected] : expected_volts(Nodes(c, other, supply), source_dc, load_dc)) {
      const std::string where = name + " " + info(role).key;
      volts.add(apart_of_supply(s.volts[index(role)], expected, supply), where);
      const Real ohm = c.stage.parts[index(role)];
      if (info(role).kind == bandwright::PartKind::capacitor) continue;
      if (ohm > 0 && std::abs(expected) < kLeastShareOfSupply * supply) continue;
      const Real expected_watts = ohm > 0 ? expected * expected / ohm : 0;
      watts.add(apart(s.watts[index(role)], expected_watts), where);
    }
  });
  std::cout << "stress\n";
  report(volts);
  report(watts);
}
