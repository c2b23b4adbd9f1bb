#include "catalogue/stock_columns.hpp"

#include <algorithm>

#include "catalogue/names.hpp"
#include "units/number_text.hpp"

namespace bandwright {

const std::array<StockColumnInfo, kStockColumnCount>& stock_columns() {
  using C = StockColumn;
  static constexpr std::array<StockColumnInfo, kStockColumnCount> kColumns = {{
      {C::kind, "kind", true, "resistor or capacitor or transistor", ""},
      {C::value, "value", true, "4K7 or 4.7k or 4.7 kohm; 100n or 0.1 uF; the type of a transistor", ""},
      {C::tolerance, "tolerance", false, "1 % or -20/+50 % or a letter of IEC 60062 such as J",
       "the usual one of the family"},
      {C::rating, "rating", false, "0.25 W or 0.25 W 250 V for a resistor; 50 V for a capacitor",
       "the smallest one of the family"},
      {C::family, "family", false, "how the part is made: see below", "the first choice at the value"},
      {C::quantity, "quantity", false, "how many there are", "not counted: it never runs short"},
      {C::unit_cost, "unit_cost", false, "cost of one: a plain number such as 0.02", "the cost of the family"},
      {C::part_number, "part_number", false, "any text; it is printed in the parts list", "none"},
      {C::note, "note", false, "any text", "none"},
  }};
  return kColumns;
}

const StockColumnInfo* find_stock_column(std::string_view heading) {
  const std::string name = one_name(heading);
  for (const StockColumnInfo& row : stock_columns())
    if (name == row.key) return &row;
  return nullptr;
}

std::vector<std::string> stock_headings() {
  std::vector<std::string> headings;
  for (const StockColumnInfo& row : stock_columns()) headings.emplace_back(row.key);
  return headings;
}

std::string one_name(std::string_view name) {
  std::string out = small_letters(trimmed(name));
  std::replace_if(
      out.begin(), out.end(), [](char c) { return c == ' ' || c == '-'; }, '_');
  return out;
}

}  // namespace bandwright
