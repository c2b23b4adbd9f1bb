// Parts: what may be bought, ranges and pinned values by role.
#include <fmt/format.h>

#include "spec/field_groups.hpp"
#include "spec/shown_value.hpp"

namespace bandwright {

namespace {

constexpr ValueRange kResistors = {1e-3, 1e9};  // ohm
constexpr ValueRange kCapacitors = {1e-14, 1};  // F
constexpr ValueRange kPartTolerance = {1e-6, 0.99};

Dimension dimension_of(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}
ValueRange sold(PartKind kind) { return kind == PartKind::resistor ? kResistors : kCapacitors; }

using Rules = PartRules Parts::*;
using Limit = std::optional<double> PartRules::*;

// One kind of part: where its rules stand, how they are called, what holds where the spec is silent.
struct Kind {
  PartKind kind;
  Rules rules;
  std::string key, one;
  std::string series, tolerance, min, max;
};

Field series(const Kind& kind) {
  const Rules rules = kind.rules;
  return {.path = "parts." + kind.key + ".series",
          .option = kind.key + "-series",
          .shape = Shape::word,
          .help = kind.one + "s: preferred-number series that limits every family",
          .usual = kind.series,
          .words = {"E3", "E6", "E12", "E24", "E48", "E96", "E192"},
          .store = [=](Draft& draft, const Reading& reading) { (draft.spec.parts.*rules).series = reading.text; },
          .show =
              [=](const Spec& spec) {
                const std::string& name = (spec.parts.*rules).series;
                return name.empty() ? Json(nullptr) : Json(name);
              }};
}

Field tolerance(const Kind& kind) {
  const Rules rules = kind.rules;
  return {.path = "parts." + kind.key + ".tolerance",
          .option = kind.key + "-tolerance",
          .shape = Shape::tolerance,
          .dimension = dimension_of(kind.kind),
          .allowed = kPartTolerance,
          .help = kind.one + "s: widest tolerance; only tightens the families' own",
          .usual = kind.tolerance,
          .store = [=](Draft& draft,
                       const Reading& reading) { (draft.spec.parts.*rules).tolerance = reading.tolerance.value; },
          .show =
              [=](const Spec& spec) {
                const auto& tolerance = (spec.parts.*rules).tolerance;
                return tolerance ? shown_tolerance(*tolerance) : Json(nullptr);
              }};
}

Field limit(const Kind& kind, const char* member, const std::string& help, const std::string& usual, Limit at) {
  const Rules rules = kind.rules;
  return {.path = fmt::format("parts.{}.{}", kind.key, member),
          .option = fmt::format("{}-{}", kind.key, member),
          .shape = Shape::quantity,
          .dimension = dimension_of(kind.kind),
          .allowed = sold(kind.kind),
          .help = kind.one + "s: " + help,
          .usual = usual,
          .store = [=](Draft& draft, const Reading& reading) { (draft.spec.parts.*rules).*at = reading.number; },
          .show =
              [=](const Spec& spec) {
                const auto& value = (spec.parts.*rules).*at;
                return value ? Json(*value) : Json(nullptr);
              }};
}

Field resistor_family() {
  return {.path = "parts.resistors.family",
          .option = "resistors-family",
          .shape = Shape::text,
          .help = "resistors: family of the catalogue",
          .usual = "the catalogue's first choice",
          .refuse = [](const Reading& r) -> std::string { return r.text.empty() ? "the key of a family" : ""; },
          .store = [](Draft& draft, const Reading& reading) { draft.spec.parts.resistors.families = {reading.text}; },
          .show =
              [](const Spec& spec) {
                const auto& families = spec.parts.resistors.families;
                return families.empty() ? Json(nullptr) : Json(families.front());
              }};
}

Field capacitor_families() {
  return {.path = "parts.capacitors.families",
          .option = "capacitors-families",
          .shape = Shape::names,
          .help = "capacitors: families of the catalogue, each offered at every value it is made in",
          .usual = "the catalogue's first choices",
          .store = [](Draft& draft, const Reading& reading) { draft.spec.parts.capacitors.families = reading.names; },
          .show =
              [](const Spec& spec) {
                const auto& families = spec.parts.capacitors.families;
                return families.empty() ? Json(nullptr) : Json(families);
              }};
}

std::vector<Field> rules_of(const Kind& kind) {
  return {series(kind), tolerance(kind), limit(kind, "min", "smallest value", kind.min, &PartRules::min),
          limit(kind, "max", "largest value", kind.max, &PartRules::max)};
}

Field by_role(const char* path, const char* help) {
  return {.path = path, .option = option_of(path), .shape = Shape::keyed, .help = help, .key_noun = "role"};
}

Field range_of(const RoleInfo& role) {
  const std::size_t at = index(role.role);
  return {
      .path = std::string("parts.ranges.") + role.key,
      .shape = Shape::range,
      .dimension = dimension_of(role.kind),
      .allowed = sold(role.kind),
      .help = std::string(role.label) + ": smallest and largest value",
      .refuse = [](const Reading& r) -> std::string { return r.number > r.second ? "the smaller value first" : ""; },
      .store =
          [=](Draft& draft, const Reading& reading) {
            draft.spec.parts.ranges[at] = ValueRange{reading.number, reading.second};
          },
      .show =
          [=](const Spec& spec) {
            const auto& range = spec.parts.ranges[at];
            return range ? Json{range->min, range->max} : Json(nullptr);
          }};
}

std::string wrong_pin(const RoleInfo& role, double value) {
  if (value == 0 && !role.may_be_absent) return fmt::format("a value: {} is never absent", role.key);
  const Dimension dimension = dimension_of(role.kind);
  const ValueRange range = sold(role.kind);
  if (value == 0 || (value >= range.min && value <= range.max)) return "";
  return fmt::format("a value from {} to {}", format_quantity(range.min, dimension),
                     format_quantity(range.max, dimension)) +
         (role.may_be_absent ? ", or absent" : "");
}

Field pin_of(const RoleInfo& role) {
  const std::size_t at = index(role.role);
  return {.path = std::string("parts.pinned.") + role.key,
          .shape = Shape::quantity,
          .dimension = dimension_of(role.kind),
          .help = std::string(role.label) + ": fixed value",
          .word_for_limit = "absent",
          .limit = 0,
          .refuse = [&role](const Reading& reading) { return wrong_pin(role, reading.number); },
          .store = [=](Draft& draft, const Reading& reading) { draft.spec.parts.pinned[at] = reading.number; },
          .show =
              [=](const Spec& spec) {
                const auto& pinned = spec.parts.pinned[at];
                if (!pinned) return Json(nullptr);
                return *pinned == 0 ? Json("absent") : Json(*pinned);
              }};
}

void append(std::vector<Field>& rows, std::vector<Field> more) {
  for (Field& row : more) rows.push_back(std::move(row));
}

}  // namespace

std::vector<Field> part_fields() {
  const Kind resistors = {PartKind::resistor, &Parts::resistors, "resistors", "resistor", "E24", "1 %", "10 Ω", "1 MΩ"};
  const Kind capacitors = {PartKind::capacitor, &Parts::capacitors,  "capacitors",        "capacitor",
                           "the families' own", "the families' own", "the families' own", "the families' own"};
  std::vector<Field> rows = rules_of(resistors);
  rows.push_back(resistor_family());
  append(rows, rules_of(capacitors));
  rows.push_back(capacitor_families());
  rows.push_back(by_role("parts.ranges", "smallest and largest value by role: emitter=1:1k,shunt=1p:10n"));
  for (const RoleInfo& role : roles()) rows.push_back(range_of(role));
  rows.push_back(by_role("parts.pinned", "fixed value by role: collector=4k7,shunt=absent"));
  for (const RoleInfo& role : roles()) rows.push_back(pin_of(role));
  return rows;
}

}  // namespace bandwright
