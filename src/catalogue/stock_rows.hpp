// Rows of a stock as text, whether they come from comma-separated values or from JSON.
#pragma once

#include <array>
#include <functional>
#include <string>
#include <string_view>

#include "catalogue/fault_list.hpp"
#include "catalogue/stock_columns.hpp"

namespace bandwright {

struct StockRow {
  std::array<std::string, kStockColumnCount> cells;  ///< without spaces around; empty: not stated
  std::string where;                                 ///< "drawer.csv, line 12"
  std::function<std::string(StockColumn)> where_of;  ///< "drawer.csv, line 12, column 3 (tolerance)"

  const std::string& operator[](StockColumn column) const { return cells[index(column)]; }
};

/// Hands each row that can be read as one to `take`; what cannot be is a fault.
using TakeStockRow = std::function<void(const StockRow&)>;
void read_stock_csv(std::string_view text, FaultList& faults, const TakeStockRow& take);
void read_stock_json(std::string_view text, FaultList& faults, const TakeStockRow& take);

}  // namespace bandwright
