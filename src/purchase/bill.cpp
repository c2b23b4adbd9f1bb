// The bill of materials: the parts of one board or several, alike ones in one row, counted and priced.
#include <algorithm>
#include <bandwright/purchase.hpp>
#include <cmath>
#include <map>
#include <tuple>

#include "purchase/bill_decoupling.hpp"
#include "purchase/bill_texts.hpp"

namespace bandwright {

namespace {

constexpr double kSmallestAmount = 1e-6;  // of money: hides the noise of binary fractions
constexpr double kNoise = 1e-12;          // a share of 7 % of 100 is 7, not 7.000000000000001
constexpr int kAllDigits = 9;             // shown of an amount
constexpr const char* kUncosted = "no unit cost is known of item ";

double money(double amount) {
  constexpr double kPerUnit = 1 / kSmallestAmount;
  return std::round(amount * kPerUnit) / kPerUnit;
}

double number_or_less(double value) { return std::isnan(value) ? -1 : value; }

/// What makes a part distinct, in the order in which rows stand.
using Distinct = std::tuple<PartKind, double, std::string, bool, double, double, std::string, double, double, bool,
                            std::string, long, double>;

Distinct distinct(const Part& part, bool outside_model) {
  return {part.kind,
          part.value,
          part.code,
          outside_model,
          part.tolerance.above,
          part.tolerance.below,
          part.family,
          number_or_less(part.voltage_rating),
          number_or_less(part.power_rating),
          part.from_stock,
          part.part_number,
          part.in_stock.value_or(-1),
          number_or_less(part.unit_cost)};
}

using Rows = std::map<Distinct, std::vector<Placed>>;

void place(const BoardParts& board, std::size_t position, const std::vector<Part>& parts, bool outside_model,
           Rows& rows) {
  const std::string front = board.prefix.empty() ? "" : board.prefix + ".";
  for (const Part& part : parts)
    rows[distinct(part, outside_model)].push_back({position, front + part.designator, part, outside_model});
}

long with_attrition(long count, double attrition) {
  return count + static_cast<long>(std::ceil(static_cast<double>(count) * attrition * (1 - kNoise)));
}

/// What each counted part of the stock still holds while rows are filled from it.
class StockLeft {
public:
  /// How many of `wanted` are not there.
  long take(const Part& part, long wanted) {
    if (!part.in_stock) return 0;
    long& left = left_.try_emplace(distinct(part, false), *part.in_stock).first->second;
    const long taken = std::min(left, wanted);
    left -= taken;
    return wanted - taken;
  }

private:
  std::map<Distinct, long> left_;
};

std::string missing_text(const BillRow& row) {
  return std::to_string(row.missing) + " of " + std::to_string(row.quantity_total) + " missing in the stock";
}

std::string row_note(const BillRow& row, const std::vector<Placed>& places) {
  std::vector<std::string> texts;
  if (const std::string note = note_of(places); !note.empty()) texts.push_back(note);
  const bool is_rated = row.part.kind != PartKind::transistor && !row.outside_model && !row.part.family.empty();
  if (is_rated && std::isnan(row.part.voltage_rating)) texts.push_back("no rating of its family holds");
  if (row.part.from_stock) texts.push_back(row.missing > 0 ? missing_text(row) : "from the stock");
  return listed(texts, "; ");
}

BillRow row_of(std::vector<Placed>& places, const BillOptions& options, StockLeft& stock) {
  std::stable_sort(places.begin(), places.end(), stands_before);
  BillRow row;
  for (const Placed& one : places) row.designators.push_back(one.designator);
  row.part = places.front().part;
  row.part.polarity = polarity_of(places);
  row.part.alternates = alternates_of(places);
  row.part.unit_cost = money(row.part.unit_cost);
  row.outside_model = places.front().outside_model;
  row.quantity_per_board = static_cast<long>(places.size());
  row.quantity_total = with_attrition(row.quantity_per_board * options.quantity, options.attrition);
  row.total_cost = money(static_cast<double>(row.quantity_total) * row.part.unit_cost);
  row.missing = stock.take(places.front().part, row.quantity_total);
  row.note = row_note(row, places);
  return row;
}

void add_total(Bill& bill) {
  double known = 0;
  std::vector<std::string> unknown;
  for (const BillRow& row : bill.rows) {
    bill.has_invented_costs = bill.has_invented_costs || row.part.invented_cost;
    if (std::isnan(row.total_cost))
      unknown.push_back(std::to_string(row.item));
    else
      known += row.total_cost;
  }
  if (unknown.empty())
    bill.total_cost = money(known);
  else
    bill.notes.push_back(kUncosted + listed(unknown) + "; the other rows cost " +
                         format_quantity(money(known), Dimension::money, kAllDigits));
}

std::string missing_note(const BillRow& row) {
  return "item " + std::to_string(row.item) + " (" + listed(row.designators) + "): " + missing_text(row);
}

void add_notes(Bill& bill) {
  const auto& rows = bill.rows;
  if (std::any_of(rows.begin(), rows.end(), [](const BillRow& row) { return row.outside_model; }))
    bill.notes.push_back(
        "C901 and C902 decouple the supply at each stage, 100 nF and 10 µF: common practice, no source; the model "
        "does not see them");
  for (const BillRow& row : rows)
    if (row.missing > 0) bill.notes.push_back(missing_note(row));
  if (std::any_of(rows.begin(), rows.end(), [](const BillRow& row) { return !row.part.alternates.empty(); }))
    bill.notes.push_back(
        "an alternate was tried with every other part as listed: change one at a time, where it names designators at "
        "those alone");
  if (bill.has_invented_costs)
    bill.notes.push_back("costs that come with the program are invented for demonstration: nobody sells at them");
}

}  // namespace

Bill bill_of_materials(const std::vector<BoardParts>& boards, const Catalogue& catalogue, const BillOptions& options) {
  Rows rows;
  for (std::size_t i = 0; i < boards.size(); ++i) {
    place(boards[i], i, boards[i].parts, false, rows);
    if (options.decoupling) place(boards[i], i, supply_decoupling(catalogue, boards[i]), true, rows);
  }
  Bill bill;
  bill.options = options;
  bill.boards = boards;
  StockLeft stock;
  for (auto& [part, places] : rows) {
    bill.rows.push_back(row_of(places, options, stock));
    bill.rows.back().item = static_cast<int>(bill.rows.size());
  }
  add_total(bill);
  add_notes(bill);
  return bill;
}

}  // namespace bandwright
