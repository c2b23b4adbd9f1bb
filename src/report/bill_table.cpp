// A bill of materials for people: what to buy, what may take its place, what to know, what to mind.
#include <fmt/format.h>

#include <bandwright/report.hpp>
#include <bandwright/version.hpp>
#include <cmath>

#include "report/bill_cells.hpp"
#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"
#include "units/printable.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kLongestCell = 4000;
constexpr int kMoneyDigits = 9;
constexpr double kPercent = 100;

std::string shown(const std::string& text) { return printable(text, kLongestCell); }

std::string money_text(double amount) { return format_quantity(amount, Dimension::money, kMoneyDigits); }

std::string costed(double amount, const Part& part) {
  return std::isnan(amount) ? "-" : fmt::format("{}{}", money_text(amount), part.invented_cost ? "*" : "");
}

std::string heading_text(const Bill& bill) {
  const std::string boards = bill.boards.size() == 1 ? "" : fmt::format(" of each of {} stages", bill.boards.size());
  const std::string spare =
      bill.options.attrition > 0 ? fmt::format(", {:.4g} % attrition", kPercent * bill.options.attrition) : "";
  return fmt::format("Bill of materials for {} board{}{}{}", counted(static_cast<std::size_t>(bill.options.quantity)),
                     bill.options.quantity == 1 ? "" : "s", boards, spare);
}

void add_boards(TextSheet& sheet, const Bill& bill) {
  for (const BoardParts& board : bill.boards)
    sheet.line(board.prefix.empty() ? shown(board.name) : fmt::format("{}: {}", board.prefix, shown(board.name)));
}

std::string value_text(const Part& part) {
  if (part.kind == PartKind::transistor) return shown(part.code);
  return format_quantity(part.value, part.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance);
}

std::string family_text(const std::string& family, PartKind of) {
  const std::string kind = fmt::format(" {}", kind_word(of));
  const std::string text = shown(family);
  return text.ends_with(kind) ? text.substr(0, text.size() - kind.size()) : text;
}

// The page is narrow: of a resistor its power, of anything else its voltage; the other one is in CSV and JSON.
std::string rating_text(const Part& part) {
  const double rating = part.kind == PartKind::resistor ? part.power_rating : part.voltage_rating;
  if (std::isnan(rating)) return part.kind == PartKind::transistor ? "" : "none holds";
  return rating > 0 ? fmt::format("{:.4g} {}", rating, part.kind == PartKind::resistor ? "W" : "V") : "";
}

std::vector<std::string> cells(const BillRow& row) {
  const Part& part = row.part;
  const bool valued = part.kind != PartKind::transistor;
  return {std::to_string(row.item),
          join(row.designators, ", "),
          std::to_string(row.quantity_per_board),
          std::to_string(row.quantity_total),
          value_text(part),
          valued ? part.code : "",
          valued ? tolerance_text(part.tolerance) : "",
          rating_text(part),
          family_text(part.family, part.kind),
          part.polarity,
          shown(part.part_number),
          costed(part.unit_cost, part),
          costed(row.total_cost, part)};
}

void add_rows(TextSheet& sheet, const Bill& bill) {
  sheet.heading("To buy");
  TextGrid grid;
  grid.columns = {{"item", true},    {"part", false},     {"per board", true},    {"total", true},
                  {"value", true},   {"code", false},     {"tolerance", false},   {"rating", false},
                  {"family", false}, {"polarity", false}, {"part number", false}, {"unit cost", true},
                  {"cost", true}};
  grid.flexible = {8, 1, 9, 10};
  grid.dispensable = {5, 2, 11};
  for (const BillRow& row : bill.rows) grid.add(cells(row));
  sheet.grid(grid);
}

std::string total_text(const Bill& bill) {
  long parts = 0;
  for (const BillRow& row : bill.rows) parts += row.quantity_total;
  const std::string count =
      fmt::format("{} parts in {} rows", counted(static_cast<std::size_t>(parts)), bill.rows.size());
  if (std::isnan(bill.total_cost)) return fmt::format("{}; the total cost is not known.", count);
  return fmt::format("{}; total cost {}{}.", count, money_text(bill.total_cost), bill.has_invented_costs ? "*" : "");
}

void add_items(TextSheet& sheet, const Bill& bill, const char* heading, std::string (*text)(const BillRow&)) {
  TextGrid grid{{{"item", true}, {"part", false}, {heading, false}}, {}, {2, 1}};
  for (const BillRow& row : bill.rows)
    if (const std::string said = text(row); !said.empty())
      grid.add({std::to_string(row.item), join(row.designators, ", "), shown(said)});
  if (grid.rows.empty()) return;
  sheet.space();
  sheet.grid(grid);
}

std::string capability_cell(double capability, bool from_moments) {
  if (std::isnan(capability)) return "-";
  return fmt::format("{}{:.2f}", from_moments && capability != 0 ? "~" : "", capability);
}

std::vector<std::string> consolidation_cells(const std::string& prefix, const Consolidation& one) {
  const PartKind kind = info(one.changed).kind;
  const std::string value =
      format_quantity(one.value.value, kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance);
  const Outcome& then = one.outcome;
  return {prefix,
          info(one.changed).designator,
          info(one.kept).designator,
          value,
          one.value.family == nullptr ? "" : family_text(one.value.family->name, kind),
          capability_cell(one.capability_before, then.from_moments),
          capability_cell(then.capability, then.from_moments),
          share_text(then.yield),
          then.verdict,
          then.other_parts};
}

void add_consolidations(TextSheet& sheet, const std::vector<BoardConsolidations>& boards) {
  sheet.heading("One value for two (proposals; nothing above has changed)");
  TextGrid grid;
  grid.columns = {{"board", false},   {"part", false},          {"takes that of", false}, {"value", true},
                  {"family", false},  {"capability now", true}, {"then", true},           {"yield", true},
                  {"verdict", false}, {"also changes", false}};
  grid.flexible = {9, 4, 8};
  for (const BoardConsolidations& board : boards)
    for (const Consolidation& one : board.list) grid.add(consolidation_cells(board.prefix, one));
  if (grid.rows.empty()) return sheet.line("None: no two roles may share a value while every requirement still holds.");
  sheet.grid(grid);
}

}  // namespace

std::string write_bill_table(const PurchaseList& list, const TableStyle& style) {
  const Bill& bill = list.bill;
  TextSheet sheet(style);
  sheet.heading(heading_text(bill));
  add_boards(sheet, bill);
  add_rows(sheet, bill);
  sheet.line(total_text(bill));
  if (bill.has_invented_costs) sheet.line("*: invented for demonstration; nobody sells at this cost.");
  add_items(sheet, bill, "alternates", [](const BillRow& row) { return join(row.part.alternates, "; "); });
  add_items(sheet, bill, "note", [](const BillRow& row) { return row.note; });
  if (!bill.notes.empty()) sheet.heading("Notes");
  for (const std::string& note : bill.notes) sheet.item(shown(note));
  if (list.consolidations) add_consolidations(sheet, *list.consolidations);
  add_cautions(sheet);
  sheet.space();
  sheet.paragraph(fmt::format("bandwright {}", version()));
  return sheet.text();
}

}  // namespace bandwright
