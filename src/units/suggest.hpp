// The known name nearest to one that is not known.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

/// Damerau-Levenshtein distance (optimal string alignment): insertions, deletions, substitutions and swaps of
/// neighbours that lead from one name to the other. Case, and '-' against '_', count nothing.
std::size_t name_distance(std::string_view a, std::string_view b);

/// The nearest of `known` (the first of equals), or empty where none is near enough to be what was meant.
std::string nearest_name(std::string_view name, const std::vector<std::string>& known);

}  // namespace bandwright
