#include "report/json_stress.hpp"

#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr const char* kNoRating = "no rating holds, or none is stated";

Json row_document(const StressRow& row, Notes& notes) {
  const bool temperature = row.dimension == Dimension::temperature;
  const std::string unit = temperature ? "_degc" : "";
  const double zero = temperature ? kZeroCelsius : 0;
  const std::string field = "stress." + row.designator + ".";
  const auto number = [&](const std::string& key, double value, const char* reason) {
    return notes.number(value, field + key, reason);
  };
  Json out;
  out["designator"] = row.designator;
  out["quantity"] = row.quantity;
  out["worst" + unit] = number("worst" + unit, row.worst - zero, "no operating point");
  out["rating" + unit] = number("rating" + unit, row.rating - zero, kNoRating);
  out["allowed" + unit] = number("allowed" + unit, row.allowed - zero, kNoRating);
  out["share"] = temperature ? notes.nothing(field + "share", "a temperature is no share of another")
                             : number("share", row.share(), kNoRating);
  out["corner"] = row.corner;
  out["holds"] = row.holds();
  return out;
}

}  // namespace

void add_stress_fields(Json& candidate_document, const Candidate& candidate, Notes& notes) {
  Json& list = candidate_document["stress"] = Json::array();
  for (const StressRow& row : candidate.stress_table) list.push_back(row_document(row, notes));
}

}  // namespace bandwright
