#include "report/bill_cells.hpp"

#include <fmt/format.h>

#include <cmath>

namespace bandwright {

namespace {

constexpr const char* kInvented = "cost invented for demonstration";
constexpr double kMillion = 1e6;

// Parts lists say 0.25 W where a sheet says 250 mW.
std::string amount(double value, const char* unit) {
  return value > 0 ? fmt::format("{:.4g} {}", value, unit) : std::string();
}

std::string both(const std::string& first, const std::string& second) {
  return first.empty() || second.empty() ? first + second : fmt::format("{}, {}", first, second);
}

}  // namespace

const char* kind_word(PartKind kind) {
  constexpr std::array kWords = {"resistor", "capacitor", "transistor"};
  return kWords[static_cast<std::size_t>(kind)];
}

std::string bill_rating(const Part& part) {
  if (part.kind == PartKind::transistor)
    return both(amount(part.voltage_rating, "V VCEO"), amount(part.power_rating, "W"));
  if (std::isnan(part.voltage_rating) || std::isnan(part.power_rating)) return "none holds";
  return both(amount(part.power_rating, "W"), amount(part.voltage_rating, "V"));
}

std::string bill_temperature_coefficient(const Part& part) {
  if (!(part.temperature_coefficient > 0)) return "";
  return fmt::format("±{:.4g} ppm/K", kMillion * part.temperature_coefficient);
}

std::string bill_note(const BillRow& row) {
  if (!row.part.invented_cost || std::isnan(row.part.unit_cost)) return row.note;
  return row.note.empty() ? kInvented : fmt::format("{}; {}", row.note, kInvented);
}

}  // namespace bandwright
