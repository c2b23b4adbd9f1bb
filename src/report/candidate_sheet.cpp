// One candidate in full, section by section.
#include <fmt/format.h>

#include "report/candidate_sections.hpp"
#include "report/sections.hpp"

namespace bandwright {

namespace {

// A note that more figures share is printed with their number.
constexpr std::size_t kNamedFields = 4;

void add_assessment(TextSheet& sheet, const Candidate& candidate, const Spec& spec) {
  if (!candidate.assessment) return;
  add_spread(sheet, *candidate.assessment, candidate, spec);
  add_spread_shares(sheet, *candidate.assessment, candidate, spec);
  add_causes(sheet, *candidate.assessment, candidate, spec);
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
  add_stress(sheet, candidate, spec);
  if (is_active(candidate)) {
    add_figures(sheet, candidate, spec);
    add_assessment(sheet, candidate, spec);
    if (candidate.allocation) add_allocation(sheet, *candidate.allocation, spec);
    add_operating_point(sheet, candidate);
    add_pole_model(sheet, candidate);
  }
  if (candidate.alternates) add_alternates(sheet, *candidate.alternates, candidate, spec);
  add_notes(sheet, candidate);
}

}  // namespace bandwright
