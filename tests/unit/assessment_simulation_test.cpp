// Yield, capability and their statistics against closed forms, enumeration and Boost.Math.
#include <algorithm>
#include <bandwright/margins.hpp>
#include <boost/math/distributions/gamma.hpp>
#include <boost/math/distributions/normal.hpp>
#include <cmath>

#include "assessment/simulation.hpp"
#include "catch.hpp"
#include "sample_population.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

/// Only one cause varies, symmetrically by a share.
Population only(Population p, Cause cause, double share) {
  for (CauseSpread& s : p.spread) s = {};
  p.spread[index(cause)] = {0, share, share, "test"};
  p.temperature_coefficient.fill(0);
  p.conditions.resize(1);
  return p;
}

/// Probability that a normal deviate truncated at 3 sigma, of half-width 1, lies under x.
double truncated_below(double x) {
  const boost::math::normal n;
  const double tail = cdf(n, -3.0);
  return std::clamp((cdf(n, 3 * x) - tail) / (1 - 2 * tail), 0.0, 1.0);
}

/// The quantile of the same deviate.
double truncated_quantile(double p) {
  const boost::math::normal n;
  const double tail = cdf(n, -3.0);
  return quantile(n, tail + (1 - 2 * tail) * p) / 3;
}

Requirement at_most(double limit) { return {kNotComputed, kNotComputed, limit}; }
Requirement at_least(double limit) { return {kNotComputed, limit, kNotComputed}; }

}  // namespace

TEST_CASE("the yield of a linear figure is the normal integral", "[assessment]") {
  // VA infinite: IC does not depend on RC, and VCE = VCC - IC RC - IE RE is linear in RC.
  SampleDesign s = sample_design("{}", R"(, "assess": {"units": 200000, "interval": 0})");
  s.device.inverse_early_voltage = 0;
  s.device.thermal_resistance = 0;
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = s.parts[i].working_value;
  s.nominal = analyse({values, &s.device, surroundings(s.spec)}, {});
  const double v_ce = s.nominal.point.collector_emitter_voltage;
  const double drop = s.nominal.point.collector_current * values[index(Role::collector)];
  for (double x : {-0.5, 0.1, 0.6, 0.9}) {  // in half-widths: a unit passes where its RC lies under it
    s.spec.requirements[index(Figure::collector_emitter_voltage)] = at_least(v_ce - x * 0.05 * drop);
    Assessment a;
    a.population = only(s.population(), Cause::collector, 0.05);
    simulate(s.spec, a, false);
    const double expected = truncated_below(x);
    const double sigma = std::sqrt(expected * (1 - expected) / 200000);
    INFO(x);
    CHECK(a.yield.units == 200000);
    CHECK(a.yield.share() == Approx(expected).margin(4 * sigma));
    CHECK(a.yield.low < expected + 2 * sigma);
    CHECK(a.yield.high > expected - 2 * sigma);
    // capability of a linear figure: the limit's distance over that of the 99.865 % quantile
    CHECK(a.capability == Approx(std::min(x / truncated_quantile(0.99865), 2.0)).epsilon(0.02));
  }
}

TEST_CASE("simulation agrees with the enumeration of a grid of equally likely units", "[assessment]") {
  // Two causes, uniform: every cell of a 120 x 120 grid stands for as many units.
  SampleDesign s = sample_design(R"({"gain": {"min": 31.4, "max": 32.9}, "lower_cutoff": {"max": "28 Hz"}})",
                                 R"(, "assess": {"units": 100000, "interval": 0, "distribution": "uniform"})");
  Population p = only(s.population(), Cause::emitter, 0.05);
  p.spread[index(Cause::bypass)] = {0, 0.2, 0.2, "test"};
  p.uniform = true;
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = s.parts[i].working_value;
  constexpr int kCells = 120;
  std::size_t passed = 0;
  for (int i = 0; i < kCells; ++i) {
    for (int k = 0; k < kCells; ++k) {
      const auto middle = [](int cell) { return (2 * cell + 1.0) / kCells - 1; };
      PartValues v = values;
      v[index(Role::emitter)] *= 1 + 0.05 * middle(i);
      v[index(Role::bypass)] *= 1 + 0.2 * middle(k);
      Stage stage{v, &s.device, surroundings(s.spec)};
      // the junction's rise is held at the nominal unit's
      stage.around.ambient = s.nominal.point.junction_temperature;
      BipolarParameters held = s.device;
      held.thermal_resistance = 0;
      stage.device = &held;
      passed += meets_all(s.spec, analyse(stage, {}).figures);
    }
  }
  const double enumerated = static_cast<double>(passed) / (kCells * kCells);
  const Yield y = simulated_yield(s.spec, p);
  INFO(enumerated << " against " << y.share());
  CHECK(enumerated > 0.2);
  CHECK(enumerated < 0.9);
  CHECK(y.share() == Approx(enumerated).margin(4 * std::sqrt(0.25 / 100000) + 1.0 / kCells));
  Assessment a;
  a.population = p;
  simulate(s.spec, a, false);
  CHECK(a.yield.passed == y.passed);  // with the cutoffs solved, and by |H| at their limits
}

TEST_CASE("the capability of a skewed figure is that of its quantiles", "[assessment]") {
  // x whose logarithm is gamma distributed, k = 4: far from normal, all quantiles known
  const boost::math::gamma_distribution<> skewed(4, 0.05);
  constexpr int kUnits = 100000;
  std::vector<double> high, low;
  for (int i = 0; i < kUnits; ++i) high.push_back(std::exp(quantile(skewed, (i + 0.5) / kUnits)));
  low = high;
  std::vector<double> again = high;
  const double middle = quantile(skewed, 0.5), right = quantile(skewed, 0.99865), left = quantile(skewed, 0.00135);
  const Requirement window{std::exp(middle), std::exp(middle - 0.14), std::exp(middle + 0.3)};
  const double above = 0.3 / (right - middle), below = 0.14 / (middle - left);
  CHECK(above < below);  // the long tail decides, although its limit is further away
  CHECK(capability(window, info(Figure::gain), high, low) == Approx(above).epsilon(1e-3));
  std::vector<double> none;
  CHECK(capability(at_least(std::exp(middle - 0.14)), info(Figure::gain), none, again) == Approx(below).epsilon(2e-2));
}

TEST_CASE("below 20,000 units mean and three sigma stand in place of quantiles", "[assessment]") {
  const boost::math::normal n(2.0, 0.1);
  std::vector<double> values, none;
  for (int i = 0; i < 5000; ++i) values.push_back(std::exp(quantile(n, (i + 0.5) / 5000)));
  std::vector<double> again = values;
  CHECK(capability(at_most(std::exp(2.3)), info(Figure::gain), values, none) == Approx(1).epsilon(2e-3));
  CHECK(capability(at_least(std::exp(1.55)), info(Figure::gain), none, again) == Approx(1.5).epsilon(2e-3));
}

TEST_CASE("capability is at most 2, one-sided where one side is open, and may be negative", "[assessment]") {
  std::vector<double> same(100, 5.0), copy = same, none;
  CHECK(capability(at_most(6), info(Figure::gain), copy, none) == 2);
  copy = same;
  CHECK(capability(at_most(4), info(Figure::gain), copy, none) == -2);
  std::vector<double> volts;
  for (int i = 0; i < 1000; ++i) volts.push_back(-0.5 + 0.001 * i);  // voltages by difference: they may be negative
  CHECK(capability(at_most(1.0), info(Figure::collector_emitter_voltage), volts, none) ==
        Approx(1.0 / (3 * 0.2887)).epsilon(2e-2));
}

TEST_CASE("the k-th smallest of n, k the next whole number above n p", "[assessment]") {
  std::vector<double> values;
  for (int i = 20000; i > 0; --i) values.push_back(i);
  CHECK(quantile(values, 99865) == 19973);  // 20,000 x 0.99865 is a whole number
  CHECK(quantile(values, 135) == 27);
  CHECK(quantile(values, 50000) == 10000);
  std::vector<double> few = {3, 1, 2};
  CHECK(quantile(few, 50000) == 2);
  CHECK(quantile(few, 100000) == 3);
}

TEST_CASE("a simulation stops when the interval is narrow enough, looked at every 1,000 units", "[assessment]") {
  SampleDesign s = sample_design(kBandRequirements, R"(, "assess": {"units": 20000, "interval": "2 %"})");
  const Yield y = simulated_yield(s.spec, s.population());
  CHECK(y.units % 1000 == 0);
  CHECK(y.high - y.low < 0.02);
  s.spec.assess.interval = 0;
  s.spec.assess.units = 4500;
  CHECK(simulated_yield(s.spec, s.population()).units == 4500);
}

TEST_CASE("units that are not active are counted, and make the capability 0", "[assessment]") {
  SampleDesign s = sample_design(R"({"gain": {"min": 1}})", kFourCorners);
  s.parts[index(Role::lower_divider)].value = s.parts[index(Role::lower_divider)].working_value = 34.5e3;
  s.nominal =
      analyse({{82e3, 34.5e3, 3.9e3, 62, 1.2e3, 4.7e-6, 1e-6, 100e-6, 2.7e-9}, &s.device, surroundings(s.spec)}, {});
  REQUIRE(s.nominal.point.state == BiasState::active);
  const Assessment a = assess(s.spec, s.population(), s.nominal);
  CHECK(a.yield.not_active > 0);
  CHECK(a.yield.passed + a.yield.not_active == a.yield.units);
  CHECK(a.capability == 0);
  CHECK(a.nominal_met);
  CHECK_FALSE(a.worst_case_met);
  CHECK_FALSE(a.worst_case[index(Figure::gain)].reason.empty());
}

TEST_CASE("a unit passes where it meets everything at every condition", "[assessment]") {
  const SampleDesign one = sample_design(kBandRequirements);
  SampleDesign five = sample_design(kBandRequirements, kFourCorners);
  const Population p = five.population();
  CHECK(one.population().conditions.size() == 3);  // the supply's tolerance alone
  CHECK(p.conditions.size() == 5);
  five.spec.assess.interval = 0;
  five.spec.assess.units = 2000;
  Assessment a = assess(five.spec, p, five.nominal);
  std::size_t most = 0;
  for (const FigureSpread& f : a.spread) most = std::max(most, f.failed);
  CHECK(a.yield.units - a.yield.passed >= most);
}
