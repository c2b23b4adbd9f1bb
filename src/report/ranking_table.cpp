#include <fmt/format.h>

#include <bandwright/margins.hpp>
#include <cmath>

#include "report/sections.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

std::string error_text(double error) { return error < kWorstError ? fmt::format("{:.3f}", error) : "no value"; }

std::string sensitivity_text(double value) { return std::isfinite(value) ? fmt::format("{:.2f}", value) : "-"; }

std::vector<std::string> row_of(const Candidate& candidate) {
  const auto plain = [&](Figure figure) {
    return format_quantity(candidate.analysis.figures[index(figure)], info(figure).dimension);
  };
  return {std::to_string(candidate.rank),
          candidate.device,
          candidate.variant,
          plain(Figure::gain),
          plain(Figure::lower_cutoff),
          plain(Figure::upper_cutoff),
          error_text(candidate.error),
          sensitivity_text(candidate.tolerance_sensitivity),
          format_quantity(candidate.analysis.figures[index(Figure::collector_current)], Dimension::current, 3)};
}

void add_titles(TextSheet& sheet, const DesignResult& result) {
  TextGrid grid{{{"rank", true}, {"best at", false}}, {}, {1}};
  for (const Candidate& candidate : result.candidates)
    if (!candidate.best_at.empty()) grid.add({std::to_string(candidate.rank), join(candidate.best_at, ", ")});
  if (grid.rows.empty()) return;
  sheet.space();
  sheet.grid(grid);
}

void add_shortfalls(TextSheet& sheet, const DesignResult& result) {
  for (const Candidate& candidate : result.candidates) {
    std::vector<std::string> texts;
    for (const Shortfall& one : candidate.shortfalls) texts.push_back(one.text);
    if (!texts.empty()) sheet.item(fmt::format("{}: {}", candidate.rank, join(texts, "; ")));
  }
}

bool any_shortfall(const DesignResult& result) {
  for (const Candidate& candidate : result.candidates)
    if (!candidate.shortfalls.empty()) return true;
  return false;
}

}  // namespace

void add_ranking(TextSheet& sheet, const DesignResult& result) {
  if (result.candidates.empty() || (!result.searched && !any_requirement(result.spec))) return;
  if (result.candidates.size() == 1)
    sheet.heading("The candidate");
  else
    sheet.heading(result.ranked_by == RankBy::error
                      ? "Candidates by error in steps of 0.05, then by tolerance sensitivity"
                      : "Candidates by tolerance sensitivity");
  const auto symbol = [](Figure figure) { return std::string(info(figure).symbol); };
  TextGrid grid;
  grid.columns = {{"rank", true},
                  {"device", false},
                  {"variant", false},
                  {"gain", true},
                  {symbol(Figure::lower_cutoff), true},
                  {symbol(Figure::upper_cutoff), true},
                  {"error", true},
                  {"tolerance sensitivity", true},
                  {symbol(Figure::collector_current), true}};
  grid.flexible = {2};
  for (const Candidate& candidate : result.candidates) grid.add(row_of(candidate));
  sheet.grid(grid);
  sheet.line(
      "error: 0 on every target, 1 at a limit, above 1 not met; tolerance sensitivity: 1 where the tolerances, as a "
      "root "
      "sum of squares, fill a window.");
  add_titles(sheet, result);
  if (!any_shortfall(result)) return;
  sheet.heading("What falls short, by rank");
  add_shortfalls(sheet, result);
}

}  // namespace bandwright
