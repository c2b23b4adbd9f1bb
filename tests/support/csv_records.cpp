#include "csv_records.hpp"

#include <stdexcept>

namespace bandwright::test {

// RFC 4180: records end with CRLF; a field in quotes may hold anything, a quote doubled.
std::vector<Record> read_records(const std::string& text) {
  std::vector<Record> records(1, Record(1));
  bool quoted = false;
  for (std::size_t i = 0; i < text.size(); ++i) {
    std::string& field = records.back().back();
    const char c = text[i];
    if (quoted && c == '"' && i + 1 < text.size() && text[i + 1] == '"') {
      field += '"';
      ++i;
    } else if (c == '"') {
      if (!quoted && !field.empty()) throw std::runtime_error("a quote inside a bare field");
      quoted = !quoted;
    } else if (quoted) {
      field += c;
    } else if (c == ',') {
      records.back().emplace_back();
    } else if (c == '\r' && i + 1 < text.size() && text[i + 1] == '\n') {
      records.emplace_back(1);
      ++i;
    } else if (c == '\r' || c == '\n') {
      throw std::runtime_error("a line end that is not CRLF");
    } else {
      field += c;
    }
  }
  if (quoted) throw std::runtime_error("a quote that is never closed");
  if (records.back() != Record(1)) throw std::runtime_error("the last record has no line end");
  records.pop_back();
  return records;
}

std::size_t column(const Record& headings, const std::string& name) {
  for (std::size_t i = 0; i < headings.size(); ++i)
    if (headings[i] == name) return i;
  throw std::runtime_error("no column " + name);
}

}  // namespace bandwright::test
