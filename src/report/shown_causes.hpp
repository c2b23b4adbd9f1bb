// Causes as every writer shows them: which of them a design has, their keys, and their limits in words.
#pragma once

#include <bandwright/design.hpp>
#include <string>

namespace bandwright {

/// Key in the result document: a part's designator, else the cause's word.
std::string shown_key(const CauseInfo& cause);

/// "C3 bypass", "hFE current gain".
std::string cause_name(const CauseInfo& cause);

/// False for a part that is absent, and for surroundings that are zero and exact.
bool is_there(const CauseInfo& cause, const Candidate& candidate, const Spec& spec);

/// "±1 %", "-20/+50 %", "x0.4 to x2.1", "±40 mV": the deviation from the nominal value at both ends.
std::string limits_text(const CauseInfo& cause, const CauseSpread& spread);

/// How units lie between the limits: "normal, 3 sigma at the limits, truncated there" or "uniform".
const char* distribution_text(const Population& population);

}  // namespace bandwright
