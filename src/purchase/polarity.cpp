// Polarity: a polarised capacitor only where its voltage keeps one sign at every corner.
#include "purchase/polarity.hpp"

#include <bandwright/purchase.hpp>

#include "catalogue/choice.hpp"
#include "catalogue/pairs.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

bool is_own(const OfferedValue& part) {
  return part.stock != nullptr || part.pair[0].stock != nullptr || part.pair[1].stock != nullptr;
}

/// The same value of another family, as it works at the nominal ambient.
OfferedValue bought_from(const Family& family, OfferedValue part, double ambient) {
  part.family = &family;
  part.working_value = part.value;
  if (ambient < kColdBegins) part.working_value *= 1 - family.cold_loss * (kColdBegins - ambient);
  part.unit_cost = family.unit_cost + family.unit_cost_per_value * part.value;
  part.invented_cost = family.invented_cost;
  if (const auto tolerance = bought_tolerance(family, part.tolerance)) part.tolerance = *tolerance;
  return part;
}

OfferedValue half_of(const OfferedValue& both, std::size_t half) {
  OfferedValue one = both;
  one.connection = Connection::single;
  one.value = both.pair[half].value;
  one.tolerance = both.pair[half].tolerance;
  one.series = both.pair[half].series;
  return one;
}

}  // namespace

bool keeps_one_sign(const StressRange& volts) { return !volts.changes_sign() && volts.largest() > 0; }

OfferedParts with_settled_polarity(const Spec& spec, OfferedParts parts, const WorstStress& stress) {
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i) {
    OfferedValue& part = parts[i];
    if (part.family == nullptr || !part.family->polarised || part.unpolarised == nullptr || is_own(part)) continue;
    if (keeps_one_sign(stress.volts[i])) continue;
    const auto other = [&](const OfferedValue& one) {
      return bought_from(*part.unpolarised, one, spec.ambient.nominal);
    };
    part = part.connection == Connection::single
               ? other(part)
               : joined(other(half_of(part, 0)), other(half_of(part, 1)), part.connection);
  }
  return parts;
}

}  // namespace bandwright
