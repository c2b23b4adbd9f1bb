// The comparison for people: what the choice is between, then candidates, measures, figures and parts beside each
// other.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/version.hpp>
#include <cmath>

#include "report/comparison_sections.hpp"
#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

std::string or_dash(const std::string& text) { return text.empty() ? "-" : text; }

void add_candidates(TextSheet& sheet, const Compared& list) {
  sheet.heading("What they are");
  TextGrid grid{{{"", false},
                 {"candidate", false},
                 {"device", false},
                 {"variant", false},
                 {"verdict", false},
                 {"non-dominated", false},
                 {"best at", false}},
                {},
                {6, 1, 3, 4}};
  for (std::size_t i = 0; i < list.size(); ++i) {
    const Candidate& one = list[i].stated;
    const bool is_told = one.notes.count("non_dominated") == 0;
    grid.add({compared_name(i), origin_text(list, i), one.device, or_dash(one.variant),
              or_dash(one.assessment->verdict), is_told ? (one.non_dominated ? "yes" : "no") : "-",
              join(one.best_at, ", ")});
  }
  sheet.grid(grid);
  sheet.line(
      fmt::format("non-dominated: none of its file is at least as good in error, capability, {} and number of parts "
                  "and better in one of them.",
                  info(Figure::supply_current).symbol));
}

void add_shortfalls(TextSheet& sheet, const Compared& list) {
  for (std::size_t i = 0; i < list.size(); ++i) {
    std::vector<std::string> texts;
    for (const Shortfall& one : list[i].stated.shortfalls) texts.push_back(one.text);
    if (!texts.empty()) sheet.item(fmt::format("{} falls short: {}", compared_name(i), join(texts, "; ")));
  }
}

std::string set_by_text(const ComparedCandidate& one) {
  const std::vector<Figure> least = least_capable_figures(one);
  if (least.size() > 1 && least.size() == required_figures(one.spec, false).size()) return "every figure";
  std::vector<std::string> labels;
  for (const Figure figure : least) labels.push_back(info(figure).label);
  return or_dash(join(labels, ", "));
}

std::string interval_text(const ComparedCandidate& one) {
  const Yield& yield = one.stated.assessment->yield;
  if (yield.units == 0) return "-";
  const std::string low = share_text(yield.low, 4);
  return fmt::format("{} to {}", low.substr(0, low.find(' ')), share_text(yield.high, 4));
}

std::string units_text(const ComparedCandidate& one) {
  const std::size_t units = one.stated.assessment->yield.units;
  return units > 0 ? counted(units) : "-";
}

// What is told beneath a measure.
struct Beneath {
  const char* key;
  const char* label;
  std::string (*text)(const ComparedCandidate&);
};
constexpr std::array kBeneath = {Beneath{"capability", "set by", set_by_text},
                                 Beneath{"yield", "95 % interval", interval_text},
                                 Beneath{"yield", "units simulated", units_text}};

std::string measure_text(const ComparedMeasure& measure, const ComparedCandidate& one) {
  if (std::string_view(measure.key) != "capability") return measure.text(one.stated);
  return capability_text(one.stated.assessment->capability, *one.stated.assessment);
}

void add_measures(TextSheet& sheet, const Compared& list, const TableStyle& style) {
  sheet.heading("Measures");
  BesideGrid grid(list, {""});
  for (const ComparedMeasure& measure : compared_measures()) {
    grid.add_stated({measure.label}, [&](const auto& one) { return measure_text(measure, one); });
    for (const Beneath& row : kBeneath)
      if (std::string_view(row.key) == measure.key) grid.add_stated({fmt::format("- {}", row.label)}, row.text);
  }
  grid.print(sheet, style);
  sheet.line(
      "error: 0 on every target, 1 at a limit, above 1 not met; tolerance sensitivity: 1 where the tolerances, as a "
      "root sum of squares, fill a window.");
  const auto is_marked = [](const ComparedCandidate& one) { return one.stated.assessment->from_moments; };
  sheet.line(capability_definition(std::any_of(list.begin(), list.end(), is_marked)));
}

// Without the decibels that a gain carries elsewhere: columns are narrow.
std::string figure_cell(const ComparedCandidate& one, const FigureInfo& figure) {
  const double value = one.stated.analysis.figures[index(figure.figure)];
  return figure.dimension == Dimension::gain ? format_quantity(value, Dimension::gain) : figure_text(value, figure);
}

std::string margin_cell(const ComparedCandidate& one, Figure figure) {
  const double margin = one.stated.margins[index(figure)];
  return std::isnan(margin) ? "-" : fmt::format("{:.2f}{}", margin, margin < 0 ? " short" : "");
}

// The window of a figure where all specs have the same.
std::string accepted_text(const Compared& list, const FigureInfo& figure) {
  std::vector<std::string> windows;
  for (const ComparedCandidate& one : list) {
    const auto& requirement = one.spec.requirement(figure.figure);
    windows.push_back(requirement ? window_text(*requirement, figure) : "");
  }
  const bool are_same = std::equal(windows.begin() + 1, windows.end(), windows.begin());
  return are_same ? windows.front() : "each its own";
}

void add_figures(TextSheet& sheet, const Compared& list, const TableStyle& style) {
  const std::vector<Figure> required = required_by_any(list);
  sheet.heading(required.empty() ? "Figures" : "Figures (margin: 1 on the target, 0 at the limit)");
  BesideGrid grid(list, {"figure", "accepted"});
  for (const Figure figure : required) {
    grid.add({info(figure).label, accepted_text(list, info(figure))},
             [&](const auto& one) { return figure_cell(one, info(figure)); });
    grid.add_stated({"- margin", ""}, [&](const auto& one) { return margin_cell(one, figure); });
  }
  for (const FigureInfo& figure : figures())
    if (std::find(required.begin(), required.end(), figure.figure) == required.end())
      grid.add_stated({figure.label, ""}, [&](const auto& one) { return figure_cell(one, figure); });
  grid.print(sheet, style);
}

}  // namespace

std::string write_comparison_table(const Comparison& comparison, const TableStyle& style) {
  const Compared& list = comparison.candidates;
  TextSheet sheet(style);
  sheet.heading(choice_text(list));
  for (const std::string& text : difference_texts(list)) sheet.paragraph(text);
  for (const std::string& note : comparison.notes) sheet.paragraph(note);
  add_candidates(sheet, list);
  add_shortfalls(sheet, list);
  add_measures(sheet, list, style);
  add_figures(sheet, list, style);
  add_compared_parts(sheet, list, style);
  add_compared_worst_cases(sheet, list, style);
  add_not_stated(sheet, list);
  add_cautions(sheet);
  sheet.space();
  sheet.paragraph(fmt::format("bandwright {}; one of them in full: bandwright check RESULT --pick RANK", version()));
  return sheet.text();
}

}  // namespace bandwright
