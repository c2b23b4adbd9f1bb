// Stress against two laws: a PNP stage is the NPN one mirrored, and a saturated one stays within what its linear
// network allows.
#include <Eigen/Dense>
#include <bandwright/purchase.hpp>
#include <cmath>

#include "catch.hpp"
#include "random_populations.hpp"

using namespace oracle;
using bandwright::index;
using bandwright::kResistorRoles;
using bandwright::kRoleCount;
using bandwright::PartValues;
using bandwright::Role;
using bandwright::StressRange;
using bandwright::WorstStress;

namespace {

constexpr int kDesigns = 100;

}  // namespace

namespace {

RandomDesign mirrored(RandomDesign d) {
  const auto turned = [](const bandwright::Condition& c) { return bandwright::Condition{-c.nominal, -c.max, -c.min}; };
  d.spec.supply = turned(d.spec.supply);
  d.spec.source.dc = -d.spec.source.dc;
  d.spec.load.dc = -d.spec.load.dc;
  d.device.pnp = d.population.device.pnp = !d.device.pnp;
  return d;
}

}  // namespace

TEST_CASE("a mirrored design has every voltage mirrored, and nothing else changed", "[oracle][stress]") {
  PopulationSource source(8103);
  for (int number = 0; number < kDesigns; ++number) {
    const RandomDesign d = source.next_with_dc();
    const RandomDesign m = mirrored(d);
    const WorstStress a = worst_stress(d.spec, d.population), b = worst_stress(m.spec, m.population);
    INFO("design " << number);
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (!(d.population.printed[i] > 0)) continue;
      CHECK(a.volts[i].max == -b.volts[i].min);
      CHECK(a.volts[i].min == -b.volts[i].max);
      if (i < kResistorRoles) CHECK(a.watts[i].max == b.watts[i].max);
    }
    CHECK(a.dissipation.max == b.dissipation.max);
    CHECK(a.junction_temperature.max == b.junction_temperature.max);
    const auto ours = parts_list(d.spec, with_settled_polarity(d.spec, d.parts, a), a);
    const auto theirs = parts_list(m.spec, with_settled_polarity(m.spec, m.parts, b), b);
    for (std::size_t i = 0; i < ours.size(); ++i) {
      CHECK(ours[i].family == theirs[i].family);
      if (!ours[i].polarity.starts_with("+ to")) continue;
      const std::size_t end = ours[i].polarity == "+ to " + ours[i].nodes[0] ? 1 : 0;
      CHECK(theirs[i].polarity == "+ to " + theirs[i].nodes[end]);
    }
  }
}

namespace {

constexpr int kStages = 2000;
constexpr double kRounding = 1e-9;  // of the supply

/// Node voltages (base, emitter, collector) with the transistor as two sources, VBE and VCE, of the saturated state.
Eigen::Vector3d saturated_nodes(const PartValues& r, double supply, double v_be, double v_ce) {
  const auto siemens = [&](Role role) { return 1 / r[index(role)]; };
  const double r_e = r[index(Role::emitter)] + r[index(Role::emitter_bypassed)];
  const double g1 = siemens(Role::upper_divider), g2 = siemens(Role::lower_divider), gc = siemens(Role::collector);
  Eigen::Matrix3d a;
  a << g1 + g2, 1 / r_e, gc,  // all currents that leave the transistor's three nodes together
      1, -1, 0, 0, -1, 1;
  return a.partialPivLu().solve(Eigen::Vector3d(supply * (g1 + gc), v_be, v_ce));
}

}  // namespace

TEST_CASE("a saturated stage stays within the rails' ranges", "[oracle][stress]") {
  Dice dice(8105);
  int seen = 0;
  for (int k = 0; k < kStages; ++k) {
    PartValues r{};
    for (std::size_t i = 0; i < kResistorRoles; ++i) r[i] = dice.log_between(10, 1e6);
    if (dice.chance(0.3)) r[index(Role::emitter)] = 0;
    for (const Role role : {Role::input_coupling, Role::output_coupling, Role::bypass}) r[index(role)] = 1e-6;
    bandwright::Spec spec;
    const double supply = dice.between(3, 48), sign = dice.chance(0.5) ? -1 : 1;
    spec.supply = {sign * supply, sign * supply, sign * supply};
    spec.source.dc = dice.between(-5, 5);
    spec.load.dc = dice.between(-5, 5);
    const Eigen::Vector3d node = saturated_nodes(r, supply, dice.between(0.5, 0.8), dice.between(0, 0.5));
    const double i_c = (supply - node[2]) / r[index(Role::collector)], base = node[0];
    const double i_b = (supply - base) / r[index(Role::upper_divider)] - base / r[index(Role::lower_divider)];
    if (i_b < 0 || i_c < 0) continue;  // not saturated
    ++seen;
    const WorstStress w = rail_to_rail(spec, r);
    const auto holds = [&](const StressRange& range, double value) {
      INFO(range.min << " to " << range.max << ": " << value);
      CHECK((value >= range.min - kRounding * supply && value <= range.max + kRounding * supply));
    };
    const double junction =
        node[1] * r[index(Role::emitter_bypassed)] / (r[index(Role::emitter)] + r[index(Role::emitter_bypassed)]);
    holds(w.volts[index(Role::upper_divider)], sign * (supply - base));
    holds(w.volts[index(Role::lower_divider)], sign * base);
    holds(w.volts[index(Role::collector)], sign * (supply - node[2]));
    holds(w.volts[index(Role::emitter_bypassed)], sign * junction);
    holds(w.volts[index(Role::bypass)], sign * junction);
    holds(w.volts[index(Role::input_coupling)], spec.source.dc - sign * base);
    holds(w.volts[index(Role::output_coupling)], sign * node[2] - spec.load.dc);
    holds(w.collector_current, i_c);
    holds(w.collector_emitter_voltage, node[2] - node[1]);
    holds(w.watts[index(Role::emitter_bypassed)], junction * junction / r[index(Role::emitter_bypassed)]);
    if (r[index(Role::emitter)] > 0) holds(w.volts[index(Role::emitter)], sign * (node[1] - junction));
  }
  CHECK(seen > kStages / 4);
}
