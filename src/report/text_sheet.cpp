#include "report/text_sheet.hpp"

#include <algorithm>
#include <cctype>

namespace bandwright {

namespace {

constexpr std::size_t kIndent = 2;
constexpr std::size_t kGap = 2;
constexpr std::size_t kNarrowestPage = 60;
constexpr std::size_t kHeadingCell = 12;   // longer headings are wrapped
constexpr std::size_t kNarrowestCell = 8;  // flexible columns give way so far
constexpr std::size_t kLongestUnit = 4;    // "kHz,"
constexpr std::string_view kBold = "1";
constexpr std::string_view kGreen = "1;32";
constexpr std::string_view kYellow = "1;33";

std::string padded(const std::string& cell, std::size_t width, bool right) {
  const std::size_t used = text_width(cell);
  const std::string fill(used < width ? width - used : 0, ' ');
  return right ? fill + cell : cell + fill;
}

void strip_trailing_spaces(std::string& line) { line.erase(line.find_last_not_of(' ') + 1); }

using Widths = std::vector<std::size_t>;

// What each column needs where nothing is wrapped but headings; 0 for a column without a filled cell.
Widths natural_widths(const TextGrid& grid) {
  Widths widths(grid.columns.size(), 0);
  for (const auto& row : grid.rows)
    for (std::size_t i = 0; i < row.size(); ++i) widths[i] = std::max(widths[i], text_width(row[i]));
  for (std::size_t i = 0; i < widths.size(); ++i) {
    if (widths[i] == 0) continue;
    for (const auto& piece : wrap(grid.columns[i].heading, kHeadingCell))
      widths[i] = std::max(widths[i], text_width(piece));
  }
  return widths;
}

std::size_t total_width(const Widths& widths) {
  std::size_t total = 0;
  for (const std::size_t width : widths) total += width > 0 ? width + kGap : 0;
  return total > 0 ? total - kGap : 0;
}

std::size_t surplus(const Widths& widths, std::size_t page) {
  return total_width(widths) - std::min(total_width(widths), page);
}

// The longest word of a column, which cannot be wrapped.
std::size_t longest_word(const TextGrid& grid, std::size_t column) {
  std::size_t longest = kNarrowestCell;
  for (const auto& row : grid.rows)
    for (const auto& word : wrap(row[column], 1)) longest = std::max(longest, text_width(word));
  return longest;
}

void narrow_to(std::size_t floor, std::size_t page, std::size_t column, Widths& widths) {
  widths[column] -= std::min(surplus(widths, page), widths[column] - std::min(widths[column], floor));
}

Widths with_whole_words(const TextGrid& grid, std::size_t page, Widths widths) {
  for (const std::size_t i : grid.flexible) narrow_to(longest_word(grid, i), page, i, widths);
  return widths;
}

// Widths of the columns on a page; 0 hides a column. Where all else is not enough, words reach over into the gap.
Widths column_widths(const TextGrid& grid, std::size_t page) {
  Widths all = natural_widths(grid);
  Widths widths = with_whole_words(grid, page, all);
  for (const std::size_t i : grid.dispensable) {
    if (surplus(widths, page) == 0) break;
    all[i] = 0;
    widths = with_whole_words(grid, page, all);
  }
  for (const std::size_t i : grid.flexible) narrow_to(kNarrowestCell, page, i, widths);
  return widths;
}

// One row of cells as as many lines as its tallest cell needs.
void append_row(const std::vector<std::string>& cells, const TextGrid& grid, const Widths& widths,
                std::vector<std::string>& lines) {
  std::vector<std::vector<std::string>> pieces;
  std::size_t height = 1;
  for (std::size_t i = 0; i < cells.size(); ++i) {
    pieces.push_back(wrap(cells[i], std::max<std::size_t>(widths[i], 1)));
    if (widths[i] > 0) height = std::max(height, pieces.back().size());
  }
  for (std::size_t k = 0; k < height; ++k) {
    std::string line;
    for (std::size_t i = 0; i < cells.size(); ++i) {
      if (widths[i] == 0) continue;
      const std::string piece = k < pieces[i].size() ? pieces[i][k] : "";
      line += padded(piece, widths[i] + (grid.columns[i].right ? 0 : kGap), grid.columns[i].right);
      if (grid.columns[i].right) line += std::string(kGap, ' ');
    }
    strip_trailing_spaces(line);
    lines.push_back(line);
  }
}

bool is_number(std::string_view word) {
  return !word.empty() && word.find_first_of("0123456789") != word.npos &&
         std::isalpha(static_cast<unsigned char>(word.front())) == 0;
}

// Where the first piece of a text ends: a word, or a number with the unit behind it.
std::size_t piece_end(std::string_view text, std::size_t width) {
  const std::size_t end = std::min(text.find(' '), text.size());
  if (end == text.size() || !is_number(text.substr(0, end))) return end;
  const std::size_t with_unit = std::min(text.find(' ', end + 1), text.size());
  const bool is_short = text_width(text.substr(end + 1, with_unit - end - 1)) <= kLongestUnit;
  return is_short && text_width(text.substr(0, with_unit)) <= width ? with_unit : end;
}

}  // namespace

std::size_t text_width(std::string_view text) {
  return static_cast<std::size_t>(
      std::count_if(text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

std::vector<std::string> wrap(std::string_view text, std::size_t width) {
  std::vector<std::string> lines(1);
  std::size_t used = 0;
  while (!text.empty()) {
    const std::size_t end = piece_end(text, width);
    const std::string word(text.substr(0, end));
    text.remove_prefix(std::min(end + 1, text.size()));
    if (word.empty()) continue;
    const std::size_t length = text_width(word);
    if (used > 0 && used + 1 + length > width) {
      lines.emplace_back();
      used = 0;
    }
    if (used > 0) lines.back() += ' ';
    lines.back() += word;
    used += length + (used > 0 ? 1 : 0);
  }
  return lines;
}

std::string join(const std::vector<std::string>& items, std::string_view separator) {
  std::string all;
  for (const auto& item : items) {
    if (!all.empty()) all += separator;
    all += item;
  }
  return all;
}

TextGrid::Lines TextGrid::lines(std::size_t width) const {
  Lines result;
  if (rows.empty()) return result;
  const auto widths = column_widths(*this, width);
  std::vector<std::string> headings;
  for (const auto& column : columns) headings.push_back(column.heading);
  if (!join(headings, "").empty()) append_row(headings, *this, widths, result.headings);
  for (const auto& row : rows) append_row(row, *this, widths, result.body);
  return result;
}

TextSheet::TextSheet(const TableStyle& style) : style_(style) {
  style_.width = std::max<int>(style_.width, kNarrowestPage);
}

std::string TextSheet::painted(const std::string& text, std::string_view colour) const {
  if (!style_.colour) return text;
  return "\x1b[" + std::string(colour) + "m" + text + "\x1b[0m";
}

void TextSheet::space() {
  if (!text_.empty() && !text_.ends_with("\n\n")) text_ += '\n';
}

void TextSheet::heading(const std::string& text) {
  space();
  for (const auto& piece : wrap(text, static_cast<std::size_t>(style_.width))) text_ += painted(piece, kBold) + '\n';
}

void TextSheet::verdict(const std::string& text, bool good) {
  for (const auto& piece : wrap(text, static_cast<std::size_t>(style_.width)))
    text_ += painted(piece, good ? kGreen : kYellow) + '\n';
}

void TextSheet::hanging(std::string_view first, std::string_view rest, const std::string& text) {
  std::string_view lead = first;
  for (const auto& piece : wrap(text, static_cast<std::size_t>(style_.width) - first.size())) {
    text_ += std::string(lead) + piece + '\n';
    lead = rest;
  }
}

void TextSheet::paragraph(const std::string& text) { hanging("", "", text); }
void TextSheet::item(const std::string& text) { hanging("  - ", "    ", text); }
void TextSheet::line(const std::string& text) { hanging("  ", "  ", text); }
void TextSheet::literal(const std::string& text) { text_ += std::string(kIndent, ' ') + text + '\n'; }

void TextSheet::grid(const TextGrid& grid) {
  const auto lines = grid.lines(static_cast<std::size_t>(style_.width) - kIndent);
  const std::string indent(kIndent, ' ');
  for (const auto& piece : lines.headings) text_ += indent + painted(piece, kBold) + '\n';
  for (const auto& piece : lines.body) text_ += indent + piece + '\n';
}

}  // namespace bandwright
