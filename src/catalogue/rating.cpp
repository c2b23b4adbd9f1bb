// Ratings: the smallest one that is loaded to no more than its derated share.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

#include "catalogue/choice.hpp"

namespace bandwright {

namespace {

double at_or_none(const std::vector<double>& list, std::size_t i) { return i < list.size() ? list[i] : kNotComputed; }

bool holds(const Rating& r, const Family& family, const Derating& derating, double volts, double watts) {
  const bool voltage_holds =
      std::isnan(r.voltage) || at_most(std::fabs(volts), voltage_share(derating, family) * r.voltage);
  const bool power_holds = std::isnan(r.power) || at_most(watts, derating.resistor_power * r.power);
  return voltage_holds && power_holds;
}

/// What a stock part states; what it leaves out is the smallest of its family.
Rating own_rating(const StockPart& part, const Family& family) {
  Rating r{part.voltage_rating, part.power_rating};
  if (std::isnan(r.voltage)) r.voltage = at_or_none(family.voltage_ratings, 0);
  if (std::isnan(r.power)) r.power = at_or_none(family.power_ratings, 0);
  return r;
}

}  // namespace

double voltage_share(const Derating& d, const Family& family) {
  if (family.kind == PartKind::resistor) return d.resistor_voltage;
  return family.electrolytic ? d.electrolytic_voltage : d.capacitor_voltage;
}

std::optional<Rating> rating_that_holds(const OfferedValue& part, const Derating& derating, double volts,
                                        double watts) {
  if (part.family == nullptr || std::isnan(volts)) return std::nullopt;
  const Family& family = *part.family;
  if (part.stock != nullptr) {
    const Rating own = own_rating(*part.stock, family);
    return holds(own, family, derating, volts, watts) ? std::optional(own) : std::nullopt;
  }
  for (std::size_t i = 0; i < std::max(family.power_ratings.size(), family.voltage_ratings.size()); ++i) {
    const Rating r{at_or_none(family.voltage_ratings, i), at_or_none(family.power_ratings, i)};
    if (holds(r, family, derating, volts, watts)) return r;
  }
  return std::nullopt;
}

double bias_factor(const OfferedValue& part, const Derating& derating, double volts, double worst_volts) {
  if (part.family == nullptr || part.family->bias_loss == 0) return 1;
  const auto rating = rating_that_holds(part, derating, worst_volts, 0);
  if (!rating || !(rating->voltage > 0)) return 1 - part.family->bias_loss;
  return 1 - part.family->bias_loss * std::min(std::fabs(volts) / rating->voltage, 1.0);
}

Tolerance tolerance_at_work(const OfferedValue& part) {
  if (part.family == nullptr || part.family->further_limits == Tolerance{}) return part.tolerance;
  const Tolerance& further = part.family->further_limits;
  return {1 - (1 - part.tolerance.below) * (1 - further.below), (1 + part.tolerance.above) * (1 + further.above) - 1};
}

const char* word(Connection connection) {
  constexpr const char* kWords[] = {"single", "series", "parallel"};
  return kWords[static_cast<std::size_t>(connection)];
}

}  // namespace bandwright
