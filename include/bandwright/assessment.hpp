// Assessment: how much of each window the tolerances fill.
//
// tolerance_sensitivity = largest over the required figures of sqrt(sum (S_i t_i)^2)/w: t_i the relative tolerance of
// part i (hFE: ln(max/min)/2; asymmetric -a/+b: ln((1+b)/(1-a))/2), w the half-width of the requirement's window in ln
// x. 1 means that the root sum of squares alone fills the window.
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/spec.hpp>

namespace bandwright {

/// Half-widths t_i of the causes, in the order of Sensitivity's columns.
using CauseWidths = std::array<double, kSensitivityCauses>;

double half_width(const Tolerance& tolerance);

/// beta0 at 25 °C of the lowest and the highest unit of the type, at a collector current.
std::array<double, 2> gain_limits(const BipolarParameters& device, double collector_current);

/// ln(max/min)/2 of beta0 at a collector current.
double gain_half_width(const BipolarParameters& device, double collector_current);

double tolerance_sensitivity(const Spec& spec, const Sensitivity& sensitivity, const CauseWidths& widths);

}  // namespace bandwright
