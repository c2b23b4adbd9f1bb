// What the writers of a stock share.
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "catalogue/stock_summary.hpp"

namespace bandwright {

/// What is taken where rows say nothing, or something unusual.
struct StockAssumption {
  PartKind kind;
  const char* what;  ///< "tolerance"
  std::size_t rows;
  std::string taken;  ///< "metal-film ±1 %, thick-film ±1 %"
};
std::vector<StockAssumption> stock_assumptions(const std::vector<StockKind>& kinds);

Dimension dimension_of_value(PartKind kind);

}  // namespace bandwright
