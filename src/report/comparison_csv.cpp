// The comparison as comma-separated values, one row a candidate, SI units; what is not stated is empty.
#include <algorithm>
#include <bandwright/report.hpp>
#include <string_view>

#include "report/comparison.hpp"
#include "report/csv_record.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

using Fields = std::vector<std::string>;

bool is_column(const FigureInfo& figure) { return figure.use != FigureUse::reserved; }

std::string dominance_text(const Candidate& one) {
  if (one.notes.count("non_dominated") > 0) return "";
  return one.non_dominated ? "true" : "false";
}

// The order of the columns; the supply current stands among the figures.
constexpr std::array kMeasured = {"error", "tolerance_sensitivity", "capability", "yield", "worst_case_margin",
                                  "parts", "distinct_values"};

double measured(const Candidate& one, std::string_view key) {
  const auto& all = compared_measures();
  return std::find_if(all.begin(), all.end(), [key](const auto& measure) { return key == measure.key; })->value(one);
}

Fields headings() {
  Fields fields = {"name", "file", "rank", "device", "variant"};
  fields.insert(fields.end(), kMeasured.begin(), kMeasured.end());
  fields.insert(fields.end(), {"yield_low", "yield_high", "verdict", "non_dominated"});
  for (const FigureInfo& figure : figures())
    if (is_column(figure)) fields.push_back(shown_key(figure));
  for (const RoleInfo& role : roles()) fields.push_back(role.designator);
  return fields;
}

Fields fields_of(const Compared& list, std::size_t position) {
  const Candidate& one = list[position].stated;
  const Yield& yield = one.assessment->yield;
  Fields fields = {compared_name(position), list[position].file, std::to_string(one.rank), one.device, one.variant};
  for (const char* key : kMeasured) fields.push_back(csv_number(measured(one, key)));
  fields.insert(fields.end(),
                {csv_number(yield.low), csv_number(yield.high), one.assessment->verdict, dominance_text(one)});
  for (const FigureInfo& figure : figures())
    if (is_column(figure)) fields.push_back(csv_number(shown_value(one, figure)));
  for (const RoleInfo& role : roles()) {
    const Part* part = part_of(one, role.role);
    fields.push_back(part != nullptr ? csv_number(part->value) : "");
  }
  return fields;
}

}  // namespace

std::string write_comparison_csv(const Comparison& comparison) {
  std::string out = csv_record(headings());
  for (std::size_t i = 0; i < comparison.candidates.size(); ++i) out += csv_record(fields_of(comparison.candidates, i));
  return out;
}

}  // namespace bandwright
