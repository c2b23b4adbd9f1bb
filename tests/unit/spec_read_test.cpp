// Reading a spec: defaults, conditions, limits of requirements.
#include <algorithm>
#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>
#include <cmath>

#include "catch.hpp"
#include "spec_texts.hpp"

using namespace bandwright;

namespace {

Spec read(const std::string& text) { return read_spec(text, "test.json"); }

// The least spec with members added.
Spec with(const std::string& members) {
  std::string text = kLeastSpec;
  return read(text.insert(text.find('{') + 1, members + ","));
}

// The least spec with another gain requirement.
Requirement gain(const std::string& requirement) {
  std::string text = kLeastSpec;
  text.replace(text.find("\"34 dB\""), 7, requirement);
  return *read(text).requirement(Figure::gain);
}

// A bare supply.
Spec supply(const std::string& json) {
  std::string text = kLeastSpec;
  text.replace(text.find("\"12 V\""), 6, json);
  return read(text);
}

// The limits that the least spec has with a cause said.
std::optional<Tolerance> limits(Cause cause, const std::string& said) {
  return with(std::string(R"("assess": {"causes": {")") + info(cause).key + "\": " + said + "}}")
      .assess.causes[index(cause)];
}

std::optional<double> coefficient(const std::string& said) {
  return with(R"("assess": {"causes": {"temperature_coefficients": )" + said + "}}").assess.temperature_coefficient;
}

constexpr double kRounding = 1e-15;  // one operation in double

}  // namespace

TEST_CASE("a spec that says the least has every default filled in") {
  const Spec spec = read(kLeastSpec);
  CHECK(spec.supply.nominal == 12);
  CHECK(spec.supply.min == 12);
  CHECK(spec.supply.max == 12);
  CHECK_FALSE(spec.pnp());
  CHECK(spec.source.resistance == 0);
  CHECK(spec.load.conductance == 0);
  CHECK(spec.stray.feedback == 0);
  CHECK(spec.ambient.nominal == 298.15);
  CHECK(spec.ambient.min == 298.15);
  CHECK(spec.ambient.max == 298.15);
  CHECK(spec.parts.resistors.series == "E24");
  CHECK(*spec.parts.resistors.tolerance == Tolerance{0.01, 0.01});
  CHECK(*spec.parts.resistors.min == 10);
  CHECK(*spec.parts.resistors.max == 1e6);
  CHECK(spec.parts.capacitors.series.empty());
  CHECK_FALSE(spec.parts.capacitors.tolerance);
  CHECK(spec.devices.empty());
  CHECK(spec.topologies == std::vector<std::string>{"common-emitter"});
  CHECK(spec.candidates == 10);
  CHECK(spec.seed == 1);
  CHECK(spec.assess.units == 20000);
  CHECK(spec.assess.yield == 0.99);
  CHECK(spec.assess.interval == 0.005);
  CHECK_FALSE(spec.assess.uniform);
  for (const auto& limits : spec.assess.causes) CHECK_FALSE(limits);
  CHECK_FALSE(spec.assess.temperature_coefficient);
  CHECK_FALSE(spec.gain_from_input);
  CHECK_FALSE(spec.gain_at);
  CHECK(spec.notes.empty());
}

TEST_CASE("a spec that says everything") {
  const Spec spec = read(kFullSpec);
  CHECK(spec.title == "Hydrophone line amplifier, µ");
  CHECK(spec.supply.min == 11.4);
  CHECK(spec.supply.max == 12.6);
  CHECK(spec.source.resistance == 600);
  CHECK(spec.source.dc == -0.1);
  CHECK(spec.load.conductance == 1 / 9700.0);
  CHECK(spec.load.dc == 1.65);
  CHECK(spec.stray.feedback == 0.3e-12);
  CHECK(spec.ambient.min == 263.15);
  CHECK(spec.gain_from_input);
  CHECK(*spec.gain_at == 1000);
  CHECK(spec.requirement(Figure::output_swing)->lower == 1.5);
  CHECK(std::isnan(spec.requirement(Figure::output_swing)->upper));
  CHECK(spec.parts.resistors.families == std::vector<std::string>{"metal-film"});
  CHECK(spec.parts.capacitors.families == std::vector<std::string>{"ceramic", "film"});
  CHECK(*spec.parts.capacitors.tolerance == Tolerance{0.2, 0.3});
  CHECK(spec.parts.ranges[index(Role::emitter)]->max == 1000);
  CHECK(*spec.parts.pinned[index(Role::collector)] == 4700);
  CHECK(*spec.parts.pinned[index(Role::shunt)] == 0);
  CHECK(*spec.parts.pinned[index(Role::emitter)] == 0);
  CHECK_FALSE(spec.parts.pinned[index(Role::bypass)]);
  CHECK(spec.seed == 9007199254740992u);
  CHECK(spec.assess.units == 5000);
  CHECK(spec.assess.yield == 0.95);
  CHECK(spec.assess.interval == 0);
  CHECK(spec.assess.uniform);
  CHECK(*spec.assess.causes[index(Cause::upper_divider)] == Tolerance{0.02, 0.02});
  CHECK(*spec.assess.causes[index(Cause::bypass)] == Tolerance{0.2, 1.5});
  CHECK(*spec.assess.causes[index(Cause::shunt)] == Tolerance{0, 0});
  CHECK(*spec.assess.causes[index(Cause::current_gain)] == Tolerance{0.5, 1.2});
  CHECK(*spec.assess.causes[index(Cause::base_emitter_voltage)] == Tolerance{0.03, 0.03});
  CHECK(*spec.assess.causes[index(Cause::load_resistance)] == Tolerance{0.1, 0.1});
  CHECK_FALSE(spec.assess.causes[index(Cause::collector)]);
  CHECK(*spec.assess.temperature_coefficient == 100e-6);
  CHECK(spec.notes == std::vector<std::string>{"gain: -34, a minus sign: inverting",
                                               "output_swing.min: 3 Vpp read as 1.5 V peak",
                                               "input_overload.min: 10 mVrms read as 14.14 mV peak"});
}

TEST_CASE("a named family of resistors brings its own series, tolerance and values") {
  const Spec spec = with(R"("parts": {"resistors": {"family": "thick-film"}})");
  CHECK(spec.parts.resistors.series.empty());
  CHECK_FALSE(spec.parts.resistors.tolerance);
  CHECK_FALSE(spec.parts.resistors.min);
}

TEST_CASE("the sign of the supply chooses the polarity, and min stays below max") {
  const Spec pnp = supply(R"({"nominal": "-12 V", "tolerance": "5 %"})");
  CHECK(pnp.pnp());
  CHECK(pnp.supply.min == -12.6);
  CHECK(pnp.supply.max == -11.4);
  CHECK(pnp.highest_supply() == 12.6);
  CHECK(pnp.supply_magnitude() == 12);
}

TEST_CASE("supply and ambient: nominal, tolerance, min and max") {
  const Spec both = supply(R"({"nominal": 3, "min": 2.2, "max": "3.3 V"})");
  CHECK(both.supply.min == 2.2);
  CHECK(both.supply.max == 3.3);
  CHECK(supply(R"({"nominal": 3, "min": 2.2})").supply.max == 3);
  CHECK(supply(R"({"nominal": 10, "tolerance": "-20/+10 %"})").supply.min == 8);
  CHECK(supply(R"({"nominal": 10, "tolerance": "-20/+10 %"})").supply.max == 11);
  CHECK(with(R"("ambient": "263 K")").ambient.nominal == 263);
  CHECK(with(R"("ambient": {"nominal": "20 °C", "tolerance": "10 K"})").ambient.max == Approx(303.15));
}

TEST_CASE("the ambient is 25 °C where that lies inside, else in the middle") {
  CHECK(with(R"("ambient": {"min": "-10 °C", "max": "60 °C"})").ambient.nominal == 298.15);
  CHECK(with(R"("ambient": {"min": "40 °C", "max": "60 °C"})").ambient.nominal == Approx(323.15));
  CHECK(with(R"("ambient": {"max": "60 °C"})").ambient.min == 298.15);
}

TEST_CASE("limits of a requirement follow the target and the tolerance") {
  // The definition of the model: L = target/(1 + t), U = target (1 + t); 1 dB is 10^(1/20) - 1.
  const double decibel = std::pow(10, 0.05);
  CHECK(gain("50").target == 50);
  CHECK(gain("50").lower == Approx(50 / decibel).epsilon(kRounding));
  CHECK(gain("50").upper == Approx(50 * decibel).epsilon(kRounding));
  CHECK(gain(R"({"target": 50, "tolerance": "2 dB"})").upper == Approx(50 * decibel * decibel).epsilon(kRounding));
  CHECK(gain(R"({"target": 50, "tolerance": "10 %"})").lower == Approx(50 / 1.1).epsilon(kRounding));
  CHECK(gain(R"({"target": 50, "tolerance": 0.1})").upper == Approx(55).epsilon(kRounding));
}

TEST_CASE("sides given apart are shares of the target") {
  const Requirement r = gain(R"({"target": 50, "tolerance": "-10/+20 %"})");
  CHECK(r.lower == 45);
  CHECK(r.upper == 60);
  // A tolerance that happens to be the same on both sides is still taken side by side.
  CHECK(gain(R"({"target": 50, "tolerance": "-10/+10 %"})").lower == 45);
}

TEST_CASE("an explicit limit is the limit of its side; without a tolerance the other side is open") {
  const Requirement open = gain(R"({"target": 50, "min": 40})");
  CHECK(open.lower == 40);
  CHECK(std::isnan(open.upper));
  const Requirement mixed = gain(R"({"target": 50, "min": 40, "tolerance": "10 %"})");
  CHECK(mixed.lower == 40);
  CHECK(mixed.upper == Approx(55).epsilon(kRounding));
  const Requirement limits = gain(R"({"min": 40, "max": 60})");
  CHECK(std::isnan(limits.target));
  CHECK(limits.lower == 40);
  CHECK(limits.upper == 60);
  CHECK(std::isnan(gain(R"({"max": 60})").lower));
  CHECK(gain(R"({"target": 50, "min": 50})").lower == 50);
}

TEST_CASE("to check parts no requirement is needed") {
  const Spec spec = read_spec(R"({"supply": 9})", "test.json", {}, SpecUse::check);
  for (const auto& requirement : spec.requirements) CHECK_FALSE(requirement);
  CHECK(read_spec(R"({"supply": 9, "requirements": {"gain": {"from": "input"}}})", "", {}, SpecUse::check)
            .gain_from_input);
  CHECK_THROWS_AS(read_spec("{}", "test.json", {}, SpecUse::check), InputError);
}

TEST_CASE("keys that later versions will read are accepted at their default") {
  CHECK(with(R"("parts": {"stock_only": false, "pairs": false, "boards": 1})").seed == 1);
}

TEST_CASE("the ends of what assess takes are taken") {
  CHECK(with(R"("assess": {"units": 100})").assess.units == 100);
  CHECK(with(R"("assess": {"units": "1000000"})").assess.units == 1000000);
  CHECK(with(R"("assess": {"yield": "100 %"})").assess.yield == 1);
  CHECK(with(R"("assess": {"interval": 1})").assess.interval == 1);
  CHECK_FALSE(with(R"("assess": {"distribution": "normal"})").assess.uniform);
  CHECK(with(R"("assess": {"causes": {}})").assess.units == 20000);
}

TEST_CASE("every cause is switched off and limited by its key, and touches no other") {
  for (const CauseInfo& row : causes()) {
    INFO(row.key);
    const bool volts = row.scale == CauseScale::volts;
    const Spec spec = with(std::string(R"("assess": {"causes": {")") + row.key + R"(": "off"}})");
    CHECK(*spec.assess.causes[index(row.cause)] == Tolerance{0, 0});
    CHECK(std::count(spec.assess.causes.begin(), spec.assess.causes.end(), std::nullopt) == kCauseCount - 1);
    CHECK(*limits(row.cause, volts ? "\"40 mV\"" : "\"4 %\"") == Tolerance{0.04, 0.04});
  }
}

TEST_CASE("limits of a cause: shares about the value, volts for the base-emitter voltage") {
  CHECK(*limits(Cause::collector, "\"±10 %\"") == Tolerance{0.1, 0.1});
  CHECK(*limits(Cause::collector, "\"-0/+50 %\"") == Tolerance{0, 0.5});
  CHECK(*limits(Cause::collector, "0.1") == Tolerance{0.1, 0.1});
  CHECK(*limits(Cause::cutoff_current, "\"-99/+900 %\"") == Tolerance{0.99, 9});
  CHECK(*limits(Cause::base_emitter_voltage, "\"200 mV\"") == Tolerance{0.2, 0.2});
  CHECK(*limits(Cause::base_emitter_voltage, "0.025") == Tolerance{0.025, 0.025});
}

TEST_CASE("temperature coefficients: a share for each kelvin, or off") {
  CHECK(*coefficient("\"50 ppm/K\"") == 50e-6);
  CHECK(*coefficient("\"±50 ppm/K\"") == 50e-6);
  CHECK(*coefficient("\"0.5 %/K\"") == 0.005);
  CHECK(*coefficient("\"10000 ppm/K\"") == 0.01);
  CHECK(*coefficient("0.0001") == 0.0001);
  CHECK(*coefficient("\"off\"") == 0);
  CHECK(*coefficient("0") == 0);
}

TEST_CASE("a result document is read for its spec") {
  const std::string result =
      R"({"format": "bandwright/result", "version": 1, "candidates": [], "spec": )" + kLeastSpec + "}";
  CHECK(read(result).requirement(Figure::lower_cutoff)->target == 40);
  try {
    read(R"({"format": "bandwright/result", "version": 1, "spec": {"supply": "x"}})");
    FAIL("no fault found");
  } catch (const InputError& error) {
    CHECK(error.faults().front().where == "spec.supply");
  }
}

TEST_CASE("a high supply is refused unless it is allowed") {
  std::string text = kLeastSpec;
  text.replace(text.find("12 V"), 4, "72 V");
  CHECK_THROWS_AS(read(text), InputError);
  const Spec spec = read_spec(text, "test.json", {}, SpecUse::design, true);
  CHECK(spec.supply.nominal == 72);
  CHECK(spec.allow_high_voltage);
}
