#include "catalogue/transistor_json.hpp"

#include <array>
#include <cmath>

#include "catalogue/provenance.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

// A condition of a figure: its key, its unit, where it goes.
struct ConditionRule {
  const char* key;
  Dimension dimension;
  double SheetFigure::*field;
};
constexpr ConditionRule kCurrent = {"collector_current", Dimension::current, &SheetFigure::collector_current};
constexpr ConditionRule kForward = {"collector_emitter_voltage", Dimension::voltage,
                                    &SheetFigure::collector_emitter_voltage};
constexpr ConditionRule kCollectorBase = {"collector_base_voltage", Dimension::voltage, &SheetFigure::reverse_voltage};
constexpr ConditionRule kEmitterBase = {"emitter_base_voltage", Dimension::voltage, &SheetFigure::reverse_voltage};
constexpr ConditionRule kNone = {nullptr, Dimension::voltage, nullptr};

enum class Need { optional, required };
enum class Special { none, zero, infinite };

// One row a figure. `required_conditions` of the conditions must be stated unless the figure is 0 or infinite.
struct FigureRule {
  const char* key;
  Dimension dimension;
  Need need;
  Special special;  // the value, besides those above 0, that is allowed
  std::array<ConditionRule, 2> conditions;
  int required_conditions;
  SheetFigure Transistor::*one;
  std::vector<SheetFigure> Transistor::*list;
};

using T = Transistor;
const std::array<FigureRule, 14> kFigures = {{
    {"collector_emitter_breakdown",
     Dimension::voltage,
     Need::required,
     Special::none,
     {kNone, kNone},
     0,
     &T::collector_emitter_breakdown,
     nullptr},
    {"collector_current_limit",
     Dimension::current,
     Need::required,
     Special::none,
     {kNone, kNone},
     0,
     &T::collector_current_limit,
     nullptr},
    {"power_limit", Dimension::power, Need::required, Special::none, {kNone, kNone}, 0, &T::power_limit, nullptr},
    {"thermal_resistance",
     Dimension::thermal_resistance,
     Need::optional,
     Special::zero,
     {kNone, kNone},
     0,
     &T::thermal_resistance,
     nullptr},
    {"junction_limit",
     Dimension::temperature,
     Need::optional,
     Special::none,
     {kNone, kNone},
     0,
     &T::junction_limit,
     nullptr},
    {"early_voltage",
     Dimension::voltage,
     Need::optional,
     Special::infinite,
     {kNone, kNone},
     0,
     &T::early_voltage,
     nullptr},
    {"base_resistance",
     Dimension::resistance,
     Need::optional,
     Special::zero,
     {kNone, kNone},
     0,
     &T::base_resistance,
     nullptr},
    {"saturation_voltage",
     Dimension::voltage,
     Need::optional,
     Special::zero,
     {kNone, kNone},
     0,
     &T::saturation_voltage,
     nullptr},
    {"current_gain",
     Dimension::fraction,
     Need::required,
     Special::none,
     {kCurrent, kForward},
     1,
     nullptr,
     &T::current_gain},
    {"base_emitter_voltage",
     Dimension::voltage,
     Need::optional,
     Special::none,
     {kCurrent, kForward},
     1,
     nullptr,
     &T::base_emitter_voltage},
    {"transition_frequency",
     Dimension::frequency,
     Need::required,
     Special::infinite,
     {kCurrent, kForward},
     2,
     nullptr,
     &T::transition_frequency},
    {"output_capacitance",
     Dimension::capacitance,
     Need::required,
     Special::zero,
     {kCollectorBase, kNone},
     1,
     nullptr,
     &T::output_capacitance},
    {"input_capacitance",
     Dimension::capacitance,
     Need::optional,
     Special::zero,
     {kEmitterBase, kNone},
     1,
     nullptr,
     &T::input_capacitance},
    {"cutoff_current",
     Dimension::current,
     Need::optional,
     Special::zero,
     {kCollectorBase, kNone},
     0,
     nullptr,
     &T::cutoff_current},
}};

std::vector<std::string> keys_of(const FigureRule& rule) {
  std::vector<std::string> keys = {"min", "typ", "max"};
  for (const ConditionRule& condition : rule.conditions) {
    if (condition.key != nullptr) keys.emplace_back(condition.key);
  }
  if (rule.list != nullptr) keys.emplace_back("temperature");
  keys.insert(keys.end(), marks_keys().begin(), marks_keys().end());
  return keys;
}

double read_value(const JsonPlace& place, const FigureRule& rule) {
  if (rule.special == Special::infinite && place.value() == "infinite") return INFINITY;
  const std::optional<double> value = place.quantity(rule.dimension);
  if (!value) return kNotComputed;
  if (*value > 0 || (*value == 0 && rule.special == Special::zero)) return *value;
  place.fault(describe_dimension(rule.dimension) + (rule.special == Special::zero ? ", 0 or above" : ", above 0"));
  return kNotComputed;
}

bool in_order(const SheetFigure& f) { return !(f.min > f.typ) && !(f.typ > f.max) && !(f.min > f.max); }

// 0 or infinite at every condition: no condition is then needed.
bool unconditional(const SheetFigure& f) {
  for (const double value : {f.min, f.typ, f.max}) {
    if (!std::isnan(value) && value != 0 && !std::isinf(value)) return false;
  }
  return true;
}

void read_conditions(const JsonPlace& place, const FigureRule& rule, SheetFigure& figure) {
  int position = 0;
  for (const ConditionRule& condition : rule.conditions) {
    if (condition.key == nullptr) continue;
    const bool required = position++ < rule.required_conditions;
    if (!place.has(condition.key)) {
      if (required && !unconditional(figure)) place.missing(condition.key, describe_dimension(condition.dimension));
      continue;
    }
    const JsonPlace stated = place.member(condition.key);
    const std::optional<double> value = stated.quantity(condition.dimension);
    const bool may_be_zero = condition.dimension == Dimension::voltage;
    if (value && (*value < 0 || (*value == 0 && !may_be_zero))) {
      stated.fault(describe_dimension(condition.dimension) + ", a magnitude");
    }
    figure.*condition.field = value.value_or(kNotComputed);
  }
  if (rule.list != nullptr && place.has("temperature")) {
    figure.temperature = place.member("temperature").quantity(Dimension::temperature).value_or(kNotComputed);
  }
}

SheetFigure read_figure(const JsonPlace& place, const FigureRule& rule) {
  SheetFigure figure;
  if (!place.is_object("a figure such as {\"typ\": ...}")) return figure;
  place.only_keys(keys_of(rule));
  if (place.has("min")) figure.min = read_value(place.member("min"), rule);
  if (place.has("typ")) figure.typ = read_value(place.member("typ"), rule);
  if (place.has("max")) figure.max = read_value(place.member("max"), rule);
  if (!place.has("min") && !place.has("typ") && !place.has("max")) place.fault("at least one of min, typ and max");
  if (!in_order(figure)) place.fault("min not above typ, typ not above max");
  read_conditions(place, rule, figure);
  Marks marks = read_marks(place);
  figure.provenance = marks.provenance;
  figure.sources = std::move(marks.sources);
  figure.note = std::move(marks.note);
  return figure;
}

Package read_package(const JsonPlace& place) {
  Package package;
  if (!place.is_object("a package such as {\"name\": \"TO-92\", \"lead_order\": \"E-B-C\"}")) return package;
  std::vector<std::string> keys = {"name", "lead_order"};
  keys.insert(keys.end(), marks_keys().begin(), marks_keys().end());
  place.only_keys(keys);
  package.name = text_or(place, "name", "a package name");
  package.lead_order = text_or(place, "lead_order", "the leads in order");
  Marks marks = read_marks(place);
  package.provenance = marks.provenance;
  package.sources = std::move(marks.sources);
  package.note = std::move(marks.note);
  return package;
}

bool read_pnp(const JsonPlace& place) {
  if (!place.has("polarity")) {
    place.missing("polarity", "NPN or PNP");
    return false;
  }
  const JsonPlace polarity = place.member("polarity");
  const std::optional<std::string> text = polarity.text("NPN or PNP");
  if (text && *text != "NPN" && *text != "PNP") polarity.fault("NPN or PNP");
  return text && *text == "PNP";
}

std::vector<std::string> transistor_keys() {
  std::vector<std::string> keys = {"type", "polarity", "use", "complement", "packages", "note"};
  for (const FigureRule& rule : kFigures) keys.emplace_back(rule.key);
  return keys;
}

void read_figures(const JsonPlace& place, const FigureRule& rule, Transistor& transistor) {
  if (!place.has(rule.key)) {
    if (rule.need == Need::required) place.missing(rule.key, "this figure: the derivation needs it");
    return;
  }
  const JsonPlace found = place.member(rule.key);
  if (rule.one != nullptr) {
    transistor.*rule.one = read_figure(found, rule);
    return;
  }
  for (const JsonPlace& element : found.elements()) {
    (transistor.*rule.list).push_back(read_figure(element, rule));
  }
  if (found.elements().empty() && rule.need == Need::required) found.fault("at least one figure");
}

// The lowest gain carries the whole derivation: a typical value alone does not say how low it goes.
void require_gain_limit(const JsonPlace& place, const Transistor& transistor) {
  if (!place.has("current_gain")) return;
  for (const SheetFigure& f : transistor.current_gain) {
    if (std::isfinite(f.min) && std::isnan(f.temperature)) return;
  }
  place.member("current_gain").fault("a min at one point at 25 °C (and the max there, where it is published)");
}

}  // namespace

std::optional<Transistor> read_transistor(const JsonPlace& place) {
  if (!place.is_object("a transistor such as {\"type\": \"BC547B\", ...}")) return std::nullopt;
  place.only_keys(transistor_keys());
  Transistor transistor;
  if (!place.has("type")) place.missing("type", "a type such as \"BC547B\"");
  transistor.type = text_or(place, "type", "a type such as \"BC547B\"");
  transistor.pnp = read_pnp(place);
  transistor.use = text_or(place, "use", "its use in words");
  transistor.complement = text_or(place, "complement", "the type of its complement");
  for (const FigureRule& rule : kFigures) read_figures(place, rule, transistor);
  require_gain_limit(place, transistor);
  if (place.has("packages")) {
    for (const JsonPlace& package : place.member("packages").elements()) {
      transistor.packages.push_back(read_package(package));
    }
  }
  if (transistor.type.empty()) return std::nullopt;
  return transistor;
}

}  // namespace bandwright
