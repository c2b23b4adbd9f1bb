// One unit of a design at one condition: the nominal stage there, its factors, its junction temperature.
#pragma once

#include <bandwright/analysis.hpp>
#include <vector>

#include "analysis/operating_point.hpp"
#include "stage/common_emitter.hpp"

namespace bandwright {

/// The circuit of a unit; an absent part stays absent, an open load open.
template <class T>
Circuit<T> unit_circuit(const Stage& stage, const UnitFactors<T>& unit) {
  Circuit<T> c = circuit_of<T>(stage);
  for (std::size_t i = 0; i < kRoleCount; ++i) c.part[i] = c.part[i] * unit.of[i];
  c.source_resistance = c.source_resistance * unit[Cause::source_resistance];
  c.source_capacitance = c.source_capacitance * unit[Cause::source_capacitance];
  c.load_conductance = c.load_conductance / unit[Cause::load_resistance];
  c.load_capacitance = c.load_capacitance * unit[Cause::load_capacitance];
  c.stray_input = c.stray_input * unit[Cause::stray_input];
  c.stray_output = c.stray_output * unit[Cause::stray_output];
  c.stray_feedback = c.stray_feedback * unit[Cause::stray_feedback];
  return c;
}

struct UnitPoint {
  Stage stage;  ///< nominal parts at work at the condition
  UnitFactors<double> factors;
  double junction = 0;  ///< K
};

/// Operating point, exact response and figures of a unit. `guess`: ln IC to start from, or NaN.
Analysis analyse_unit(const UnitPoint& unit, const GainDefinition& definition, double guess = kNotComputed);

/// A direction in which a unit moves: what changes for each step of 1.
struct Direction {
  std::array<double, kCauseCount> factors{};
  double supply = 0;    ///< V
  double junction = 0;  ///< K
};

/// d ln|y| of every figure for a step of 1 in each direction, exact. `analysis` is the unit's own, active.
std::vector<FigureValues> slopes(const UnitPoint& unit, const Analysis& analysis, const GainDefinition& definition,
                                 const std::vector<Direction>& directions, ResponseModel model = ResponseModel::exact);

}  // namespace bandwright
