// Candidates as comma-separated values, RFC 4180: CRLF ends each record, '.' is the decimal sign, SI units.
#include <bandwright/report.hpp>
#include <cmath>

#include "report/csv_record.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

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
                                     csv_number(candidate.error), csv_number(candidate.tolerance_sensitivity)};
  for (const FigureInfo& figure : figures())
    if (is_column(figure)) fields.push_back(csv_number(shown_value(candidate, figure)));
  for (const double value : role_values(candidate.parts)) fields.push_back(value > 0 ? csv_number(value) : "");
  for (const AssessedColumn& column : kAssessed)
    fields.push_back(candidate.assessment ? csv_number(column.value(*candidate.assessment)) : "");
  fields.push_back(candidate.non_dominated ? "true" : "false");
  return fields;
}

}  // namespace

std::string write_csv(const DesignResult& result) {
  std::string out = csv_record(headings());
  for (const Candidate& one : result.candidates) out += csv_record(fields_of(one));
  return out;
}

}  // namespace bandwright
