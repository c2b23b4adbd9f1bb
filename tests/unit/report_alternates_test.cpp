// What may stand in for the parts, on the sheet and in the document. All of it is invented.
#include <bandwright/report.hpp>
#include <limits>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Json = nlohmann::json;

namespace {

constexpr TableStyle kWide{false, 200};  // nothing is wrapped

Outcome outcome(double gain, double capability) {
  Outcome o;
  o.figures = test::sample_candidate().analysis.figures;
  o.figures[index(Figure::gain)] *= gain;
  o.error = 0.4;
  o.capability = capability;
  o.yield = 0.996;
  o.verdict = "pass";
  o.active = o.rated = o.holds = true;
  return o;
}

Outcome failed(const char* reason) {
  Outcome o = outcome(0.5, -0.25);
  o.holds = false;
  o.reason = reason;
  return o;
}

OfferedValue value(double printed) {
  OfferedValue o;
  o.value = printed;
  o.family = built_in_catalogue().find_family("metal-film");
  return o;
}

std::vector<Package> leads(const char* lead_order) {
  Package p;
  p.name = "TO-92";
  p.lead_order = lead_order;
  return {p};
}

Alternates sample_alternates() {
  Alternates a;
  a.if_unavailable = {{Role::collector, false, value(4300), outcome(0.92, 1.1)},
                      {Role::collector, true, value(5100), failed("gain: 60, at most 56.1")},
                      {Role::emitter, false, value(62), failed("not active: VCE would be 0.1 V")}};
  a.if_unavailable[0].outcome.other_parts = "C2: 100 V in place of 63 V";
  a.if_unavailable[1].outcome.shortfalls = {{Figure::gain, 60, 56.1, "gain: 60, at most 56.1"}};
  a.if_unavailable[2].outcome.active = false;
  a.if_unavailable[2].outcome.figures.fill(kNotComputed);
  a.if_unavailable[2].outcome.capability = kNotComputed;
  a.substitutes = {{"BC550C", true, outcome(1.01, 0.9), leads("1 C, 2 B, 3 E"), ""},
                   {"2N3904", false, outcome(0.97, 0.7), leads("E-B-C (1-2-3)"), "TO-92: E-B-C"},
                   {"2N4401", false, outcome(0.96, 0.6), leads("E-B-C"), "TO-92: E-B-C"}};
  a.gain_needed = {185.2, 720.4, 1.03e-3, 5.9, {"BC547B", "BC550C"}};
  return a;
}

DesignResult sample() {
  DesignResult result = test::sample_result();
  result.candidates[0].offered[index(Role::collector)] = value(4700);
  result.candidates[0].offered[index(Role::emitter)] = value(68);
  result.candidates[0].alternates = sample_alternates();
  return result;
}

/// Runs of spaces as one.
std::string squeezed(const std::string& text) {
  std::string out;
  for (const char c : text)
    if (c != ' ' || !out.ends_with(' ')) out += c;
  return out;
}

std::string sheet_of(const DesignResult& result) { return squeezed(write_table(result, kWide)); }

Json first(const DesignResult& result) { return Json::parse(write_json(result))["candidates"][0]; }

}  // namespace

TEST_CASE("next values stand with the change of each required figure and a word on the spec") {
  const std::string text = sheet_of(sample());
  CHECK_THAT(text, ContainsSubstring("\nIf a value is unavailable\n"));
  CHECK_THAT(text, ContainsSubstring("part in place instead A % fL % fH % capability still holds\n"));
  CHECK_THAT(text, ContainsSubstring("\n R3 4.7 kΩ 4.3 kΩ -8.0 0 0 1.10 yes\n"));
  CHECK_THAT(text, ContainsSubstring("\n R3 4.7 kΩ 5.1 kΩ -50.0 0 0 -0.25 no: A\n"));
  CHECK_THAT(text, ContainsSubstring("\n R4 68 Ω 62 Ω - - - - no: not active\n"));
  CHECK_THAT(text, ContainsSubstring("\n - with R3 4.3 kΩ: C2: 100 V in place of 63 V\n"));
}

TEST_CASE("the word on the spec names what misses") {
  DesignResult result = sample();
  Outcome& one = result.candidates[0].alternates->if_unavailable[1].outcome;
  one.shortfalls.clear();
  CHECK_THAT(sheet_of(result), ContainsSubstring("no: yield 99.6 %"));
  one.rated = false;
  CHECK_THAT(sheet_of(result), ContainsSubstring("no: rating"));
  one.available = false;
  CHECK_THAT(sheet_of(result), ContainsSubstring("no: stock"));
  one = outcome(1, 0.8);
  one.verdict = "pass with notes";
  CHECK_THAT(sheet_of(result), ContainsSubstring("yes, with notes"));
}

TEST_CASE("transistors stand with their changes, their leads and the hFE that is needed") {
  const std::string text = sheet_of(sample());
  CHECK_THAT(text, ContainsSubstring("\nTransistors that may stand in\n"));
  CHECK_THAT(text, ContainsSubstring("type A % fL % fH % ICC % capability still holds leads\n"));
  CHECK_THAT(text, ContainsSubstring("\n BC550C +1.0 0 0 0 0.90 yes TO-92 C-B-E\n"));
  CHECK_THAT(text, ContainsSubstring("\n - 2N3904, 2N4401: leads: TO-92: E-B-C\n"));
  CHECK_THAT(text, ContainsSubstring("\n - 2N3904, 2N4401: not named by the spec\n"));
  CHECK_THAT(text, ContainsSubstring("hFE needed: 185 to 720 at 1.03 mA and 5.9 V") &&
                       ContainsSubstring("inside lie BC547B, BC550C."));
}

TEST_CASE("an hFE without an end, and one that is not there, are told") {
  DesignResult result = sample();
  GainNeeded& needed = result.candidates[0].alternates->gain_needed;
  needed.max = std::numeric_limits<double>::infinity();
  CHECK_THAT(sheet_of(result), ContainsSubstring("hFE needed: at least 185 at"));
  CHECK(first(result)["current_gain_needed"]["max"].is_null());
  CHECK(first(result)["notes"]["current_gain_needed.max"] == "no upper bound");
  needed.min = needed.max = kNotComputed;
  CHECK_THAT(sheet_of(result), ContainsSubstring("the nominal unit misses a requirement"));
  CHECK(first(result)["current_gain_needed"]["min"].is_null());
}

TEST_CASE("nothing that may stand in is told in words") {
  DesignResult result = sample();
  result.candidates[0].alternates = Alternates{};
  const std::string text = sheet_of(result);
  CHECK_THAT(text, ContainsSubstring("The spec fixes every value, or offers no other."));
  CHECK_THAT(text, ContainsSubstring("no other transistor of the catalogue holds the spec"));
}

TEST_CASE("the sheet keeps its width on a narrow page") {
  for (const int width : {60, 80, 100}) {
    const std::string text = write_table(sample(), {false, width});
    const std::size_t at = text.find("If a value is unavailable");
    REQUIRE(at != std::string::npos);
    CHECK_THAT(text.substr(at), ContainsSubstring("no: A") && ContainsSubstring("BC550C"));
  }
}

TEST_CASE("the document holds each next value with its outcome") {
  const Json one = first(sample())["if_unavailable"];
  REQUIRE(one.size() == 3);
  CHECK(one[0]["designator"] == "R3");
  CHECK(one[0]["role"] == "collector");
  CHECK(one[0]["direction"] == "down");
  CHECK(one[1]["direction"] == "up");
  CHECK(one[1]["value"] == 5100);
  CHECK(one[1]["value_code"] == "5K1");
  CHECK(one[0]["figures"]["gain"] == outcome(0.92, 0).figures[index(Figure::gain)]);
  CHECK(one[0]["figures"]["supply_current"] == 1.25e-3);
  CHECK(one[0]["capability"] == 1.1);
  CHECK(one[0]["from_moments"] == false);
  CHECK(one[0]["yield"] == 0.996);
  CHECK(one[0]["verdict"] == "pass");
  CHECK(one[0]["holds"] == true);
  CHECK(one[0]["reason"].is_null());
  CHECK(one[0]["other_parts"] == "C2: 100 V in place of 63 V");
  CHECK(one[1]["holds"] == false);
  CHECK(one[1]["reason"] == "gain: 60, at most 56.1");
  CHECK(one[2]["figures"]["gain"].is_null());
}

TEST_CASE("the document holds each substitute with the change that it brings") {
  const Json candidate = first(sample());
  const Json& one = candidate["substitutes"];
  REQUIRE(one.size() == 3);
  CHECK(one[0]["device"] == "BC550C");
  CHECK(one[0]["changes"]["gain"].get<double>() == Approx(0.01).epsilon(1e-12));
  CHECK(one[0]["changes"]["supply_current"] == 0);
  CHECK(one[0]["changes"]["capability"].get<double>() == Approx(0.9 - 0.81));  // of the sample assessment
  CHECK(one[0]["packages"][0]["lead_order"] == "1 C, 2 B, 3 E");
  CHECK(one[0]["lead_warning"].is_null());
  CHECK(one[1]["lead_warning"] == "TO-92: E-B-C");
  CHECK(one[0]["named_in_spec"].is_null());
  CHECK(candidate["notes"]["substitutes.named_in_spec"] == "the spec names no transistors");
  CHECK(candidate["current_gain_needed"]["min"] == 185.2);
  CHECK(candidate["current_gain_needed"]["collector_current"] == 1.03e-3);
  CHECK(candidate["current_gain_needed"]["groups"] == Json({"BC547B", "BC550C"}));
  DesignResult named = sample();
  named.spec.devices = {"BC547B", "BC550C"};
  CHECK(first(named)["substitutes"][0]["named_in_spec"] == true);
  CHECK(first(named)["substitutes"][1]["named_in_spec"] == false);
}

TEST_CASE("without the question the fields are null and say how to ask") {
  const Json candidate = first(test::sample_result());
  for (const char* field : {"if_unavailable", "substitutes", "current_gain_needed"}) {
    CHECK(candidate[field].is_null());
    CHECK(candidate["notes"][field] == "asked for with --alternates");
  }
}
