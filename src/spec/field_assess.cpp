// How built units are assessed, and what varies from unit to unit.
#include "spec/field_groups.hpp"
#include "spec/shown_value.hpp"

namespace bandwright {

namespace {

constexpr ValueRange kUnits = {100, 1e6};
constexpr ValueRange kYield = {1e-6, 1};
constexpr ValueRange kInterval = {0, 1};
constexpr ValueRange kPerKelvin = {0, 0.01};  // 1/K
constexpr ValueRange kShift = {1e-6, 0.2};    // V
constexpr ValueRange kShare = {1e-6, 10};     // of a part or a surrounding value
constexpr ValueRange kFactor = {1e-6, 1000};  // above what is published: a cutoff current scatters over decades
constexpr const char* kOff = "off";

Field units() {
  return {.path = "assess.units",
          .option = option_of("assess.units"),
          .shape = Shape::count,
          .allowed = kUnits,
          .help = "units that are simulated at most",
          .usual = "20000",
          .store = [](Draft& draft, const Reading& r) { draft.spec.assess.units = static_cast<int>(r.number); },
          .show = [](const Spec& spec) { return Json(spec.assess.units); }};
}

Field share(const char* path, ValueRange allowed, const char* help, const char* usual, double Assess::*member) {
  return {.path = path,
          .option = option_of(path),
          .shape = Shape::quantity,
          .dimension = Dimension::fraction,
          .allowed = allowed,
          .help = help,
          .usual = usual,
          .store = [=](Draft& draft, const Reading& reading) { draft.spec.assess.*member = reading.number; },
          .show = [=](const Spec& spec) { return Json(spec.assess.*member); }};
}

Field distribution() {
  return {.path = "assess.distribution",
          .option = option_of("assess.distribution"),
          .shape = Shape::word,
          .help = "how values are spread within their tolerances",
          .usual = "normal",
          .words = {"normal", "uniform"},
          .store = [](Draft& draft, const Reading& r) { draft.spec.assess.uniform = r.text == "uniform"; },
          .show = [](const Spec& spec) { return Json(spec.assess.uniform ? "uniform" : "normal"); }};
}

Field by_cause() {
  return {.path = "assess.causes",
          .option = option_of("assess.causes"),
          .shape = Shape::keyed,
          .help =
              "limits by cause, or off: current_gain=off,source_resistance=10%; base_emitter_voltage in volts, "
              "temperature_coefficients in ppm/K",
          .usual = "as published or assumed; source, load and wiring do not vary",
          .key_noun = "cause"};
}

// What all causes have in common; off is stored as limits of 0.
Field cause_field(const CauseInfo& cause) {
  const std::size_t at = index(cause.cause);
  return {.path = std::string("assess.causes.") + cause.key,
          .help = std::string(cause.label) + ": limits from unit to unit",
          .word_for_limit = kOff,
          .show = [at](const Spec& spec) {
            const auto& limits = spec.assess.causes[at];
            if (!limits) return Json(nullptr);
            return *limits == Tolerance{} ? Json(kOff) : shown_tolerance(*limits);
          }};
}

Field shifted(const CauseInfo& cause) {
  Field field = cause_field(cause);
  field.shape = Shape::quantity;
  field.dimension = Dimension::voltage;
  field.allowed = kShift;
  field.direct = true;
  field.store = [at = index(cause.cause)](Draft& draft, const Reading& reading) {
    draft.spec.assess.causes[at] = Tolerance{reading.number, reading.number};
  };
  return field;
}

std::string down_to_nothing(const Reading& reading) {
  return reading.tolerance.value.below >= 1 ? "a low side under 100 %, such as -50/+200 %" : "";
}

Field scaled(const CauseInfo& cause) {
  Field field = cause_field(cause);
  field.shape = Shape::tolerance;
  field.allowed = cause.scale == CauseScale::logarithm ? kFactor : kShare;
  field.refuse = down_to_nothing;
  field.store = [at = index(cause.cause)](Draft& draft, const Reading& reading) {
    draft.spec.assess.causes[at] = reading.tolerance.value;
  };
  return field;
}

Field temperature_coefficients() {
  return {
      .path = "assess.causes.temperature_coefficients",
      .shape = Shape::per_kelvin,
      .allowed = kPerKelvin,
      .help = "two-sided temperature coefficient of every part",
      .word_for_limit = kOff,
      .store = [](Draft& draft, const Reading& reading) { draft.spec.assess.temperature_coefficient = reading.number; },
      .show =
          [](const Spec& spec) {
            const auto& coefficient = spec.assess.temperature_coefficient;
            if (!coefficient) return Json(nullptr);
            return *coefficient == 0 ? Json(kOff) : Json(*coefficient);
          }};
}

}  // namespace

std::vector<Field> assess_fields() {
  std::vector<Field> rows = {
      units(), share("assess.yield", kYield, "share of units that must pass", "99 %", &Assess::yield),
      share("assess.interval", kInterval,
            "width of the 95 % interval at which the simulation stops early, never with 0", "0.5 %", &Assess::interval),
      distribution(), by_cause()};
  for (const CauseInfo& cause : causes())
    rows.push_back(cause.scale == CauseScale::volts ? shifted(cause) : scaled(cause));
  rows.push_back(temperature_coefficients());
  return rows;
}

}  // namespace bandwright
