// The stock file to start from. Its comments hold no comma and no quote, so that a spreadsheet keeps them as they are.
#include <fmt/format.h>

#include <bandwright/catalogue.hpp>

#include "catalogue/stock_columns.hpp"

namespace bandwright {

namespace {

constexpr const char* kOpening =
    "# The parts at hand: one row a part under the headings; the rows below are examples to write over.\n"
    "# Lines that begin with # are comments. Comma-separated values (RFC 4180): a field with a comma stands in "
    "quotes.\n"
    "# The headings may stand in any order and case; columns that are not needed may be left out.\n"
    "#\n";

constexpr const char* kClosing =
    "#\n"
    "# The part numbers and costs below are invented.\n";

constexpr const char* kRows =
    "resistor,4K7,1 %,0.25 W 250 V,metal-film,100,0.02,START-R-001,\n"
    "resistor,100 kohm,F,,,,,,not counted; all else as usual at this value\n"
    "capacitor,100n,10 %,63 V,film,40,0.12,START-C-001,\"box, 5 mm\"\n"
    "capacitor,10 uF,-20/+50 %,25 V,electrolytic,25,,START-C-002,\n"
    "transistor,BC547B,,,,50,0.08,START-Q-001,\n";

std::string heading_line() {
  const std::vector<std::string> headings = stock_headings();
  return fmt::format("{}\n", fmt::join(headings, ","));
}

}  // namespace

std::string stock_to_start_from() {
  std::string text = kOpening;
  for (const StockColumnInfo& row : stock_columns()) {
    text += fmt::format("# {:<12} {}", row.key, row.stands);
    text += row.needed ? "; needed\n" : fmt::format(" (empty: {})\n", row.silent);
  }
  text += "#\n# Families:\n";
  for (const Family& family : built_in_catalogue().families)
    text += fmt::format("#   {:<20} {}\n", family.key, family.name);
  return text + kClosing + heading_line() + kRows;
}

}  // namespace bandwright
