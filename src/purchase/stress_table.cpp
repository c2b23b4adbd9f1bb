// The stress table: each rating beside the worst corner and what derating leaves of it.
#include <bandwright/purchase.hpp>
#include <cmath>

namespace bandwright {

namespace {

double voltage_derating(const Derating& d, const Part& part) {
  if (part.kind == PartKind::resistor) return d.resistor_voltage;
  return part.electrolytic ? d.electrolytic_voltage : d.capacitor_voltage;
}

void add_part(const Derating& d, const Part& part, const WorstStress& stress, std::vector<StressRow>& rows) {
  const std::size_t i = index(part.role);
  if (part.kind == PartKind::resistor && part.power_rating != 0)
    rows.push_back({part.designator, "power", Dimension::power, part.watts, part.power_rating,
                    d.resistor_power * part.power_rating, stress.watts[i].at_max});
  if (part.voltage_rating != 0)
    rows.push_back({part.designator, "voltage", Dimension::voltage, part.volts < 0 ? -part.volts : part.volts,
                    part.voltage_rating, voltage_derating(d, part) * part.voltage_rating,
                    stress.volts[i].at_largest()});
}

}  // namespace

std::vector<StressRow> stress_table(const Spec& spec, const std::vector<Part>& parts, const BipolarParameters& device,
                                    const WorstStress& stress) {
  const Derating& d = spec.parts.derating;
  std::vector<StressRow> rows;
  for (const Part& part : parts) add_part(d, part, stress, rows);
  const auto transistor = [&](const char* what, Dimension dimension, const StressRange& range, double rating,
                              double allowed) {
    if (rating > 0 && !std::isnan(range.max))
      rows.push_back({"Q1", what, dimension, range.max, rating, allowed, range.at_max});
  };
  transistor("collector-emitter voltage", Dimension::voltage, stress.collector_emitter_voltage,
             device.breakdown_voltage, d.transistor_voltage * device.breakdown_voltage);
  transistor("collector current", Dimension::current, stress.collector_current, device.current_limit,
             d.transistor_current * device.current_limit);
  transistor("power", Dimension::power, stress.dissipation, device.power_limit,
             d.transistor_power * device.power_limit);
  transistor("junction temperature", Dimension::temperature, stress.junction_temperature, device.junction_limit,
             device.junction_limit - d.junction_margin);
  return rows;
}

}  // namespace bandwright
