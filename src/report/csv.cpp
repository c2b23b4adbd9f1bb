// Candidates as comma-separated values, RFC 4180: CRLF ends each record, '.' is the decimal sign, SI units.
#include <fmt/format.h>

#include <bandwright/report.hpp>
#include <cmath>

#include "report/shown_figures.hpp"

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

// The shortest text that reads back as the same number; empty where there is none.
std::string number(double value) { return std::isfinite(value) ? fmt::format("{}", value) : ""; }

bool is_column(const FigureInfo& figure) { return figure.use != FigureUse::reserved; }

// Columns that are empty where a candidate was not assessed.
struct AssessedColumn {
  const char* heading;
  double (*value)(const Assessment&);
};
constexpr std::array kAssessed = {
    AssessedColumn{"capability", [](const Assessment& a) { return a.capability; }},
    AssessedColumn{"yield", [](const Assessment& a) { return a.yield.share(); }},
    AssessedColumn{"yield_low", [](const Assessment& a) { return a.yield.low; }},
    AssessedColumn{"yield_high", [](const Assessment& a) { return a.yield.high; }},
    AssessedColumn{"worst_case_margin", [](const Assessment& a) { return a.worst_case_margin; }},
};

std::string record(const std::vector<std::string>& fields) {
  std::string out;
  for (const std::string& field : fields) {
    if (&field != &fields.front()) out += ',';
    out += quoted(field);
  }
  return out + "\r\n";
}

std::vector<std::string> headings() {
  std::vector<std::string> fields = {"rank", "device", "variant", "error", "tolerance_sensitivity"};
  for (const FigureInfo& figure : figures())
    if (is_column(figure)) fields.push_back(shown_key(figure));
  for (const RoleInfo& role : roles()) fields.push_back(role.designator);
  for (const AssessedColumn& column : kAssessed) fields.push_back(column.heading);
  fields.push_back("non_dominated");
  return fields;
}

std::vector<std::string> fields_of(const Candidate& candidate) {
  std::vector<std::string> fields = {std::to_string(candidate.rank), candidate.device, candidate.variant,
                                     number(candidate.error), number(candidate.tolerance_sensitivity)};
  for (const FigureInfo& figure : figures())
    if (is_column(figure)) fields.push_back(number(shown_value(candidate, figure)));
  std::array<std::string, kRoleCount> values;
  for (const Part& part : candidate.parts) values[index(part.role)] = number(part.value);
  fields.insert(fields.end(), values.begin(), values.end());
  for (const AssessedColumn& column : kAssessed)
    fields.push_back(candidate.assessment ? number(column.value(*candidate.assessment)) : "");
  fields.push_back(candidate.non_dominated ? "true" : "false");
  return fields;
}

}  // namespace

std::string write_csv(const DesignResult& result) {
  std::string out = record(headings());
  for (const Candidate& one : result.candidates) out += record(fields_of(one));
  return out;
}

}  // namespace bandwright
