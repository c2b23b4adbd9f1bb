// Sections of the printed sheet, in the order in which they stand there.
#pragma once

#include <bandwright/design.hpp>

#include "report/text_sheet.hpp"

namespace bandwright {

/// Whether the requirements are met, and what limits the first candidate.
void add_verdict(TextSheet& sheet, const DesignResult& result);

/// Requirements and conditions as they were understood, defaults included.
void add_asked_for(TextSheet& sheet, const DesignResult& result);

/// "44.7 to 56.2", "at least 4.7 kΩ"; empty for an open requirement.
std::string window_text(const Requirement& requirement, const FigureInfo& figure);

/// One row a candidate; nothing where there is nothing to compare.
void add_ranking(TextSheet& sheet, const DesignResult& result);

/// Parts, figures, spread of built units, operating point and pole model of one candidate.
void add_candidate(TextSheet& sheet, const Candidate& candidate, const Spec& spec);

/// What to mind before building, the same under every parts list.
void add_cautions(TextSheet& sheet);

/// False: no operating point in the active region, and so no figures.
bool is_active(const Candidate& candidate);

bool any_requirement(const Spec& spec);

}  // namespace bandwright
