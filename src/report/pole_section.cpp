#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "report/candidate_sections.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// Smaller shares of a cutoff are not listed one by one.
constexpr double kSmallestShare = 0.005;

std::string shares_text(const std::vector<TimeConstant>& constants) {
  std::vector<TimeConstant> sorted = constants;
  std::stable_sort(sorted.begin(), sorted.end(),
                   [](const TimeConstant& a, const TimeConstant& b) { return a.share > b.share; });
  std::vector<std::string> words;
  for (const TimeConstant& one : sorted) {
    if (one.share < kSmallestShare) continue;
    words.push_back(fmt::format("{} {:.0f} % ({})", one.capacitor, 100 * one.share,
                                format_quantity(one.frequency, Dimension::frequency)));
  }
  const bool some_left_out = words.size() < sorted.size();
  return join(words, ", ") + (some_left_out ? ", the rest under 0.5 % each" : "");
}

std::string root_text(const std::complex<double>& root) {
  const std::string real = format_quantity(root.real(), Dimension::frequency);
  if (root.imag() == 0) return real;
  return real + " ± j " + format_quantity(std::fabs(root.imag()), Dimension::frequency);
}

// A conjugate pair is printed once.
std::string roots_text(const std::vector<std::complex<double>>& roots) {
  std::vector<std::string> words;
  for (const auto& root : roots)
    if (root.imag() >= 0) words.push_back(root_text(root));
  return words.empty() ? "none" : join(words, ", ");
}

void add_roots(TextSheet& sheet, const Candidate& candidate) {
  if (candidate.poles.poles.empty() && candidate.poles.zeros.empty()) return;
  sheet.item("Poles, s/2π: " + roots_text(candidate.poles.poles));
  sheet.item("Zeros, s/2π: " + roots_text(candidate.poles.zeros));
}

}  // namespace

void add_pole_model(TextSheet& sheet, const Candidate& candidate) {
  const PoleModel& model = candidate.poles_estimate;
  sheet.heading("Pole model beside the exact response");
  TextGrid grid{{{"", false}, {"exact", true}, {"estimate", true}, {"how", false}}, {}, {3}};
  const auto row = [&](Figure figure, double estimate, const std::string& how) {
    grid.add({info(figure).label, figure_text(candidate, info(figure)), figure_text(estimate, info(figure)), how});
  };
  row(Figure::gain, model.midband_gain, "resistive midband network");
  row(Figure::gain, model.textbook_gain, "hfe R'L/hie, over F, times Rin/(Rin + RS)");
  row(Figure::lower_cutoff, model.lower_cutoff, "sum of the short-circuit corner frequencies");
  row(Figure::upper_cutoff, model.upper_cutoff, "sum of the open-circuit time constants");
  row(Figure::upper_cutoff, model.miller_upper_cutoff, "input pole alone, Miller form");
  sheet.grid(grid);
  const std::string f_l = info(Figure::lower_cutoff).symbol;
  const std::string f_h = info(Figure::upper_cutoff).symbol;
  if (!model.low.empty()) sheet.item("Who sets " + f_l + ": " + shares_text(model.low));
  if (!model.high.empty()) sheet.item("Who sets " + f_h + ": " + shares_text(model.high));
  add_roots(sheet, candidate);
}

}  // namespace bandwright
