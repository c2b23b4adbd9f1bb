// Sections of the printed sheet, in the order in which they stand there.
#pragma once

#include <bandwright/design.hpp>

#include "report/text_sheet.hpp"

namespace bandwright {

/// Requirements and conditions as they were understood, defaults included.
void add_asked_for(TextSheet& sheet, const Spec& spec);

/// "44.7 to 56.2", "at least 4.7 kΩ"; empty for an open requirement.
std::string window_text(const Requirement& requirement, const FigureInfo& figure);

/// One row a candidate.
void add_ranking(TextSheet& sheet, const DesignResult& result);

/// Parts, figures, operating point and pole model of one candidate.
void add_candidate(TextSheet& sheet, const Candidate& candidate, const Spec& spec);

}  // namespace bandwright
