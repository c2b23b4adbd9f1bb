#include <fmt/format.h>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <tuple>

#include "spec/resolve.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kTouchableVoltage = 60;  // V DC, the limit of ES1 in IEC 62368-1, read through an index of it

std::string shown(double value, Dimension dimension) { return format_quantity(value, dimension, 6); }

// Fifteen digits, so that 12 V less 5 % is 11.4 V, as if it had been written.
double tidy(double value) {
  const std::string text = fmt::format("{:.15g}", value);
  std::from_chars(text.data(), text.data() + text.size(), value);
  return value;
}

// Spread about the nominal value, as two ends.
std::optional<std::pair<double, double>> spread(const ConditionDraft& draft, double nominal) {
  if (draft.difference) return std::pair(nominal - *draft.difference, nominal + *draft.difference);
  if (!draft.tolerance) return std::nullopt;
  return std::minmax({tidy(nominal * (1 - draft.tolerance->below)), tidy(nominal * (1 + draft.tolerance->above))});
}

void check_order(const Condition& c, bool both_stated, const std::string& name, Dimension dimension,
                 Statements& statements) {
  if (both_stated && c.min > c.max) return statements.object(name + ".min", "at most max, " + shown(c.max, dimension));
  if (c.min > c.nominal) statements.object(name + ".min", "at most the nominal value, " + shown(c.nominal, dimension));
  if (c.max < c.nominal) statements.object(name + ".max", "at least the nominal value, " + shown(c.nominal, dimension));
}

Condition resolved(const ConditionDraft& draft, double nominal, const std::string& name, Dimension dimension,
                   Statements& statements) {
  Condition out{nominal, draft.min.value_or(nominal), draft.max.value_or(nominal)};
  if (const auto ends = spread(draft, nominal)) {
    if (draft.min || draft.max)
      statements.object(name + ".tolerance", "no tolerance beside min and max, or a tolerance alone");
    std::tie(out.min, out.max) = *ends;
  } else {
    check_order(out, draft.min && draft.max, name, dimension, statements);
  }
  return out;
}

// 25 °C where inside min to max, else the middle.
double usual_ambient(const ConditionDraft& draft) {
  const double usual = kReferenceTemperature;
  if (!draft.min || !draft.max) return usual;
  const bool inside = usual >= *draft.min && usual <= *draft.max;
  return inside ? usual : *draft.min + (*draft.max - *draft.min) / 2;
}

void check_sign(const Condition& supply, Statements& statements) {
  if ((supply.min > 0 && supply.max > 0) || (supply.min < 0 && supply.max < 0)) return;
  const std::string path = statements.find("supply.min") ? "supply.min" : "supply.max";
  statements.object(path, "one sign over the whole range: positive for NPN, negative for PNP");
}

// The highest voltage between any two of supply, 0 V, source and load.
void check_height(const Spec& spec, Statements& statements) {
  const auto [low, high] = std::minmax({0.0, spec.supply.min, spec.supply.max, spec.source.dc, spec.load.dc});
  if (high - low <= kTouchableVoltage) return;
  const bool by_supply = std::max(std::fabs(spec.supply.min), std::fabs(spec.supply.max)) > kTouchableVoltage;
  const bool by_load = std::fabs(spec.load.dc) >= std::fabs(spec.source.dc);
  const std::string path = by_supply ? "supply" : by_load ? "load.dc" : "source.dc";
  const std::string at = by_supply && statements.find("supply.nominal") ? "supply.nominal" : path;
  statements.object(at,
                    fmt::format("at most {} V between any two points, since more may be dangerous to touch (here {}); "
                                "--allow-high-voltage lifts this limit",
                                kTouchableVoltage, shown(high - low, Dimension::voltage)));
}

void resolve_supply(Draft& draft, Statements& statements, bool allow_high_voltage) {
  if (!draft.supply.nominal) {
    const std::string path = statements.touched("supply") ? "supply.nominal" : "supply";
    if (!statements.spoiled("supply")) statements.object(path, "a supply voltage such as 12 V or -12 V");
    return;
  }
  Spec& spec = draft.spec;
  spec.supply = resolved(draft.supply, *draft.supply.nominal, "supply", Dimension::voltage, statements);
  if (statements.spoiled("supply")) return;
  check_sign(spec.supply, statements);
  if (!allow_high_voltage) check_height(spec, statements);
}

}  // namespace

void resolve_conditions(Draft& draft, Statements& statements, bool allow_high_voltage) {
  draft.spec.allow_high_voltage = allow_high_voltage;
  resolve_supply(draft, statements, allow_high_voltage);
  const double nominal = draft.ambient.nominal.value_or(usual_ambient(draft.ambient));
  draft.spec.ambient = resolved(draft.ambient, nominal, "ambient", Dimension::temperature, statements);
  const auto [low, high] = find_field("ambient.nominal")->allowed;
  if (draft.ambient.difference && (draft.spec.ambient.min < low || draft.spec.ambient.max > high))
    statements.object("ambient.tolerance",
                      "ends of the ambient temperature " + describe_range(*find_field("ambient.nominal")));
}

}  // namespace bandwright
