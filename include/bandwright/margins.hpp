// Margins: the one place that compares figures with requirements.
//
// error of a requirement with target: ln(x/target)/ln(U/target) above it, ln(target/x)/ln(target/L) below; on an open
// side |ln(x/target)|/ln(1 + default tolerance), capped at 1. Without target: 0 if met, else 1 + |ln(x/limit)|/ln(1 +
// default tolerance). Figures that may be 0 or negative are compared by difference over |limit|.
// margin: 1 at the target, 0 at the limit, negative outside; without target (U - x)/|U| or (x - L)/|L|.
#pragma once

#include <array>
#include <bandwright/figure.hpp>
#include <bandwright/spec.hpp>
#include <string>
#include <vector>

namespace bandwright {

/// Stands for "has no value": larger than any error of a stage that works.
inline constexpr double kWorstError = 1e3;

double requirement_error(const Requirement& requirement, const FigureInfo& figure, double value);
double requirement_margin(const Requirement& requirement, const FigureInfo& figure, double value);
bool meets(const Requirement& requirement, double value);

/// The same of a cutoff that was not solved: `ratio` is 2 |H|^2/A^2 at the frequency of the limit, which is not beyond
/// the peak. A lower cutoff lies at or under the limit, an upper one at or above it, where the ratio is at least 1.
bool meets_at_limit(Figure cutoff, bool upper_limit, double ratio);

/// The error with its sign, for searches that need slopes: 0 at the target or inside the limits, +1 at U, -1 at L, on
/// an open side not capped, without the step of 1 past a lone limit.
struct Deviation {
  double value = 0;
  double slope = 0;  ///< d value / d ln x
};
Deviation deviation(const Requirement& requirement, const FigureInfo& figure, double value);

/// Half-width of the window in ln x, as the tolerance sensitivity divides by it.
double window_width(const Requirement& requirement, const FigureInfo& figure);

/// Largest error over all requirements of a spec; kWorstError where a required figure is NaN.
double error(const Spec& spec, const FigureValues& values);
bool meets_all(const Spec& spec, const FigureValues& values);

/// A requirement that is not met.
struct Shortfall {
  Figure figure;
  double value = kNotComputed;
  double limit = kNotComputed;
  std::string text;  ///< "gain: 31.2, needs at least 44.7 (3.1 dB short)"
};
std::vector<Shortfall> shortfalls(const Spec& spec, const FigureValues& values);

}  // namespace bandwright
