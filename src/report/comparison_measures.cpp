// Names of the candidates, and the measures by which they are told apart.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/comparison.hpp"
#include "report/shown_assessment.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

constexpr int kCurrentDigits = 3;

// Two or three places, and no minus before nothing.
std::string decimals(double value, int places) {
  if (std::isnan(value)) return "-";
  const std::string text = fmt::format("{:.{}f}", value, places);
  return text.find_first_not_of("-0.") == std::string::npos && text.front() == '-' ? text.substr(1) : text;
}

double capability(const Candidate& one) { return one.assessment->capability; }
double worst_case_margin(const Candidate& one) { return one.assessment->worst_case_margin; }
double yield(const Candidate& one) { return one.assessment->yield.share(); }
double error(const Candidate& one) { return one.error; }
double sensitivity(const Candidate& one) { return one.tolerance_sensitivity; }
double supply_current(const Candidate& one) { return one.analysis.figures[index(Figure::supply_current)]; }
double parts(const Candidate& one) { return static_cast<double>(one.parts.size()); }

double values(const Candidate& one) {
  PartValues list{};
  for (const Part& part : one.parts) list[index(part.role)] = part.value;
  return distinct_values(list);
}

template <double (*value)(const Candidate&), int places>
std::string decimal_text(const Candidate& one) {
  return decimals(value(one), places);
}

std::string yield_text(const Candidate& one) { return share_text(yield(one)); }
std::string error_text(const Candidate& one) { return one.error >= kWorstError ? "no value" : decimals(one.error, 3); }
std::string current_text(const Candidate& one) {
  return format_quantity(supply_current(one), Dimension::current, kCurrentDigits);
}

}  // namespace

const std::vector<ComparedMeasure>& compared_measures() {
  static const std::vector<ComparedMeasure> kMeasures = {
      {"capability", "capability", "capability", "the higher", "the highest", true, false, capability,
       decimal_text<capability, 2>},
      {"worst_case_margin", "worst-case margin", "margin at the worst corner", "the larger", "the largest", true, false,
       worst_case_margin, decimal_text<worst_case_margin, 2>},
      {"yield", "yield", "yield", "the higher", "the highest", true, false, yield, yield_text},
      {"error", "error", "error", "the smaller", "the smallest", false, false, error, error_text},
      {"tolerance_sensitivity", "tolerance sensitivity", "tolerance sensitivity", "the lower", "the lowest", false,
       false, sensitivity, decimal_text<sensitivity, 2>},
      {"supply_current", "supply current", "supply current", "the lower", "the lowest", false, false, supply_current,
       current_text},
      {"parts", "number of parts", "parts", "fewer", "the fewest", false, true, parts, decimal_text<parts, 0>},
      {"distinct_values", "number of distinct values", "distinct values", "fewer", "the fewest", false, true, values,
       decimal_text<values, 0>},
  };
  return kMeasures;
}

std::string compared_name(std::size_t position) { return std::string(1, static_cast<char>('A' + position)); }

std::string origin_text(const Compared& list, std::size_t position) {
  const ComparedCandidate& one = list[position];
  const bool is_one_file =
      std::all_of(list.begin(), list.end(), [&](const ComparedCandidate& other) { return other.file == one.file; });
  return fmt::format("{}rank {}", is_one_file ? "" : one.file + ", ", one.stated.rank);
}

std::string enumerated(const std::vector<std::string>& items, const char* last) {
  if (items.size() < 2) return join(items, "");
  return fmt::format("{} {} {}", join({items.begin(), items.end() - 1}, ", "), last, items.back());
}

std::string names_of(const Positions& positions, const char* last) {
  std::vector<std::string> names;
  for (const std::size_t position : positions) names.push_back(compared_name(position));
  return enumerated(names, last);
}

std::vector<Figure> least_capable_figures(const ComparedCandidate& one) {
  const Assessment& assessment = *one.stated.assessment;
  std::vector<Figure> least;
  for (const Figure figure : required_figures(one.spec, false))
    if (assessment.spread[index(figure)].capability <= assessment.capability) least.push_back(figure);
  return least;
}

}  // namespace bandwright
