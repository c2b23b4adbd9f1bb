// The first line of a comparison: what the choice is between, in numbers.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/comparison.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

// The candidates that are best in the same measures.
struct Lead {
  Positions ahead;
  std::vector<std::string> points;
};

bool intervals_overlap(const Yield& a, const Yield& b) { return a.low <= b.high && b.low <= a.high; }

// Alike to the digits shown; yields also where the simulation cannot tell them apart.
bool are_alike(const ComparedMeasure& measure, const Candidate& a, const Candidate& b) {
  if (measure.text(a) == measure.text(b)) return true;
  return std::string_view(measure.key) == "yield" && intervals_overlap(a.assessment->yield, b.assessment->yield);
}

bool is_better(const ComparedMeasure& measure, const Candidate& a, const Candidate& b) {
  return measure.higher_is_better ? measure.value(a) > measure.value(b) : measure.value(a) < measure.value(b);
}

bool all_state(const ComparedMeasure& measure, const Compared& list) {
  return std::none_of(list.begin(), list.end(),
                      [&](const ComparedCandidate& one) { return std::isnan(measure.value(one.stated)); });
}

Positions best_of(const ComparedMeasure& measure, const Compared& list) {
  const auto best = std::min_element(
      list.begin(), list.end(), [&](const auto& a, const auto& b) { return is_better(measure, a.stated, b.stated); });
  Positions ahead;
  for (std::size_t i = 0; i < list.size(); ++i)
    if (are_alike(measure, list[i].stated, best->stated)) ahead.push_back(i);
  return ahead;
}

// "1.94 to 1.98", or one value.
std::string range_of(const ComparedMeasure& measure, const Compared& list, const Positions& positions) {
  const auto by_value = [&](std::size_t a, std::size_t b) {
    return measure.value(list[a].stated) < measure.value(list[b].stated);
  };
  const auto [least, most] = std::minmax_element(positions.begin(), positions.end(), by_value);
  const std::string low = measure.text(list[*least].stated), high = measure.text(list[*most].stated);
  return low == high ? low : fmt::format("{} to {}", low, high);
}

Positions others(const Compared& list, const Positions& ahead) {
  Positions rest;
  for (std::size_t i = 0; i < list.size(); ++i)
    if (!std::binary_search(ahead.begin(), ahead.end(), i)) rest.push_back(i);
  return rest;
}

// "the higher capability (2.00 against 1.49)", "the highest capability (2.00, the others 1.49 to 1.94)"
std::string point_text(const ComparedMeasure& measure, const Compared& list, const Positions& ahead) {
  const Positions rest = others(list, ahead);
  const bool is_pair = list.size() == 2;
  const char* between = is_pair ? " against" : rest.size() == 1 ? ", the other" : ", the others";
  return fmt::format("{} {} ({}{} {})", is_pair ? measure.better : measure.best, measure.noun,
                     range_of(measure, list, ahead), between, range_of(measure, list, rest));
}

// What is alike, told with the reason where it does not look so.
std::string alike_text(const ComparedMeasure& measure, const Compared& list) {
  const std::string first = measure.text(list.front().stated);
  const bool looks_alike = std::all_of(list.begin(), list.end(),
                                       [&](const ComparedCandidate& one) { return measure.text(one.stated) == first; });
  return fmt::format("{}{}", measure.label, looks_alike ? "" : " (the 95 % intervals overlap)");
}

void add_point(std::vector<Lead>& leads, const Positions& ahead, const std::string& point) {
  const auto same = std::find_if(leads.begin(), leads.end(), [&](const Lead& one) { return one.ahead == ahead; });
  if (same == leads.end())
    leads.push_back({ahead, {point}});
  else
    same->points.push_back(point);
}

// "A has the higher capability (...)"; the verb stands once.
std::string lead_text(const Lead& lead, bool with_verb) {
  const char* verb = lead.ahead.size() == 1 ? "has " : "have ";
  return fmt::format("{} {}{}", names_of(lead.ahead, "and"), with_verb ? verb : "", enumerated(lead.points, "and"));
}

std::string behind_text(const std::vector<Lead>& leads, const Compared& list) {
  Positions ahead;
  for (const Lead& lead : leads) ahead.insert(ahead.end(), lead.ahead.begin(), lead.ahead.end());
  std::sort(ahead.begin(), ahead.end());
  const Positions rest = others(list, ahead);
  if (rest.empty() || leads.empty()) return "";
  return fmt::format("{} {} ahead in none of these", names_of(rest, "and"), rest.size() == 1 ? "is" : "are");
}

bool verdicts_differ(const Compared& list) {
  return std::any_of(list.begin(), list.end(), [&](const ComparedCandidate& one) {
    return one.stated.assessment->verdict != list.front().stated.assessment->verdict;
  });
}

// "A or B", "A (pass) or B (not met)"
std::string candidates_text(const Compared& list) {
  std::vector<std::string> names;
  const bool with_verdict = verdicts_differ(list);
  for (std::size_t i = 0; i < list.size(); ++i) {
    const std::string& verdict = list[i].stated.assessment->verdict;
    names.push_back(with_verdict ? fmt::format("{} ({})", compared_name(i), verdict.empty() ? "no verdict" : verdict)
                                 : compared_name(i));
  }
  return enumerated(names, "or");
}

}  // namespace

std::string choice_text(const Compared& list) {
  std::vector<Lead> leads;
  std::vector<std::string> alike;
  for (const ComparedMeasure& measure : compared_measures()) {
    if (!all_state(measure, list)) continue;
    const Positions ahead = best_of(measure, list);
    if (ahead.size() == list.size())
      alike.push_back(alike_text(measure, list));
    else
      add_point(leads, ahead, point_text(measure, list, ahead));
  }
  std::vector<std::string> clauses;
  for (const Lead& lead : leads) clauses.push_back(lead_text(lead, clauses.empty()));
  if (const std::string behind = behind_text(leads, list); !behind.empty()) clauses.push_back(behind);
  if (!alike.empty()) clauses.push_back("alike in " + enumerated(alike, "and"));
  if (!differing_requirements(list).empty()) clauses.push_back("each against its own requirements");
  return fmt::format("{}: {}.", candidates_text(list), join(clauses, "; "));
}

}  // namespace bandwright
