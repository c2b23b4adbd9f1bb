// Malformed specs: each with the path that is named and a piece of the message.
#include <algorithm>
#include <bandwright/fault.hpp>
#include <string>
#include <vector>

#include "catch.hpp"
#include "spec_faults.hpp"

using namespace bandwright;

namespace {

// The least spec with another supply.
std::string supply(const std::string& json) {
  std::string text = kLeastSpec;
  return text.replace(text.find("\"12 V\""), 6, json);
}

// The least spec with other requirements.
std::string required(const std::string& members) { return R"({"supply": "12 V", "requirements": {)" + members + "}}"; }
std::string gain(const std::string& json) {
  return required("\"gain\": " + json + R"(, "lower_cutoff": "40 Hz", "upper_cutoff": "20 kHz")");
}
std::string besides(const std::string& members) {
  return required(R"("gain": 50, "lower_cutoff": "40 Hz", "upper_cutoff": "20 kHz", )" + members);
}

std::vector<Malformed> syntax() {
  return {
      {" ", "test.json, line 1, column 2", "unexpected end of input"},
      {"{\n  \"supply\": \"12 V\",\n  \"title\" \"x\"\n}", "test.json, line 3, column 13", "expected ':'"},
      {"{\"supply\": 12,}", "test.json, line 1, column 15", "found \"{\"supply\": 12,}\""},
      {"{\"supply\": 12} x", "test.json, line 1, column 16", "well-formed JSON"},
      {"{\"supply\": nan}", "test.json, line 1, column 13", "well-formed JSON"},
      {"{\"supply\": \"\xFF\"}", "test.json, line 1, column 13", "ill-formed UTF-8"},
      {"{\"supply\": 1e999}", "test.json", "found \"'1e999'\"; expected numbers within the range"},
      {"[]", "test.json", "found \"[]\"; expected a spec: an object"},
      {"12", "test.json", "expected a spec: an object"},
      {with(R"("supply": "9 V")"), "supply", "found \"supply\"; expected each key once"},
      {gain(R"({"target": 50, "target": 60})"), "requirements.gain.target", "expected each key once"},
  };
}

std::vector<Malformed> keys() {
  return {
      {with(R"("suply": 12)"), "suply", "did you mean \"supply\"?"},
      {with(R"("colour": "red")"), "colour", "expected one of the keys title, supply"},
      {with(R"("gain": 50)"), "gain", "expected it inside \"requirements\""},
      {with(R"("allow_high_voltage": true)"), "allow_high_voltage", "as --allow-high-voltage"},
      {with(R"("source": {"resistence": 600})"), "source.resistence", "did you mean \"resistance\"?"},
      {gain(R"({"traget": 50})"), "requirements.gain.traget", "did you mean \"target\"?"},
      {besides(R"("input_resistence": "1k")"), "requirements.input_resistence", "did you mean \"input_resistance\"?"},
      {besides(R"("noise_figure": {"max": "3 dB"})"), "requirements.noise_figure",
       "noise_figure left out: it is not computed by this version"},
      {besides(R"("settling_time": {"max": 3})"), "requirements.settling_time",
       "settling_time left out: it is not computed by this version"},
      {besides(R"("stability_factor": {"max": 8})"), "requirements.stability_factor",
       "stability_factor left out: it is reported, never required"},
      {besides(R"("bandwidth": {"from": "input", "min": 1})"), "requirements.bandwidth.from", "one of the keys target"},
      {with(R"("parts": {"pinned": {"R3": "4k7"}})"), "parts.pinned.R3", "did you mean \"collector\"?"},
  };
}

std::vector<Malformed> types() {
  return {
      {with(R"("source": 600)"), "source", "found \"600\"; expected an object with resistance, capacitance, dc"},
      {R"({"supply": 12, "requirements": [1]})", "requirements", "found \"[1]\"; expected an object with gain"},
      {supply("true"), "supply", "found \"true\"; expected a voltage such as 1.5 V"},
      {supply("null"), "supply", "found \"null\"; expected a voltage"},
      {gain("[50]"), "requirements.gain", "found \"[50]\"; expected a gain such as 50 or 34 dB"},
      {with(R"("devices": "2N3904")"), "devices", "expected a list of names"},
      {with(R"("devices": ["2N3904", 1])"), "devices", "expected a list of names"},
      {with(R"("title": 5)"), "title", "expected text of at most 500 bytes"},
      {with(R"("search": {"candidates": 2.5})"), "search.candidates", "a whole number from 1 to 1000"},
      {with(R"("search": {"candidates": 0})"), "search.candidates", "a whole number from 1 to 1000"},
      {with(R"("search": {"seed": "x"})"), "search.seed", "a whole number from 0 to"},
      {with(R"("parts": {"ranges": {"emitter": "1k"}})"), "parts.ranges.emitter", "two values, [smallest, largest]"},
      {with(R"("parts": {"ranges": {"emitter": [1, 2, 3]}})"), "parts.ranges.emitter", "two values"},
      {with(R"("parts": {"pairs": "no"})"), "parts.pairs", "true or false"},
      {with(R"("parts": {"resistors": {"series": 24}})"), "parts.resistors.series", "E3, E6, E12"},
  };
}

std::vector<Malformed> quantities() {
  return {
      {supply("\"12,5 V\""), "supply", "found \"12,5 V\"; expected a voltage such as 1.5 V (write a decimal point"},
      {supply("\"12 Vpp\""), "supply", "a DC voltage such as 12 V"},
      {supply("\"\""), "supply", "supply: nothing found; expected a voltage"},
      {gain("\"34 x\""), "requirements.gain", "\"x\" after the number is no unit of gain"},
      {gain("\"1 V\""), "requirements.gain", "V is a unit of voltage, not of gain"},
      {gain("0"), "requirements.gain", "a value from 0.001 to 1000000"},
      {gain(R"({"target": 50, "tolerance": "5"})"), "requirements.gain.tolerance", "write 5 %"},
      {gain(R"({"target": 50, "tolerance": 0})"), "requirements.gain.tolerance", "a tolerance from 0.0001 % to 1000 %"},
      {gain(R"({"target": 50, "tolerance": "-120/+5 %"})"), "requirements.gain.tolerance", "under 100 %"},
      {besides(R"("supply_current": {"max": "5 mV"})"), "requirements.supply_current.max", "mV is a unit of voltage"},
      {besides(R"("supply_current": {"max": -0.005})"), "requirements.supply_current.max",
       "a value from 1 pA to 100 A"},
      {besides(R"("collector_emitter_voltage": {"min": "3 Vrms"})"), "requirements.collector_emitter_voltage.min",
       "a DC voltage"},
      {with(R"("load": {"capacitance": "220"})"), "load.capacitance", "the unit is missing"},
      {with(R"("load": {"resistance": 0})"), "load.resistance", "a value from 1 mΩ to 1 TΩ"},
      {with(R"("load": {"resistance": "opn"})"), "load.resistance", "or open"},
      {with(R"("source": {"resistance": "-600"})"), "source.resistance", "a value from 0 Ω to 1 GΩ"},
      {with(R"("ambient": 25)"), "ambient", "25 °C or 298.15 K (the unit is missing)"},
      {with(R"("ambient": "200 °C")"), "ambient", "a value from -55 °C to 125 °C"},
      {with(R"("ambient": {"tolerance": "5 %"})"), "ambient.tolerance", "a difference of temperatures such as 10 K"},
      {with(R"("ambient": {"tolerance": "150 K"})"), "ambient.tolerance", "from -55 °C to 125 °C"},
      {with(R"("parts": {"resistors": {"series": "E25"}})"), "parts.resistors.series", "did you mean \"E24\"?"},
      {with(R"("parts": {"resistors": {"family": ""}})"), "parts.resistors.family", "the key of a family"},
      {with(R"("parts": {"resistors": {"tolerance": "nan"}})"), "parts.resistors.tolerance", "such as 5 %"},
      {with(R"("parts": {"capacitors": {"min": 10}})"), "parts.capacitors.min", "a value from 0.01 pF to 1 F"},
      {with(R"("parts": {"pinned": {"collector": "4k7x"}})"), "parts.pinned.collector", "or absent"},
      {with(R"("parts": {"pinned": {"collector": "absent"}})"), "parts.pinned.collector", "collector is never absent"},
      {with(R"("parts": {"pinned": {"input_coupling": 0}})"), "parts.pinned.input_coupling", "never absent"},
      {with(R"("parts": {"pinned": {"bypass": "-1 uF"}})"), "parts.pinned.bypass", "from 0.01 pF to 1 F, or absent"},
  };
}

std::vector<Malformed> contradictions() {
  return {
      {supply("0"), "supply", "a supply of at least 100 mV"},
      {supply("\"72 V\""), "supply", "--allow-high-voltage lifts this limit"},
      {supply(R"({"nominal": "58 V", "tolerance": "5 %"})"), "supply.nominal", "(here 60.9 V)"},
      {with(R"("load": {"dc": "-50 V"})"), "load.dc", "(here 62 V)"},
      {supply(R"({"nominal": 12, "min": -12})"), "supply.min", "one sign over the whole range"},
      {supply(R"({"nominal": 12, "min": 13, "max": 14})"), "supply.min", "at most the nominal value, 12 V"},
      {supply(R"({"nominal": 12, "min": 11, "max": 10})"), "supply.min", "at most max, 10 V"},
      {supply(R"({"nominal": 12, "max": 11})"), "supply.max", "at least the nominal value, 12 V"},
      {supply(R"({"nominal": 12, "max": 13, "tolerance": "5 %"})"), "supply.tolerance",
       "no tolerance beside min and max"},
      {supply(R"({"min": 11, "max": 13})"), "supply.nominal", "nothing found; expected a supply voltage"},
      {R"({"requirements": {"gain": 50, "lower_cutoff": 40, "upper_cutoff": 20000}})", "supply",
       "nothing found; expected a supply voltage such as 12 V or -12 V"},
      {required(R"("lower_cutoff": 40, "upper_cutoff": 20000)"), "requirements.gain",
       "nothing found; expected a target, min or max"},
      {gain("{}"), "requirements.gain", "a target, min or max: a gain"},
      {gain(R"({"from": "input"})"), "requirements.gain", "a target, min or max"},
      {gain(R"({"min": 60, "max": 40})"), "requirements.gain.min", "less than max, 40"},
      {gain(R"({"min": 50, "max": 50})"), "requirements.gain.min", "less than max, 50"},
      {gain(R"({"target": 50, "min": 60})"), "requirements.gain.target", "a target of at least min, 60"},
      {gain(R"({"target": 50, "max": 40})"), "requirements.gain.target", "a target of at most max, 40"},
      {gain(R"({"tolerance": "1 dB"})"), "requirements.gain.tolerance", "a target beside the tolerance"},
      {gain(R"({"target": 50, "from": "output"})"), "requirements.gain.from", "source or input"},
      {gain(R"({"target": 50, "at": "30 kHz"})"), "requirements.gain.at", "between the two cutoffs, 40 Hz and 20 kHz"},
      {gain(R"({"target": 50, "at": "40 Hz"})"), "requirements.gain.at", "between the two cutoffs, 40 Hz and 20 kHz"},
      {required(R"("gain": 50, "lower_cutoff": "20 kHz", "upper_cutoff": "40 Hz")"), "requirements.lower_cutoff",
       "a lower cutoff under the upper cutoff, 40 Hz"},
      {with(R"("ambient": {"min": "60 °C", "max": "-10 °C"})"), "ambient.min", "at most max, -10 °C"},
      {with(R"("parts": {"resistors": {"min": "1M", "max": "10k"}})"), "parts.resistors.min", "at most max, 10 kΩ"},
      {with(R"("parts": {"ranges": {"emitter": ["1k", "1"]}})"), "parts.ranges.emitter", "the smaller value first"},
      {with(R"("parts": {"pinned": {"emitter": 0, "emitter_bypassed": 0}})"), "parts.pinned", "of one variant"},
      {with(R"("parts": {"pinned": {"bypass": "absent", "emitter_bypassed": "1k"}})"), "parts.pinned",
       "of one variant"},
  };
}

std::vector<Malformed> stock_and_derating() {
  return {
      {with(R"("parts": {"stock": ""})"), "parts.stock", "the name of a stock file"},
      {with(R"("parts": {"stock": 5})"), "parts.stock", "text of at most 500 bytes"},
      {with(R"("parts": {"stock_only": true})"), "parts.stock_only", "beside parts.stock"},
      {with(R"("parts": {"stock_only": "yes"})"), "parts.stock_only", "true or false"},
      {with(R"("parts": {"pairs": 1})"), "parts.pairs", "true or false"},
      {with(R"("parts": {"boards": 0})"), "parts.boards", "a whole number from 1 to 1000000"},
      {with(R"("parts": {"boards": 2.5})"), "parts.boards", "a whole number"},
      {with(R"("parts": {"derating": {"resistor_power": "120 %"}})"), "parts.derating.resistor_power",
       "a value from 5 % to 100 %"},
      {with(R"("parts": {"derating": {"junction_margin": 40}})"), "parts.derating.junction_margin",
       "a difference of temperatures such as 10 K"},
      {with(R"("parts": {"derating": {"resistor": "50 %"}})"), "parts.derating.resistor", "resistor_"},
      {besides(R"("cost": {"max": -1})"), "requirements.cost.max", "a value from"},
  };
}

std::vector<Malformed> not_in_this_version() {
  return {
      {with(R"("topologies": ["common-base"])"), "topologies", "no other topology is available in this version"},
      {with(R"("topologies": [])"), "topologies", "the only topology of this version"},
      {R"({"format": "bandwright/result", "version": 2, "spec": {"supply": 1}})", "version", "version 1"},
      {R"({"format": "bandwright/result", "version": 1})", "spec", "the spec of the result"},
  };
}

}  // namespace

TEST_CASE("malformed specs: syntax") { check_each(syntax()); }
TEST_CASE("malformed specs: keys") { check_each(keys()); }
TEST_CASE("malformed specs: types") { check_each(types()); }
TEST_CASE("malformed specs: quantities") { check_each(quantities()); }
TEST_CASE("malformed specs: contradictions") { check_each(contradictions()); }
TEST_CASE("malformed specs: stock and derating") { check_each(stock_and_derating()); }
TEST_CASE("malformed specs: not in this version") { check_each(not_in_this_version()); }

TEST_CASE("all faults of a file are reported at once") {
  const auto faults = faults_of(R"({
    "suply": "12 V",
    "source": {"resistance": "10 Hz"},
    "requirements": {"gain": {"min": 60, "max": 40}, "lower_cutoff": "x", "noise_figure": 3},
    "parts": {"boards": 0},
    "search": {"candidates": 5000},
    "assess": {"units": 1, "causes": {"collector": "5", "hFE": "off"}}
  })");
  REQUIRE(faults.size() == 11);
  for (const char* where : {"suply", "source.resistance", "requirements.gain.min", "requirements.lower_cutoff",
                            "requirements.upper_cutoff", "requirements.noise_figure", "parts.boards",
                            "search.candidates", "assess.units", "assess.causes.collector", "assess.causes.hFE"}) {
    INFO(where);
    CHECK(std::count_if(faults.begin(), faults.end(), [&](const Fault& f) { return f.where == where; }) == 1);
  }
}
