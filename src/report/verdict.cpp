// The first lines of the sheet: whether the requirements are met, and what limits the first candidate.
#include <fmt/format.h>

#include <algorithm>

#include "report/sections.hpp"
#include "report/shown_assessment.hpp"

namespace bandwright {

namespace {

constexpr double kHighestCapability = 2;  // it is counted up to here only

std::string verdict_text(const DesignResult& result) {
  const std::size_t all = result.candidates.size();
  const auto meeting = std::count_if(result.candidates.begin(), result.candidates.end(),
                                     [](const Candidate& c) { return c.shortfalls.empty(); });
  if (all == 0 && result.interrupted) return "No candidate had been found yet.";
  if (all == 0) return "No candidate: no stage meets even the conditions of a working operating point.";
  if (all == 1 && !is_active(result.candidates.front()))
    return "The stage does not work as an amplifier: see its notes.";
  if (!any_requirement(result.spec)) return "Recomputed; no requirement was stated.";
  if (meeting == 0)
    return all == 1
               ? "The candidate does not meet every requirement nominally."
               : fmt::format("None of {} candidates meets every requirement nominally; the nearest are listed.", all);
  if (all == 1) return "The candidate meets every requirement nominally.";
  return fmt::format("{} of {} candidates {} every requirement nominally.", meeting, all,
                     meeting == 1 ? "meets" : "meet");
}

// "; C3 makes 61 % of its spread".
std::string cause_text(const Assessment& assessment, Figure figure) {
  const auto cause = largest_cause(assessment, figure);
  if (!cause) return "";
  return fmt::format("; {} makes {:.0f} % of its spread", info(*cause).symbol,
                     100 * assessment.share[index(figure)][index(*cause)]);
}

// What costs most units; where none fails, what comes nearest to its limit.
std::string limiting_text(const Assessment& assessment, const Spec& spec) {
  const auto failed = most_failed(assessment, spec);
  const std::size_t not_active = assessment.yield.not_active;
  if (not_active > (failed ? assessment.spread[index(*failed)].failed : 0))
    return fmt::format("most units that fail are not active {}",
                       at_condition_text(assessment, assessment.yield.least_active_at));
  if (failed)
    return fmt::format("{} fails most, {}{}", info(*failed).label,
                       at_condition_text(assessment, assessment.spread[index(*failed)].most_failed_at),
                       cause_text(assessment, *failed));
  const auto nearest = least_capable(assessment, spec);
  if (!nearest) return "";
  if (assessment.spread[index(*nearest)].capability >= kHighestCapability)
    return "every requirement is far from its limits";
  return fmt::format("{} comes nearest to its limit, capability {}{}", info(*nearest).label,
                     capability_text(assessment.spread[index(*nearest)].capability, assessment),
                     cause_text(assessment, *nearest));
}

std::string first_text(const Candidate& first, const DesignResult& result) {
  const Assessment& assessment = *first.assessment;
  const std::string who =
      result.candidates.size() > 1 ? fmt::format("Candidate {} as built", first.rank) : std::string("As built");
  const std::string yield =
      assessment.yield.units > 0 ? "yield " + share_text(assessment.yield.share()) : "not simulated";
  const std::string limit = assessment.yield.units > 0 ? limiting_text(assessment, result.spec) : "";
  return fmt::format("{}: {}; {}{}{}.", who, assessment.verdict, yield, limit.empty() ? "" : "; ", limit);
}

}  // namespace

void add_verdict(TextSheet& sheet, const DesignResult& result) {
  if (result.interrupted)
    sheet.verdict("INTERRUPTED: the search was stopped early; this is the best it had found.", false);
  const bool works = !result.candidates.empty() && is_active(result.candidates.front());
  sheet.verdict(verdict_text(result), result.met && works && !result.interrupted);
  if (works && result.candidates.front().assessment && any_requirement(result.spec))
    sheet.verdict(first_text(result.candidates.front(), result),
                  result.candidates.front().assessment->verdict != "not met");
  if (!result.spec.title.empty()) sheet.paragraph(result.spec.title);
}

}  // namespace bandwright
