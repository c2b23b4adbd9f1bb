// The sheet for people: verdict, what was asked, the ranking, the first candidate in full, what it rests on, cautions.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>

#include "report/sections.hpp"

namespace bandwright {

namespace {

void add_list(TextSheet& sheet, const std::string& heading, const std::vector<std::string>& items) {
  if (items.empty()) return;
  sheet.heading(heading);
  for (const std::string& item : items) sheet.item(item);
}

// How to see what the sheet leaves out.
std::string closing_text(const DesignResult& result) {
  const std::string program = fmt::format("bandwright {}", version());
  if (result.candidates.size() < 2) return program;
  return program +
         "; another candidate in full: --format json -o result.json, then bandwright check result.json --pick 2";
}

}  // namespace

void add_cautions(TextSheet& sheet) {
  sheet.heading("Before building");
  sheet.line(
      "At most 60 V DC between any two nodes, battery or certified isolated supply; mind polarity and rating; eye "
      "protection at first power-up; discharge before touching; hot parts. A paper design: build and measure; not for "
      "medical or safety use; local codes first. In full: README.md, Cautions.");
}

bool any_requirement(const Spec& spec) {
  return std::any_of(spec.requirements.begin(), spec.requirements.end(), [](const auto& r) { return r.has_value(); });
}

std::string write_table(const DesignResult& result, const TableStyle& style) {
  TextSheet sheet(style);
  add_verdict(sheet, result);
  if (!result.met) add_list(sheet, "Why", result.explanations);
  add_asked_for(sheet, result);
  add_ranking(sheet, result);
  if (!result.candidates.empty()) add_candidate(sheet, result.candidates.front(), result.spec);
  add_list(sheet, "Definitions in force", result.definitions);
  add_list(sheet, "Assumptions", result.assumptions);
  add_list(sheet, "Figures from memory", result.from_memory);
  add_list(sheet, "Transistors left out", result.dropped);
  if (result.met) add_list(sheet, "Explanations", result.explanations);
  add_cautions(sheet);
  sheet.space();
  sheet.paragraph(closing_text(result));
  return sheet.text();
}

}  // namespace bandwright
