// A stock as comma-separated values: headings first, then a row for each part.
#include <fmt/format.h>

#include <algorithm>
#include <optional>

#include "catalogue/csv_reader.hpp"
#include "catalogue/stock_rows.hpp"
#include "units/number_text.hpp"
#include "units/printable.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

using Record = std::vector<CsvField>;

constexpr std::size_t kMostQuoted = 200;  // bytes of a field that a fault keeps

std::string beginning(const std::string& text) { return text.substr(0, kMostQuoted); }

std::string joined(const std::vector<std::string>& words) { return fmt::format("{}", fmt::join(words, ", ")); }

bool is_empty(const Record& record) {
  return std::all_of(record.begin(), record.end(),
                     [](const CsvField& f) { return f.fault == nullptr && trimmed(f.text).empty(); });
}

class CsvStock {
public:
  CsvStock(std::string_view text, FaultList& faults)
      : reader_(text), faults_(faults), is_utf8_(is_utf8(text)), known_(stock_headings()) {
    row_.where_of = [this](StockColumn column) { return where_of(column); };
  }

  void read(const TakeStockRow& take) {
    if (!reader_.next(record_)) return nothing();
    if (!take_headings()) return;
    while (reader_.next(record_)) {
      if (is_empty(record_) || !is_sound()) continue;
      fill_row();
      take(row_);
    }
  }

private:
  std::string where_line() const { return fmt::format("{}, line {}", faults_.file(), record_.front().line); }
  std::string where_field(const CsvField& f) const {
    const std::string where = fmt::format("{}, line {}, column {}", faults_.file(), f.line, f.column);
    const auto column = f.column <= columns_.size() ? columns_[f.column - 1] : std::nullopt;
    return column ? fmt::format("{} ({})", where, info(*column).key) : where;
  }
  std::string where_of(StockColumn column) const { return where_field(record_[place_of(column)]); }
  std::size_t place_of(StockColumn column) const {
    const auto found = std::find(columns_.begin(), columns_.end(), std::optional(column));
    return static_cast<std::size_t>(found - columns_.begin());
  }

  void nothing() {
    faults_.add([&]() -> Fault {
      return {faults_.file(), "", "headings such as " + joined(known_) + ", and a row for each part", ""};
    });
  }

  void refuse(const CsvField& f, const std::string& expected, const std::string& suggestion = {}) {
    faults_.add([&]() -> Fault { return {where_field(f), beginning(f.text), expected, suggestion}; });
  }

  // False where no row can be read under these headings.
  bool take_headings() {
    if (!is_legible()) return false;
    if (!looks_like_headings()) return false;
    std::vector<std::string> meant;  // by headings that are misspelt
    for (const CsvField& f : record_) take_heading(f, meant);
    for (const StockColumnInfo& row : stock_columns()) {
      if (!row.needed || place_of(row.column) < columns_.size()) continue;
      if (std::find(meant.begin(), meant.end(), row.key) == meant.end()) missing(row);
    }
    for (const StockColumnInfo& row : stock_columns())
      if (row.needed && place_of(row.column) == columns_.size()) return false;
    return true;
  }

  void missing(const StockColumnInfo& row) {
    faults_.add([&]() -> Fault {
      return {where_line(), "", fmt::format("a column with the heading {}", row.key), ""};
    });
  }

  bool looks_like_headings() {
    const auto is_known = [](const CsvField& f) { return find_stock_column(f.text) != nullptr; };
    if (std::any_of(record_.begin(), record_.end(), is_known)) return true;
    const bool parted = record_.size() == 1 && record_.front().text.find_first_of(";\t") != std::string::npos;
    const std::string expected =
        "headings, among them kind and value" + std::string(parted ? ", parted by commas and by nothing else" : "");
    faults_.add([&]() -> Fault { return {where_line(), shown_record(), expected, ""}; });
    return false;
  }

  std::string shown_record() const {
    std::string shown;
    for (const CsvField& f : record_) shown += (shown.empty() ? "" : ",") + beginning(f.text);
    return beginning(shown);
  }

  void take_heading(const CsvField& f, std::vector<std::string>& meant) {
    const StockColumnInfo* found = find_stock_column(f.text);
    columns_.emplace_back();
    if (found == nullptr) {
      const std::string nearest = nearest_name(one_name(f.text), known_);
      meant.push_back(nearest);
      return refuse(f, "one of the headings " + joined(known_), nearest);
    }
    if (place_of(found->column) < columns_.size()) return refuse(f, "each heading once");
    columns_.back() = found->column;
  }

  // Every field well-formed text.
  bool is_legible() {
    const std::size_t before = faults_.count();
    for (const CsvField& f : record_) {
      if (f.fault != nullptr)
        refuse(f, f.fault);
      else if (!is_utf8_ && !is_utf8(f.text))
        refuse(f, "text in UTF-8");
    }
    return faults_.count() == before;
  }

  bool is_sound() {
    if (!is_legible()) return false;
    if (record_.size() == columns_.size()) return true;
    faults_.add([&]() -> Fault {
      const char* plural = record_.size() == 1 ? "" : "s";
      return {where_line(), fmt::format("{} field{}", record_.size(), plural),
              fmt::format("{}, one for each heading; a field with a comma in it stands in quotes", columns_.size()),
              ""};
    });
    return false;
  }

  void fill_row() {
    row_.where = where_line();
    for (std::size_t i = 0; i < columns_.size(); ++i)
      if (columns_[i]) row_.cells[index(*columns_[i])] = trimmed(record_[i].text);
  }

  CsvReader reader_;
  FaultList& faults_;
  bool is_utf8_;
  std::vector<std::string> known_;
  Record record_;
  std::vector<std::optional<StockColumn>> columns_;  // of the file; none: a heading at fault
  StockRow row_;
};

}  // namespace

void read_stock_csv(std::string_view text, FaultList& faults, const TakeStockRow& take) {
  CsvStock(text, faults).read(take);
}

}  // namespace bandwright
