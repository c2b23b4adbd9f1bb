#include "report/text_sheet.hpp"

#include <algorithm>

namespace bandwright {

namespace {

constexpr std::size_t kIndent = 2;
constexpr std::size_t kGap = 2;
constexpr std::size_t kNarrowestPage = 60;
constexpr std::size_t kHeadingCell = 12;   // longer headings are wrapped
constexpr std::size_t kNarrowestCell = 8;  // flexible columns give way so far
constexpr std::string_view kBold = "1";
constexpr std::string_view kGreen = "1;32";
constexpr std::string_view kYellow = "1;33";

std::string padded(const std::string& cell, std::size_t width, bool right) {
  const std::size_t used = text_width(cell);
  const std::string fill(used < width ? width - used : 0, ' ');
  return right ? fill + cell : cell + fill;
}

void strip_trailing_spaces(std::string& line) { line.erase(line.find_last_not_of(' ') + 1); }

// Widths of the columns of a grid; 0 hides a column.
std::vector<std::size_t> column_widths(const TextGrid& grid, std::size_t page) {
  std::vector<std::size_t> widths(grid.columns.size(), 0);
  for (const auto& row : grid.rows)
    for (std::size_t i = 0; i < row.size(); ++i) widths[i] = std::max(widths[i], text_width(row[i]));
  std::size_t total = 0;
  for (std::size_t i = 0; i < widths.size(); ++i) {
    if (widths[i] == 0) continue;
    for (const auto& piece : wrap(grid.columns[i].heading, kHeadingCell))
      widths[i] = std::max(widths[i], text_width(piece));
    total += widths[i] + kGap;
  }
  std::size_t surplus = total > page + kGap ? total - kGap - page : 0;
  for (const std::size_t i : grid.flexible) {
    const std::size_t given = std::min(surplus, widths[i] - std::min(widths[i], kNarrowestCell));
    widths[i] -= given;
    surplus -= given;
  }
  return widths;
}

// One row of cells as as many lines as its tallest cell needs.
void append_row(const std::vector<std::string>& cells, const TextGrid& grid, const std::vector<std::size_t>& widths,
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

}  // namespace

std::size_t text_width(std::string_view text) {
  return static_cast<std::size_t>(
      std::count_if(text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

std::vector<std::string> wrap(std::string_view text, std::size_t width) {
  std::vector<std::string> lines(1);
  std::size_t used = 0;
  while (!text.empty()) {
    const std::size_t end = std::min(text.find(' '), text.size());
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
  text_ += painted(text, kBold) + '\n';
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
