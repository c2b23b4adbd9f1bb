// Which of a transistor's published figures the derivation uses, and what stands in where none is published.
#pragma once

#include <bandwright/device.hpp>
#include <bandwright/fault.hpp>
#include <string>
#include <vector>

#include "device/gain_lists.hpp"
#include "device/nominal.hpp"

namespace bandwright {

/// A figure with the conditions at which it holds.
struct ChosenPoint {
  Nominal nominal;
  double collector_current = kNotComputed;
  double collector_emitter_voltage = kNotComputed;
  double reverse_voltage = 0;
  double min = kNotComputed;  ///< published there
  double max = kNotComputed;
};

struct ChosenFigures {
  GainLists gain;
  Nominal early_voltage;
  Nominal base_resistance;
  Nominal saturation_voltage;
  Nominal thermal_resistance;
  ChosenPoint base_emitter;
  ChosenPoint transition;
  ChosenPoint output_capacitance;
  ChosenPoint input_capacitance;
  ChosenPoint cutoff;
};

/// Faults name the figures that the derivation needs and that are missing.
ChosenFigures choose_figures(const Transistor& transistor, std::vector<Fault>& faults);

/// The lowest figure stated of a limit; NaN where there is none.
double limit_of(const SheetFigure& figure);
/// Tj max, K; 150 °C where it is not stated, assumed.
double junction_limit_of(const Transistor& transistor);

/// One row a figure that has one nominal value.
struct ChosenName {
  const char* name;  ///< "base resistance rbb'"
  Dimension dimension;
  const Nominal& (*of)(const ChosenFigures&);
  Nominal& (*change)(ChosenFigures&);
  bool moves_response;  ///< gain and cutoffs hang on it
  double shift;         ///< V up and down to see what it is worth; 0: halved and doubled
};
const std::vector<ChosenName>& chosen_names();

/// What was taken that no sheet prints, in words.
std::vector<std::string> assumptions_of(const std::string& type, const ChosenFigures& chosen);

}  // namespace bandwright
