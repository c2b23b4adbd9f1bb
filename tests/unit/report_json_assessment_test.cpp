// What becomes of many units, in the result document: each field against the structure that it is written from.
#include <bandwright/report.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "sample_assessment.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Json = nlohmann::json;

namespace {

Json first_candidate(const DesignResult& result) { return Json::parse(write_json(result))["candidates"][0]; }

// The sample with everything that can be asked for.
DesignResult full_result() {
  DesignResult result = test::sample_result();
  Candidate& c = result.candidates[0];
  c.assessment = test::sample_assessment_with_pictures(c);
  c.allocation = test::sample_allocation();
  return result;
}

constexpr std::array kRequired = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};

void check_list(const Json& written, const std::vector<double>& list) {
  REQUIRE(written.size() == list.size());
  for (std::size_t i = 0; i < list.size(); ++i) CHECK(written[i].get<double>() == list[i]);
}

}  // namespace

TEST_CASE("the order stands by its word, with its reason") {
  DesignResult result = test::sample_result();
  for (const RankOrder& order : rank_orders()) {
    result.ranked_by = order.by;
    const Json all = Json::parse(write_json(result));
    CHECK(all["ranked_by"] == order.word);
    CHECK(all["order_reason"] == order.reason);
  }
}

TEST_CASE("sensitivities and shares have a column for each cause that the design has") {
  const DesignResult result = full_result();
  const Json one = first_candidate(result);
  for (const char* field : {"sensitivity", "spread_share"}) {
    const Json& row = one[field]["gain"];
    INFO(field);
    for (const char* key : {"R1", "R5", "C3", "current_gain", "early_voltage", "cutoff_current", "load_resistance"})
      CHECK(row.contains(key));
    CHECK(row.contains("stray_output"));  // exact 0 in the spec, but it varies
    for (const char* key : {"C4", "source_resistance", "stray_input", "RL", "hFE"})  // absent, zero, or a symbol
      CHECK_FALSE(row.contains(key));
  }
  CHECK(one["sensitivity"]["gain"]["stray_output"].get<double>() == -1.0 / 3);
  CHECK(one["spread_share"]["upper_cutoff"]["stray_output"].get<double>() == 2 * (1.0 / 3));
  CHECK(one["spread_share"]["upper_cutoff"]["R3"].get<double>() == 1.0 / 3);
}

TEST_CASE("the worst case is written for every figure that has one") {
  const DesignResult result = full_result();
  const Json written = first_candidate(result)["worst_case"];
  REQUIRE(written.size() == 4);
  for (const auto& [key, cell] : written.items()) {
    const WorstCase& worst = result.candidates[0].assessment->worst_case[index(*find_figure(key))];
    CHECK(cell["min"].get<double>() == worst.min);
    CHECK(cell["max"].get<double>() == worst.max);
    CHECK(cell["rss_min"].get<double>() == worst.rss_min);
    CHECK(cell["rss_max"].get<double>() == worst.rss_max);
    CHECK(cell["at_min"] == worst.at_min);
    CHECK(cell["at_max"] == worst.at_max);
  }
}

TEST_CASE("a worst case that does not exist is null, with its reason") {
  DesignResult result = full_result();
  WorstCase& worst = result.candidates[0].assessment->worst_case[index(Figure::output_swing)];
  worst.reason = "a unit at a corner (60 °C, 11.4 V) has no value";
  const Json one = first_candidate(result);
  for (const char* key : {"min", "max", "at_min", "at_max", "rss_min", "rss_max"})
    CHECK(one["worst_case"]["output_swing"][key].is_null());
  CHECK(one["notes"]["worst_case.output_swing"] == worst.reason);
}

TEST_CASE("spread and capability are those of the structure") {
  const DesignResult result = full_result();
  const Json one = first_candidate(result);
  for (const Figure figure : kRequired) {
    const FigureSpread& spread = result.candidates[0].assessment->spread[index(figure)];
    const char* key = info(figure).key;
    CHECK(one["spread"][key]["mean"].get<double>() == spread.mean);
    CHECK(one["spread"][key]["sigma"].get<double>() == spread.sigma);
    CHECK(one["capability"][key].get<double>() == spread.capability);
  }
  CHECK(one["capability"]["smallest"] == 0.81);
  CHECK(one["capability"]["from_moments"] == false);
}

TEST_CASE("the yield counts units and names what fails most") {
  const Json written = first_candidate(full_result())["yield"];
  CHECK(written["passed"] == 19840);
  CHECK(written["units"] == 20000);
  CHECK(written["low"] == 0.99067);
  CHECK(written["high"] == 0.99319);
  CHECK(written["method"] == "clopper-pearson");
  CHECK(written["seed"] == 7);
  CHECK(written["not_active"] == 0);
  CHECK(written["fails_most"] == Json({{"figure", "lower_cutoff"}, {"units", 150}, {"condition", "0 °C, 12.6 V"}}));
  CHECK(written["failed"] == Json({{"gain", 0}, {"lower_cutoff", 150}, {"upper_cutoff", 12}}));
}

TEST_CASE("where every unit passes nothing fails most") {
  DesignResult result = full_result();
  for (FigureSpread& spread : result.candidates[0].assessment->spread) spread.failed = 0;
  const Json one = first_candidate(result);
  CHECK(one["yield"]["fails_most"].is_null());
  CHECK(one["notes"]["yield.fails_most"] == "no unit misses a requirement");
}

TEST_CASE("verdict and place among the others") {
  const Json one = first_candidate(full_result());
  CHECK(one["verdict"] == Json({{"nominal", true}, {"worst_case", false}, {"overall", "pass with notes"}}));
  CHECK(one["non_dominated"] == true);
}

TEST_CASE("each condition stands with its supply, its ambient and the nominal unit's figures") {
  DesignResult result = full_result();
  const Json written = first_candidate(result)["conditions"];
  REQUIRE(written.size() == 5);
  CHECK(written[0]["name"] == "nominal");
  CHECK(written[2]["name"] == "0 °C, 12.6 V");
  CHECK(written[2]["supply"] == 12.6);
  CHECK(written[2]["ambient_degc"].get<double>() == 0);
  CHECK(written[2]["figures"]["lower_cutoff"].get<double>() == 47 + 1.0 / 3);
  CHECK(written[2]["figures"].size() == 3);
  // the supply carries its sign, as in the spec
  result.spec.supply = {-12, -12.6, -11.4};
  CHECK(first_candidate(result)["conditions"][2]["supply"] == -12.6);
}

TEST_CASE("each cause stands with its limits and what they rest on") {
  const DesignResult result = full_result();
  const Population& population = result.candidates[0].assessment->population;
  const Json one = first_candidate(result);
  std::size_t device_causes = 0;
  for (const Json& row : one["causes"]) {
    const CauseInfo& cause = info(*find_cause(row["cause"].get<std::string>()));
    const CauseSpread& spread = population.spread[index(cause.cause)];
    INFO(cause.key);
    CHECK(row["symbol"] == cause.symbol);
    CHECK(row["centre"].get<double>() == spread.centre);
    CHECK(row["low"].get<double>() == spread.low());
    CHECK(row["high"].get<double>() == spread.high());
    CHECK(row["basis"] == spread.basis);
    CHECK((row["distribution"] == "exact") == !spread.varies());
    device_causes += cause.kind == CauseKind::device;
  }
  CHECK(device_causes == 8);
  CHECK(one["causes"][0]["scale"] == "share");
  CHECK(one["causes"][0]["distribution"] == "normal, 3 sigma at the limits, truncated there");
  const Json coefficients = one["temperature_coefficients"];
  REQUIRE(coefficients.size() == result.candidates[0].parts.size());
  CHECK(coefficients[0] == Json({{"part", "R1"}, {"coefficient", 50e-6}, {"distribution", "uniform"}}));
}

TEST_CASE("scales and distributions go by their words") {
  DesignResult result = full_result();
  result.candidates[0].assessment->population.uniform = true;
  for (const Json& row : first_candidate(result)["causes"]) {
    if (row["cause"] == "current_gain") CHECK(row["scale"] == "logarithm");
    if (row["cause"] == "base_emitter_voltage") CHECK(row["scale"] == "volts");
    if (row["cause"] == "current_gain") CHECK(row["distribution"] == "uniform");
  }
}

TEST_CASE("an allocation stands only where one was made") {
  CHECK_FALSE(first_candidate(test::sample_result()).contains("allocation"));
  const DesignResult result = full_result();
  const Allocation& allocation = *result.candidates[0].allocation;
  const Json one = first_candidate(result);
  const Json written = one["allocation"];
  CHECK(written["reached"] == true);
  CHECK(written["yield"]["passed"] == 19900);
  REQUIRE(written["parts"].size() == 5);
  CHECK(written["parts"][1]["designator"] == "R3");
  CHECK(written["parts"][1]["loosest"] == Json({{"family", "metal film resistor"}, {"tolerance", {-0.05, 0.05}}}));
  CHECK(written["parts"][1]["needed"]["tolerance"] == Json({-0.01, 0.01}));
  CHECK(written["parts"][2]["yield_if_looser"].get<double>() == allocation.parts[2].yield_if_looser);
  CHECK(written["parts"][0]["yield_if_looser"].is_null());
  CHECK(one["notes"].contains("allocation.parts.R1.yield_if_looser"));
  REQUIRE(written["steps"].size() == 3);
  CHECK(written["steps"][0]["designator"] == "R4");
  CHECK(written["steps"][0]["yield_after"].get<double>() == allocation.steps[0].yield_after);
  CHECK(written["steps"][2]["to"]["family"] == "polyester film capacitor");
}

TEST_CASE("pictures stand only where they were asked for") {
  const Json plain = first_candidate(test::sample_result());
  for (const char* field : {"response", "histograms", "node_voltages"}) CHECK_FALSE(plain.contains(field));
  const DesignResult result = full_result();
  const Assessment& assessment = *result.candidates[0].assessment;
  const Json one = first_candidate(result);
  check_list(one["response"]["frequency"], assessment.response.frequency);
  check_list(one["response"]["magnitude"], assessment.response.magnitude);
  check_list(one["response"]["phase"], assessment.response.phase);
  check_list(one["response"]["envelope"]["min"], assessment.response.min);
  check_list(one["response"]["envelope"]["low"], assessment.response.low);
  check_list(one["response"]["envelope"]["high"], assessment.response.high);
  check_list(one["response"]["envelope"]["max"], assessment.response.max);
  REQUIRE(one["histograms"].size() == 1);
  check_list(one["histograms"]["gain"]["edges"], assessment.spread[index(Figure::gain)].edges);
  CHECK(one["histograms"]["gain"]["counts"] == Json({9000, 11000}));
  CHECK(one["node_voltages"][0]["node"] == "base");
  CHECK(one["node_voltages"][0]["min"].get<double>() == assessment.node_voltages[0].min);
  CHECK(one["node_voltages"][1]["max"] == 7.9);
}

TEST_CASE("without an assessment its fields are null, and the stage's reason is given") {
  DesignResult result = test::sample_result();
  Candidate& c = result.candidates[0];
  c.assessment.reset();
  c.analysis.point.state = BiasState::saturated;
  c.analysis.figures.fill(kNotComputed);
  const std::string reason = "not active: VCE would be 0.1 V, needs 0.5 V";
  c.notes["gain"] = reason;
  c.notes["collector_current"] = "another note";
  const Json one = first_candidate(result);
  for (const char* field : {"spread_share", "worst_case", "spread", "capability", "yield", "verdict", "conditions",
                            "causes", "temperature_coefficients"}) {
    INFO(field);
    REQUIRE(one.contains(field));
    CHECK(one[field].is_null());
    CHECK(one["notes"][field] == reason);
  }
}
