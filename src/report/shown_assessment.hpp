// What every writer picks out of an assessment, and its numbers in words.
#pragma once

#include <bandwright/design.hpp>
#include <optional>
#include <string>
#include <vector>

namespace bandwright {

/// Why a candidate has no assessment.
std::string why_not_assessed(const Candidate& candidate);

/// The figures that a spec requires; with `band` gain and cutoffs too.
std::vector<Figure> required_figures(const Spec& spec, bool band);

/// Required figures, gain and cutoffs, and all others that have a worst case.
std::vector<Figure> bounded_figures(const Assessment& assessment, const Spec& spec);

/// The required figure that most units miss; none where every unit meets them all.
std::optional<Figure> most_failed(const Assessment& assessment, const Spec& spec);

/// The required figure of the smallest capability; none where nothing is required.
std::optional<Figure> least_capable(const Assessment& assessment, const Spec& spec);

/// The cause that makes most of a figure's spread; none where it has no spread.
std::optional<Cause> largest_cause(const Assessment& assessment, Figure figure);

/// "99.2 %"; as many digits as it takes not to round up to all.
std::string share_text(double share, int digits = 3);

/// "19,840".
std::string counted(std::size_t units);

/// "1.41", "~1.41" where it rests on mean and 3 sigma, "-" where it was not computed.
std::string capability_text(double capability, const Assessment& assessment);
std::string capability_text(double capability, bool from_moments);

/// What capability means, and the mark before it where it stands.
std::string capability_definition(bool marked);

/// "at 0 °C, 12.6 V", "at the nominal condition".
std::string at_condition_text(const Assessment& assessment, std::size_t condition);

}  // namespace bandwright
