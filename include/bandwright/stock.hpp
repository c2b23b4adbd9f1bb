// Stock: the user's own parts, read from comma-separated values (RFC 4180) or JSON.
//
//   Catalogue catalogue = built_in_catalogue();
//   catalogue.stock = read_stock(text, "drawer.csv", catalogue);
//
// A part of the stock keeps its own tolerance, rating and cost; what a row leaves out comes from its family.
#pragma once

#include <bandwright/quantity.hpp>
#include <bandwright/role.hpp>
#include <cstddef>
#include <limits>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

struct Catalogue;

/// One row of a stock. NaN: not stated.
struct StockPart {
  PartKind kind = PartKind::resistor;
  double value = 0;                                                  ///< ohm or farad; 0: a transistor
  std::string type;                                                  ///< of a transistor
  std::optional<Tolerance> tolerance;                                ///< absent: the usual one of its family
  double voltage_rating = std::numeric_limits<double>::quiet_NaN();  ///< V
  double power_rating = std::numeric_limits<double>::quiet_NaN();    ///< W
  std::string family;                                                ///< key; empty: first choice at its value
  std::optional<long> quantity;                                      ///< absent: not counted, it never runs short
  double unit_cost = std::numeric_limits<double>::quiet_NaN();
  std::string part_number;
  std::string note;
  std::string where;  ///< "drawer.csv, line 12"
};

struct Stock {
  std::string name;  ///< of the file; empty: there is no stock
  std::vector<StockPart> parts;
};

/// True where the stock says anything of transistors.
bool holds_transistors(const Stock& stock);

/// True where it holds a type of transistor for so many boards.
bool is_at_hand(const Stock& stock, std::string_view type, int boards);

/// Reads a stock; JSON where the text begins with { or [. Families and transistors are names or keys of `catalogue`.
/// Throws InputError with every fault: line, column heading, what was found, what is right.
Stock read_stock(std::string_view text, std::string_view name, const Catalogue& catalogue);

/// A stock file to start from: every heading explained in comments, and a few rows of invented parts.
std::string stock_to_start_from();

}  // namespace bandwright
