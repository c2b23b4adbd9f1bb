#include "report/csv_record.hpp"

#include <fmt/format.h>

#include <cmath>

namespace bandwright {

namespace {

std::string quoted(const std::string& text) {
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  std::string out = "\"";
  for (const char c : text) {
    if (c == '"') out += '"';
    out += c;
  }
  return out + "\"";
}

}  // namespace

std::string csv_record(const std::vector<std::string>& fields) {
  std::string out;
  for (const std::string& field : fields) {
    if (&field != &fields.front()) out += ',';
    out += quoted(field);
  }
  return out + "\r\n";
}

std::string csv_number(double value) { return std::isfinite(value) ? fmt::format("{}", value) : ""; }

}  // namespace bandwright
