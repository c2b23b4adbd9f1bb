#include <fmt/format.h>

#include <algorithm>

#include "report/candidate_sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// "5 %", "-20/+50 %".
std::string plain_tolerance(const Tolerance& tolerance) {
  const std::string sign = "±";
  const std::string text = tolerance_text(tolerance);
  return text.starts_with(sign) ? text.substr(sign.size()) : text;
}

std::string class_text(const ToleranceClass& one, Role role) {
  return fmt::format("{} {}", tolerance_text(one.tolerance), short_family(one.family, role));
}

bool same(const ToleranceClass& a, const ToleranceClass& b) {
  return a.tolerance == b.tolerance && a.family == b.family;
}

// A family stands there only where it is another one than that of the loosest class.
std::string needed_text(const AllocatedPart& part) {
  const std::string tolerance = plain_tolerance(part.needed.tolerance);
  return part.needed.family == part.loosest.family
             ? tolerance
             : fmt::format("{} {}", tolerance, short_family(part.needed.family, part.role));
}

// "R1", "R1 and R2", "R1, R2 and R3".
std::string listed(const std::vector<std::string>& names) {
  if (names.size() == 1) return names.front();
  return join({names.begin(), names.end() - 1}, ", ") + " and " + names.back();
}

struct Need {
  std::string text;
  std::vector<std::string> parts;
};

void add_once(std::vector<Need>& needs, const std::string& text, const std::string& part) {
  const auto known = std::find_if(needs.begin(), needs.end(), [&](const Need& one) { return one.text == text; });
  if (known == needs.end())
    needs.push_back({text, {part}});
  else
    known->parts.push_back(part);
}

// "R3 and R4 need 1 %, C2 needs 10 %; all others may be at their loosest: 5 %, 20 %."
std::string answer_text(const Allocation& allocation) {
  std::vector<Need> tight, loose;
  for (const AllocatedPart& part : allocation.parts)
    add_once(same(part.needed, part.loosest) ? loose : tight, needed_text(part), info(part.role).designator);
  std::vector<std::string> needs, loosest;
  for (const Need& one : tight)
    needs.push_back(fmt::format("{} {} {}", listed(one.parts), one.parts.size() == 1 ? "needs" : "need", one.text));
  for (const Need& one : loose) loosest.push_back(one.text);
  if (tight.empty()) return fmt::format("Every part may be at its loosest: {}.", join(loosest, ", "));
  if (loose.empty()) return join(needs, ", ") + ".";
  return fmt::format("{}; all others may be at their loosest: {}.", join(needs, ", "), join(loosest, ", "));
}

std::string outcome_text(const Allocation& allocation, const Spec& spec) {
  const Yield& yield = allocation.yield;
  return fmt::format("With these classes {} of {} units pass: {}; {} is asked.", counted(yield.passed),
                     counted(yield.units), share_text(yield.share(), 4), share_text(spec.assess.yield, 6));
}

void add_parts_grid(TextSheet& sheet, const Allocation& allocation) {
  TextGrid grid;
  grid.columns = {{"part", false}, {"role", false}, {"loosest", false}, {"needed", false}, {"yield if looser", true}};
  grid.flexible = {2, 3, 1};
  for (const AllocatedPart& part : allocation.parts) {
    const std::string needed = same(part.needed, part.loosest) ? "the loosest" : class_text(part.needed, part.role);
    grid.add({info(part.role).designator, info(part.role).label, class_text(part.loosest, part.role), needed,
              share_text(part.yield_if_looser)});
  }
  sheet.grid(grid);
}

void add_steps(TextSheet& sheet, const Allocation& allocation) {
  if (allocation.steps.empty()) return;
  sheet.space();
  TextGrid grid;
  grid.columns = {{"tightened", false}, {"from", false}, {"to", false}, {"yield before", true}, {"yield after", true}};
  grid.flexible = {1, 2};
  for (const AllocationStep& step : allocation.steps)
    grid.add({info(step.role).designator, class_text(step.from, step.role), class_text(step.to, step.role),
              share_text(step.yield_before), share_text(step.yield_after)});
  sheet.grid(grid);
}

}  // namespace

void add_allocation(TextSheet& sheet, const Allocation& allocation, const Spec& spec) {
  sheet.heading("Tolerance allocation");
  sheet.line(allocation.reached
                 ? answer_text(allocation)
                 : "Tighter tolerances alone do not give the yield; tightened is what raises it at all.");
  sheet.line(outcome_text(allocation, spec));
  add_parts_grid(sheet, allocation);
  add_steps(sheet, allocation);
}

}  // namespace bandwright
