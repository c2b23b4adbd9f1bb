// "bandwright/bill" version 1: the keys of a row are the columns of the CSV, in SI units; what has no value is null.
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>
#include <cmath>

#include "report/bill_cells.hpp"
#include "report/json_notes.hpp"

namespace bandwright {

namespace {

constexpr int kDocumentVersion = 1;

Json number_or_null(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }
Json text_or_null(const std::string& text) { return text.empty() ? Json(nullptr) : Json(text); }

Json row_document(const BillRow& row) {
  const Part& part = row.part;
  const bool valued = part.kind != PartKind::transistor;
  Json out;
  out["item"] = row.item;
  out["designators"] = row.designators;
  out["quantity_per_board"] = row.quantity_per_board;
  out["quantity_total"] = row.quantity_total;
  out["kind"] = kind_word(part.kind);
  out["value"] = valued ? Json(part.value) : Json(nullptr);
  out["value_code"] = part.code;
  out["tolerance"] =
      valued ? Json{number_or_null(-part.tolerance.below), number_or_null(part.tolerance.above)} : Json();
  out["rating"] = text_or_null(bill_rating(part));
  out["family"] = text_or_null(part.family);
  out["temperature_coefficient"] =
      part.temperature_coefficient > 0 ? Json(part.temperature_coefficient) : Json(nullptr);
  out["polarity"] = text_or_null(part.polarity);
  out["part_number"] = part.part_number;
  out["alternates"] = part.alternates;
  out["unit_cost"] = number_or_null(part.unit_cost);
  out["total_cost"] = number_or_null(row.total_cost);
  out["note"] = bill_note(row);
  out["voltage_rating"] = number_or_null(part.voltage_rating);
  out["power_rating"] = part.kind == PartKind::capacitor ? Json(nullptr) : number_or_null(part.power_rating);
  out["cost_invented"] = part.invented_cost;
  out["from_stock"] = part.from_stock;
  out["in_stock"] = part.in_stock ? Json(*part.in_stock) : Json(nullptr);
  out["missing_in_stock"] = row.missing;
  out["outside_model"] = row.outside_model;
  return out;
}

Json consolidation_document(const std::string& prefix, const Consolidation& one) {
  Json out;
  out["board"] = prefix;
  out["kept"] = info(one.kept).designator;
  out["changed"] = info(one.changed).designator;
  out["value"] = one.value.value;
  out["value_code"] = value_code(
      one.value.value, info(one.changed).kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance);
  out["family"] = one.value.family == nullptr ? Json(nullptr) : Json(one.value.family->name);
  out["capability_before"] = number_or_null(one.capability_before);
  out["capability"] = number_or_null(one.outcome.capability);
  out["capability_change"] = number_or_null(one.outcome.capability - one.capability_before);
  out["from_moments"] = one.outcome.from_moments;
  out["yield"] = number_or_null(one.outcome.yield);
  out["error"] = number_or_null(one.outcome.error);
  out["verdict"] = text_or_null(one.outcome.verdict);
  out["other_parts"] = text_or_null(one.outcome.other_parts);
  return out;
}

Json consolidation_documents(const std::vector<BoardConsolidations>& boards) {
  Json out = Json::array();
  for (const BoardConsolidations& board : boards)
    for (const Consolidation& one : board.list) out.push_back(consolidation_document(board.prefix, one));
  return out;
}

}  // namespace

std::string write_bill_json(const PurchaseList& list) {
  const Bill& bill = list.bill;
  Json out;
  out["format"] = "bandwright/bill";
  out["version"] = kDocumentVersion;
  out["program"] = version();
  out["boards"] = Json::array();
  for (const BoardParts& board : bill.boards) out["boards"].push_back({{"prefix", board.prefix}, {"name", board.name}});
  out["quantity"] = bill.options.quantity;
  out["attrition"] = bill.options.attrition;
  out["total_cost"] = number_or_null(bill.total_cost);
  out["costs_invented"] = bill.has_invented_costs;
  out["rows"] = Json::array();
  for (const BillRow& row : bill.rows) out["rows"].push_back(row_document(row));
  if (list.consolidations) out["consolidations"] = consolidation_documents(*list.consolidations);
  out["notes"] = bill.notes;
  out["cautions"] = caution_list();
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace bandwright
