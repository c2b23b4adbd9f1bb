// A stock for people: what it holds, by kind and by family, and what is taken where rows say nothing.
#include <fmt/format.h>

#include <bandwright/report.hpp>

#include "catalogue/stock_part.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_stock.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

std::string value_text(PartKind kind, double value) {
  return kind == PartKind::transistor ? "" : format_quantity(value, dimension_of_value(kind));
}

std::string pieces_text(const StockGroup& group) {
  return group.uncounted == group.rows ? "" : counted(static_cast<std::size_t>(group.pieces));
}

std::string cost_text(const StockGroup& group) {
  return group.costed == 0 ? "" : format_quantity(group.cost, Dimension::money);
}

std::string count_text(std::size_t count) { return count == 0 ? "" : counted(count); }

TextGrid group_grid(const char* first) {
  return {{{first, false},
           {"kind", false},
           {"rows", true},
           {"values", true},
           {"from", true},
           {"to", true},
           {"pieces", true},
           {"rows not counted", true},
           {"cost", true},
           {"rows with cost", true}},
          {},
          {0},
          {9, 7}};
}

std::vector<std::string> group_cells(const std::string& name, PartKind kind, const StockGroup& group) {
  return {name,
          word(kind),
          counted(group.rows),
          counted(group.values),
          value_text(kind, group.range.min),
          value_text(kind, group.range.max),
          pieces_text(group),
          count_text(group.uncounted),
          cost_text(group),
          count_text(group.costed)};
}

void add_kinds(TextSheet& sheet, const std::vector<StockKind>& kinds) {
  sheet.heading("What it holds");
  TextGrid grid = group_grid("");
  for (const StockKind& kind : kinds) grid.add(group_cells("", kind.kind, kind.all));
  sheet.grid(grid);
  sheet.line("cost: quantity x unit cost, over the rows that state both.");
}

void add_groups(TextSheet& sheet, const std::vector<StockKind>& kinds) {
  sheet.heading("By family and type");
  TextGrid grid = group_grid("family or type");
  for (const StockKind& kind : kinds)
    for (const StockGroup& group : kind.groups) grid.add(group_cells(group.name, kind.kind, group));
  sheet.grid(grid);
}

void add_assumptions(TextSheet& sheet, const std::vector<StockKind>& kinds) {
  const auto assumptions = stock_assumptions(kinds);
  if (assumptions.empty()) return;
  sheet.heading("Taken where rows say nothing, or something unusual");
  TextGrid grid{{{"kind", false}, {"what", false}, {"rows", true}, {"taken", false}}, {}, {3}};
  for (const StockAssumption& one : assumptions) grid.add({word(one.kind), one.what, counted(one.rows), one.taken});
  sheet.grid(grid);
}

}  // namespace

std::string write_stock(const Catalogue& catalogue, const TableStyle& style) {
  const std::size_t rows = catalogue.stock.parts.size();
  TextSheet sheet(style);
  sheet.paragraph(fmt::format("{}: {} {}, no fault", catalogue.stock.name, counted(rows), rows == 1 ? "row" : "rows"));
  const std::vector<StockKind> kinds = summarise(catalogue.stock, catalogue);
  if (kinds.empty()) return sheet.text();
  add_kinds(sheet, kinds);
  add_groups(sheet, kinds);
  add_assumptions(sheet, kinds);
  return sheet.text();
}

}  // namespace bandwright
