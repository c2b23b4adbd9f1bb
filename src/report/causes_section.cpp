#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <map>

#include "report/candidate_sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_causes.hpp"

namespace bandwright {

namespace {

constexpr double kSmallestShare = 0.01;         // smaller ones are not listed
constexpr double kSmallestSensitivity = 0.005;  // smaller ones are shown as 0
constexpr std::size_t kFiguresOfAGrid = 4;      // so many columns fit on a page

double largest_share(const Assessment& assessment, Cause cause, const std::vector<Figure>& list) {
  double largest = 0;
  for (const Figure figure : list) largest = std::max(largest, assessment.share[index(figure)][index(cause)]);
  return largest;
}

// Causes that make a share worth naming of some figure, the largest first.
std::vector<Cause> who_counts(const Assessment& assessment, const std::vector<Figure>& list) {
  std::vector<Cause> found;
  for (const CauseInfo& row : causes())
    if (largest_share(assessment, row.cause, list) >= kSmallestShare) found.push_back(row.cause);
  std::stable_sort(found.begin(), found.end(), [&](Cause a, Cause b) {
    return largest_share(assessment, a, list) > largest_share(assessment, b, list);
  });
  return found;
}

std::string sensitivity_text(double value) {
  if (!std::isfinite(value)) return "-";
  return std::fabs(value) < kSmallestSensitivity ? "0" : fmt::format("{:.2f}", value);
}

std::vector<std::string> share_row(const Assessment& assessment, const Candidate& candidate, Cause cause,
                                   const std::vector<Figure>& list) {
  std::vector<std::string> cells = {cause_name(info(cause))};
  for (const Figure figure : list) {
    const double share = assessment.share[index(figure)][index(cause)];
    const bool counts = share >= kSmallestShare;
    cells.push_back(sensitivity_text(candidate.sensitivity[index(figure)][index(cause)]));
    cells.push_back(counts ? fmt::format("{:.0f} %", 100 * share) : "-");
  }
  return cells;
}

void add_shares(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate,
                const std::vector<Figure>& list) {
  TextGrid grid{{{"cause", false}}, {}, {0}};
  for (const Figure figure : list) {
    grid.columns.push_back({std::string("S of ") + info(figure).symbol, true});
    grid.columns.push_back({"share", true});
  }
  for (const Cause cause : who_counts(assessment, list)) grid.add(share_row(assessment, candidate, cause, list));
  sheet.grid(grid);
}

struct LimitsRow {
  std::string causes, limits, basis;
};

// Parts of the same limits stand in one row.
std::vector<LimitsRow> limits_rows(const Population& population, const Candidate& candidate, const Spec& spec) {
  std::vector<LimitsRow> rows;
  for (const CauseInfo& cause : causes()) {
    const CauseSpread& spread = population.spread[index(cause.cause)];
    if (!is_there(cause, candidate, spec) || !spread.varies()) continue;
    const bool is_part = cause.kind == CauseKind::part;
    LimitsRow row{is_part ? cause.symbol : cause_name(cause), limits_text(cause, spread), spread.basis};
    const auto same = std::find_if(rows.begin(), rows.end(), [&](const LimitsRow& one) {
      return is_part && one.limits == row.limits && one.basis == row.basis;
    });
    if (same == rows.end())
      rows.push_back(row);
    else
      same->causes += " " + row.causes;
  }
  return rows;
}

void add_exact(TextSheet& sheet, const Population& population, const Candidate& candidate, const Spec& spec) {
  std::map<std::string, std::vector<std::string>> names_of;
  for (const CauseInfo& cause : causes()) {
    const CauseSpread& spread = population.spread[index(cause.cause)];
    if (is_there(cause, candidate, spec) && !spread.varies()) names_of[spread.basis].push_back(cause_name(cause));
  }
  for (const auto& [basis, names] : names_of) sheet.item(fmt::format("{}: {}", basis, join(names, ", ")));
}

std::string per_million(double coefficient) { return fmt::format("±{:.4g} ppm/K", 1e6 * coefficient); }
std::string per_cent(double coefficient) { return fmt::format("{:.4g} %/K", 100 * coefficient); }

// "±50 ppm/K of R1 R2, ±200 ppm/K of C1": the parts of each coefficient together.
std::string coefficients_text(const std::array<double, kRoleCount>& coefficients, const Candidate& candidate,
                              std::string (*text)(double)) {
  std::vector<std::string> words;
  std::vector<double> listed;
  for (const Part& first : candidate.parts) {
    const double coefficient = coefficients[index(first.role)];
    if (coefficient == 0 || std::find(listed.begin(), listed.end(), coefficient) != listed.end()) continue;
    listed.push_back(coefficient);
    std::string word = text(coefficient) + " of";
    for (const Part& one : candidate.parts)
      if (coefficients[index(one.role)] == coefficient) word += fmt::format(" {}", info(one.role).designator);
    words.push_back(word);
  }
  return join(words, ", ");
}

}  // namespace

void add_spread_shares(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec) {
  std::vector<Figure> list = required_figures(spec, false);
  if (list.empty()) list = required_figures(spec, true);
  sheet.heading("Who makes the spread (S: % for 1 % of the cause; share: of the variance)");
  for (std::size_t first = 0; first < list.size(); first += kFiguresOfAGrid) {
    if (first > 0) sheet.space();
    const auto begin = list.begin() + static_cast<std::ptrdiff_t>(first);
    const auto length = static_cast<std::ptrdiff_t>(std::min(kFiguresOfAGrid, list.size() - first));
    add_shares(sheet, assessment, candidate, {begin, begin + length});
  }
}

void add_causes(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec) {
  const Population& population = assessment.population;
  sheet.heading("What varies");
  TextGrid grid{{{"cause", false}, {"limits", false}, {"basis", false}}, {}, {2, 0}};
  for (const LimitsRow& row : limits_rows(population, candidate, spec)) grid.add({row.causes, row.limits, row.basis});
  sheet.grid(grid);
  sheet.line(fmt::format("Distribution: {}.", distribution_text(population)));
  const std::string drift = coefficients_text(population.temperature_coefficient, candidate, per_million);
  if (!drift.empty()) sheet.line(fmt::format("Temperature coefficients from 25 °C, uniform: {}.", drift));
  const std::string cold = coefficients_text(population.cold_loss, candidate, per_cent);
  if (!cold.empty()) sheet.line(fmt::format("Capacitance lost below 20 °C: {}.", cold));
  add_exact(sheet, population, candidate, spec);
}

}  // namespace bandwright
