#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/sections.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// A band narrower than this has a peak that stays visibly under the idealised midband gain.
constexpr double kNarrowBand = 30;

// Smaller shares of a cutoff are not listed one by one.
constexpr double kSmallestShare = 0.005;

// A note that more figures share is printed with their number.
constexpr std::size_t kNamedFields = 4;

std::string quantity(double value, Dimension dimension) { return format_quantity(value, dimension); }

// What the part must stand: a resistor's power, a capacitor's voltage.
std::string rating_text(const Part& part) {
  const bool resistor = info(part.role).kind == PartKind::resistor;
  const double rating = resistor ? part.power_rating : part.voltage_rating;
  if (!std::isfinite(rating)) return "none holds";
  return rating == 0 ? "" : quantity(rating, resistor ? Dimension::power : Dimension::voltage);
}

// "metal film": the designator says already what kind of part it is.
std::string short_family(const Part& part) {
  const std::string kind = info(part.role).kind == PartKind::resistor ? " resistor" : " capacitor";
  return part.family.ends_with(kind) ? part.family.substr(0, part.family.size() - kind.size()) : part.family;
}

std::vector<std::string> part_row(const Part& part) {
  const RoleInfo& role = info(part.role);
  const Dimension dimension = role.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
  return {role.designator,
          role.label,
          quantity(part.value, dimension),
          part.code,
          part.series.empty() ? "none" : part.series,
          tolerance_text(part.tolerance),
          short_family(part),
          rating_text(part),
          part.polarity};
}

void add_parts(TextSheet& sheet, const Candidate& candidate) {
  sheet.heading("Parts");
  TextGrid grid;
  grid.columns = {{"part", false},      {"role", false},   {"value", true},   {"code", false},    {"series", false},
                  {"tolerance", false}, {"family", false}, {"rating", false}, {"polarity", false}};
  grid.flexible = {6, 1, 8};
  for (const Part& part : candidate.parts) grid.add(part_row(part));
  grid.add({"Q1", "transistor", candidate.device, "", "", "", candidate.parameters.pnp ? "PNP" : "NPN", "", ""});
  sheet.grid(grid);
  for (const Package& one : candidate.packages) {
    const std::string note = one.note.empty() ? "" : "; " + one.note;
    sheet.line(fmt::format("Q1 in {}: leads {}{} ({})", one.name, one.lead_order, note, describe(one.provenance)));
  }
}

std::string margin_text(double margin) {
  if (!std::isfinite(margin)) return "-";
  return fmt::format("{:.{}f}{}", margin, std::fabs(margin) < 10 ? 2 : 0, margin < 0 ? " short" : "");
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
  return {figure.label, figure.symbol, figure_text(candidate, figure), asked, margin};
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

std::string shares_text(const std::vector<TimeConstant>& constants) {
  std::vector<TimeConstant> sorted = constants;
  std::stable_sort(sorted.begin(), sorted.end(),
                   [](const TimeConstant& a, const TimeConstant& b) { return a.share > b.share; });
  std::vector<std::string> words;
  for (const TimeConstant& one : sorted) {
    if (one.share < kSmallestShare) continue;
    words.push_back(
        fmt::format("{} {:.0f} % ({})", one.capacitor, 100 * one.share, quantity(one.frequency, Dimension::frequency)));
  }
  const bool some_left_out = words.size() < sorted.size();
  return join(words, ", ") + (some_left_out ? ", the rest under 0.5 % each" : "");
}

void add_pole_model(TextSheet& sheet, const Candidate& candidate) {
  const PoleModel& model = candidate.poles_estimate;
  sheet.heading("Pole model beside the exact response");
  TextGrid grid{{{"", false}, {"exact", true}, {"estimate", true}, {"how", false}}, {}, {3}};
  const auto row = [&](Figure figure, double estimate, const std::string& how) {
    grid.add({info(figure).label, figure_text(candidate, info(figure)), figure_text(estimate, info(figure)), how});
  };
  row(Figure::gain, model.midband_gain, "resistive midband network");
  row(Figure::gain, model.textbook_gain, "hfe R'L/hie, over F, times Rin/(Rin + RS)");
  row(Figure::lower_cutoff, model.lower_cutoff, "sum of the short-circuit corner frequencies");
  row(Figure::upper_cutoff, model.upper_cutoff, "sum of the open-circuit time constants");
  row(Figure::upper_cutoff, model.miller_upper_cutoff, "input pole alone, Miller form");
  sheet.grid(grid);
  const std::string f_l = info(Figure::lower_cutoff).symbol;
  const std::string f_h = info(Figure::upper_cutoff).symbol;
  if (!model.low.empty()) sheet.item("Who sets " + f_l + ": " + shares_text(model.low));
  if (!model.high.empty()) sheet.item("Who sets " + f_h + ": " + shares_text(model.high));
}

std::string root_text(const std::complex<double>& root) {
  const std::string real = quantity(root.real(), Dimension::frequency);
  if (root.imag() == 0) return real;
  return real + " ± j " + quantity(std::fabs(root.imag()), Dimension::frequency);
}

// A conjugate pair is printed once.
std::string roots_text(const std::vector<std::complex<double>>& roots) {
  std::vector<std::string> words;
  for (const auto& root : roots)
    if (root.imag() >= 0) words.push_back(root_text(root));
  return words.empty() ? "none" : join(words, ", ");
}

void add_roots(TextSheet& sheet, const Candidate& candidate) {
  if (candidate.poles.poles.empty() && candidate.poles.zeros.empty()) return;
  sheet.item("Poles, s/2π: " + roots_text(candidate.poles.poles));
  sheet.item("Zeros, s/2π: " + roots_text(candidate.poles.zeros));
}

// Figures of later versions go without saying here, and the narrow band has a line of its own.
bool is_silent(const std::string& field) {
  const auto figure = find_figure(field);
  return figure && (*figure == Figure::midband_gain || info(*figure).use == FigureUse::reserved);
}

void add_notes(TextSheet& sheet, const Candidate& candidate) {
  std::map<std::string, std::vector<std::string>> fields_of;
  for (const auto& [field, text] : candidate.notes)
    if (!is_silent(field)) fields_of[text].push_back(field);
  if (fields_of.empty()) return;
  sheet.heading("Notes");
  for (const auto& [text, fields] : fields_of) {
    const bool many = fields.size() > kNamedFields;
    sheet.item((many ? fmt::format("{} figures", fields.size()) : join(fields, ", ")) + ": " + text);
  }
}

}  // namespace

bool is_active(const Candidate& candidate) { return candidate.analysis.point.state == BiasState::active; }

void add_candidate(TextSheet& sheet, const Candidate& candidate, const Spec& spec) {
  sheet.heading(fmt::format("Candidate {}: {}, {}", candidate.rank, candidate.device, candidate.variant));
  add_parts(sheet, candidate);
  if (is_active(candidate)) {
    add_figures(sheet, candidate, spec);
    add_operating_point(sheet, candidate);
    add_pole_model(sheet, candidate);
    add_roots(sheet, candidate);
  }
  add_notes(sheet, candidate);
}

}  // namespace bandwright
