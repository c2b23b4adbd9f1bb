// The columns of a stock file, one table: headings, keys in JSON, and what the starting file says of them.
#pragma once

#include <array>
#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

enum class StockColumn { kind, value, tolerance, rating, family, quantity, unit_cost, part_number, note };
inline constexpr std::size_t kStockColumnCount = 9;
constexpr std::size_t index(StockColumn column) { return static_cast<std::size_t>(column); }

/// One row a column.
struct StockColumnInfo {
  StockColumn column;
  const char* key;     ///< heading, and key in JSON: "unit_cost"
  bool needed;         ///< a part is nothing without it
  const char* stands;  ///< what stands in it
  const char* silent;  ///< what holds where it is empty
};
const std::array<StockColumnInfo, kStockColumnCount>& stock_columns();
inline const StockColumnInfo& info(StockColumn column) { return stock_columns()[index(column)]; }

/// By heading, in any case; spaces, underscores and dashes are alike.
const StockColumnInfo* find_stock_column(std::string_view heading);

/// All headings, in the order of the table.
std::vector<std::string> stock_headings();

/// A name in the spelling by which names are compared: small letters, '_' for spaces and dashes.
std::string one_name(std::string_view name);

}  // namespace bandwright
