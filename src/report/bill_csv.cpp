// A bill of materials as comma-separated values, RFC 4180: CRLF ends each record, '.' is the decimal sign, SI units.
//
// Spreadsheets take a cell that begins with = + - or @ for a formula, and split at ; where that is their separator. So
// no text, and no part of one behind a ;, begins with one of those: our own get a word, the user's an apostrophe.
#include <bandwright/report.hpp>
#include <cmath>
#include <string_view>

#include "report/bill_cells.hpp"
#include "report/csv_record.hpp"
#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"
#include "units/printable.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kLongestCell = 32000;  // bytes; some spreadsheets take no more

// The last four are the same signs in full width.
constexpr std::array<std::string_view, 8> kFormulaSigns = {"=", "+", "-", "@", "＝", "＋", "－", "＠"};

bool begins_a_formula(std::string_view text) {
  for (const std::string_view sign : kFormulaSigns)
    if (text.starts_with(sign)) return true;
  return false;
}

std::string guarded_piece(const std::string& piece) {
  const std::size_t begin = piece.find_first_not_of(' ');
  if (begin == piece.npos || !begins_a_formula(std::string_view(piece).substr(begin))) return piece;
  return piece.substr(0, begin) + "'" + piece.substr(begin);
}

std::string guarded(const std::string& text) {
  std::string rest = printable(text, kLongestCell);
  std::string all;
  for (std::size_t end = rest.find(';'); end != rest.npos; end = rest.find(';')) {
    all += guarded_piece(rest.substr(0, end)) + ';';
    rest.erase(0, end + 1);
  }
  return all + guarded_piece(rest);
}

std::string polarity_cell(const std::string& text) {
  return guarded(text.starts_with("+ ") ? "plus" + text.substr(1) : text);
}

std::string tolerance_cell(const Part& part) {
  if (part.kind == PartKind::transistor || std::isnan(part.tolerance.above)) return "";
  const std::string text = tolerance_text(part.tolerance);
  return text.starts_with("-") ? "tolerance " + text : text;
}

std::vector<std::string> cells(const BillRow& row) {
  const Part& part = row.part;
  return {std::to_string(row.item),
          guarded(join(row.designators, ", ")),
          std::to_string(row.quantity_per_board),
          std::to_string(row.quantity_total),
          kind_word(part.kind),
          part.kind == PartKind::transistor ? "" : csv_number(part.value),
          guarded(part.code),
          tolerance_cell(part),
          bill_rating(part),
          guarded(part.family),
          bill_temperature_coefficient(part),
          polarity_cell(part.polarity),
          guarded(part.part_number),
          guarded(join(part.alternates, "; ")),
          csv_number(part.unit_cost),
          csv_number(row.total_cost),
          guarded(bill_note(row))};
}

}  // namespace

std::string write_bill_csv(const Bill& bill) {
  std::string out = csv_record({kBillHeadings.begin(), kBillHeadings.end()});
  for (const BillRow& row : bill.rows) out += csv_record(cells(row));
  return out;
}

}  // namespace bandwright
