// What the user's stock offers for a role.
#pragma once

#include <bandwright/catalogue.hpp>
#include <vector>

namespace bandwright {

/// The family of a stock part: the one it names, else the one that is first choice at its value; nullptr where there is
/// none of its kind.
const Family* family_of(const Catalogue& catalogue, const StockPart& part);

/// The stock's parts that a role may take, in the order of the file: of the families that the rules name, within their
/// values, enough for all boards. A stock part keeps its own tolerance and series.
std::vector<OfferedValue> stock_values(const Catalogue& catalogue, const Spec& spec, Role role,
                                       const ValueRange& allowed);

/// One part of the stock, resolved.
OfferedValue stock_offer(const Catalogue& catalogue, const Spec& spec, const StockPart& part);

/// The stock part that a choice means; nullptr where the stock holds none of its value.
const StockPart* find_stock(const Catalogue& catalogue, PartKind kind, const PartChoice& choice);

}  // namespace bandwright
