// Sections of one candidate on the printed sheet.
#pragma once

#include <bandwright/design.hpp>

#include "report/text_sheet.hpp"

namespace bandwright {

/// What to buy and how to fit it.
void add_parts(TextSheet& sheet, const Candidate& candidate);

/// What each part stands at its worst corner beside its rating; what stands close to nothing is only counted.
void add_stress(TextSheet& sheet, const Candidate& candidate, const Spec& spec);

/// Figures beside what was asked, then the operating point.
void add_figures(TextSheet& sheet, const Candidate& candidate, const Spec& spec);
void add_operating_point(TextSheet& sheet, const Candidate& candidate);

/// The pole model beside the exact response; poles and zeros.
void add_pole_model(TextSheet& sheet, const Candidate& candidate);

/// Yield, worst case and spread of built units.
void add_spread(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec);

/// Which cause makes how much of each figure's spread.
void add_spread_shares(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec);

/// What varies from unit to unit, how far and on what grounds.
void add_causes(TextSheet& sheet, const Assessment& assessment, const Candidate& candidate, const Spec& spec);

/// Which parts need a tight tolerance.
void add_allocation(TextSheet& sheet, const Allocation& allocation, const Spec& spec);

/// What may stand in for the parts: next values, transistors.
void add_alternates(TextSheet& sheet, const Alternates& alternates, const Candidate& candidate, const Spec& spec);

}  // namespace bandwright
