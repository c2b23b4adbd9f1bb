// A written spec is a spec again, and the same one.
#include <bandwright/spec.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "spec/shown_value.hpp"
#include "spec/spec_json.hpp"
#include "spec_texts.hpp"
#include "units/constants.hpp"

using namespace bandwright;

namespace {

// Equal to the last bit; absent limits are NaN on both sides.
bool same(double a, double b) { return a == b || (std::isnan(a) && std::isnan(b)); }
bool same(const Condition& a, const Condition& b) {
  return same(a.nominal, b.nominal) && same(a.min, b.min) && same(a.max, b.max);
}
bool same(const Source& a, const Source& b) {
  return same(a.resistance, b.resistance) && same(a.capacitance, b.capacitance) && same(a.dc, b.dc);
}
bool same(const Load& a, const Load& b) {
  return same(a.conductance, b.conductance) && same(a.capacitance, b.capacitance) && same(a.dc, b.dc);
}
bool same(const Stray& a, const Stray& b) {
  return same(a.input, b.input) && same(a.output, b.output) && same(a.feedback, b.feedback);
}
bool same(const Requirement& a, const Requirement& b) {
  return same(a.target, b.target) && same(a.lower, b.lower) && same(a.upper, b.upper);
}
bool same(const ValueRange& a, const ValueRange& b) { return same(a.min, b.min) && same(a.max, b.max); }
template <class T>
bool same(const std::optional<T>& a, const std::optional<T>& b) {
  return a.has_value() == b.has_value() && (!a || same(*a, *b));
}
bool same(const PartRules& a, const PartRules& b) {
  return a.families == b.families && a.series == b.series && a.tolerance == b.tolerance && same(a.min, b.min) &&
         same(a.max, b.max);
}

void check_same(const Spec& a, const Spec& b) {
  CHECK(a.title == b.title);
  CHECK(same(a.supply, b.supply));
  CHECK(same(a.source, b.source));
  CHECK(same(a.load, b.load));
  CHECK(same(a.stray, b.stray));
  CHECK(same(a.ambient, b.ambient));
  for (std::size_t i = 0; i < kFigureCount; ++i) CHECK(same(a.requirements[i], b.requirements[i]));
  CHECK(a.gain_from_input == b.gain_from_input);
  CHECK(a.gain_at == b.gain_at);
  CHECK(same(a.parts.resistors, b.parts.resistors));
  CHECK(same(a.parts.capacitors, b.parts.capacitors));
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    CHECK(same(a.parts.ranges[i], b.parts.ranges[i]));
    CHECK(same(a.parts.pinned[i], b.parts.pinned[i]));
  }
  CHECK(a.devices == b.devices);
  CHECK(a.topologies == b.topologies);
  CHECK(a.candidates == b.candidates);
  CHECK(a.seed == b.seed);
  CHECK(a.assess.units == b.assess.units);
  CHECK(a.assess.yield == b.assess.yield);
  CHECK(a.assess.interval == b.assess.interval);
  CHECK(a.assess.uniform == b.assess.uniform);
  CHECK(a.assess.causes == b.assess.causes);
  CHECK(a.assess.temperature_coefficient == b.assess.temperature_coefficient);
}

void check_round_trip(const std::string& text, SpecUse use = SpecUse::design) {
  const Spec spec = read_spec(text, "test.json", {}, use);
  const std::string written = write_spec(spec);
  INFO(written);
  const Spec again = read_spec(written, "written", {}, use);
  check_same(spec, again);
  CHECK(write_spec(again) == written);
}

// Numbers with all their digits, from a fixed sequence (Park and Miller's minimal generator, 1988; from memory).
double scattered(std::uint64_t& state, double low, double high) {
  state = state * 48271 % 2147483647;
  return low * std::pow(high / low, static_cast<double>(state) / 2147483647.0);
}

}  // namespace

TEST_CASE("a written spec reads back as the same spec") {
  check_round_trip(kLeastSpec);
  check_round_trip(kFullSpec);
  check_round_trip(R"({"supply": {"nominal": "-9.1 V", "tolerance": "-7/+13 %"}})", SpecUse::check);
  check_round_trip(R"({"supply": 5, "requirements": {"gain": {"at": "3 kHz"}}, "devices": []})", SpecUse::check);
  check_round_trip(R"({"supply": 5, "parts": {"resistors": {"family": "thick-film", "max": "4R7"}}})", SpecUse::check);
  check_round_trip(R"({"supply": 5, "parts": {"resistors": {"max": "4R7"}}})", SpecUse::check);
}

TEST_CASE("numbers with all their digits survive") {
  std::uint64_t state = 1;
  for (int i = 0; i < 300; ++i) {
    Spec spec = read_spec(kLeastSpec, "test.json");
    spec.load.conductance = 1 / scattered(state, 1, 1e6);
    spec.source.resistance = scattered(state, 1e-3, 1e6);
    spec.stray.input = scattered(state, 1e-15, 1e-9);
    spec.ambient.nominal = scattered(state, 219, 397);
    spec.ambient.min = spec.ambient.nominal;
    spec.ambient.max = spec.ambient.nominal;
    spec.parts.capacitors.tolerance = Tolerance{scattered(state, 1e-3, 0.9), scattered(state, 1e-3, 0.9)};
    spec.gain_at = scattered(state, 41, 19999);
    spec.assess.yield = scattered(state, 1e-3, 0.999);
    spec.assess.interval = scattered(state, 1e-3, 0.999);
    for (const CauseInfo& row : causes()) {
      const double v = scattered(state, 1e-5, 0.1);
      // From 1 upwards a percentage has fewer bits behind the point than the share.
      const Tolerance apart = {scattered(state, 1e-3, 0.99), scattered(state, 1e-3, 9.9)};
      spec.assess.causes[index(row.cause)] = row.scale == CauseScale::volts ? Tolerance{v, v} : apart;
    }
    spec.assess.temperature_coefficient = scattered(state, 1e-7, 0.01);
    check_same(spec, read_spec(write_spec(spec), "written"));
  }
}

TEST_CASE("the written form: SI numbers, temperatures as strings, limits resolved") {
  const auto json = spec_json(read_spec(kLeastSpec, "test.json"));
  CHECK(json["supply"]["nominal"] == 12);
  CHECK(json["ambient"]["min"] == "25 °C");
  CHECK(json["load"]["resistance"] == "open");
  CHECK(json["requirements"]["lower_cutoff"]["target"] == 40);
  CHECK(json["requirements"]["lower_cutoff"]["min"] == 40 / 1.2);
  CHECK(json["requirements"]["lower_cutoff"]["max"] == 48);
  CHECK(json["requirements"]["gain"]["from"] == "source");
  CHECK(json["parts"]["resistors"]["series"] == "E24");
  CHECK(json["search"]["candidates"] == 10);
  CHECK(json["assess"].dump() == R"({"units":20000,"yield":0.99,"interval":0.005,"distribution":"normal"})");
  CHECK(json["parts"]["boards"] == 1);
  CHECK(json["parts"]["derating"]["junction_margin"] == "40 K");
  CHECK(json["parts"]["derating"]["electrolytic_voltage"] == 0.8);
  CHECK_FALSE(json.contains("devices"));
  CHECK(json.begin().key() == "supply");  // the order of the format
}

TEST_CASE("causes are written where they were given: shares, volts and 1/K, or off") {
  const auto json = spec_json(read_spec(kFullSpec, "test.json"));
  CHECK(json["assess"].dump() ==
        R"({"units":5000,"yield":0.95,"interval":0.0,"distribution":"uniform","causes":{"upper_divider":0.02,)"
        R"("bypass":"-20/+150 %","shunt":"off","current_gain":"-50/+120 %","base_emitter_voltage":0.03,)"
        R"("load_resistance":0.1,"temperature_coefficients":0.0001}})");
  const auto off = spec_json(read_spec(
      R"({"supply": 5, "assess": {"causes": {"base_emitter_voltage": "off", "temperature_coefficients": "off"}}})", "",
      {}, SpecUse::check));
  CHECK(off["assess"]["causes"].dump() == R"({"base_emitter_voltage":"off","temperature_coefficients":"off"})");
}

TEST_CASE("an open side is left out") {
  const auto json = spec_json(read_spec(kFullSpec, "test.json"));
  CHECK_FALSE(json["requirements"]["lower_cutoff"].contains("min"));
  CHECK_FALSE(json["requirements"]["supply_current"].contains("target"));
  CHECK(json["parts"]["pinned"]["shunt"] == "absent");
  CHECK(json["parts"]["capacitors"]["tolerance"] == "-20/+30 %");
}

TEST_CASE("temperatures are written short where that is exact") {
  CHECK(shown_temperature(298.15) == "25 °C");
  CHECK(shown_temperature(20.3 + kZeroCelsius) == "20.3 °C");
  CHECK(shown_temperature(-10 + kZeroCelsius) == "-10 °C");
  CHECK(shown_temperature(kZeroCelsius) == "0 °C");
}
