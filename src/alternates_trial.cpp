#include "alternates_trial.hpp"

#include <algorithm>
#include <cmath>

#include "assemble.hpp"

namespace bandwright {

namespace {

constexpr double kSamePrint = 1e-9;

std::string joined(const std::vector<std::string>& list) {
  std::string text;
  for (const std::string& one : list) {
    if (!text.empty() && !one.empty()) text += "; ";
    text += one;
  }
  return text;
}

bool is_active(const Candidate& c) { return c.analysis.point.state == BiasState::active; }

bool within_limits(const StressRow& row) { return row.designator != "Q1" || row.holds(); }

bool is_rated(const Candidate& c) {
  return c.notes.count("parts") == 0 && std::all_of(c.stress_table.begin(), c.stress_table.end(), within_limits);
}

std::string row_text(const StressRow& row) {
  return row.designator + " " + row.quantity + ": " + format_quantity(row.worst, row.dimension, 3) + " at " +
         row.corner + ", at most " + format_quantity(row.allowed, row.dimension, 3) + " is allowed";
}

std::string rating_reason(const Candidate& c) {
  std::vector<std::string> list;
  if (const auto note = c.notes.find("parts"); note != c.notes.end()) list.push_back(note->second);
  for (const StressRow& row : c.stress_table)
    if (!within_limits(row)) list.push_back(row_text(row));
  return joined(list);
}

/// As offered, before the loss under its DC voltage is counted: assembling counts it anew.
OfferedParts without_bias_loss(OfferedParts parts) {
  for (OfferedValue& part : parts) {
    if (part.bias_factor == 1) continue;
    part.working_value = part.family->cold_loss > 0 ? part.working_value / part.bias_factor : part.value;
    part.bias_factor = 1;
  }
  return parts;
}

std::string yield_reason(const Spec& spec, const Assessment& a) {
  const auto percent = [](double share) { return format_quantity(100 * share, Dimension::fraction, 5) + " %"; };
  return "a requirement misses at its worst corner, and the yield is " + percent(a.yield.share()) + " where " +
         percent(spec.assess.yield) + " is asked";
}

std::string inactive_reason(const Candidate& c) {
  const auto note = c.notes.find(info(Figure::gain).key);
  return note == c.notes.end() ? "not active" : note->second;
}

/// Why it does not hold before any unit is simulated; empty where nothing rules it out.
std::string nominal_reason(const Candidate& c) {
  if (!is_active(c)) return inactive_reason(c);
  std::vector<std::string> list;
  for (const Shortfall& s : c.shortfalls) list.push_back(s.text);
  if (!is_rated(c)) list.push_back(rating_reason(c));
  return joined(list);
}

std::string bought_as(const Part& part) {
  std::string text = part.family;
  if (part.voltage_rating > 0) text += ", " + format_quantity(part.voltage_rating, Dimension::voltage);
  if (part.power_rating > 0) text += ", " + format_quantity(part.power_rating, Dimension::power);
  return part.polarity.empty() ? text : text + ", " + part.polarity;
}

bool can_stay(const Part& part, const Part& needed) {
  return part.family == needed.family && part.polarity == needed.polarity &&
         !(part.voltage_rating < needed.voltage_rating) && !(part.power_rating < needed.power_rating);
}

/// Parts of the same value that would have to be bought otherwise: a higher rating, another family or polarity.
std::string other_parts(const Candidate& before, const Candidate& after) {
  std::vector<std::string> list;
  for (const Part& needed : after.parts) {
    for (const Part& part : before.parts) {
      const bool same = part.designator == needed.designator && same_print(part.value, needed.value);
      if (same && !can_stay(part, needed))
        list.push_back(part.designator + ": " + bought_as(needed) + " in place of " + bought_as(part));
    }
  }
  return joined(list);
}

void take_assessment(const Spec& spec, const Candidate& c, Outcome& o) {
  const Assessment a = assess(spec, population_of(spec, c.parameters, c.offered, c.analysis), c.analysis);
  o.capability = a.capability;
  o.from_moments = a.from_moments;
  o.yield = a.yield.share();
  o.verdict = a.verdict;
  if (o.reason.empty() && a.verdict == "not met") o.reason = yield_reason(spec, a);
}

}  // namespace

Trial tried(const Spec& spec, const Catalogue& catalogue, const Candidate& before, const BipolarParameters& device,
            const OfferedParts& parts, TrialDepth depth) {
  const Candidate c = assemble(spec, {device, {}, {}}, catalogue, without_bias_loss(parts));
  Trial t{c.offered, {}};
  Outcome& o = t.outcome;
  const std::string lacking = shortage(spec, c.offered);
  o.active = is_active(c);
  o.figures = c.analysis.figures;
  if (!o.active) o.figures.fill(kNotComputed);
  o.error = c.error;
  o.rated = is_rated(c);
  o.available = lacking.empty();
  o.shortfalls = c.shortfalls;
  o.reason = joined({nominal_reason(c), lacking});
  o.other_parts = other_parts(before, c);
  if (o.active && (o.reason.empty() || depth == TrialDepth::full)) take_assessment(spec, c, o);
  o.holds = o.reason.empty();
  return t;
}

OfferedParts with_part(OfferedParts parts, Role role, const OfferedValue& part) {
  parts[index(role)] = part;
  return parts;
}

bool is_open(const Spec& spec, const Candidate& candidate, Role role) {
  return candidate.offered[index(role)].value > 0 && !spec.parts.pinned[index(role)];
}

bool same_print(double a, double b) { return std::fabs(a - b) <= kSamePrint * std::fmax(a, b); }

bool more_capable(const Outcome& a, const Outcome& b) {
  const auto rank = [](double capability) { return std::isnan(capability) ? -HUGE_VAL : capability; };
  return rank(a.capability) > rank(b.capability);
}

}  // namespace bandwright
