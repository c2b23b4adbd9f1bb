#include <fmt/format.h>

#include <algorithm>
#include <bandwright/margins.hpp>
#include <cmath>
#include <functional>

#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// Stands before the rank of a candidate that none of the others beats in every respect.
constexpr const char* kMark = "*";

std::string error_text(double error) { return error < kWorstError ? fmt::format("{:.3f}", error) : "no value"; }

std::string ratio_text(double value) { return std::isfinite(value) ? fmt::format("{:.2f}", value) : "-"; }

using CellText = std::function<std::string(const Candidate&)>;

CellText figure_cell(Figure figure, int digits) {
  return [figure, digits](const Candidate& candidate) {
    return format_quantity(candidate.analysis.figures[index(figure)], info(figure).dimension, digits);
  };
}

CellText assessed_cell(std::string (*text)(const Assessment&)) {
  return [text](const Candidate& candidate) { return candidate.assessment ? text(*candidate.assessment) : "-"; };
}

std::string marked_rank(const Candidate& candidate) {
  return fmt::format("{}{}", candidate.non_dominated ? kMark : "", candidate.rank);
}

// A column of the ranking; on a narrow page the dispensable ones give way, last one first.
struct RankColumn {
  TextGrid::Column column;
  CellText text;
  bool is_wanted = true;
  bool is_dispensable = false;
};

bool any_assessed(const DesignResult& result) {
  return std::any_of(result.candidates.begin(), result.candidates.end(),
                     [](const Candidate& one) { return one.assessment.has_value(); });
}

// What the order looks at is always there.
std::vector<RankColumn> rank_columns(const DesignResult& result) {
  const bool assessed = any_assessed(result);
  const auto by = [&](RankBy order) { return result.ranked_by == order; };
  const auto symbol = [](Figure figure) { return std::string(info(figure).symbol); };
  return {
      {{"rank", true}, marked_rank},
      {{"device", false}, [](const Candidate& c) { return c.device; }},
      {{"variant", false}, [](const Candidate& c) { return c.variant; }},
      {{"gain", true}, figure_cell(Figure::gain, 4)},
      {{symbol(Figure::lower_cutoff), true}, figure_cell(Figure::lower_cutoff, 4)},
      {{symbol(Figure::upper_cutoff), true}, figure_cell(Figure::upper_cutoff, 4)},
      {{"error", true}, [](const Candidate& c) { return error_text(c.error); }, true, !by(RankBy::error)},
      {{"tolerance sensitivity", true},
       [](const Candidate& c) { return ratio_text(c.tolerance_sensitivity); },
       by(RankBy::sensitivity) || !assessed},
      {{"worst-case margin", true},
       assessed_cell([](const Assessment& a) { return ratio_text(a.worst_case_margin); }),
       by(RankBy::worst_case) && assessed},
      {{"capability", true},
       assessed_cell([](const Assessment& a) { return capability_text(a.capability, a); }),
       assessed,
       !by(RankBy::capability) && !by(RankBy::yield)},
      {{"yield", true}, assessed_cell([](const Assessment& a) { return share_text(a.yield.share()); }), assessed},
      {{symbol(Figure::supply_current), true}, figure_cell(Figure::supply_current, 3), true, !by(RankBy::current)},
      {{"parts", true}, [](const Candidate& c) { return std::to_string(c.parts.size()); }, by(RankBy::parts)},
  };
}

TextGrid ranking_grid(const DesignResult& result) {
  TextGrid grid{{}, std::vector<std::vector<std::string>>(result.candidates.size()), {2}};
  for (const RankColumn& one : rank_columns(result)) {
    if (!one.is_wanted) continue;
    if (one.is_dispensable) grid.dispensable.insert(grid.dispensable.begin(), grid.columns.size());
    grid.columns.push_back(one.column);
    for (std::size_t i = 0; i < result.candidates.size(); ++i) grid.rows[i].push_back(one.text(result.candidates[i]));
  }
  return grid;
}

void explain_columns(TextSheet& sheet, const DesignResult& result) {
  const bool assessed = any_assessed(result);
  std::string text = "error: 0 on every target, 1 at a limit, above 1 not met";
  if (!assessed || result.ranked_by == RankBy::sensitivity)
    text += "; tolerance sensitivity: 1 where the tolerances, as a root sum of squares, fill a window";
  sheet.line(text + ".");
  if (!assessed) return;
  const bool marked = std::any_of(result.candidates.begin(), result.candidates.end(),
                                  [](const Candidate& one) { return one.assessment && one.assessment->from_moments; });
  sheet.line(capability_definition(marked));
  if (std::any_of(result.candidates.begin(), result.candidates.end(), [](const auto& c) { return c.non_dominated; }))
    sheet.line(
        fmt::format("{}: none of the others is at least as good in error, capability, {} and number of parts and "
                    "better in one of them.",
                    kMark, info(Figure::supply_current).symbol));
}

void add_titles(TextSheet& sheet, const DesignResult& result) {
  TextGrid grid{{{"rank", true}, {"best at", false}}, {}, {1}};
  for (const Candidate& candidate : result.candidates)
    if (!candidate.best_at.empty()) grid.add({std::to_string(candidate.rank), join(candidate.best_at, ", ")});
  if (grid.rows.empty()) return;
  sheet.space();
  sheet.grid(grid);
}

// What is given away with the smallest error.
void compare_with_most_exact(TextSheet& sheet, const DesignResult& result) {
  const Candidate& first = result.candidates.front();
  const auto exact = std::find_if(result.candidates.begin(), result.candidates.end(), [](const Candidate& one) {
    return std::find(one.best_at.begin(), one.best_at.end(), "most exact") != one.best_at.end();
  });
  if (exact == result.candidates.end() || exact->rank == first.rank || !first.assessment || !exact->assessment) return;
  const Assessment& a = *first.assessment;
  const Assessment& b = *exact->assessment;
  sheet.line(
      fmt::format("Candidate {} against the most exact (rank {}): capability {} against {}, yield {} against {}.",
                  first.rank, exact->rank, capability_text(a.capability, a), capability_text(b.capability, b),
                  share_text(a.yield.share()), share_text(b.yield.share())));
}

void add_shortfalls(TextSheet& sheet, const DesignResult& result) {
  for (const Candidate& candidate : result.candidates) {
    std::vector<std::string> texts;
    for (const Shortfall& one : candidate.shortfalls) texts.push_back(one.text);
    if (!texts.empty()) sheet.item(fmt::format("{}: {}", candidate.rank, join(texts, "; ")));
  }
}

bool any_shortfall(const DesignResult& result) {
  return std::any_of(result.candidates.begin(), result.candidates.end(),
                     [](const Candidate& one) { return !one.shortfalls.empty(); });
}

}  // namespace

void add_ranking(TextSheet& sheet, const DesignResult& result) {
  if (result.candidates.empty() || (!result.searched && !any_requirement(result.spec))) return;
  const bool alone = result.candidates.size() == 1;
  sheet.heading(alone ? "The candidate" : fmt::format("Candidates: {}", order_reason(result)));
  sheet.grid(ranking_grid(result));
  explain_columns(sheet, result);
  add_titles(sheet, result);
  compare_with_most_exact(sheet, result);
  if (!any_shortfall(result)) return;
  sheet.heading("What falls short, by rank");
  add_shortfalls(sheet, result);
}

}  // namespace bandwright
