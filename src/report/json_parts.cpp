// The parts of a candidate as the result document states them.
#include "report/json_parts.hpp"

#include "report/bill_cells.hpp"

namespace bandwright {

namespace {

constexpr const char* kBeyond = "the family has no rating above the stress";
constexpr const char* kNoPoint = "no operating point";

Json text_or_null(const std::string& text) { return text.empty() ? Json(nullptr) : Json(text); }

// Of a pair's part its share of what both do together.
double working_value(const Part& part, const Candidate& candidate) {
  const std::size_t i = index(part.role);
  if (part.connection == Connection::single) return candidate.working_values[i];
  const OfferedValue& both = candidate.offered[i];
  return part.value * both.working_value / both.value;
}

void add_purchase(Json& out, const Part& part, const std::string& field, Notes& notes) {
  out["unit_cost"] = notes.number(part.unit_cost, field + "unit_cost", "no cost is known");
  out["cost_invented"] = part.invented_cost;
  out["from_stock"] = part.from_stock;
  out["in_stock"] = part.in_stock ? Json(*part.in_stock) : Json(nullptr);
  out["note"] = part.note;
}

Json part_document(const Part& part, const Candidate& candidate, Notes& notes) {
  const bool resistor = part.kind == PartKind::resistor;
  const std::string field = "parts." + part.designator + ".";
  Json out;
  out["designator"] = part.designator;
  out["role"] = info(part.role).key;
  out["kind"] = kind_word(part.kind);
  out["value"] = part.value;
  out["value_code"] = part.code;
  out["series"] = notes.text(part.series, field + "series", "the value stands in no series");
  out["tolerance"] = {-part.tolerance.below, part.tolerance.above};
  out["family"] = part.family;
  out["power_rating"] = resistor ? notes.number(part.power_rating, field + "power_rating", kBeyond) : Json(nullptr);
  out["voltage_rating"] = notes.number(part.voltage_rating, field + "voltage_rating", kBeyond);
  out["polarity"] = text_or_null(part.polarity);
  out["nodes"] = part.nodes;
  out["part_number"] = part.part_number;
  if (part.connection != Connection::single) out["connection"] = word(part.connection);
  out["working_value"] = working_value(part, candidate);
  out["highest_voltage"] = notes.number(part.volts, field + "highest_voltage", kNoPoint);
  if (resistor) out["highest_dissipation"] = notes.number(part.watts, field + "highest_dissipation", kNoPoint);
  out["temperature_coefficient"] =
      part.temperature_coefficient > 0 ? Json(part.temperature_coefficient) : Json(nullptr);
  add_purchase(out, part, field, notes);
  return out;
}

}  // namespace

Json part_documents(const Candidate& candidate, Notes& notes) {
  Json out = Json::array();
  for (const Part& one : candidate.parts) out.push_back(part_document(one, candidate, notes));
  return out;
}

Json transistor_document(const Candidate& candidate, Notes& notes) {
  const Part& part = candidate.transistor;
  const std::string field = "transistor.";
  const char* not_stated = "its data sheets state none";
  Json out;
  out["designator"] = part.designator;
  out["kind"] = kind_word(part.kind);
  out["type"] = part.code;
  out["family"] = part.family;
  out["power_rating"] = notes.number(part.power_rating, field + "power_rating", not_stated);
  out["voltage_rating"] = notes.number(part.voltage_rating, field + "voltage_rating", not_stated);
  out["part_number"] = part.part_number;
  out["highest_voltage"] = notes.number(part.volts, field + "highest_voltage", kNoPoint);
  out["highest_dissipation"] = notes.number(part.watts, field + "highest_dissipation", kNoPoint);
  add_purchase(out, part, field, notes);
  return out;
}

}  // namespace bandwright
