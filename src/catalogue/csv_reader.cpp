#include "catalogue/csv_reader.hpp"

#include <algorithm>

namespace bandwright {

namespace {

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

constexpr const char* kNeverClosed = "a quote that closes the field";
constexpr const char* kBehindQuote = "a comma or the end of the line behind the closing quote";
constexpr const char* kQuoteInside = "quotes around the whole field, and each quote inside doubled";
constexpr const char* kReturnInside = "lines that end with LF or CRLF, or quotes around the whole field";

// Bytes of the line end that a text begins with; 0: none.
std::size_t line_end(std::string_view text) {
  if (text.starts_with('\n')) return 1;
  return text.starts_with("\r\n") ? 2 : 0;
}

bool ends_field(std::string_view text) { return text.empty() || text.front() == ',' || line_end(text) > 0; }

// Where the bare text ends; a CR without LF is no end.
std::size_t bare_length(std::string_view text) {
  std::size_t length = text.find_first_of(",\r\n");
  while (length < text.size() && !ends_field(text.substr(length))) length = text.find_first_of(",\r\n", length + 1);
  return std::min(length, text.size());
}

}  // namespace

CsvReader::CsvReader(std::string_view text) : rest_(text) {
  if (rest_.starts_with(kByteOrderMark)) rest_.remove_prefix(kByteOrderMark.size());
}

bool CsvReader::next(std::vector<CsvField>& record) {
  pass_over();
  if (rest_.empty()) return false;
  std::size_t taken = 0;
  for (bool more = true; more; ++taken) {
    if (taken == record.size()) record.emplace_back();
    record[taken].column = taken + 1;
    take_field(record[taken]);
    more = rest_.starts_with(',');
    if (more) advance(1);
  }
  record.resize(taken);
  advance(line_end(rest_));
  return true;
}

void CsvReader::pass_over() {
  while (true) {
    if (const std::size_t end = line_end(rest_); end > 0)
      advance(end);
    else if (rest_.starts_with('#'))
      advance(std::min(rest_.find('\n'), rest_.size()));
    else
      return;
  }
}

void CsvReader::take_field(CsvField& field) {
  field.text.clear();
  field.line = line_;
  field.fault = nullptr;
  if (!rest_.starts_with('"')) return take_bare(field);
  take_quoted(field);
  if (ends_field(rest_)) return;
  take_bare(field);
  field.fault = kBehindQuote;
}

void CsvReader::take_quoted(CsvField& field) {
  do {
    advance(1);
    const std::size_t quote = rest_.find('"');
    field.text += rest_.substr(0, quote);
    if (quote == std::string_view::npos) field.fault = kNeverClosed;
    advance(std::min(quote, rest_.size()));
    if (!rest_.empty()) advance(1);
    if (rest_.starts_with('"')) field.text += '"';
  } while (rest_.starts_with('"'));
}

void CsvReader::take_bare(CsvField& field) {
  const std::string_view bare = rest_.substr(0, bare_length(rest_));
  if (bare.find('\r') != std::string_view::npos) field.fault = kReturnInside;
  if (bare.find('"') != std::string_view::npos) field.fault = kQuoteInside;
  field.text += bare;
  advance(bare.size());
}

void CsvReader::advance(std::size_t count) {
  const std::string_view passed = rest_.substr(0, count);
  line_ += static_cast<std::size_t>(std::count(passed.begin(), passed.end(), '\n'));
  rest_.remove_prefix(count);
}

}  // namespace bandwright
