#include <fmt/format.h>

#include <cmath>

#include "report/candidate_sections.hpp"
#include "report/shown_figures.hpp"
#include "units/printable.hpp"

namespace bandwright {

namespace {

// What the part must stand: a resistor's power, a capacitor's voltage.
std::string rating_text(const Part& part) {
  const bool resistor = part.kind == PartKind::resistor;
  const double rating = resistor ? part.power_rating : part.voltage_rating;
  if (!std::isfinite(rating)) return "none holds";
  return rating == 0 ? "" : format_quantity(rating, resistor ? Dimension::power : Dimension::voltage);
}

std::vector<std::string> part_row(const Part& part) {
  const RoleInfo& role = info(part.role);
  const Dimension dimension = role.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
  return {part.designator,
          role.label,
          format_quantity(part.value, dimension),
          part.code,
          part.series.empty() ? "none" : part.series,
          tolerance_text(part.tolerance),
          short_family(part.family, part.role),
          rating_text(part),
          part.polarity,
          printable(part.part_number)};
}

void add_note(TextSheet& sheet, const Part& part) {
  if (!part.note.empty()) sheet.line(part.designator + ": " + printable(part.note));
}

void add_at_hand(TextSheet& sheet, const Candidate& candidate) {
  std::vector<std::string> names;
  for (const Part& part : candidate.parts)
    if (part.from_stock) names.push_back(part.designator);
  if (candidate.transistor.from_stock) names.push_back(candidate.transistor.designator);
  if (!names.empty()) sheet.line("From the stock: " + join(names, ", ") + ".");
}

}  // namespace

void add_parts(TextSheet& sheet, const Candidate& candidate) {
  sheet.heading("Parts");
  TextGrid grid;
  grid.columns = {{"part", false},     {"role", false},       {"value", true},   {"code", false},
                  {"series", false},   {"tolerance", false},  {"family", false}, {"rating", false},
                  {"polarity", false}, {"part number", false}};
  grid.flexible = {6, 1, 8, 9};
  grid.dispensable = {4};
  for (const Part& part : candidate.parts) grid.add(part_row(part));
  grid.add({"Q1", "transistor", candidate.device, "", "", "", candidate.parameters.pnp ? "PNP" : "NPN", "", "",
            printable(candidate.transistor.part_number)});
  sheet.grid(grid);
  add_at_hand(sheet, candidate);
  for (const Part& part : candidate.parts) add_note(sheet, part);
  add_note(sheet, candidate.transistor);
  for (const Package& one : candidate.packages) {
    const std::string note = one.note.empty() ? "" : "; " + one.note;
    sheet.line(fmt::format("Q1 in {}: leads {}{} ({})", one.name, one.lead_order, note, describe(one.provenance)));
  }
}

}  // namespace bandwright
