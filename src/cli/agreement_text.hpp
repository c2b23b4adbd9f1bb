#pragma once

#include <bandwright/report.hpp>
#include <string>

namespace bandwright::cli {

/// Whether the figures of a stored candidate agree with recomputed ones, and where not.
std::string agreement_text(const Agreement& agreement, const std::string& name, int rank);

}  // namespace bandwright::cli
