#include <algorithm>
#include <array>

#include "spec/resolve.hpp"

namespace bandwright {

namespace {

// The resistors of a spec that is silent on them.
const PartRules kUsualResistors = {{}, "E24", Tolerance{0.01, 0.01}, 10.0, 1e6};

// A named family brings its own series, tolerance and values.
void fill_in_resistors(PartRules& rules) {
  if (!rules.families.empty()) return;
  if (rules.series.empty()) rules.series = kUsualResistors.series;
  if (!rules.tolerance) rules.tolerance = kUsualResistors.tolerance;
  if (!rules.min) rules.min = std::min(*kUsualResistors.min, rules.max.value_or(kUnlimited));
  if (!rules.max) rules.max = std::max(*kUsualResistors.max, *rules.min);
}

void check_limits(const PartRules& rules, const std::string& path, Dimension dimension, Statements& statements) {
  if (rules.min && rules.max && *rules.min > *rules.max)
    statements.object(path + ".min", "at most max, " + format_quantity(*rules.max, dimension));
}

// Which of emitter, emitter_bypassed and bypass a variant has.
struct Variant {
  bool emitter, emitter_bypassed, bypass;
};
constexpr std::array kVariants = {Variant{false, true, true},    // bypass complete
                                  Variant{true, true, true},     // split emitter
                                  Variant{true, false, false}};  // no bypass

bool agrees(const std::optional<double>& pinned, bool present) { return !pinned || (*pinned != 0) == present; }

void check_variant(const Parts& parts, Statements& statements) {
  const auto pinned = [&](Role role) { return parts.pinned[index(role)]; };
  for (const Variant& variant : kVariants)
    if (agrees(pinned(Role::emitter), variant.emitter) &&
        agrees(pinned(Role::emitter_bypassed), variant.emitter_bypassed) &&
        agrees(pinned(Role::bypass), variant.bypass))
      return;
  statements.object("parts.pinned",
                    "emitter, emitter_bypassed and bypass of one variant: emitter_bypassed and bypass with or without "
                    "emitter, or emitter alone");
}

}  // namespace

void resolve_parts(Draft& draft, Statements& statements) {
  Parts& parts = draft.spec.parts;
  if (statements.spoiled("parts")) return;
  fill_in_resistors(parts.resistors);
  check_limits(parts.resistors, "parts.resistors", Dimension::resistance, statements);
  check_limits(parts.capacitors, "parts.capacitors", Dimension::capacitance, statements);
  check_variant(parts, statements);
  if (parts.stock_only && parts.stock.empty())
    statements.object("parts.stock_only", "it beside parts.stock, the name of a stock file");
}

}  // namespace bandwright
