// Sections of a printed comparison, and the grid they share: a column for each candidate.
#pragma once

#include <functional>

#include "report/comparison.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

/// Rows of a grid with the candidates beside each other, behind columns that say what a row is.
class BesideGrid {
public:
  using CellText = std::function<std::string(const ComparedCandidate&)>;

  BesideGrid(const Compared& list, const std::vector<std::string>& named);
  void add(std::vector<std::string> named, const CellText& text);
  /// Leaves a row out where every cell is "-".
  void add_stated(const std::vector<std::string>& named, const CellText& text);
  bool is_empty() const { return grid_.rows.empty(); }
  /// Candidates that do not fit on the page follow below, under the same names of rows.
  void print(TextSheet& sheet, const TableStyle& style) const;

private:
  TextGrid columns_of(std::size_t first, std::size_t count) const;

  const Compared& list_;
  std::size_t named_;
  TextGrid grid_;
};

/// Parts that differ, one row each, and those that are the same in one line.
void add_compared_parts(TextSheet& sheet, const Compared& list, const TableStyle& style);

/// Worst cases of the figures that any of the specs requires.
void add_compared_worst_cases(TextSheet& sheet, const Compared& list, const TableStyle& style);

/// What a document does not state, with its reason.
void add_not_stated(TextSheet& sheet, const Compared& list);

}  // namespace bandwright
