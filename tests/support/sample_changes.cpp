#include "sample_changes.hpp"

#include <cmath>

namespace bandwright::test {

namespace {

bool rows_hold(const Candidate& c) {
  for (const StressRow& row : c.stress_table)
    if (row.designator == "Q1" && !(row.worst <= row.allowed)) return false;
  return true;
}

bool within(const Requirement& r, double value) {
  const bool above = std::isnan(r.lower) || value >= r.lower;
  const bool below = std::isnan(r.upper) || value <= r.upper;
  return !std::isnan(value) && above && below;
}

}  // namespace

Spec changeable_spec(const std::string& requirements, const std::string& more) {
  return read_spec(R"({"supply": {"nominal": "12 V", "tolerance": "5 %"}, "source": {"resistance": 600},
      "load": {"resistance": "10k", "capacitance": "220 pF"}, "stray": {"input": "3 pF", "output": "3 pF",
      "feedback": "0.3 pF"}, "ambient": {"min": "0 °C", "max": "45 °C"},
      "parts": {"resistors": {"series": "E24"}, "capacitors": {"series": "E12"}},
      "assess": {"units": 2000, "interval": 0}, "requirements": )" +
                       requirements + more + "}",
                   "sample", {}, SpecUse::check);
}

Candidate changeable_candidate(const Spec& spec) {
  return checked(spec, "BC547B", bandwright::choices_of(kChangeable));
}

PartChoices choices_of(const Candidate& candidate) {
  PartChoices choices;
  for (const RoleInfo& r : roles()) choices = with_choice(choices, r.role, candidate.offered[index(r.role)]);
  return choices;
}

PartChoices with_choice(PartChoices choices, Role role, const OfferedValue& value) {
  choices[index(role)] = {value.value, value.family != nullptr ? value.family->key : ""};
  return choices;
}

Candidate checked(const Spec& spec, const std::string& device, const PartChoices& parts) {
  return check(spec, built_in_catalogue(), device, parts).candidates.at(0);
}

bool holds_the_spec(const Spec& spec, const Candidate& c) {
  if (c.analysis.point.state != BiasState::active || c.notes.count("parts") > 0 || !rows_hold(c)) return false;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (r && !within(*r, c.analysis.figures[index(f.figure)])) return false;
  }
  const Assessment& a = *c.assessment;
  return a.worst_case_met || a.yield.share() >= spec.assess.yield;
}

bool same_numbers(double a, double b) { return a == b || (std::isnan(a) && std::isnan(b)); }

bool same_figures(const FigureValues& a, const FigureValues& b) {
  for (std::size_t i = 0; i < kFigureCount; ++i)
    if (!same_numbers(a[i], b[i])) return false;
  return true;
}

}  // namespace bandwright::test
