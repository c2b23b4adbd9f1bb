#include "catalogue/stock_rating.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "units/number_text.hpp"
#include "units/quantity_text.hpp"

namespace bandwright {

namespace {

// Beyond these a prefix was mistaken: 250 MW for 250 mW.
constexpr ValueRange kVoltages = {0.1, 100e3};  // V
constexpr ValueRange kPowers = {1e-3, 1e3};     // W

const ValueRange& allowed(Dimension dimension) { return dimension == Dimension::power ? kPowers : kVoltages; }

std::string describe_rating(PartKind kind) {
  return kind == PartKind::resistor ? "a rating such as 0.25 W, 250 V or 0.25 W 250 V"
                                    : "a rating: a DC voltage such as 50 V";
}

// The first of the quantities, up to and with its W or V; the rest without what parts them.
std::string_view take_quantity(std::string_view& rest) {
  std::size_t end = 0;
  while (end < rest.size() && rest[end] != 'W' && rest[end] != 'V') ++end;
  end = std::min(end + 1, rest.size());
  if (end < rest.size() && std::string_view(" ,;/").find(rest[end]) == std::string_view::npos && !is_digit(rest[end]))
    end = rest.size();  // a letter behind the unit: no unit of ours
  const std::string_view first = rest.substr(0, end);
  rest.remove_prefix(end);
  while (!rest.empty() && std::string_view(" ,;/").find(rest.front()) != std::string_view::npos) rest.remove_prefix(1);
  return trimmed(first);
}

std::optional<double> read_one(std::string_view text, Dimension dimension, std::string& reason) {
  const auto quantity = read_quantity(text, dimension, reason);
  if (!quantity) return std::nullopt;
  const ValueRange& range = allowed(dimension);
  if (!quantity->note.empty())
    reason = "a DC voltage such as 50 V";
  else if (quantity->value < range.min || quantity->value > range.max)
    reason = fmt::format("a value from {} to {}", format_quantity(range.min, dimension),
                         format_quantity(range.max, dimension));
  else
    return quantity->value;
  return std::nullopt;
}

bool has_unit(std::string_view text) { return !text.empty() && !is_digit(text.back()) && text.back() != '.'; }

// Puts one quantity where it belongs; what would be right where it has no place, or nothing.
std::string take_into(Rating& rating, std::string_view text, PartKind kind) {
  const bool power = text.ends_with('W') || text.ends_with('w');
  if (power && kind == PartKind::capacitor) return describe_rating(kind);
  if (kind == PartKind::resistor && !has_unit(text)) return describe_rating(kind) + " (the unit is missing)";
  double& place = power ? rating.power : rating.voltage;
  if (!std::isnan(place)) return describe_rating(kind) + " (one of each at most)";
  std::string reason;
  const auto value = read_one(text, power ? Dimension::power : Dimension::voltage, reason);
  if (value) place = *value;
  return value ? "" : reason;
}

}  // namespace

std::optional<Rating> read_rating(std::string_view text, PartKind kind, std::string& expected) {
  const std::string spelt = one_spelling(text);
  std::string_view rest = spelt;
  Rating rating;
  do {
    expected = take_into(rating, take_quantity(rest), kind);
  } while (expected.empty() && !rest.empty());
  return expected.empty() ? std::optional(rating) : std::nullopt;
}

}  // namespace bandwright
