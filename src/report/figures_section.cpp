#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/candidate_sections.hpp"
#include "report/sections.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// A band narrower than this has a peak that stays visibly under the idealised midband gain.
constexpr double kNarrowBand = 30;

std::string margin_text(double margin) {
  if (!std::isfinite(margin)) return "-";
  return fmt::format("{:.{}f}{}", margin, std::fabs(margin) < 10 ? 2 : 0, margin < 0 ? " short" : "");
}

bool has_invented_costs(const Candidate& candidate) {
  return candidate.transistor.invented_cost || std::any_of(candidate.parts.begin(), candidate.parts.end(),
                                                           [](const Part& part) { return part.invented_cost; });
}

std::vector<std::string> figure_row(const Candidate& candidate, const FigureInfo& figure, const Spec& spec) {
  const auto& requirement = spec.requirement(figure.figure);
  std::string asked;
  std::string margin;
  if (requirement) {
    asked = window_text(*requirement, figure);
    const double value = candidate.margins[index(figure.figure)];
    margin = margin_text(value);
  }
  const bool invented = figure.figure == Figure::cost && has_invented_costs(candidate);
  return {figure.label, figure.symbol, figure_text(candidate, figure) + (invented ? "*" : ""), asked, margin};
}

// Figures shown in a section of their own.
constexpr std::array kOperatingPoint = {
    Figure::collector_current,     Figure::collector_emitter_voltage, Figure::base_voltage,
    Figure::emitter_voltage,       Figure::collector_voltage,         Figure::dissipation,
    Figure::junction_temperature,  Figure::stability_factor,          Figure::divider_current_ratio,
    Figure::emitter_voltage_share, Figure::collector_emitter_share};

bool is_operating_point(Figure figure) {
  return std::find(kOperatingPoint.begin(), kOperatingPoint.end(), figure) != kOperatingPoint.end();
}

}  // namespace

void add_figures(TextSheet& sheet, const Candidate& candidate, const Spec& spec) {
  sheet.heading("Figures beside what was asked (margin: 1 on the target, 0 at the limit)");
  TextGrid grid{
      {{"figure", false}, {"symbol", false}, {"value", true}, {"accepted", false}, {"margin", false}}, {}, {0}};
  for (const bool required : {true, false}) {
    for (const FigureInfo& figure : figures()) {
      if (figure.use == FigureUse::reserved || bool(spec.requirement(figure.figure)) != required) continue;
      if (required || !is_operating_point(figure.figure)) grid.add(figure_row(candidate, figure, spec));
    }
  }
  sheet.grid(grid);
  if (has_invented_costs(candidate)) sheet.line("*: with costs invented for demonstration; nobody sells at them.");
  const FigureValues& values = candidate.analysis.figures;
  const double ratio = values[index(Figure::upper_cutoff)] / values[index(Figure::lower_cutoff)];
  if (!(ratio < kNarrowBand)) return;
  sheet.line(
      fmt::format("Narrow band, fH/fL = {:.3g}: the gain stays under the idealised midband gain of {}, which counts no "
                  "capacitor. {}: "
                  "{}.",
                  ratio, figure_text(candidate, info(Figure::midband_gain)), info(Figure::gain).label,
                  info(Figure::gain).definition));
}

void add_operating_point(TextSheet& sheet, const Candidate& candidate) {
  sheet.heading("Operating point");
  TextGrid grid{{{"", false}, {"", false}, {"value", true}, {"usual", false}}, {}, {3}};
  const std::map<Figure, std::string> usual = {
      {Figure::collector_emitter_share, "near half"},
      {Figure::emitter_voltage_share, "about a tenth, or 1 V"},
      {Figure::divider_current_ratio, "about 10"},
  };
  for (const Figure figure : kOperatingPoint) {
    const auto hint = usual.find(figure);
    grid.add({info(figure).label, info(figure).symbol, figure_text(candidate, info(figure)),
              hint == usual.end() ? "" : hint->second});
  }
  sheet.grid(grid);
  sheet.line("usual: common practice, no source");
}

}  // namespace bandwright
