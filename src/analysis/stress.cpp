#include <bandwright/analysis.hpp>

#include "analysis/operating_point.hpp"
#include "analysis/stress_equations.hpp"

namespace bandwright {

Stress stress_of(bool pnp, const Circuit<double>& c, const OperatingPoint& p, double source_dc, double load_dc) {
  const double sign = pnp ? -1 : 1;
  const double i_e = p.collector_current + p.base_current;
  const double v_c = p.emitter_voltage + p.collector_emitter_voltage;
  const double v_junction = i_e * c[Role::emitter_bypassed];

  Stress s;
  const auto volts = [&s](Role role) -> double& { return s.volts[index(role)]; };
  volts(Role::upper_divider) = sign * (c.supply - p.base_voltage);
  volts(Role::lower_divider) = sign * p.base_voltage;
  volts(Role::collector) = sign * (c.supply - v_c);
  volts(Role::emitter) = sign * i_e * c[Role::emitter];
  volts(Role::emitter_bypassed) = sign * v_junction;
  volts(Role::input_coupling) = source_dc - sign * p.base_voltage;
  volts(Role::output_coupling) = sign * v_c - load_dc;
  volts(Role::bypass) = sign * v_junction;
  volts(Role::shunt) = sign * v_c;
  for (std::size_t i = 0; i < kResistorRoles; ++i) {
    if (c.part[i] > 0) s.watts[i] = s.volts[i] * s.volts[i] / c.part[i];
  }
  return s;
}

Stress stress(const Stage& stage, const OperatingPoint& nominal, double supply_magnitude, double source_dc,
              double load_dc) {
  Circuit<double> c = circuit_of<double>(stage);
  c.supply = supply_magnitude;
  const NominalBias bias = bias_at(stage, c, nominal.junction_temperature, ln(nominal.collector_current));
  return stress_of(stage.device->pnp, c, bias.point, source_dc, load_dc);
}

}  // namespace bandwright
