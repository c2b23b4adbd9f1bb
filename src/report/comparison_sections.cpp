#include "report/comparison_sections.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/sections.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr int kNarrowestPage = 60;  // as a sheet has them
constexpr int kIndent = 2;

bool fits(const TextGrid& grid, const TableStyle& style) {
  const auto width = static_cast<std::size_t>(std::max(style.width, kNarrowestPage) - kIndent);
  const TextGrid::Lines lines = grid.lines(width);
  const auto is_short = [&](const std::string& line) { return text_width(line) <= width; };
  return std::all_of(lines.headings.begin(), lines.headings.end(), is_short) &&
         std::all_of(lines.body.begin(), lines.body.end(), is_short);
}

Dimension dimension_of(Role role) {
  return info(role).kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

using PartText = std::string (*)(const Part&);

std::string value_text(const Part& part) { return format_quantity(part.value, dimension_of(part.role)); }

std::string tolerance_cell(const Part& part) {
  return std::isnan(part.tolerance.above) ? "-" : tolerance_text(part.tolerance);
}

std::string family_cell(const Part& part) { return part.family.empty() ? "-" : short_family(part.family, part.role); }

std::string rating_cell(const Part& part) {
  const bool is_resistor = info(part.role).kind == PartKind::resistor;
  return format_quantity(rating_of(part), is_resistor ? Dimension::power : Dimension::voltage);
}

void add_part_row(BesideGrid& grid, Role role, const std::vector<std::string>& named, PartText text) {
  grid.add(named, [&](const ComparedCandidate& one) {
    const Part* part = part_of(one.stated, role);
    return part != nullptr ? text(*part) : "none";
  });
}

// The value, and below it what else differs.
void add_part(BesideGrid& grid, const RoleInfo& role, const PartDifference& difference) {
  add_part_row(grid, role.role, {role.designator, role.label}, value_text);
  if (difference.tolerance) add_part_row(grid, role.role, {"", "- tolerance"}, tolerance_cell);
  if (difference.family) add_part_row(grid, role.role, {"", "- family"}, family_cell);
  if (difference.rating) add_part_row(grid, role.role, {"", "- rating"}, rating_cell);
}

void add_end(BesideGrid& grid, Figure figure, const std::string& label, double WorstCase::*end) {
  grid.add_stated({label}, [figure, end](const ComparedCandidate& one) {
    return format_quantity(one.stated.assessment->worst_case[index(figure)].*end, info(figure).dimension);
  });
}

std::vector<std::string> same_parts(const Compared& list) {
  std::vector<std::string> same;
  for (const RoleInfo& role : roles()) {
    const Part* part = part_of(list.front().stated, role.role);
    if (part != nullptr && !part_difference(list, role.role).any())
      same.push_back(fmt::format("{} {}", role.designator, value_text(*part)));
  }
  if (!devices_differ(list)) same.push_back("Q1 " + list.front().stated.device);
  return same;
}

// What a sheet shows of a candidate, by its field in the document.
struct ShownField {
  std::string key;
  std::string label;
};

std::vector<ShownField> shown_fields(const Compared& list) {
  std::vector<ShownField> fields = {{"variant", "variant"},
                                    {"verdict", "verdict"},
                                    {"non_dominated", "non-dominated"},
                                    {"error", "error"},
                                    {"tolerance_sensitivity", "tolerance sensitivity"},
                                    {"capability", "capability"},
                                    {"capability.smallest", "capability"},
                                    {"yield", "yield"},
                                    {"worst_case", "worst case"}};
  for (const Figure figure : required_by_any(list)) {
    const std::string key = shown_key(info(figure)), label = info(figure).label;
    fields.push_back({key, label});
    fields.push_back({"worst_case." + key, "worst case of " + label});
  }
  return fields;
}

}  // namespace

BesideGrid::BesideGrid(const Compared& list, const std::vector<std::string>& named)
    : list_(list), named_(named.size()), grid_{{}, {}, {0}} {
  for (const std::string& heading : named) grid_.columns.push_back({heading, false});
  for (std::size_t i = 0; i < list.size(); ++i) grid_.columns.push_back({compared_name(i), true});
}

void BesideGrid::add(std::vector<std::string> named, const CellText& text) {
  for (const ComparedCandidate& one : list_) named.push_back(text(one));
  grid_.add(std::move(named));
}

void BesideGrid::add_stated(const std::vector<std::string>& named, const CellText& text) {
  if (std::any_of(list_.begin(), list_.end(), [&](const auto& one) { return text(one) != "-"; })) add(named, text);
}

TextGrid BesideGrid::columns_of(std::size_t first, std::size_t count) const {
  const auto cut = [&](const auto& row) {
    auto out = row;
    const auto begin = row.begin() + static_cast<std::ptrdiff_t>(named_ + first);
    out.assign(row.begin(), row.begin() + static_cast<std::ptrdiff_t>(named_));
    out.insert(out.end(), begin, begin + static_cast<std::ptrdiff_t>(count));
    return out;
  };
  TextGrid part{cut(grid_.columns), {}, grid_.flexible};
  for (const auto& row : grid_.rows) part.add(cut(row));
  return part;
}

void BesideGrid::print(TextSheet& sheet, const TableStyle& style) const {
  for (std::size_t first = 0, count = 0; first < list_.size(); first += count) {
    count = list_.size() - first;
    while (count > 1 && !fits(columns_of(first, count), style)) --count;
    if (first > 0) sheet.space();
    sheet.grid(columns_of(first, count));
  }
}

void add_compared_parts(TextSheet& sheet, const Compared& list, const TableStyle& style) {
  BesideGrid grid(list, {"part", "role"});
  for (const RoleInfo& role : roles()) {
    const PartDifference difference = part_difference(list, role.role);
    if (difference.any()) add_part(grid, role, difference);
  }
  if (devices_differ(list)) grid.add({"Q1", "transistor"}, [](const auto& one) { return one.stated.device; });
  sheet.heading(grid.is_empty() ? "No part differs" : "Parts that differ");
  grid.print(sheet, style);
  const std::vector<std::string> same = same_parts(list);
  sheet.line(same.empty() ? "no part is the same in all" : "the same in all: " + join(same, ", "));
}

void add_compared_worst_cases(TextSheet& sheet, const Compared& list, const TableStyle& style) {
  BesideGrid grid(list, {"figure"});
  for (const Figure figure : required_by_any(list)) {
    add_end(grid, figure, std::string(info(figure).label) + ", least", &WorstCase::min);
    add_end(grid, figure, "- largest", &WorstCase::max);
  }
  if (grid.is_empty()) return;
  sheet.heading("Worst case (every cause at its limits, at the worst supply and ambient)");
  grid.print(sheet, style);
}

void add_not_stated(TextSheet& sheet, const Compared& list) {
  std::vector<std::string> lines;
  for (std::size_t i = 0; i < list.size(); ++i) {
    std::map<std::string, std::vector<std::string>> labels_of;
    for (const ShownField& field : shown_fields(list)) {
      const auto note = list[i].stated.notes.find(field.key);
      if (note != list[i].stated.notes.end()) labels_of[note->second].push_back(field.label);
    }
    for (const auto& [reason, labels] : labels_of)
      lines.push_back(fmt::format("{}: {}: {}", compared_name(i), join(labels, ", "), reason));
  }
  if (!lines.empty()) sheet.heading("Notes");
  for (const std::string& line : lines) sheet.item(line);
}

}  // namespace bandwright
