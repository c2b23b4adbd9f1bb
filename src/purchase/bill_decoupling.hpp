#pragma once

#include <bandwright/purchase.hpp>

namespace bandwright {

/// The two capacitors across the supply of a stage, C901 and C902: of the stock where it holds some of a rating that
/// suffices, else bought. Values: common practice, no source.
std::vector<Part> supply_decoupling(const Catalogue& catalogue, const BoardParts& board);

}  // namespace bandwright
