// Result documents made by hand, so that what must be said of them is known. The stages are invented.
#pragma once

#include <bandwright/report.hpp>
#include <nlohmann/json.hpp>
#include <string>
#include <vector>

namespace bandwright::test {

using Json = nlohmann::ordered_json;

inline constexpr double kThird = 1.0 / 3;  // needs all its digits

inline Json part(const char* role, double value, Json tolerance = {-0.01, 0.01},
                 const char* family = "metal film resistor") {
  return {{"role", role}, {"value", value}, {"tolerance", tolerance}, {"family", family}};
}

inline Json yield(int passed, double low, double high) {
  return {{"passed", passed}, {"units", 20000}, {"low", low}, {"high", high}, {"seed", 1}};
}

// A whole candidate; what a test is about is changed in it.
inline Json candidate(int rank) {
  return {{"rank", rank},
          {"best_at", Json::array()},
          {"variant", "unbypassed emitter"},
          {"device", "BC547B"},
          {"parts",
           {part("upper_divider", 47e3), part("lower_divider", 10e3), part("collector", 4700), part("emitter", 220),
            part("input_coupling", 1e-6, {-0.1, 0.1}, "polyester film capacitor"),
            part("output_coupling", 1e-6, {-0.1, 0.1}, "polyester film capacitor")}},
          {"figures", {{"gain", 20.5}, {"lower_cutoff", 38 + kThird}, {"supply_current", 723e-6}}},
          {"margins", {{"gain", 0.75}}},
          {"error", 0.0231},
          {"tolerance_sensitivity", 0.8},
          {"shortfalls", Json::array()},
          {"capability", {{"gain", 2}, {"smallest", 2}, {"from_moments", false}}},
          {"yield", yield(20000, 0.9998, 1)},
          {"worst_case", {{"gain", {{"min", 18.5}, {"max", 22.5}, {"at_min", "x"}, {"at_max", "y"}}}}},
          {"verdict", {{"nominal", true}, {"worst_case", true}, {"overall", "pass"}}},
          {"non_dominated", true},
          {"notes", Json::object()}};
}

inline Json document(const std::vector<Json>& candidates) {
  return {{"format", "bandwright/result"},
          {"version", 1},
          {"spec", {{"supply", 12}, {"requirements", {{"gain", {{"target", 20}, {"min", 18}, {"max", 22}}}}}}},
          {"candidates", candidates}};
}

inline Comparison compared(const std::vector<Json>& documents, const std::vector<int>& ranks = {}) {
  Comparison comparison;
  for (std::size_t i = 0; i < documents.size(); ++i)
    for (const auto& one : read_compared(documents[i].dump(), "file" + std::to_string(i + 1) + ".json", ranks))
      comparison.candidates.push_back(one);
  return comparison;
}

// Less capable and less exact than the first.
inline Json second() {
  Json one = candidate(2);
  one["error"] = 0.0619;
  one["capability"] = {{"gain", 1.49}, {"smallest", 1.49}, {"from_moments", false}};
  return one;
}

}  // namespace bandwright::test
