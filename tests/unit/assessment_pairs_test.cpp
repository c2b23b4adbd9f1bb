// Two parts in one role: each with its own deviation in the simulation, both at their ends in the worst case.
#include <bandwright/margins.hpp>
#include <cmath>

#include "assessment/simulation.hpp"
#include "assessment/variance.hpp"
#include "assessment/worst_case.hpp"
#include "catalogue/pairs.hpp"
#include "catch.hpp"
#include "kernel/run_units.hpp"
#include "sample_population.hpp"

using namespace bandwright;
using test::sample_design;
using test::SampleDesign;

namespace {

// Standard deviation of a normal number truncated at 3 sigma, over the tolerance: Johnson & Kotz, Continuous Univariate
// Distributions (from memory); computed from 1 - 6 phi(3)/(2 Phi(3) - 1).
constexpr double kTruncatedSigma = 0.3289;
constexpr std::size_t kUnits = 200000;

OfferedValue resistor(double value, double tolerance) {
  OfferedValue o;
  o.value = o.working_value = value;
  o.tolerance = {tolerance, tolerance};
  o.family = built_in_catalogue().find_family("metal-film");
  return o;
}

/// VA infinite, no heating: VCE is linear in RC. Nothing varies but RC, the pair given.
SampleDesign with_collector(const OfferedValue& pair) {
  SampleDesign s = sample_design("{}", R"(, "assess": {"units": 200000, "interval": 0,
      "causes": {"temperature_coefficients": "off"}})");
  s.device.inverse_early_voltage = 0;
  s.device.thermal_resistance = 0;
  s.parts[index(Role::collector)] = pair;
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = s.parts[i].working_value;
  s.nominal = analyse({values, &s.device, surroundings(s.spec)}, {});
  return s;
}

Population only_collector(const SampleDesign& s) {
  Population p = s.population();
  for (std::size_t i = 0; i < kCauseCount; ++i)
    if (i != index(Cause::collector)) p.spread[i] = {};
  return p;
}

double sigma_of_drop(const SampleDesign& s, const Population& p) {
  Assessment a;
  a.population = p;
  Spec spec = s.spec;
  spec.requirements[index(Figure::collector_emitter_voltage)] = Requirement{kNotComputed, 0.1, kNotComputed};
  simulate(spec, a, false);
  REQUIRE(a.yield.units == kUnits);
  return a.spread[index(Figure::collector_emitter_voltage)].sigma;
}

}  // namespace

TEST_CASE("the spread of a series pair is the root sum of squares of its parts", "[pairs]") {
  // 3 kohm 1 % and 1 kohm 5 %: 30 ohm and 50 ohm
  const SampleDesign s = with_collector(joined(resistor(3000, 0.01), resistor(1000, 0.05), Connection::series));
  REQUIRE(s.nominal.point.state == BiasState::active);
  const double expected = s.nominal.point.collector_current * kTruncatedSigma * std::sqrt(30.0 * 30 + 50.0 * 50);
  const double sampling = 4 / std::sqrt(2.0 * kUnits);  // four standard errors of a standard deviation
  CHECK(sigma_of_drop(s, only_collector(s)) == Approx(expected).epsilon(sampling + 2e-4));
}

TEST_CASE("the spread of a parallel pair follows its weights", "[pairs]") {
  // 6.2 kohm beside 12 kohm: d ln R = w d1 + (1 - w) d2 with w = R/R1
  const OfferedValue pair = joined(resistor(6200, 0.02), resistor(12000, 0.05), Connection::parallel);
  const SampleDesign s = with_collector(pair);
  REQUIRE(s.nominal.point.state == BiasState::active);
  const double w = pair.value / 6200, a = w * 0.02, b = (1 - w) * 0.05;
  const double expected = s.nominal.point.collector_current * pair.value * kTruncatedSigma * std::sqrt(a * a + b * b);
  CHECK(sigma_of_drop(s, only_collector(s)) == Approx(expected).epsilon(0.02));
}

TEST_CASE("the worst case of a pair has both parts at their ends", "[pairs]") {
  const SampleDesign s = with_collector(joined(resistor(3000, 0.01), resistor(1000, 0.05), Connection::series));
  Population p = only_collector(s);
  p.conditions.resize(1);
  const auto worst = worst_cases(p, {Figure::collector_emitter_voltage});
  const WorstCase& w = worst[index(Figure::collector_emitter_voltage)];
  const double swing = s.nominal.point.collector_current * 80;  // 30 ohm and 50 ohm
  const double v_ce = s.nominal.point.collector_emitter_voltage;
  CHECK(w.min == Approx(v_ce - swing).epsilon(1e-9));
  CHECK(w.max == Approx(v_ce + swing).epsilon(1e-9));
}

TEST_CASE("a pair's units are the same one by one and in lanes", "[pairs]") {
  const SampleDesign s = with_collector(joined(resistor(3000, 0.01), resistor(1000, 0.05), Connection::series));
  const Population p = s.population();
  UnitBlock one, lanes;
  UnitRunner(p, {Figure::gain, Figure::collector_current}, {}, LaneKind::one).run(5, 0, 999, one);
  for (LaneKind kind : usable_lanes()) {
    UnitRunner(p, {Figure::gain, Figure::collector_current}, {}, kind).run(5, 0, 999, lanes);
    double apart = 0;
    for (std::size_t i = 0; i < 999; ++i)
      for (std::size_t k = 0; k < 2; ++k)
        apart = std::max(apart, std::fabs(lanes.value(0, k, i) / one.value(0, k, i) - 1));
    CHECK(apart < 1e-9);
  }
}
