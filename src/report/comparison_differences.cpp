// How specs and parts of compared candidates differ.
#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <functional>

#include "report/comparison.hpp"
#include "report/sections.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

// One thing that specs may state differently.
struct SpecLine {
  std::string label;
  std::function<std::string(const Spec&)> text;
};

// "12 V (A), 9 V (B and C)"; empty where all state the same.
std::string differing_text(const Compared& list, const SpecLine& line) {
  std::vector<std::string> texts;
  std::vector<Positions> who;
  for (std::size_t i = 0; i < list.size(); ++i) {
    const std::string text = line.text(list[i].spec);
    const auto same = std::find(texts.begin(), texts.end(), text) - texts.begin();
    if (static_cast<std::size_t>(same) == texts.size()) {
      texts.push_back(text);
      who.emplace_back();
    }
    who[static_cast<std::size_t>(same)].push_back(i);
  }
  if (texts.size() < 2) return "";
  for (std::size_t i = 0; i < texts.size(); ++i) texts[i] += fmt::format(" ({})", names_of(who[i], "and"));
  return fmt::format("{} {}", line.label, join(texts, ", "));
}

std::vector<std::string> differing_lines(const Compared& list, const std::vector<SpecLine>& lines) {
  std::vector<std::string> found;
  for (const SpecLine& line : lines)
    if (const std::string text = differing_text(list, line); !text.empty()) found.push_back(text);
  return found;
}

std::string requirement_text(const Spec& spec, const FigureInfo& figure) {
  const auto& requirement = spec.requirement(figure.figure);
  if (!requirement) return "not asked for";
  const std::string window = window_text(*requirement, figure);
  if (std::isnan(requirement->target)) return window;
  const std::string target = format_quantity(requirement->target, figure.dimension);
  return window.empty() ? target : fmt::format("{}, {}", target, window);
}

std::string gain_taken_text(const Spec& spec) {
  const std::string where = spec.gain_at ? format_quantity(*spec.gain_at, Dimension::frequency) : "the peak";
  return fmt::format("from the {} at {}", spec.gain_from_input ? "input" : "source", where);
}

const std::vector<SpecLine>& requirement_lines() {
  static const std::vector<SpecLine> kLines = [] {
    std::vector<SpecLine> lines;
    for (const FigureInfo& figure : figures())
      lines.push_back({figure.label, [&figure](const Spec& spec) { return requirement_text(spec, figure); }});
    lines.push_back({"gain taken", gain_taken_text});
    return lines;
  }();
  return kLines;
}

SpecLine quantity_line(const char* label, Dimension dimension, double (*value)(const Spec&)) {
  return {label, [dimension, value](const Spec& spec) { return format_quantity(value(spec), dimension); }};
}

// "usual", or "R1 exact, hFE ±10 %": what the spec says of the causes of spread.
std::string causes_text(const Spec& spec) {
  std::vector<std::string> words;
  if (spec.assess.uniform) words.push_back("uniform");
  for (const CauseInfo& cause : causes()) {
    const auto& limits = spec.assess.causes[index(cause.cause)];
    if (!limits) continue;
    const bool is_exact = limits->below == 0 && limits->above == 0;
    const std::string width = cause.scale == CauseScale::volts
                                  ? "±" + format_quantity(limits->above, Dimension::voltage)
                                  : tolerance_text(*limits);
    words.push_back(fmt::format("{} {}", cause.symbol, is_exact ? "exact" : width));
  }
  if (const auto& coefficient = spec.assess.temperature_coefficient)
    words.push_back(fmt::format("temperature coefficients ±{:.4g} ppm/K", *coefficient * 1e6));
  return words.empty() ? "as usual" : join(words, " and ");
}

const std::vector<SpecLine>& condition_lines() {
  using D = Dimension;
  static const std::vector<SpecLine> kLines = {
      quantity_line("supply", D::voltage, [](const Spec& s) { return s.supply.nominal; }),
      quantity_line("lowest supply", D::voltage, [](const Spec& s) { return s.supply.min; }),
      quantity_line("highest supply", D::voltage, [](const Spec& s) { return s.supply.max; }),
      quantity_line("source resistance", D::resistance, [](const Spec& s) { return s.source.resistance; }),
      quantity_line("source capacitance", D::capacitance, [](const Spec& s) { return s.source.capacitance; }),
      quantity_line("source DC", D::voltage, [](const Spec& s) { return s.source.dc; }),
      quantity_line("load resistance", D::resistance, [](const Spec& s) { return 1 / s.load.conductance; }),
      quantity_line("load capacitance", D::capacitance, [](const Spec& s) { return s.load.capacitance; }),
      quantity_line("load DC", D::voltage, [](const Spec& s) { return s.load.dc; }),
      quantity_line("wiring at the base", D::capacitance, [](const Spec& s) { return s.stray.input; }),
      quantity_line("wiring at the collector", D::capacitance, [](const Spec& s) { return s.stray.output; }),
      quantity_line("wiring from collector to base", D::capacitance, [](const Spec& s) { return s.stray.feedback; }),
      quantity_line("ambient", D::temperature, [](const Spec& s) { return s.ambient.nominal; }),
      quantity_line("lowest ambient", D::temperature, [](const Spec& s) { return s.ambient.min; }),
      quantity_line("highest ambient", D::temperature, [](const Spec& s) { return s.ambient.max; }),
      {"spread of units", causes_text},
      {"yield asked", [](const Spec& s) { return share_text(s.assess.yield, 6); }},
  };
  return kLines;
}

template <typename Of>
bool any_apart(const std::vector<const Part*>& parts, Of of) {
  return std::any_of(parts.begin(), parts.end(), [&](const Part* one) { return !(of(*one) == of(*parts.front())); });
}

// Not stated on both sides is alike.
double comparable(double value) { return std::isnan(value) ? -1 : value; }

}  // namespace

std::vector<std::string> differing_requirements(const Compared& list) {
  return differing_lines(list, requirement_lines());
}

std::vector<std::string> differing_conditions(const Compared& list) { return differing_lines(list, condition_lines()); }

std::vector<std::string> difference_texts(const Compared& list) {
  std::vector<std::string> texts;
  if (const auto lines = differing_requirements(list); !lines.empty())
    texts.push_back(
        fmt::format("The requirements differ: {}. Error, margins, capability and yield are each against "
                    "the requirements of its own file.",
                    join(lines, "; ")));
  if (const auto lines = differing_conditions(list); !lines.empty())
    texts.push_back(fmt::format("The conditions differ: {}.", join(lines, "; ")));
  return texts;
}

std::vector<Figure> required_by_any(const Compared& list) {
  std::vector<Figure> required;
  for (const FigureInfo& figure : figures())
    if (std::any_of(list.begin(), list.end(), [&](const auto& one) { return one.spec.requirement(figure.figure); }))
      required.push_back(figure.figure);
  return required;
}

const Part* part_of(const Candidate& candidate, Role role) {
  const auto found = std::find_if(candidate.parts.begin(), candidate.parts.end(),
                                  [role](const Part& part) { return part.role == role; });
  return found == candidate.parts.end() ? nullptr : &*found;
}

double rating_of(const Part& part) {
  return info(part.role).kind == PartKind::resistor ? part.power_rating : part.voltage_rating;
}

PartDifference part_difference(const Compared& list, Role role) {
  std::vector<const Part*> present;
  for (const ComparedCandidate& one : list)
    if (const Part* part = part_of(one.stated, role)) present.push_back(part);
  PartDifference difference;
  difference.presence = !present.empty() && present.size() < list.size();
  difference.value = any_apart(present, [](const Part& p) { return p.value; });
  difference.tolerance = any_apart(
      present, [](const Part& p) { return std::pair(comparable(p.tolerance.below), comparable(p.tolerance.above)); });
  difference.family = any_apart(present, [](const Part& p) { return p.family; });
  difference.rating = any_apart(present, [](const Part& p) { return comparable(rating_of(p)); });
  return difference;
}

bool devices_differ(const Compared& list) {
  return std::any_of(list.begin(), list.end(),
                     [&](const ComparedCandidate& one) { return one.stated.device != list.front().stated.device; });
}

}  // namespace bandwright
