// The boards of a bill of materials: candidates of result documents, recomputed.
#pragma once

#include <bandwright/report.hpp>
#include <deque>
#include <string>

#include "cli/command_line.hpp"

namespace bandwright::cli {

/// One candidate of one result document. It stays where it is: the result points into the catalogue.
struct PickedBoard {
  std::string prefix;  ///< "A"; empty where it is the only one
  std::string file;
  StoredCandidate stored;
  Spec spec;
  Catalogue catalogue;
  DesignResult result;

  const Candidate& candidate() const { return result.candidates.front(); }
};
using PickedBoards = std::deque<PickedBoard>;

/// Boards have the prefixes A to Z.
inline constexpr std::size_t kMostBoards = 26;

/// Reads the documents that stand on the command line and recomputes the candidates picked of them. Throws UsageError,
/// FileError and InputError, each with all that is wrong in any of them.
PickedBoards picked_boards(const Arguments& arguments);

/// Says on standard error whether the figures agree with the document's, and what a candidate lacks.
void tell_state(const PickedBoard& board, bool quiet);

}  // namespace bandwright::cli
