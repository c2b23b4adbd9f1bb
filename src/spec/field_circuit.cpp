// Title, supply, source, load, stray and ambient.
#include <cmath>

#include "spec/field_groups.hpp"
#include "spec/shown_value.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kLeastSupply = 0.1;  // V
constexpr double kMostSupply = 1000;  // V, with high voltage allowed
// -55 to 125 °C, the widest range that parts are sold for; summed as a temperature is read, so that both ends are in it
constexpr ValueRange kAmbient = {-55 + kZeroCelsius, 125 + kZeroCelsius};
constexpr ValueRange kResistance = {0, 1e9};          // ohm
constexpr ValueRange kLoadResistance = {1e-3, 1e12};  // ohm
constexpr ValueRange kCapacitance = {0, 1e-3};        // F
constexpr ValueRange kStray = {0, 1e-6};              // F
constexpr ValueRange kDirect = {-kMostSupply, kMostSupply};

std::string too_small_a_supply(const Reading& reading) {
  return std::fabs(reading.number) < kLeastSupply ? "a supply of at least 100 mV, positive or negative" : "";
}

Field title() {
  return {.path = "title",
          .option = "title",
          .shape = Shape::text,
          .help = "name of the design, printed with the result",
          .store = [](Draft& draft, const Reading& reading) { draft.spec.title = reading.text; },
          .show = [](const Spec& spec) { return spec.title.empty() ? Json(nullptr) : Json(spec.title); }};
}

using DraftEnd = std::optional<double> ConditionDraft::*;

Field supply_end(const char* path, const char* help, DraftEnd end, double Condition::*shown) {
  return {.path = path,
          .option = option_of(path),
          .shape = Shape::quantity,
          .dimension = Dimension::voltage,
          .allowed = kDirect,
          .help = help,
          .direct = true,
          .refuse = too_small_a_supply,
          .store = [end](Draft& draft, const Reading& reading) { draft.supply.*end = reading.number; },
          .show = [shown](const Spec& spec) { return Json(spec.supply.*shown); }};
}

std::vector<Field> supply() {
  Field nominal = supply_end("supply.nominal",
                             "supply; its sign chooses NPN (+) or PNP (-); above 60 V only with --allow-high-voltage",
                             &ConditionDraft::nominal, &Condition::nominal);
  nominal.bare = true;
  Field tolerance{.path = "supply.tolerance",
                  .option = "supply-tolerance",
                  .shape = Shape::tolerance,
                  .dimension = Dimension::voltage,
                  .allowed = {0, 0.99},
                  .help = "tolerance of the supply, in place of min and max",
                  .usual = "exact",
                  .store = [](Draft& draft, const Reading& r) { draft.supply.tolerance = r.tolerance.value; }};
  return {nominal, tolerance,
          supply_end("supply.min", "supply at its lowest, with sign", &ConditionDraft::min, &Condition::min),
          supply_end("supply.max", "supply at its highest, with sign", &ConditionDraft::max, &Condition::max)};
}

Field ambient_end(const char* path, const char* help, DraftEnd end, double Condition::*shown) {
  return {.path = path,
          .option = option_of(path),
          .shape = Shape::quantity,
          .dimension = Dimension::temperature,
          .allowed = kAmbient,
          .help = help,
          .store = [end](Draft& draft, const Reading& reading) { draft.ambient.*end = reading.number; },
          .show = [shown](const Spec& spec) { return shown_temperature(spec.ambient.*shown); }};
}

std::vector<Field> ambient() {
  Field nominal = ambient_end("ambient.nominal", "ambient temperature", &ConditionDraft::nominal, &Condition::nominal);
  nominal.bare = true;
  nominal.usual = "25 °C where inside min to max, else the middle";
  Field tolerance{.path = "ambient.tolerance",
                  .option = "ambient-tolerance",
                  .shape = Shape::difference,
                  .dimension = Dimension::temperature,
                  .allowed = {0, kAmbient.max - kAmbient.min},
                  .help = "two-sided spread of the ambient temperature, in kelvin, in place of min and max",
                  .usual = "none",
                  .store = [](Draft& draft, const Reading& r) { draft.ambient.difference = r.number; }};
  return {nominal, tolerance,
          ambient_end("ambient.min", "ambient temperature at its lowest", &ConditionDraft::min, &Condition::min),
          ambient_end("ambient.max", "ambient temperature at its highest", &ConditionDraft::max, &Condition::max)};
}

// A number of the spec that is stored as it is read.
template <class Group>
Field plain(const char* path, Dimension dimension, ValueRange allowed, const char* help, Group Spec::*group,
            double Group::*member) {
  return {.path = path,
          .option = option_of(path),
          .shape = Shape::quantity,
          .dimension = dimension,
          .allowed = allowed,
          .help = help,
          .usual = "0",
          .direct = dimension == Dimension::voltage,
          .store = [=](Draft& draft, const Reading& reading) { (draft.spec.*group).*member = reading.number; },
          .show = [=](const Spec& spec) { return Json((spec.*group).*member); }};
}

Field load_resistance() {
  return {.path = "load.resistance",
          .option = "load-resistance",
          .shape = Shape::quantity,
          .dimension = Dimension::resistance,
          .allowed = kLoadResistance,
          .help = "load resistance, or \"open\"",
          .usual = "open",
          .word_for_limit = "open",
          .limit = kUnlimited,
          .store = [](Draft& draft, const Reading& reading) { draft.spec.load.conductance = 1 / reading.number; },
          .show = [](const Spec& spec) { return shown_load(spec.load.conductance); }};
}

void append(std::vector<Field>& rows, std::vector<Field> more) {
  for (Field& row : more) rows.push_back(std::move(row));
}

}  // namespace

std::vector<Field> circuit_fields() {
  constexpr auto kOhm = Dimension::resistance;
  constexpr auto kFarad = Dimension::capacitance;
  constexpr auto kVolt = Dimension::voltage;
  std::vector<Field> rows = {title()};
  append(rows, supply());
  append(rows,
         {plain("source.resistance", kOhm, kResistance, "source resistance", &Spec::source, &Source::resistance),
          plain("source.capacitance", kFarad, kCapacitance, "source capacitance", &Spec::source, &Source::capacitance),
          plain("source.dc", kVolt, kDirect, "DC voltage of the source", &Spec::source, &Source::dc), load_resistance(),
          plain("load.capacitance", kFarad, kCapacitance, "load capacitance", &Spec::load, &Load::capacitance),
          plain("load.dc", kVolt, kDirect, "DC voltage of the load", &Spec::load, &Load::dc),
          plain("stray.input", kFarad, kStray, "wiring capacitance, base to 0 V", &Spec::stray, &Stray::input),
          plain("stray.output", kFarad, kStray, "wiring capacitance, collector to 0 V", &Spec::stray, &Stray::output),
          plain("stray.feedback", kFarad, kStray, "wiring capacitance, collector to base", &Spec::stray,
                &Stray::feedback)});
  append(rows, ambient());
  return rows;
}

}  // namespace bandwright
