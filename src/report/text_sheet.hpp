// Text sheet: headings, wrapped paragraphs and column grids on a page of a given width. Widths count characters,
// not bytes.
#pragma once

#include <bandwright/report.hpp>
#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

/// Characters of a UTF-8 text (every character taken as one column wide).
std::size_t text_width(std::string_view text);

/// Breaks a text at spaces into lines of at most `width` characters; a longer word stands alone, a number keeps its
/// unit.
std::vector<std::string> wrap(std::string_view text, std::size_t width);

std::string join(const std::vector<std::string>& items, std::string_view separator);

/// A grid of cells. Where the rows would be wider than the page, the columns `flexible` are wrapped, first one first;
/// where that is not enough, the columns `dispensable` are left out before, first one first.
struct TextGrid {
  struct Column {
    std::string heading;
    bool right = false;
  };
  std::vector<Column> columns;
  std::vector<std::vector<std::string>> rows;
  std::vector<std::size_t> flexible;
  std::vector<std::size_t> dispensable = {};

  void add(std::vector<std::string> cells) { rows.push_back(std::move(cells)); }
  /// Columns without a single filled cell are left out; without headings no heading line is printed.
  struct Lines {
    std::vector<std::string> headings;
    std::vector<std::string> body;
  };
  Lines lines(std::size_t width) const;
};

/// A page under construction.
class TextSheet {
public:
  explicit TextSheet(const TableStyle& style);

  void heading(const std::string& text);
  void verdict(const std::string& text, bool good);
  void paragraph(const std::string& text);  ///< flush left
  void item(const std::string& text);       ///< indented, with a dash and a hanging indent
  void line(const std::string& text);       ///< indented, wrapped
  void literal(const std::string& text);    ///< indented, never wrapped: for text to be copied
  void grid(const TextGrid& grid);          ///< indented
  void space();                             ///< one empty line, never two

  const std::string& text() const { return text_; }

private:
  void hanging(std::string_view first, std::string_view rest, const std::string& text);
  std::string painted(const std::string& text, std::string_view colour) const;

  TableStyle style_;
  std::string text_;
};

}  // namespace bandwright
