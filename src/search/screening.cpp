#include <algorithm>
#include <bandwright/search.hpp>
#include <cmath>
#include <optional>

#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

// A band with one pole a side cannot be narrower: 3 + 2 sqrt(2).
constexpr double kNarrowestBand = 5.8284271247461903;
constexpr double kTogether = 1.5;

std::string text(double v, Dimension d) { return format_quantity(v, d, 3); }

double thermal_voltage(const Spec& spec) { return spec.ambient.nominal * kBoltzmann / kElementaryCharge; }

double lower_limit(const Spec& spec, Figure f) {
  const auto& r = spec.requirement(f);
  return r ? r->lower : kNotComputed;
}

/// gm R_ac with the largest drop the supply leaves to the collector resistor, ro in parallel: A <= V/VT with 1/V =
/// 1/(VCC
/// - 1 V) + 1/VA. Degeneration, load and source only lower it.
double gain_ceiling(const Spec& spec, double inverse_early_voltage) {
  const double drop = spec.supply_magnitude() - kLeastCollectorEmitter;
  return drop > 0 ? drop / (1 + drop * inverse_early_voltage) / thermal_voltage(spec) : 0;
}

/// The input pole by the Miller effect: (RS + rbb') Cmu A is part of the time constant whatever the rest does, Cmu at
/// the largest VCB. Two poles that come together put fH up to 1.29 times over 1/(2 pi tau): kTogether is left for them.
double miller_ceiling(const Spec& spec, const BipolarParameters& d, double gain) {
  const double v_cb = spec.supply_magnitude();
  const double c_mu = d.feedback_capacitance * e_to(-d.grading_exponent * ln(1 + v_cb / d.built_in_potential));
  const double r = (spec.gain_from_input ? 0 : spec.source.resistance) + d.base_resistance;
  return kTogether / (2 * kPi * r * c_mu * gain);
}

std::optional<std::string> ceiling_reason(const Spec& spec, const BipolarParameters& d) {
  const double gain = lower_limit(spec, Figure::gain), fast = lower_limit(spec, Figure::upper_cutoff);
  if (spec.highest_supply() > d.breakdown_voltage) {
    return "VCEO " + text(d.breakdown_voltage, Dimension::voltage) + " is under the highest supply, " +
           text(spec.highest_supply(), Dimension::voltage);
  }
  if (const double most = gain_ceiling(spec, d.inverse_early_voltage); gain > most) {
    return "gain cannot exceed V/VT = " + text(most, Dimension::gain) + " with 1/V = 1/(VCC - 1 V) + 1/VA";
  }
  if (d.highest_transition_frequency > 0 && fast > d.highest_transition_frequency) {
    return "fT " + text(d.highest_transition_frequency, Dimension::frequency) +
           " is under the lowest upper cutoff allowed, " + text(fast, Dimension::frequency);
  }
  if (const double most = miller_ceiling(spec, d, gain); fast > most) {
    return "upper cutoff cannot exceed " + text(most, Dimension::frequency) +
           " at this gain: Miller effect of Cmu on the source's resistance and rbb'";
  }
  return std::nullopt;
}

}  // namespace

std::vector<Dropped> screen_devices(const Spec& spec, const std::vector<DerivedDevice>& devices) {
  std::vector<Dropped> dropped;
  for (std::size_t i = 0; i < devices.size(); ++i) {
    if (auto reason = ceiling_reason(spec, devices[i].parameters)) {
      dropped.push_back({i, devices[i].parameters.type + ": " + *reason});
    }
  }
  return dropped;
}

std::vector<std::string> explain_limits(const Spec& spec, const std::vector<DerivedDevice>& devices) {
  std::vector<std::string> reasons;
  const double gain = lower_limit(spec, Figure::gain);
  double loosest = 1;  // the largest VA makes the highest ceiling
  for (const DerivedDevice& d : devices) loosest = std::min(loosest, d.parameters.inverse_early_voltage);
  const double most = gain_ceiling(spec, devices.empty() ? 0 : loosest);
  if (gain > most) {
    reasons.push_back("gain: gm R_ac = IC R_ac/VT cannot exceed " + text(most, Dimension::gain) + " on " +
                      text(spec.supply_magnitude(), Dimension::voltage) + " (VT " +
                      text(thermal_voltage(spec), Dimension::voltage) + ", 1 V left for VCE); at least " +
                      text(gain, Dimension::gain) + " is required");
  }
  double fastest = 0;
  for (const DerivedDevice& d : devices) fastest = std::max(fastest, miller_ceiling(spec, d.parameters, gain));
  if (!devices.empty() && lower_limit(spec, Figure::upper_cutoff) > fastest) {
    reasons.push_back("upper cutoff: the Miller effect of Cmu on the source's resistance and rbb' allows at most " +
                      text(fastest, Dimension::frequency) + " at a gain of " + text(gain, Dimension::gain) +
                      "; at least " + text(lower_limit(spec, Figure::upper_cutoff), Dimension::frequency) +
                      " is required");
  }
  const auto& low = spec.requirement(Figure::lower_cutoff);
  const auto& high = spec.requirement(Figure::upper_cutoff);
  if (low && high && high->upper / low->lower < kNarrowestBand) {
    reasons.push_back("band: with one pole a side fH/fL cannot go below 3 + 2 sqrt(2) = 5.83; at most " +
                      text(high->upper / low->lower, Dimension::fraction) + " is allowed");
  }
  return reasons;
}

}  // namespace bandwright
