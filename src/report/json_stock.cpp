// "bandwright/stock" version 1. What a row does not state is null; what is taken in its place stands in `assumptions`.
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>

#include "catalogue/stock_part.hpp"
#include "report/json_notes.hpp"
#include "report/shown_stock.hpp"

namespace bandwright {

namespace {

constexpr int kDocumentVersion = 1;

Json number_or_null(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }
Json text_or_null(const std::string& text) { return text.empty() ? Json(nullptr) : Json(text); }

void add_group(Json& out, PartKind kind, const StockGroup& group) {
  const bool valued = kind != PartKind::transistor;
  out["rows"] = group.rows;
  out["values"] = group.values;
  out["min"] = valued ? Json(group.range.min) : Json(nullptr);
  out["max"] = valued ? Json(group.range.max) : Json(nullptr);
  out["pieces"] = group.pieces;
  out["rows_not_counted"] = group.uncounted;
  out["cost"] = group.costed > 0 ? Json(group.cost) : Json(nullptr);
  out["rows_with_cost"] = group.costed;
}

Json kind_document(const StockKind& kind) {
  Json out;
  out["kind"] = word(kind.kind);
  add_group(out, kind.kind, kind.all);
  const char* key = kind.kind == PartKind::transistor ? "type" : "family";
  Json groups = Json::array();
  for (const StockGroup& group : kind.groups) {
    Json one = {{key, text_or_null(group.name)}};
    add_group(one, kind.kind, group);
    groups.push_back(std::move(one));
  }
  out[kind.kind == PartKind::transistor ? "types" : "families"] = std::move(groups);
  return out;
}

Json part_document(const StockPart& part) {
  const bool valued = part.kind != PartKind::transistor;
  Json out;
  out["kind"] = word(part.kind);
  out["value"] = valued ? Json(part.value) : Json(part.type);
  out["value_code"] = valued ? Json(value_code(part.value, dimension_of_value(part.kind))) : Json(nullptr);
  out["tolerance"] = part.tolerance ? Json{-part.tolerance->below, part.tolerance->above} : Json(nullptr);
  out["voltage_rating"] = number_or_null(part.voltage_rating);
  out["power_rating"] = number_or_null(part.power_rating);
  out["family"] = text_or_null(part.family);
  out["quantity"] = part.quantity ? Json(*part.quantity) : Json(nullptr);
  out["unit_cost"] = number_or_null(part.unit_cost);
  out["part_number"] = part.part_number;
  out["note"] = part.note;
  out["where"] = part.where;
  return out;
}

}  // namespace

std::string write_stock_json(const Catalogue& catalogue) {
  const std::vector<StockKind> kinds = summarise(catalogue.stock, catalogue);
  Json out;
  out["format"] = "bandwright/stock";
  out["version"] = kDocumentVersion;
  out["program"] = version();
  out["name"] = catalogue.stock.name;
  out["rows"] = catalogue.stock.parts.size();
  out["kinds"] = Json::array();
  for (const StockKind& kind : kinds) out["kinds"].push_back(kind_document(kind));
  out["assumptions"] = Json::array();
  for (const StockAssumption& one : stock_assumptions(kinds))
    out["assumptions"].push_back(
        {{"kind", word(one.kind)}, {"what", one.what}, {"rows", one.rows}, {"taken", one.taken}});
  out["notes"] = {{"null", "the row does not state it"},
                  {"cost", "quantity x unit cost over the rows that state both; null where none does"}};
  out["parts"] = Json::array();
  for (const StockPart& part : catalogue.stock.parts) out["parts"].push_back(part_document(part));
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace bandwright
