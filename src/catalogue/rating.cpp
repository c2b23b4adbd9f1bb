// Ratings: the smallest rating of a family that stands above the stress.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <cmath>

namespace bandwright {

namespace {

// A resistor is loaded to half its rating at most: common practice, no source.
constexpr double kLargestLoad = 0.5;

}  // namespace

std::optional<double> rated_voltage(const Family& family, double highest_volts) {
  const auto& ratings = family.voltage_ratings;
  const auto row = std::upper_bound(ratings.begin(), ratings.end(), std::fabs(highest_volts));
  if (std::isnan(highest_volts) || row == ratings.end()) return std::nullopt;
  return *row;
}

std::optional<std::size_t> rating_row(const Family& family, double highest_volts, double highest_watts) {
  const auto& powers = family.power_ratings;
  const auto& voltages = family.voltage_ratings;
  for (std::size_t i = 0; i < std::max(powers.size(), voltages.size()); ++i) {
    const bool power_holds = powers.empty() || (i < powers.size() && highest_watts <= kLargestLoad * powers[i]);
    const bool voltage_holds = voltages.empty() || (i < voltages.size() && std::fabs(highest_volts) < voltages[i]);
    if (power_holds && voltage_holds) return i;
  }
  return std::nullopt;
}

}  // namespace bandwright
