// A stock in numbers: what it holds by kind and by family, and what its rows leave to the catalogue.
#pragma once

#include <bandwright/catalogue.hpp>
#include <cstddef>
#include <string>
#include <vector>

namespace bandwright {

/// Rows that belong together.
struct StockGroup {
  std::string name;                ///< key of the family, or type
  const Family* family = nullptr;  ///< nullptr: all of a kind, or a type
  std::size_t rows = 0;
  std::size_t values = 0;             ///< that differ; of transistors the types
  ValueRange range;                   ///< of the values, ohm or farad; of transistors 0
  long pieces = 0;                    ///< in rows that state a quantity
  std::size_t uncounted = 0;          ///< rows that state none
  double cost = 0;                    ///< quantity x unit cost
  std::size_t costed = 0;             ///< rows that state both
  std::size_t without_family = 0;     ///< the first choice at the value is taken
  std::size_t without_tolerance = 0;  ///< the usual one of the family is taken
  std::size_t without_voltage = 0;    ///< the smallest rating of the family is taken
  std::size_t without_power = 0;      ///< the same, of resistors
  std::size_t without_cost = 0;       ///< the cost of the family or type is taken
  std::size_t outside = 0;            ///< values that the family is not made in
};

struct StockKind {
  PartKind kind = PartKind::resistor;
  StockGroup all;
  std::vector<StockGroup> groups;  ///< by family, in the catalogue's order; of transistors by type
};

/// Of each kind that there is. The families are those of the catalogue, which must outlive it.
std::vector<StockKind> summarise(const Stock& stock, const Catalogue& catalogue);

}  // namespace bandwright
