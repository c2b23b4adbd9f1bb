// Comma-separated values after RFC 4180, read record by record.
//
//   CsvReader reader(text);
//   for (std::vector<CsvField> record; reader.next(record);) ...
//
// Beyond the letter of it, LF ends a line as CRLF does, and three things are passed over: a byte order mark, empty
// lines, and lines whose first character is #. Source: RFC 4180, section 2, rules 1 to 7.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

struct CsvField {
  std::string text;             ///< without its quotes; spaces belong to it
  std::size_t line = 0;         ///< in which it begins, from 1
  std::size_t column = 0;       ///< its number in the record, from 1, as a spreadsheet counts
  const char* fault = nullptr;  ///< what would be right; nullptr: nothing is wrong
};

class CsvReader {
public:
  /// The text must outlive the reader.
  explicit CsvReader(std::string_view text);

  /// The next record, in place of what `record` held; false at the end. A field at fault keeps what was read of it, and
  /// reading goes on behind the next comma or line end.
  bool next(std::vector<CsvField>& record);

private:
  void pass_over();
  void take_field(CsvField& field);
  void take_quoted(CsvField& field);
  void take_bare(CsvField& field);
  void advance(std::size_t count);

  std::string_view rest_;
  std::size_t line_ = 1;
};

}  // namespace bandwright
