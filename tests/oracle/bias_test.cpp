// Operating point and hybrid-pi parameters against nested bisection in long double.
#include "bias.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>
#include <iostream>

#include "agreement.hpp"
#include "catch.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;

namespace {

constexpr double kBias = 1e-10;        // operating point against an independent bracketing solve
constexpr double kSmallSignal = 1e-9;  // follows from it: VCB and VT carry the operating point's difference on

constexpr double kThermalVoltage = 0.025;  // V: a VBE far below it is the small difference of two logarithms
constexpr double kHottest = 473.15;  // K: above, no silicon junction works, and both solves may call it what they like

constexpr int kActive = 10000;

double apart(double value, Real reference) { return relative_difference(value, static_cast<double>(reference)); }

struct Findings {
  Agreement i_c{"collector current"}, v_be{"base-emitter voltage"}, v_ce{"collector-emitter voltage"};
  Agreement i_b{"base current"}, temperature{"junction temperature"}, small{"hybrid-pi parameters"};
  Census census;
  int drawn = 0, states = 0;
  std::array<int, 3> of_state{};
  std::string where;
};

void compare(const RandomCircuit& c, const Analysis& a, const Bias& b, Findings& f) {
  const std::string name = fmt::format("circuit {}", f.drawn);
  f.i_c.add(apart(a.point.collector_current, b.i_c), name);
  f.i_b.add(apart(a.point.base_current, b.i_b), name);
  const double v_be = static_cast<double>(b.v_be);
  f.v_be.add(std::fabs(a.point.base_emitter_voltage - v_be) / std::max(std::fabs(v_be), kThermalVoltage), name);
  f.v_ce.add(apart(a.point.collector_emitter_voltage, b.v_ce), name);
  f.temperature.add(apart(a.point.junction_temperature, b.temperature), name);
  const HybridPi expected = hybrid_pi(*c.device, b);
  const HybridPi found = widen(a.small);
  for (const auto member :
       {&HybridPi::g_m, &HybridPi::g_pi, &HybridPi::g_o, &HybridPi::c_pi, &HybridPi::c_mu, &HybridPi::r_bb})
    f.small.add(apart(static_cast<double>(found.*member), expected.*member), name);
}

/// Whether a stage works must agree everywhere; why it does not, where current leaves the emitter and the junction
/// lives.
bool same_state(BiasState found, const Bias& b) {
  if (found == b.state) return true;
  if (found == BiasState::active || b.state == BiasState::active) return false;
  return b.i_c + b.i_b <= 0 || b.temperature > kHottest;
}

}  // namespace

TEST_CASE("operating point against nested bisection", "[oracle][bias]") {
  CircuitSource source(2001);
  Findings f;
  for (; f.census.circuits < kActive; ++f.drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    const Bias b = solve_bias(c.stage);
    ++f.of_state[static_cast<std::size_t>(b.state)];
    if (!same_state(a.point.state, b)) {
      ++f.states;
      f.where +=
          fmt::format("circuit {}: state {} against {}, VCE {} IC {} VCC {} Tj {}\n", f.drawn, int(a.point.state),
                      int(b.state), double(b.v_ce), double(b.i_c), c.stage.around.supply, double(b.temperature));
    }
    if (a.point.state != BiasState::active || b.state != BiasState::active) continue;
    f.census.count(c);
    compare(c, a, b, f);
  }
  std::cout << fmt::format("operating point: {} circuits: {} active, {} saturated, {} cut off\n", f.drawn,
                           f.of_state[0], f.of_state[1], f.of_state[2]);
  for (const Agreement* a : {&f.i_c, &f.i_b, &f.v_be, &f.v_ce, &f.temperature, &f.small}) {
    std::cout << "  " << a->summary() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->worst() <= (a == &f.small ? kSmallSignal : kBias));
  }
  INFO(f.where);
  CHECK(f.states == 0);
  CHECK(f.of_state[1] > 500);
  CHECK(f.of_state[2] > 100);
}

TEST_CASE("current gain over collector current against a cubic in Bernstein form", "[oracle][bias]") {
  for (const bandwright::Transistor& t : bandwright::built_in_catalogue().transistors) {
    INFO(t.type);
    const bandwright::BipolarParameters q = bandwright::derive_parameters(t).parameters;
    for (const bandwright::GainCurve* curve : {&q.gain, &q.gain_min, &q.gain_max}) {
      bandwright::GainCurve again = *curve;
      set_slopes(again);
      for (int i = 0; i < curve->points; ++i)
        CHECK(curve->slope[static_cast<std::size_t>(i)] ==
              Approx(again.slope[static_cast<std::size_t>(i)]).margin(1e-14));
    }
  }
}
