// The result document against the contract of its format: every key is there, every null has its reason, numbers keep
// all their digits.
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "sample_assessment.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Json = nlohmann::json;

namespace {

Json document(const DesignResult& result) { return Json::parse(write_json(result)); }

Json first_candidate(const DesignResult& result) { return document(result)["candidates"][0]; }

void check_keys(const Json& object, const std::vector<std::string>& keys) {
  for (const std::string& key : keys) {
    INFO(key);
    CHECK(object.contains(key));
  }
}

// Every null below `value` with its path.
void collect_nulls(const Json& value, const std::string& path, std::vector<std::string>& nulls) {
  if (value.is_null()) nulls.push_back(path);
  if (value.is_object())
    for (const auto& [key, cell] : value.items()) collect_nulls(cell, path + "/" + key, nulls);
  if (value.is_array())
    for (std::size_t i = 0; i < value.size(); ++i) collect_nulls(value[i], path + "/" + std::to_string(i), nulls);
}

// Fields that do not apply to a part are null without a reason, as the format shows.
bool needs_no_reason(const std::string& path) {
  for (const char* key : {"/polarity", "/in_stock", "/temperature_coefficient"})
    if (path.ends_with(key)) return true;
  return path.starts_with("/parts/") && path.ends_with("/power_rating");
}

// A note stands under the figure's name, or under the path of what holds it.
bool has_reason(const Json& notes, const std::string& path) {
  std::string rest = path.substr(1);
  std::replace(rest.begin(), rest.end(), '/', '.');
  for (const auto& [key, text] : notes.items())
    if (!text.get<std::string>().empty() && (rest == key || rest == "figures." + key || rest.starts_with(key + ".")))
      return true;
  return false;
}

// What a place in a list is called in a note: the part's designator, nothing in other lists.
std::string list_place(const std::string& path) {
  for (const auto& [beginning, designator] : {std::pair{"/parts/0", "/R1/"},
                                              {"/parts/6", "/C2/"},
                                              {"/allocation/parts/0", "/R1/"},
                                              {"/allocation/parts/4", "/C3/"}})
    if (path.starts_with(beginning)) return designator;
  return "/";
}

// An assessment in which something is missing everywhere.
void lose_values(Assessment& assessment) {
  assessment.share[index(Figure::gain)].fill(kNotComputed);
  assessment.worst_case[index(Figure::gain)] = {};
  assessment.worst_case[index(Figure::output_swing)].reason = "not active at a corner";
  assessment.spread[index(Figure::gain)] = {};
  for (FigureSpread& spread : assessment.spread) spread.failed = 0;
  assessment.yield.low = kNotComputed;
  assessment.capability = kNotComputed;
  assessment.at_condition[3][index(Figure::upper_cutoff)] = kNotComputed;
  assessment.response = {{10}, {kNotComputed}, {0}, {kNotComputed}, {1}, {2}, {3}};
  assessment.node_voltages = {{"base", 1.7, kNotComputed, 2}};
}

}  // namespace

TEST_CASE("a result document holds every field of its format") {
  const Json all = document(test::sample_result());
  CHECK(all["format"] == "bandwright/result");
  CHECK(all["version"] == 1);
  CHECK(all["program"] == version());
  check_keys(all, {"spec", "met", "definitions", "assumptions", "from_memory", "cautions", "candidates"});
  CHECK(all["met"] == true);
  CHECK(all["spec"]["requirements"]["gain"]["target"] == 50);
  REQUIRE(all["cautions"].size() == cautions().size());
  check_keys(all["cautions"][0], {"code", "text"});
  REQUIRE(all["candidates"].size() == 2);
}

TEST_CASE("a candidate holds every field of its format") {
  const Json one = first_candidate(test::sample_result());
  check_keys(one, {"rank",        "best_at",
                   "topology",    "variant",
                   "device",      "device_parameters",
                   "parts",       "figures",
                   "pole_model",  "poles",
                   "zeros",       "notes",
                   "error",       "tolerance_sensitivity",
                   "margins",     "shortfalls",
                   "sensitivity", "worst_case",
                   "spread",      "capability",
                   "yield",       "verdict"});
  check_keys(one["device_parameters"],
             {"current_gain", "current_gain_at_zero_vce", "current_gain_limits_at_zero_vce", "log_saturation_current",
              "early_voltage", "base_spreading_resistance", "base_transit_time", "emitter_depletion_capacitance",
              "feedback_capacitance_at_zero_bias", "collector_built_in_potential", "collector_grading_exponent",
              "saturation_current_temperature_exponent", "current_gain_temperature_exponent", "bandgap_voltage",
              "collector_cutoff_current", "saturation_voltage", "thermal_resistance"});
  check_keys(one["parts"][0],
             {"designator", "role", "kind", "value", "value_code", "series", "tolerance", "family", "power_rating",
              "voltage_rating", "polarity", "nodes", "part_number", "temperature_coefficient", "unit_cost",
              "cost_invented", "from_stock", "in_stock", "note"});
  check_keys(one["transistor"], {"designator", "kind", "type", "family", "power_rating", "voltage_rating",
                                 "part_number", "unit_cost", "cost_invented", "from_stock", "in_stock", "note"});
  check_keys(one["figures"], {"gain",
                              "lower_cutoff",
                              "upper_cutoff",
                              "bandwidth",
                              "input_resistance",
                              "output_resistance",
                              "output_swing",
                              "input_overload",
                              "supply_current",
                              "collector_current",
                              "collector_emitter_voltage",
                              "dissipation",
                              "input_noise_density",
                              "output_noise",
                              "noise_figure",
                              "second_harmonic",
                              "third_harmonic",
                              "settling_time",
                              "supply_rejection",
                              "cost",
                              "base_voltage",
                              "emitter_voltage",
                              "collector_voltage",
                              "junction_temperature_degc"});
}

TEST_CASE("values stand under their names in SI") {
  const Json one = first_candidate(test::sample_result());
  CHECK(one["parts"][6]["designator"] == "C2");
  CHECK(one["parts"][6]["role"] == "output_coupling");
  CHECK(one["parts"][6]["kind"] == "capacitor");
  CHECK(one["parts"][6]["tolerance"] == Json({-0.2, 0.5}));
  CHECK(one["parts"][6]["polarity"] == "+ to collector");
  CHECK(one["parts"][0]["nodes"] == Json({"supply", "base"}));
  CHECK(one["parts"][0]["unit_cost"] == 0.02);
  CHECK(one["parts"][0]["cost_invented"] == true);
  CHECK(one["parts"][0]["in_stock"].is_null());
  CHECK(one["transistor"]["type"] == "BC547B");
  CHECK(one["transistor"]["unit_cost"] == 0.08);
  CHECK(one["figures"]["junction_temperature_degc"].get<double>() == Approx(300 - 273.15));
  CHECK(one["poles"][1]["real"] == -20e3);
  CHECK(one["poles"][1]["imaginary"] == 1e3);
  CHECK(one["margins"]["gain"] == 0.9);
  CHECK(one["sensitivity"]["gain"]["R1"].get<double>() == Approx(-1.0 / 3));
  CHECK(one["sensitivity"]["gain"].contains("current_gain"));
  CHECK_FALSE(one["sensitivity"]["gain"].contains("C4"));
  // beta = beta0 (1 + VCE/VA) with the sample's 290, 5.9 V and 74 V
  CHECK(one["device_parameters"]["current_gain"].get<double>() == Approx(290 * (1 + 5.9 / 74)));
  CHECK(one["device_parameters"]["early_voltage"].get<double>() == Approx(74));
}

TEST_CASE("numbers read back as the same doubles") {
  const DesignResult result = test::sample_result();
  const Json one = first_candidate(result);
  CHECK(one["error"].get<double>() == 0.1 + 0.2);
  for (const FigureInfo& figure : figures()) {
    const double value = result.candidates[0].analysis.figures[index(figure.figure)];
    if (std::isfinite(value) && figure.dimension != Dimension::temperature)
      CHECK(one["figures"][figure.key].get<double>() == value);
  }
}

TEST_CASE("every null has its reason in the notes") {
  DesignResult result = test::sample_result();
  Candidate& c = result.candidates[0];
  c.analysis.figures[index(Figure::upper_cutoff)] = kNotComputed;
  c.notes["upper_cutoff"] = "no crossing";
  c.margins[index(Figure::upper_cutoff)] = kNotComputed;
  c.tolerance_sensitivity = kNotComputed;
  c.parameters.inverse_early_voltage = 0;
  c.parts[0].series = "";
  c.parts[0].unit_cost = c.transistor.unit_cost = kNotComputed;
  c.parts[6].voltage_rating = kNotComputed;
  c.poles_estimate.upper_cutoff = std::numeric_limits<double>::infinity();
  c.poles_estimate.low[0].resistance = std::numeric_limits<double>::infinity();
  c.sensitivity[index(Figure::gain)][0] = kNotComputed;
  c.allocation = test::sample_allocation();
  lose_values(*c.assessment);
  const Json one = first_candidate(result);
  std::vector<std::string> nulls;
  collect_nulls(one, "", nulls);
  CHECK(nulls.size() > 35);
  for (const std::string& path : nulls) {
    if (needs_no_reason(path)) continue;
    // a list's reason stands under the list's name
    std::string named = path;
    for (const char* digit : {"/0/", "/3/", "/4/", "/6/"})
      if (const auto at = named.find(digit); at != std::string::npos) named.replace(at, 3, list_place(named));
    INFO(path);
    CHECK(has_reason(one["notes"], named));
  }
  CHECK(one["notes"]["upper_cutoff"] == "no crossing");
  CHECK(one["notes"]["device_parameters.early_voltage"] == "infinite");
}

TEST_CASE("figures of later versions are null, and said to be") {
  const Json one = first_candidate(test::sample_result());
  CHECK(one["figures"]["noise_figure"].is_null());
  CHECK(one["notes"]["noise_figure"] == "not computed by this version");
}

TEST_CASE("a stage without an operating point still makes a valid document") {
  DesignResult result = test::sample_result();
  Candidate& c = result.candidates[0];
  c.analysis = {};
  c.analysis.figures.fill(kNotComputed);
  c.analysis.point.gain_at_zero_vce = kNotComputed;
  c.margins.fill(kNotComputed);
  c.gain_limits = {kNotComputed, kNotComputed};
  c.poles_estimate = {};
  c.poles = {{{kNotComputed, kNotComputed}}, {}};
  c.error = std::numeric_limits<double>::infinity();
  const std::string text = write_json(result);
  const Json one = Json::parse(text)["candidates"][0];
  CHECK(one["figures"]["gain"].is_null());
  CHECK(one["poles"].empty());
  CHECK(one["error"].is_null());
  CHECK(text.find(" nan") == std::string::npos);
  CHECK(text.find("inf,") == std::string::npos);
}

TEST_CASE("an interrupted search is marked in the document") {
  DesignResult result = test::sample_result();
  CHECK(document(result)["interrupted"] == false);
  result.interrupted = true;
  CHECK(document(result)["interrupted"] == true);
}

TEST_CASE("a title that is not UTF-8 does not break the document") {
  DesignResult result = test::sample_result();
  result.definitions = {"broken \xff text"};
  CHECK_NOTHROW(document(result));
}
