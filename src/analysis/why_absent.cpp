#include <bandwright/analysis.hpp>
#include <cmath>

#include "analysis/operating_point.hpp"

namespace bandwright {

namespace {

std::string volts(double v) { return format_quantity(v, Dimension::voltage, 3); }

std::string why_not_active(const Analysis& a, const Stage& stage) {
  const OperatingPoint& p = a.point;
  if (p.state == BiasState::saturated) {
    return "not active: VCE would be " + volts(p.collector_emitter_voltage) + ", needs " +
           volts(least_active_voltage(*stage.device, p.base_emitter_voltage)) +
           "; lower the base voltage or the collector resistor";
  }
  return "not active: IC would be " + format_quantity(p.collector_current, Dimension::current, 3) +
         ", under 100 times the leakage of the transistor at this temperature; raise the base voltage";
}

}  // namespace

std::string why_absent(const Analysis& a, const Stage& stage, const GainDefinition& definition, Figure figure) {
  if (!std::isnan(a.figures[index(figure)])) return "";
  if (a.point.state != BiasState::active) return why_not_active(a, stage);
  if (info(figure).use == FigureUse::reserved) return "not computed by this version";
  const bool band = figure == Figure::lower_cutoff || figure == Figure::upper_cutoff || figure == Figure::bandwidth;
  if (band && definition.frequency > 0 && std::isnan(a.band.lower) && std::isnan(a.band.upper)) {
    return "the response at " + format_quantity(definition.frequency, Dimension::frequency) +
           " is more than 3.01 dB under its own peak: it lies outside the pass band";
  }
  if (band) return "the response does not fall to the gain over the square root of 2 on this side";
  return "";
}

}  // namespace bandwright
