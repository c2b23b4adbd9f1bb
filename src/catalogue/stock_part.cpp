#include "catalogue/stock_part.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>

#include "catalogue/names.hpp"
#include "catalogue/stock_rating.hpp"
#include "units/number_text.hpp"
#include "units/quantity_text.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

using C = StockColumn;

// What is sold, as wide as a spec may ask for.
constexpr ValueRange kResistors = {1e-3, 1e9};  // ohm
constexpr ValueRange kCapacitors = {1e-14, 1};  // F
constexpr ValueRange kTolerances = {1e-6, 10};  // the larger side
constexpr double kSmallCapacitance = 10e-12;    // F, below which tolerance letters are capacitances
constexpr long kMostPieces = 1'000'000'000;
constexpr double kHighestCost = 1e9;

constexpr const char* kToleranceText = "a tolerance such as 1 %, -20/+50 % or a letter of IEC 60062 such as J";

constexpr std::array kKinds = {PartKind::resistor, PartKind::capacitor, PartKind::transistor};

Dimension dimension_of(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

bool is_within(double value, const ValueRange& range) { return value >= range.min && value <= range.max; }

bool is_sensible(const Tolerance& t) { return t.below < 1 && is_within(std::max(t.below, t.above), kTolerances); }

// A single letter as IEC 60062 has it for the part: a share, or below 10 pF a capacitance.
std::optional<Tolerance> lettered(char letter, const StockPart& part) {
  if (part.kind != PartKind::capacitor || !(part.value > 0 && part.value < kSmallCapacitance))
    return tolerance_of_letter(letter);
  const auto capacitance = small_capacitance_tolerance_of_letter(letter);
  if (!capacitance) return std::nullopt;
  return Tolerance{*capacitance / part.value, *capacitance / part.value};
}

}  // namespace

const char* word(PartKind kind) {
  static constexpr const char* kWords[] = {"resistor", "capacitor", "transistor"};
  return kWords[static_cast<std::size_t>(kind)];
}

StockPartReader::StockPartReader(const Catalogue& catalogue, FaultList& faults)
    : catalogue_(catalogue), faults_(faults) {
  for (const Family& family : catalogue.families) families_.emplace(one_name(family.name), &family);
  for (const Family& family : catalogue.families) families_[one_name(family.key)] = &family;
  for (const Transistor& t : catalogue.transistors) types_.emplace(small_letters(t.type), t.type);
}

std::optional<StockPart> StockPartReader::read(const StockRow& row) {
  const std::size_t before = faults_.count();
  StockPart part;
  part.where = row.where;
  part.part_number = row[C::part_number];
  part.note = row[C::note];
  if (const auto kind = read_kind(row)) {
    part.kind = *kind;
    if (part.kind == PartKind::transistor) {
      read_type(row, part);
      leave_to_the_type(row);
    } else {
      read_value(row, part);
      read_rating_cell(row, part);
      read_family(row, part);
      read_tolerance_cell(row, part);
    }
  }
  read_quantity_cell(row, part);
  read_unit_cost(row, part);
  return faults_.count() == before ? std::optional(std::move(part)) : std::nullopt;
}

void StockPartReader::refuse(const StockRow& row, StockColumn column, const std::string& expected,
                             const std::vector<std::string>& known) {
  faults_.add([&]() -> Fault {
    return {row.where_of(column), row[column], expected, nearest_name(row[column], known)};
  });
}

std::optional<PartKind> StockPartReader::read_kind(const StockRow& row) {
  const std::string name = small_letters(row[C::kind]);
  for (const PartKind kind : kKinds)
    if (name == word(kind)) return kind;
  refuse(row, C::kind, "resistor, capacitor or transistor", {"resistor", "capacitor", "transistor"});
  return std::nullopt;
}

void StockPartReader::read_type(const StockRow& row, StockPart& part) {
  const auto found = types_.find(small_letters(row[C::value]));
  if (found != types_.end()) {
    part.type = found->second;
    return;
  }
  std::vector<std::string> known;
  for (const auto& [small, type] : types_) known.push_back(type);
  refuse(row, C::value, "the type of a transistor of the catalogue", known);
}

void StockPartReader::read_value(const StockRow& row, StockPart& part) {
  const Dimension dimension = dimension_of(part.kind);
  const ValueRange& range = part.kind == PartKind::resistor ? kResistors : kCapacitors;
  std::string expected;
  const auto value = read_quantity(row[C::value], dimension, expected);
  if (value && is_within(value->value, range)) {
    part.value = value->value;
    return;
  }
  if (value)
    expected = fmt::format("a {} from {} to {}", part.kind == PartKind::resistor ? "resistance" : "capacitance",
                           format_quantity(range.min, dimension), format_quantity(range.max, dimension));
  refuse(row, C::value, expected);
}

void StockPartReader::read_tolerance_cell(const StockRow& row, StockPart& part) {
  const std::string& text = row[C::tolerance];
  if (text.empty()) return;
  std::string expected = kToleranceText;
  if (text.size() == 1 && !is_digit(text.front())) {
    part.tolerance = lettered(text.front(), part);
    if (!part.tolerance && tolerance_of_letter(text.front()))
      expected = "below 10 pF one of the letters B, C, D, F and G, or a share such as 5 %";
  } else if (const auto written = read_tolerance(text, dimension_of(part.kind), expected)) {
    part.tolerance = written->value;
  }
  if (part.tolerance && is_sensible(*part.tolerance)) return;
  if (part.tolerance) expected = "a tolerance from 0.0001 % to 1000 %, and under 100 % below";
  refuse(row, C::tolerance, expected);
}

void StockPartReader::read_rating_cell(const StockRow& row, StockPart& part) {
  if (row[C::rating].empty()) return;
  std::string expected;
  const auto rating = read_rating(row[C::rating], part.kind, expected);
  if (!rating) return refuse(row, C::rating, expected);
  part.voltage_rating = rating->voltage;
  part.power_rating = rating->power;
}

void StockPartReader::read_family(const StockRow& row, StockPart& part) {
  const std::string& text = row[C::family];
  if (text.empty()) return;
  const auto found = families_.find(one_name(text));
  if (found != families_.end() && found->second->kind == part.kind) {
    part.family = found->second->key;
    return;
  }
  std::vector<std::string> known;
  for (const Family& family : catalogue_.families)
    if (family.kind == part.kind) known.insert(known.end(), {family.key, family.name});
  const char* reason = found != families_.end() ? " (this family is of another kind)" : "";
  refuse(row, C::family, fmt::format("a {} family of the catalogue{}", word(part.kind), reason), known);
}

void StockPartReader::read_quantity_cell(const StockRow& row, StockPart& part) {
  const std::string& text = row[C::quantity];
  if (text.empty()) return;
  long pieces = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), pieces);
  if (error == std::errc() && end == text.data() + text.size() && pieces >= 0 && pieces <= kMostPieces)
    part.quantity = pieces;
  else
    refuse(row, C::quantity, fmt::format("a whole number from 0 to {}, without a unit or separators", kMostPieces));
}

void StockPartReader::read_unit_cost(const StockRow& row, StockPart& part) {
  const std::string& text = row[C::unit_cost];
  if (text.empty()) return;
  std::string expected;
  const auto cost = read_quantity(text, Dimension::money, expected);
  if (!cost) return refuse(row, C::unit_cost, expected);
  if (!is_within(cost->value, {0, kHighestCost}))
    return refuse(row, C::unit_cost, "an amount of at least 0 and at most a thousand million");
  part.unit_cost = cost->value;
}

void StockPartReader::leave_to_the_type(const StockRow& row) {
  for (const StockColumn column : {C::tolerance, C::rating, C::family})
    if (!row[column].empty()) refuse(row, column, "nothing: the catalogue says it of the type");
}

}  // namespace bandwright
