#include <algorithm>
#include <bandwright/assessment.hpp>
#include <bandwright/margins.hpp>
#include <cmath>

#include "device/gain_curve.hpp"
#include "numeric/elementary.hpp"

namespace bandwright {

double half_width(const Tolerance& t) { return t.above == t.below ? t.above : ln((1 + t.above) / (1 - t.below)) / 2; }

std::array<double, 2> gain_limits(const BipolarParameters& device, double collector_current) {
  const double x = ln(collector_current);
  return {e_to(gain_point(device.gain_min, x).log_gain), e_to(gain_point(device.gain_max, x).log_gain)};
}

double gain_half_width(const BipolarParameters& device, double collector_current) {
  const std::array<double, 2> limits = gain_limits(device, collector_current);
  return ln(limits[1] / limits[0]) / 2;
}

double assessed_half_width(const Spec& spec, Cause cause, double usual) {
  const auto& chosen = spec.assess.causes[index(cause)];
  if (!chosen) return usual;
  const bool by_logarithm = info(cause).scale == CauseScale::logarithm;
  return by_logarithm ? ln((1 + chosen->above) / (1 - chosen->below)) / 2 : half_width(*chosen);
}

double tolerance_sensitivity(const Spec& spec, const Sensitivity& sensitivity, const CauseWidths& widths) {
  double largest = 0;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (!r || !varies(f.figure)) continue;
    double sum = 0;
    for (std::size_t i = 0; i < kCauseCount; ++i) {
      const double part = sensitivity[index(f.figure)][i] * widths[i];
      sum += part * part;
    }
    const double share = std::sqrt(sum) / window_width(*r, f);
    if (std::isnan(share)) return share;  // a figure without a value has no sensitivity
    largest = std::max(largest, share);
  }
  return largest;
}

}  // namespace bandwright
