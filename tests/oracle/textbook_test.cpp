// The oracle itself against published circuits and against a solve in fifty digits.
//
// [C]: book, example; read through a transcription, book not opened. "full": the example's circuit by another nodal
// solve with a half-power search, made when the transcription was checked; printed to four or five digits.
#include <cmath>
#include <numbers>

#include "bias.hpp"
#include "catch.hpp"
#include "fifty_digits.hpp"
#include "nodal.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::index;
using bandwright::Role;

namespace {

// Two independent solvers of one circuit must agree; what is left is the rounding of the reference's printed digits.
constexpr double kPrinted = 0.0005;

constexpr Real kShort = 1;  // farad: a coupling that shows nowhere above 1 Hz

Circuit textbook(double r1, double r2, double rc, double re1, double re2) {
  Circuit c;
  c.parts[index(Role::upper_divider)] = r1;
  c.parts[index(Role::lower_divider)] = r2;
  c.parts[index(Role::collector)] = rc;
  c.parts[index(Role::emitter)] = re1;
  c.parts[index(Role::emitter_bypassed)] = re2;
  c.parts[index(Role::input_coupling)] = c.parts[index(Role::output_coupling)] = kShort;
  return c;
}

void same(std::optional<Real> value, double expected) {
  REQUIRE(value);
  CHECK(static_cast<double>(*value) == Approx(expected).epsilon(kPrinted));
}

/// Boylestad & Nashelsky, Electronic Devices and Circuit Theory, 10th ed., Ex 9.11 [C]: re = 26 mV/IE.
Circuit boylestad_9_11() {
  Circuit c = textbook(40e3, 10e3, 4e3, 0, 2e3);
  c.parts[index(Role::input_coupling)] = 10e-6L;
  c.parts[index(Role::output_coupling)] = 1e-6L;
  c.parts[index(Role::bypass)] = 20e-6L;
  c.device.g_m = 1 / 15.758L;
  c.device.g_pi = c.device.g_m / 100;
  c.around.source_resistance = 1e3;
  c.around.load_conductance = 1 / 2.2e3;
  return c;
}

/// Sedra & Smith, Microelectronic Circuits, 5th ed., Ex 5.18 [C].
Circuit sedra_5_18() {
  Circuit c = textbook(200e3, 200e3, 8e3, 0, 1e6);
  c.parts[index(Role::bypass)] = kShort;
  c.device = {40e-3L, 1 / 2.5e3L, 1 / 100e3L, 7e-12L, 1e-12L, 50};
  c.around.source_resistance = 5e3;
  c.around.load_conductance = 1 / 5e3;
  return c;
}

/// Sedra & Smith, Microelectronic Circuits, 5th ed., Ex 6.9 [C]: a field-effect stage, 20 fF, 5 fF and 25 fF.
Circuit sedra_6_9() {
  Circuit c = textbook(1e12, 1e12, 9.82e3, 0, 1e6);
  c.parts[index(Role::bypass)] = kShort;
  c.device = {1.25e-3L, 0, 0, 20e-15L, 5e-15L, 0};
  c.around.source_resistance = 10e3;
  c.around.stray.output = 25e-15;
  return c;
}

}  // namespace

TEST_CASE("oracle: common-emitter stage with three corners", "[oracle][textbook]") {
  const Edges band = edges(network(boylestad_9_11()));
  same(band.gain, 51.19);
  same(band.lower, 337.1);
  CHECK_FALSE(band.upper);
}

TEST_CASE("oracle: stage with a capacitor on its load", "[oracle][textbook]") {
  // Neamen, Electronic Circuit Analysis and Design, 2nd ed., Ex 7.7 [C]; VT 26 mV.
  Circuit c = textbook(40e3, 5.7e3, 5e3, 500, 0);
  c.parts[index(Role::input_coupling)] = 10e-6L;
  c.device.g_m = 0.99e-3L / 26e-3L;
  c.device.g_pi = c.device.g_m / 100;
  c.around.source_resistance = 100;
  c.around.load_conductance = 1 / 10e3;
  c.around.load_capacitance = 15e-12;
  const Edges band = edges(network(c));
  same(band.gain, 6.1397);
  same(band.lower, 3.4147);
  same(band.upper, 3.1831e6);
}

TEST_CASE("oracle: high-frequency response with Miller effect", "[oracle][textbook]") {
  const Edges band = edges(network(sedra_5_18()));
  same(band.gain, 38.88);
  same(band.upper, 749.2e3);
}

TEST_CASE("oracle: exact poles of a stage driven from 10 kilohm", "[oracle][textbook]") {
  const Network net = network(sedra_6_9());
  same(edges(net).upper, 145.1e6);
  for (const Real printed : {145.6e6L, 2444e6L}) {
    Complex s = -2 * std::numbers::pi_v<Real> * printed;
    for (int step = 0; step < 6; ++step) {  // Newton on the determinant
      const Complex move = Real(1) / net.determinant_slope(s);
      if (std::isfinite(move.real())) s -= move;
    }
    same(-s.real() / (2 * std::numbers::pi_v<Real>), static_cast<double>(printed));
  }
}

TEST_CASE("oracle: operating points of printed dividers", "[oracle][textbook]") {
  struct Row {
    const char* source;
    double supply, r1, r2, rc, re, beta, v_be, i_c, v_ce;
  };
  // exact solutions of the examples' equations, to the digits kept: IC in A, VCE in V
  const Row rows[] = {
      {"Sedra & Smith 5e Ex 5.10 [C]", 15, 100e3, 50e3, 5e3, 3e3, 100, 0.7, 1.2785e-3, 4.734},
      {"Hambley Ex 13.7 [C]", 15, 10e3, 5e3, 1e3, 1e3, 300, 0.7, 4.2388e-3, 6.508},
      {"Millman & Halkias Ex 9.1 [C]", 22.5, 90e3, 10e3, 5.6e3, 1e3, 55, 0.65, 1.3538e-3, 13.540},
      {"Kumar & Jain Ex 5.2 [C]", 18, 82e3, 22e3, 5.6e3, 1.2e3, 50, 0.7, 1.9783e-3, 4.500},
  };
  for (const Row& row : rows) {
    INFO(row.source);
    bandwright::BipolarParameters q;
    q.gain.log_gain[0] = std::log(row.beta);
    // VBE is held in the examples: IS is chosen so that the junction shows it at the printed current
    q.log_saturation_current = std::log(row.i_c) - row.v_be / (1.380649e-23 * 298.15 / 1.602176634e-19);
    BiasNetwork net;
    net.parts = textbook(row.r1, row.r2, row.rc, row.re, 0).parts;
    net.supply = row.supply;
    net.device = &q;
    const Bias bias = solve_bias(net, 298.15L);
    same(bias.i_c, row.i_c);
    same(bias.v_ce, row.v_ce);
  }
}

TEST_CASE("oracle: long double solve against fifty digits", "[oracle][textbook]") {
  // A hundredth of the bar that the solve serves, 1e-9.
  constexpr Real kSolveError = 1e-11L;
  CircuitSource source(7);
  Real worst = 0;
  for (int circuit = 0; circuit < 200; ++circuit) {
    const RandomCircuit random = source.next();
    const Bias bias = solve_bias(random.stage);
    if (bias.state != bandwright::BiasState::active) continue;
    const Network net = network({widen(random.stage.parts), hybrid_pi(*random.device, bias), random.stage.around,
                                 random.definition.from_input});
    for (Real f = 1e-3L; f < 2e10L; f *= 100) {
      const Real exact = magnitude_in_fifty_digits(net, output, f);
      worst = std::max(worst, std::abs(magnitude(net, f) / exact - 1));
    }
  }
  INFO("worst " << static_cast<double>(worst));
  CHECK(worst < kSolveError);
}
