// The rows of the table of fields, by what they speak of.
#pragma once

#include <vector>

#include "spec/field.hpp"

namespace bandwright {

std::vector<Field> circuit_fields();      ///< title, supply, source, load, stray, ambient
std::vector<Field> requirement_fields();  ///< requirements
std::vector<Field> part_fields();         ///< parts: rules, ranges, pinned
std::vector<Field> search_fields();       ///< devices, topologies, search
std::vector<Field> assess_fields();       ///< assess: units, yield, interval, distribution, causes
std::vector<Field> stock_fields();        ///< parts: stock, stock_only, pairs, boards, derating

}  // namespace bandwright
