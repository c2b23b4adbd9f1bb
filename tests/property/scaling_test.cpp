// Laws of linear networks that hold whatever the numbers are.
#include <bandwright/analysis.hpp>
#include <cmath>
#include <random>

#include "analysis/response.hpp"
#include "catch.hpp"
#include "stage/common_emitter.hpp"

using namespace bandwright;

namespace {

constexpr double kRounding = 1e-9;  // far above the 1e-10 the response is exact to, far below any real difference

/// A random circuit with its hybrid-pi, no bias behind it: the laws need none.
struct Network {
  Circuit<double> circuit;
  HybridPi<double> device;
};

Network random_network(std::mt19937_64& random) {
  const auto pick = [&](double a, double b) {
    return a * std::pow(b / a, static_cast<double>(random() >> 11) * 0x1p-53);
  };
  Network n;
  Circuit<double>& c = n.circuit;
  c.part = {pick(1e3, 1e6),   pick(1e3, 1e6),   pick(100, 1e5),   pick(1, 1e3),     pick(10, 1e4),
            pick(1e-8, 1e-4), pick(1e-8, 1e-4), pick(1e-7, 1e-3), pick(1e-12, 1e-8)};
  c.supply = 12;
  c.source_resistance = pick(1, 1e5);
  c.source_capacitance = pick(1e-12, 1e-9);
  c.load_conductance = 1 / pick(100, 1e6);
  c.load_capacitance = pick(1e-12, 1e-9);
  c.stray_input = c.stray_output = c.stray_feedback = pick(1e-13, 1e-11);
  const double g_m = pick(1e-4, 1);
  n.device = {g_m, g_m / pick(20, 1000), g_m / pick(500, 1e4), pick(1e-12, 1e-10), pick(1e-13, 1e-11), pick(1, 500)};
  return n;
}

/// Every impedance times z, every frequency times w.
Network scaled(Network n, double z, double w) {
  const double r = z, c = 1 / (z * w), g = 1 / z;
  for (std::size_t i = 0; i < kRoleCount; ++i) n.circuit.part[i] *= i < kResistorRoles ? r : c;
  n.circuit.source_resistance *= r;
  n.circuit.source_capacitance *= c;
  n.circuit.load_conductance *= g;
  n.circuit.load_capacitance *= c;
  n.circuit.stray_input *= c;
  n.circuit.stray_output *= c;
  n.circuit.stray_feedback *= c;
  n.device.transconductance *= g;
  n.device.input_conductance *= g;
  n.device.output_conductance *= g;
  n.device.input_capacitance *= c;
  n.device.feedback_capacitance *= c;
  n.device.base_resistance *= r;
  return n;
}

Crossings band(const Network& n) { return find_crossings(transfer(n.circuit, n.device), 0); }

}  // namespace

TEST_CASE("scaling all impedances leaves gain and cutoffs; scaling all capacitors moves the cutoffs alike",
          "[property]") {
  std::mt19937_64 random(21);
  for (int i = 0; i < 500; ++i) {
    const Network n = random_network(random);
    const Crossings base = band(n), impedance = band(scaled(n, 37.5, 1)), frequency = band(scaled(n, 1, 4.2));
    CHECK(impedance.gain_squared == Approx(base.gain_squared).epsilon(kRounding));
    CHECK(frequency.gain_squared == Approx(base.gain_squared).epsilon(kRounding));
    if (std::isnan(base.upper)) continue;
    CHECK(impedance.lower == Approx(base.lower).epsilon(kRounding));
    CHECK(impedance.upper == Approx(base.upper).epsilon(kRounding));
    CHECK(frequency.lower == Approx(base.lower * 4.2 * 4.2).epsilon(kRounding));
    CHECK(frequency.upper == Approx(base.upper * 4.2 * 4.2).epsilon(kRounding));
  }
}

TEST_CASE("no coefficient of the denominator is negative", "[property]") {
  std::mt19937_64 random(22);
  for (int i = 0; i < 500; ++i) {
    const Network n = random_network(random);
    for (double c : transfer(n.circuit, n.device).denominator.c) CHECK(c > 0);
  }
}

TEST_CASE("a larger shunt capacitor never raises the upper cutoff", "[property]") {
  std::mt19937_64 random(23);
  for (int i = 0; i < 200; ++i) {
    Network n = random_network(random);
    const double before = band(n).upper;
    n.circuit.part[index(Role::shunt)] *= 1.5;
    const double after = band(n).upper;
    if (!std::isnan(before)) CHECK(after <= before * (1 + kRounding));
  }
}
