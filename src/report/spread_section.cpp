#include <fmt/format.h>

#include <cmath>

#include "report/candidate_sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr std::array kNumbers = {"none", "one corner", "two corners", "three corners", "four corners"};

// "at nominal and at four corners".
std::string conditions_text(const Population& population) {
  const std::size_t corners = population.conditions.size() - 1;
  if (corners == 0) return "at nominal";
  return fmt::format("at nominal and at {}", kNumbers.at(corners));
}

std::string yield_text(const Assessment& assessment, const Spec& spec) {
  const Yield& yield = assessment.yield;
  if (yield.units == 0) return "No unit was simulated.";
  const std::string interval = share_text(yield.low, 4);
  return fmt::format("{} of {} units {} {}: {} (95 % interval {} to {}), seed {}.", counted(yield.passed),
                     counted(yield.units), required_figures(spec, false).empty() ? "are active" : "pass",
                     conditions_text(assessment.population), share_text(yield.share(), 4),
                     interval.substr(0, interval.size() - 2), share_text(yield.high, 4), yield.seed);
}

std::string inactive_text(const Assessment& assessment) {
  const Yield& yield = assessment.yield;
  return fmt::format("{} {} not active at some condition, most often {}.", counted(yield.not_active),
                     yield.not_active == 1 ? "unit is" : "units are",
                     at_condition_text(assessment, yield.least_active_at));
}

// What the verdict rests on.
std::string verdict_text(const Assessment& assessment, const Spec& spec) {
  const auto met = [](bool is_met) { return is_met ? "met" : "not met"; };
  return fmt::format("Verdict: {}. Nominally {}; in the worst case {}; yield {} where {} is asked.", assessment.verdict,
                     met(assessment.nominal_met), met(assessment.worst_case_met),
                     share_text(assessment.yield.share(), 4), share_text(spec.assess.yield, 6));
}

// "38.1 to 46.3 Hz": the unit once where both ends have the same.
std::string range_text(double min, double max, const FigureInfo& figure) {
  if (std::isnan(min) || std::isnan(max)) return "-";
  const std::string low = format_quantity(min, figure.dimension), high = format_quantity(max, figure.dimension);
  const std::size_t unit = high.find(' ');
  if (unit == std::string::npos || !low.ends_with(high.substr(unit))) return low + " to " + high;
  return low.substr(0, low.find(' ')) + " to " + high;
}

std::string sigma_text(const FigureSpread& spread) {
  const double share = spread.sigma / std::fabs(spread.mean);
  return std::isfinite(share) ? fmt::format("{:.2g} %", 100 * share) : "-";
}

std::vector<std::string> spread_row(const Assessment& assessment, const Candidate& candidate, const FigureInfo& figure,
                                    bool required) {
  const std::size_t at = index(figure.figure);
  const WorstCase& worst = assessment.worst_case[at];
  const FigureSpread& spread = assessment.spread[at];
  return {figure.label,
          format_quantity(candidate.analysis.figures[at], figure.dimension),
          range_text(worst.min, worst.max, figure),
          range_text(worst.rss_min, worst.rss_max, figure),
          std::isnan(spread.mean) ? "" : sigma_text(spread),
          required ? capability_text(spread.capability, assessment) : "",
          required ? counted(spread.failed) : ""};
}

void add_rows(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec) {
  TextGrid grid;
  grid.columns = {{"figure", false}, {"nominal", true},    {"worst case", true}, {"RSS", true},
                  {"sigma", true},   {"capability", true}, {"failed", true}};
  grid.flexible = {0, 3, 2};
  for (const Figure figure : bounded_figures(assessment, spec))
    grid.add(spread_row(assessment, candidate, info(figure), spec.requirement(figure).has_value()));
  sheet.grid(grid);
}

void add_corners(TextSheet& sheet, const Assessment& assessment, const Spec& spec) {
  for (const Figure figure : required_figures(spec, true)) {
    const WorstCase& worst = assessment.worst_case[index(figure)];
    if (worst.at_min.empty() || worst.at_max.empty()) continue;
    sheet.item(fmt::format("{}: least at {}; largest at {}", info(figure).label, worst.at_min, worst.at_max));
  }
}

// Figures without a worst case, those of one reason together.
void add_missing(TextSheet& sheet, const Assessment& assessment, const Spec& spec) {
  std::map<std::string, std::vector<std::string>> labels_of;
  for (const Figure figure : bounded_figures(assessment, spec)) {
    const std::string& reason = assessment.worst_case[index(figure)].reason;
    if (!reason.empty()) labels_of[reason].push_back(info(figure).label);
  }
  for (const auto& [reason, labels] : labels_of)
    sheet.item(fmt::format("no worst case of {}: {}", join(labels, ", "), reason));
}

}  // namespace

void add_spread(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec) {
  const bool any_required = !required_figures(spec, false).empty();
  sheet.heading("Spread of built units");
  sheet.line(yield_text(assessment, spec));
  if (assessment.yield.not_active > 0) sheet.line(inactive_text(assessment));
  if (any_required) sheet.line(verdict_text(assessment, spec));
  add_rows(sheet, assessment, candidate, spec);
  add_corners(sheet, assessment, spec);
  add_missing(sheet, assessment, spec);
  sheet.line(fmt::format(
      "worst case: every cause at its limits, at the worst supply and ambient; RSS: root sum of squares of the causes' "
      "effects at their limits; sigma: over the units, at nominal{}.",
      any_required ? "; failed: active units that miss the requirement at some condition" : ""));
}

}  // namespace bandwright
