#include "report/shown_assessment.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/sections.hpp"

namespace bandwright {

namespace {

constexpr int kMostDigits = 9;

bool is_band(Figure figure) {
  return figure == Figure::gain || figure == Figure::lower_cutoff || figure == Figure::upper_cutoff;
}

bool has_worst_case(const WorstCase& worst) {
  return !worst.reason.empty() || std::isfinite(worst.min) || std::isfinite(worst.max);
}

}  // namespace

std::string why_not_assessed(const Candidate& candidate) {
  for (const auto& [field, text] : candidate.notes)
    if (text.starts_with("not active")) return text;
  return is_active(candidate) ? "not assessed" : "not active";
}

std::vector<Figure> required_figures(const Spec& spec, bool band) {
  std::vector<Figure> list;
  for (const FigureInfo& figure : figures())
    if (varies(figure.figure) && (spec.requirement(figure.figure) || (band && is_band(figure.figure))))
      list.push_back(figure.figure);
  return list;
}

std::vector<Figure> bounded_figures(const Assessment& assessment, const Spec& spec) {
  std::vector<Figure> list = required_figures(spec, true);
  for (const FigureInfo& figure : figures()) {
    const bool listed = std::find(list.begin(), list.end(), figure.figure) != list.end();
    if (!listed && varies(figure.figure) && has_worst_case(assessment.worst_case[index(figure.figure)]))
      list.push_back(figure.figure);
  }
  return list;
}

std::optional<Figure> most_failed(const Assessment& assessment, const Spec& spec) {
  std::optional<Figure> most;
  std::size_t failed = 0;
  for (const Figure figure : required_figures(spec, false)) {
    if (assessment.spread[index(figure)].failed <= failed) continue;
    failed = assessment.spread[index(figure)].failed;
    most = figure;
  }
  return most;
}

std::optional<Figure> least_capable(const Assessment& assessment, const Spec& spec) {
  std::optional<Figure> least;
  for (const Figure figure : required_figures(spec, false)) {
    const double capability = assessment.spread[index(figure)].capability;
    if (std::isnan(capability)) continue;
    if (!least || capability < assessment.spread[index(*least)].capability) least = figure;
  }
  return least;
}

std::optional<Cause> largest_cause(const Assessment& assessment, Figure figure) {
  const auto& row = assessment.share[index(figure)];
  const auto largest = std::max_element(row.begin(), row.end());
  if (!(*largest > 0)) return std::nullopt;
  return causes()[static_cast<std::size_t>(largest - row.begin())].cause;
}

std::string share_text(double share, int digits) {
  if (std::isnan(share)) return "-";
  std::string text = fmt::format("{:.{}g}", 100 * share, digits);
  for (; share < 1 && text == "100" && digits < kMostDigits; ++digits)
    text = fmt::format("{:.{}g}", 100 * share, digits + 1);
  return text + " %";
}

std::string counted(std::size_t units) {
  std::string text = std::to_string(units);
  for (std::size_t end = text.size(); end > 3; end -= 3) text.insert(end - 3, 1, ',');
  return text;
}

std::string capability_text(double capability, bool from_moments) {
  if (std::isnan(capability)) return "-";
  return fmt::format("{}{:.2f}", from_moments && capability != 0 ? "~" : "", capability);
}

std::string capability_text(double capability, const Assessment& assessment) {
  return capability_text(capability, assessment.from_moments);
}

std::string capability_definition(bool marked) {
  return fmt::format(
      "capability: from the median of the units to the nearer limit, over what lies between the median and their "
      "0.135 % or 99.865 % quantile on that side; at most 2, 0 where more than 0.135 % of the units are not active{}.",
      marked ? "; ~: fewer than 20,000 units, mean and 3 sigma in place of quantiles" : "");
}

std::string at_condition_text(const Assessment& assessment, std::size_t condition) {
  if (condition == 0) return "at the nominal condition";
  return fmt::format("at {}", condition_name(assessment.population, condition));
}

}  // namespace bandwright
