// What a row says of all its designators together.
#pragma once

#include <bandwright/purchase.hpp>
#include <string>
#include <vector>

namespace bandwright {

/// A part in its place: one designator of a board.
struct Placed {
  std::size_t board = 0;
  std::string designator;  ///< with the board's prefix
  Part part;
  bool outside_model = false;
};

/// Boards as they were given, then letters, then numbers by their size: A.R2 before A.R10.
bool stands_before(const Placed& a, const Placed& b);

/// "R1, R2"
std::string listed(const std::vector<std::string>& names, const std::string& separator = ", ");

/// One text where all say the same, else each with its designators: "C1 + to base; C2 + to collector".
std::string polarity_of(const std::vector<Placed>& places);
std::string note_of(const std::vector<Placed>& places);

/// Each alternate once. It stands alone where it holds in every place and no board has two of them, since each was
/// tried with all other parts as they are; else with its designators: "43K for R1".
std::vector<std::string> alternates_of(const std::vector<Placed>& places);

}  // namespace bandwright
