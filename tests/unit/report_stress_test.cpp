// The stress of each part on the sheet and in the result document, and the notes of the parts list.
#include <bandwright/report.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Json = nlohmann::json;

namespace {

StressRow row(const char* designator, const char* quantity, Dimension dimension, double worst, double rating,
              double allowed) {
  return {designator, quantity, dimension, worst, rating, allowed, "hFE max, 60 °C, 12.6 V"};
}

/// The first candidate alone, with a stress of every kind.
DesignResult stressed() {
  DesignResult result = test::sample_result();
  result.candidates.resize(1);
  result.candidates[0].stress_table = {
      row("R1", "power", Dimension::power, 5e-3, 0.25, 0.125), row("R3", "power", Dimension::power, 0.1, 0.25, 0.125),
      row("R3", "voltage", Dimension::voltage, 9.5, 250, 200), row("C2", "voltage", Dimension::voltage, 12.6, 16, 12.8),
      row("Q1", "junction temperature", Dimension::temperature, 333.15, 423.15, 383.15)};
  return result;
}

std::string sheet_of(const DesignResult& result) { return write_table(result, {false, 120}); }

Json stress_of(const DesignResult& result) { return Json::parse(write_json(result))["candidates"][0]["stress"]; }

}  // namespace

TEST_CASE("the sheet shows what stands near its rating, and counts the rest") {
  const std::string text = sheet_of(stressed());
  CHECK_THAT(text, ContainsSubstring("Stress at the worst corner"));
  CHECK_THAT(text,
             ContainsSubstring("R3    power                 100 mW  250 mW   125 mW    40 %  hFE max, 60 °C, 12.6 V"));
  CHECK_THAT(text, ContainsSubstring("C2    voltage               12.6 V    16 V   12.8 V  78.8 %"));
  CHECK_THAT(text, ContainsSubstring("Q1    junction temperature   60 °C  150 °C   110 °C       -"));
  CHECK_THAT(text, ContainsSubstring("2 more stand under 10 % of their rating."));
  CHECK_THAT(text, !ContainsSubstring("more than is allowed"));
}

TEST_CASE("the sheet says what the shares of derating rest on") {
  DesignResult result = stressed();
  CHECK_THAT(sheet_of(result),
             ContainsSubstring("from memory of ECSS-Q-ST-30-11C, which was not read: capacitors 60 %") &&
                 !ContainsSubstring("as the spec sets it"));
  result.spec.parts.derating.capacitor_voltage = 0.5;
  result.spec.parts.derating.junction_margin = 25;
  CHECK_THAT(sheet_of(result),
             ContainsSubstring("Allowed, as the spec sets it: capacitors 50 % of their rated voltage, "
                               "its junction 25 K under the limit.") &&
                 ContainsSubstring("which was not read: electrolytics 80 %"));
  for (double Derating::*share :
       {&Derating::electrolytic_voltage, &Derating::resistor_power, &Derating::resistor_voltage,
        &Derating::transistor_voltage, &Derating::transistor_current, &Derating::transistor_power})
    result.spec.parts.derating.*share = 0.9;
  const std::string text = sheet_of(result);
  CHECK_THAT(text, !ContainsSubstring("Allowed, from memory"));
}

TEST_CASE("what is overloaded, or has no rating, is never left out") {
  DesignResult result = stressed();
  auto& table = result.candidates[0].stress_table;
  table[0].rating = table[0].allowed = kNotComputed;
  table[3].worst = 12.9;
  const std::string text = sheet_of(result);
  CHECK_THAT(text, ContainsSubstring("R1    power                   5 mW  none holds        -       -"));
  CHECK_THAT(text, ContainsSubstring("R1 power: more than is allowed"));
  CHECK_THAT(text, ContainsSubstring("C2 voltage: more than is allowed"));
  CHECK_THAT(text, ContainsSubstring("1 more stands under 10 % of its rating."));
}

TEST_CASE("the document holds every row, temperatures in degrees Celsius") {
  const Json rows = stress_of(stressed());
  REQUIRE(rows.size() == 5);
  CHECK(rows[1]["designator"] == "R3");
  CHECK(rows[1]["quantity"] == "power");
  CHECK(rows[1]["worst"] == 0.1);
  CHECK(rows[1]["rating"] == 0.25);
  CHECK(rows[1]["allowed"] == 0.125);
  CHECK(rows[1]["share"].get<double>() == Approx(0.4));
  CHECK(rows[1]["corner"] == "hFE max, 60 °C, 12.6 V");
  CHECK(rows[1]["holds"] == true);
  CHECK(rows[4]["worst_degc"].get<double>() == Approx(60));
  CHECK(rows[4]["rating_degc"].get<double>() == Approx(150));
  CHECK(rows[4]["allowed_degc"].get<double>() == Approx(110));
  CHECK_FALSE(rows[4].contains("worst"));
  CHECK(rows[4]["share"].is_null());
}

TEST_CASE("a stress without a rating is null, and the notes say why") {
  DesignResult result = stressed();
  result.candidates[0].stress_table[3].rating = result.candidates[0].stress_table[3].allowed = kNotComputed;
  const Json one = Json::parse(write_json(result))["candidates"][0];
  CHECK(one["stress"][3]["rating"].is_null());
  CHECK(one["stress"][3]["share"].is_null());
  CHECK(one["stress"][3]["holds"] == false);
  for (const char* field : {"stress.C2.rating", "stress.C2.allowed", "stress.C2.share", "stress.Q1.share"})
    CHECK(one["notes"].contains(field));
}

TEST_CASE("part numbers and notes of parts stand with the parts, where there are any") {
  DesignResult result = stressed();
  CHECK_THAT(sheet_of(result), !ContainsSubstring("part number"));
  Candidate& c = result.candidates[0];
  c.parts[5].note = "bipolar: its voltage lies between -200 mV and 500 mV";
  c.parts[6].part_number = "DRAWER-7";
  c.transistor.note = "from the red box";
  const std::string text = sheet_of(result);
  CHECK_THAT(text, ContainsSubstring("part number") && ContainsSubstring("DRAWER-7"));
  CHECK_THAT(text, ContainsSubstring("  C1: bipolar: its voltage lies between -200 mV and 500 mV\n"));
  CHECK_THAT(text, ContainsSubstring("  Q1: from the red box\n"));
}
