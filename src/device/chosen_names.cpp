// The chosen figures by name, and what was assumed of them in words.
#include <bandwright/quantity.hpp>
#include <cmath>

#include "device/chosen_figures.hpp"

namespace bandwright {

namespace {

using C = ChosenFigures;

constexpr double kBaseEmitterShift = 0.05;  // V

std::string conditions(const ChosenPoint* point) {
  if (point == nullptr || std::isnan(point->collector_current) || point->collector_current == 0) return "";
  return " at " + format_quantity(point->collector_current, Dimension::current);
}

const ChosenPoint* point_behind(const C& c, const Nominal& value) {
  for (const ChosenPoint* p : {&c.base_emitter, &c.transition}) {
    if (&p->nominal == &value) return p;
  }
  return nullptr;
}

std::string assumption(const std::string& type, const ChosenName& row, const C& c) {
  const Nominal& value = row.of(c);
  std::string text = type + ": " + row.name + " " + format_quantity(value.value, row.dimension) +
                     conditions(point_behind(c, value)) + ": " + value.rule;
  const bool is_assumed = value.by_factor || value.provenance == Provenance::assumed;
  if (is_assumed) text += ", assumed";
  return text;
}

}  // namespace

const std::vector<ChosenName>& chosen_names() {
  static const std::vector<ChosenName> rows = {
      {"base-emitter voltage VBE", Dimension::voltage,
       [](const C& c) -> const Nominal& { return c.base_emitter.nominal; },
       [](C& c) -> Nominal& { return c.base_emitter.nominal; }, true, kBaseEmitterShift},
      {"Early voltage VA", Dimension::voltage, [](const C& c) -> const Nominal& { return c.early_voltage; },
       [](C& c) -> Nominal& { return c.early_voltage; }, true, 0},
      {"base resistance rbb'", Dimension::resistance, [](const C& c) -> const Nominal& { return c.base_resistance; },
       [](C& c) -> Nominal& { return c.base_resistance; }, true, 0},
      {"transition frequency fT", Dimension::frequency,
       [](const C& c) -> const Nominal& { return c.transition.nominal; },
       [](C& c) -> Nominal& { return c.transition.nominal; }, true, 0},
      {"output capacitance Cob", Dimension::capacitance,
       [](const C& c) -> const Nominal& { return c.output_capacitance.nominal; },
       [](C& c) -> Nominal& { return c.output_capacitance.nominal; }, true, 0},
      {"input capacitance Cib", Dimension::capacitance,
       [](const C& c) -> const Nominal& { return c.input_capacitance.nominal; },
       [](C& c) -> Nominal& { return c.input_capacitance.nominal; }, true, 0},
      {"cutoff current ICBO", Dimension::current, [](const C& c) -> const Nominal& { return c.cutoff.nominal; },
       [](C& c) -> Nominal& { return c.cutoff.nominal; }, true, 0},
      {"saturation voltage VCE(sat)", Dimension::voltage,
       [](const C& c) -> const Nominal& { return c.saturation_voltage; },
       [](C& c) -> Nominal& { return c.saturation_voltage; }, false, 0},
      {"thermal resistance junction to ambient", Dimension::thermal_resistance,
       [](const C& c) -> const Nominal& { return c.thermal_resistance; },
       [](C& c) -> Nominal& { return c.thermal_resistance; }, true, 0},
  };
  return rows;
}

std::vector<std::string> assumptions_of(const std::string& type, const ChosenFigures& chosen) {
  std::vector<std::string> said;
  for (const ChosenName& row : chosen_names()) {
    if (!row.of(chosen).rule.empty()) said.push_back(assumption(type, row, chosen));
  }
  if (chosen.gain.max.empty()) said.push_back(type + ": hFE maximum taken as 3 times the minimum, assumed");
  if (chosen.gain.typ.empty())
    said.push_back(type + ": typical hFE taken as the geometric mean of min and max, assumed");
  return said;
}

}  // namespace bandwright
