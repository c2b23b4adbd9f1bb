// What may stand in for the parts of a candidate: next values, other transistors, the hFE that is needed.
#include <fmt/format.h>

#include <cmath>
#include <map>

#include "report/candidate_sections.hpp"
#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr int kDigits = 3;

std::string symbols(const std::vector<Shortfall>& shortfalls) {
  std::vector<std::string> list;
  for (const Shortfall& one : shortfalls) list.push_back(info(one.figure).symbol);
  return join(list, ", ");
}

std::string holds_text(const Outcome& outcome) {
  if (outcome.holds) return outcome.verdict == "pass with notes" ? "yes, with notes" : "yes";
  if (!outcome.active) return "no: not active";
  if (!outcome.shortfalls.empty()) return "no: " + symbols(outcome.shortfalls);
  if (!outcome.available) return "no: stock";
  return outcome.rated ? "no: yield " + share_text(outcome.yield) : "no: rating";
}

// "+1.3": in per cent; "0" where it rounds to nothing.
std::string change_text(const Outcome& outcome, const Candidate& before, Figure figure) {
  const double then = before.analysis.figures[index(figure)];
  const double change = 100 * (outcome.figures[index(figure)] - then) / std::fabs(then);
  if (!std::isfinite(change)) return "-";
  const std::string text = fmt::format("{:+.1f}", change);
  return text.substr(1) == "0.0" ? "0" : text;
}

void add_change_columns(TextGrid& grid, const std::vector<Figure>& shown) {
  for (const Figure figure : shown) grid.columns.push_back({fmt::format("{} %", info(figure).symbol), true});
}

std::string value_text(double value, Role role) {
  const bool resistor = info(role).kind == PartKind::resistor;
  return format_quantity(value, resistor ? Dimension::resistance : Dimension::capacitance);
}

// Texts that several names share, each once.
using Grouped = std::map<std::string, std::vector<std::string>>;

void add_items(TextSheet& sheet, const Grouped& grouped) {
  for (const auto& [text, names] : grouped) sheet.item(join(names, ", ") + ": " + text);
}

TextGrid values_grid(const std::vector<IfUnavailable>& list, const Candidate& candidate, const Spec& spec) {
  const std::vector<Figure> shown = required_figures(spec, true);
  TextGrid grid;
  grid.columns = {{"part", false}, {"in place", true}, {"instead", true}};
  add_change_columns(grid, shown);
  grid.columns.insert(grid.columns.end(), {{"capability", true}, {"still holds", false}});
  grid.flexible = {grid.columns.size() - 1};
  grid.dispensable = {1};
  for (const IfUnavailable& one : list) {
    std::vector<std::string> row = {info(one.role).designator,
                                    value_text(candidate.offered[index(one.role)].value, one.role),
                                    value_text(one.value.value, one.role)};
    for (const Figure figure : shown) row.push_back(change_text(one.outcome, candidate, figure));
    row.push_back(capability_text(one.outcome.capability, one.outcome.from_moments));
    row.push_back(holds_text(one.outcome));
    grid.add(row);
  }
  return grid;
}

std::string capability_before(const Candidate& candidate) {
  if (!candidate.assessment || std::isnan(candidate.assessment->capability)) return "";
  return fmt::format("; capability as it is: {}",
                     capability_text(candidate.assessment->capability, *candidate.assessment));
}

void add_values(TextSheet& sheet, const std::vector<IfUnavailable>& list, const Candidate& candidate,
                const Spec& spec) {
  sheet.heading("If a value is unavailable");
  if (list.empty()) return sheet.line("The spec fixes every value, or offers no other.");
  sheet.line(fmt::format("One part at a time at its next value; figures change by, in per cent{}:",
                         capability_before(candidate)));
  sheet.grid(values_grid(list, candidate, spec));
  Grouped others;
  for (const IfUnavailable& one : list)
    if (!one.outcome.other_parts.empty())
      others[one.outcome.other_parts].push_back(
          fmt::format("with {} {}", info(one.role).designator, value_text(one.value.value, one.role)));
  add_items(sheet, others);
}

std::string leads_text(const std::vector<Package>& packages) {
  std::vector<std::string> list;
  for (const Package& one : packages) {
    const std::string letters = lead_letters(one);
    list.push_back(
        fmt::format("{} {}", one.name.substr(0, one.name.find(' ')), letters.empty() ? one.lead_order : letters));
  }
  return join(list, ", ");
}

TextGrid devices_grid(const std::vector<Substitute>& list, const Candidate& candidate) {
  const std::vector<Figure> shown = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff, Figure::supply_current};
  TextGrid grid;
  grid.columns = {{"type", false}};
  add_change_columns(grid, shown);
  grid.columns.insert(grid.columns.end(), {{"capability", true}, {"still holds", false}, {"leads", false}});
  grid.flexible = {grid.columns.size() - 1};
  for (const Substitute& one : list) {
    std::vector<std::string> row = {one.device};
    for (const Figure figure : shown) row.push_back(change_text(one.outcome, candidate, figure));
    row.push_back(capability_text(one.outcome.capability, one.outcome.from_moments));
    row.push_back(holds_text(one.outcome));
    row.push_back(leads_text(one.packages));
    grid.add(row);
  }
  return grid;
}

void add_device_warnings(TextSheet& sheet, const std::vector<Substitute>& list) {
  Grouped leads, others, unnamed;
  for (const Substitute& one : list) {
    if (!one.lead_warning.empty()) leads["leads: " + one.lead_warning].push_back(one.device);
    if (!one.outcome.other_parts.empty()) others[one.outcome.other_parts].push_back("with " + one.device);
    if (!one.named) unnamed["not named by the spec"].push_back(one.device);
  }
  for (const Grouped* grouped : {&leads, &others, &unnamed}) add_items(sheet, *grouped);
}

std::string number_text(double value) { return format_quantity(value, Dimension::fraction, kDigits); }

std::string range_text(const GainNeeded& needed) {
  if (std::isinf(needed.max)) return "at least " + number_text(needed.min);
  if (needed.min == 0) return "at most " + number_text(needed.max);
  return number_text(needed.min) + " to " + number_text(needed.max);
}

std::string gain_text(const GainNeeded& needed) {
  if (std::isnan(needed.min)) return "hFE needed: the nominal unit misses a requirement at some supply or ambient.";
  const std::string groups =
      needed.groups.empty() ? "no type's published range lies inside" : "inside lie " + join(needed.groups, ", ");
  return fmt::format(
      "hFE needed: {} at {} and {}, for every requirement at every supply and ambient with nominal parts; {}.",
      range_text(needed), format_quantity(needed.collector_current, Dimension::current, kDigits),
      format_quantity(needed.collector_emitter_voltage, Dimension::voltage, kDigits), groups);
}

void add_devices(TextSheet& sheet, const Alternates& alternates, const Candidate& candidate) {
  sheet.heading("Transistors that may stand in");
  if (alternates.substitutes.empty()) {
    sheet.line("With these parts no other transistor of the catalogue holds the spec.");
  } else {
    sheet.line(fmt::format("In place of {}, in the same parts; figures change by, in per cent{}:", candidate.device,
                           capability_before(candidate)));
    sheet.grid(devices_grid(alternates.substitutes, candidate));
    add_device_warnings(sheet, alternates.substitutes);
  }
  if (is_active(candidate)) sheet.line(gain_text(alternates.gain_needed));
}

}  // namespace

void add_alternates(TextSheet& sheet, const Alternates& alternates, const Candidate& candidate, const Spec& spec) {
  add_values(sheet, alternates.if_unavailable, candidate, spec);
  add_devices(sheet, alternates, candidate);
}

}  // namespace bandwright
