// A small reader of comma-separated values that follows RFC 4180 to the letter, independent of the writers.
#pragma once

#include <string>
#include <vector>

namespace bandwright::test {

using Record = std::vector<std::string>;

/// Throws std::runtime_error on a line end that is not CRLF, a quote in a bare field, a quote that is never closed.
std::vector<Record> read_records(const std::string& text);

/// The position of a heading; throws where there is none.
std::size_t column(const Record& headings, const std::string& name);

}  // namespace bandwright::test
