#include <fmt/format.h>

#include <cmath>

#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"
#include "units/printable.hpp"

namespace bandwright {

namespace {

// A grid of two columns without headings.
struct NamedLines {
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  void add(const std::string& name, const std::string& text) { grid.add({name, text}); }
};

std::string condition_text(const Condition& condition, Dimension dimension) {
  const std::string nominal = format_quantity(condition.nominal, dimension);
  if (condition.min == condition.max) return nominal + " exactly";
  return fmt::format("{} ({} to {})", nominal, format_quantity(condition.min, dimension),
                     format_quantity(condition.max, dimension));
}

std::string dc_text(double dc) { return dc == 0 ? "" : ", at " + format_quantity(dc, Dimension::voltage) + " DC"; }

std::string shunted(const std::string& resistance, double capacitance) {
  if (capacitance == 0) return resistance;
  return resistance + " with " + format_quantity(capacitance, Dimension::capacitance) + " to ground";
}

std::string source_text(const Source& source) {
  return shunted(format_quantity(source.resistance, Dimension::resistance), source.capacitance) + dc_text(source.dc);
}

std::string load_text(const Load& load) {
  const std::string resistance =
      load.conductance > 0 ? format_quantity(1 / load.conductance, Dimension::resistance) : "open";
  return shunted(resistance, load.capacitance) + dc_text(load.dc);
}

std::string stray_text(const Stray& stray) {
  if (stray.input == 0 && stray.output == 0 && stray.feedback == 0) return "none counted";
  return fmt::format(
      "base {}, collector {}, collector to base {}", format_quantity(stray.input, Dimension::capacitance),
      format_quantity(stray.output, Dimension::capacitance), format_quantity(stray.feedback, Dimension::capacitance));
}

std::string assess_text(const Assess& assess) {
  const std::string units = counted(static_cast<std::size_t>(assess.units));
  const std::string asked = fmt::format("{} must pass; {} simulated", share_text(assess.yield, 6), units);
  if (assess.interval == 0) return asked;
  return fmt::format("{}, fewer once the 95 % interval is narrower than {}", asked, share_text(assess.interval, 6));
}

std::string rules_text(const PartRules& rules, Dimension dimension) {
  std::vector<std::string> words;
  words.push_back(rules.families.empty() ? "the first choice of the catalogue at each value"
                                         : join(rules.families, ", "));
  words.push_back(rules.series.empty() ? "each family's own series" : rules.series);
  if (rules.tolerance) words.push_back(tolerance_text(*rules.tolerance));
  if (rules.min) words.push_back("from " + format_quantity(*rules.min, dimension));
  if (rules.max) words.push_back("up to " + format_quantity(*rules.max, dimension));
  return join(words, ", ");
}

Dimension dimension_of(const RoleInfo& role) {
  return role.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

void add_role_rules(NamedLines& lines, const Parts& parts) {
  std::vector<std::string> ranges;
  std::vector<std::string> pinned;
  for (const RoleInfo& role : roles()) {
    const Dimension dimension = dimension_of(role);
    if (const auto& range = parts.ranges[index(role.role)])
      ranges.push_back(fmt::format("{} {} {} to {}", role.designator, role.label,
                                   format_quantity(range->min, dimension), format_quantity(range->max, dimension)));
    if (const auto& value = parts.pinned[index(role.role)])
      pinned.push_back(fmt::format("{} {} {}", role.designator, role.label,
                                   *value > 0 ? format_quantity(*value, dimension) : "absent"));
  }
  if (!ranges.empty()) lines.add("limits", join(ranges, "; "));
  if (!pinned.empty()) lines.add("fixed", join(pinned, "; "));
}

void add_stock(NamedLines& lines, const Parts& parts) {
  if (!parts.stock.empty()) {
    const std::string boards = parts.boards == 1 ? "one board" : fmt::format("{} boards", parts.boards);
    lines.add("stock", fmt::format("{}, {}, for {}", printable(parts.stock),
                                   parts.stock_only ? "nothing else" : "before bought parts", boards));
  }
  if (parts.pairs) lines.add("pairs", "two parts in one role, where single values miss");
}

void add_requirements(TextSheet& sheet, const Spec& spec) {
  TextGrid grid{{{"figure", false}, {"target", true}, {"accepted", false}, {"taken", false}}, {}, {2}};
  for (const FigureInfo& figure : figures()) {
    const auto& requirement = spec.requirement(figure.figure);
    if (!requirement) continue;
    std::string taken;
    if (figure.figure == Figure::gain)
      taken = (spec.gain_from_input ? "from the input" : "from the source") +
              (spec.gain_at ? ", at " + format_quantity(*spec.gain_at, Dimension::frequency) : std::string());
    grid.add({figure.label, std::isnan(requirement->target) ? "" : figure_text(requirement->target, figure),
              window_text(*requirement, figure), taken});
  }
  if (grid.rows.empty()) sheet.line("no requirement: the figures stand alone");
  sheet.grid(grid);
}

}  // namespace

std::string window_text(const Requirement& requirement, const FigureInfo& figure) {
  const bool lower = std::isfinite(requirement.lower);
  const bool upper = std::isfinite(requirement.upper);
  // Without the decibels that a target carries: a window is compared with the ratio.
  const auto text = [&](double value) { return format_quantity(value, figure.dimension); };
  if (lower && upper) return text(requirement.lower) + " to " + text(requirement.upper);
  if (lower) return "at least " + text(requirement.lower);
  if (upper) return "at most " + text(requirement.upper);
  return "";
}

void add_asked_for(TextSheet& sheet, const DesignResult& result) {
  const Spec& spec = result.spec;
  sheet.heading("Asked for");
  add_requirements(sheet, spec);
  sheet.heading("Under these conditions");
  NamedLines lines;
  lines.add("supply", condition_text(spec.supply, Dimension::voltage));
  lines.add("source", source_text(spec.source));
  lines.add("load", load_text(spec.load));
  lines.add("wiring", stray_text(spec.stray));
  lines.add("ambient", condition_text(spec.ambient, Dimension::temperature));
  lines.add("built units", assess_text(spec.assess));
  if (result.searched) {
    add_stock(lines, spec.parts);
    if (!spec.parts.stock_only) {
      lines.add("resistors", rules_text(spec.parts.resistors, Dimension::resistance));
      lines.add("capacitors", rules_text(spec.parts.capacitors, Dimension::capacitance));
    }
    add_role_rules(lines, spec.parts);
    const char* any = spec.parts.stock_only
                          ? "those of the stock; every fitting type of the catalogue where it has none"
                          : "every fitting type of the catalogue";
    lines.add("transistors", spec.devices.empty() ? any : join(spec.devices, ", "));
    lines.add("search", fmt::format("up to {} candidates, seed {}", spec.candidates, spec.seed));
  }
  sheet.grid(lines.grid);
  for (const std::string& note : spec.notes) sheet.item(note);
}

}  // namespace bandwright
