// Figures: the one vocabulary of what a stage is asked for and what is reported of it.
//
// Requirements, results, margins, sensitivities, columns and JSON keys are arrays indexed by Figure.
// A new figure is one row in the table (src/spec/figure.cpp) and the function that computes it.
#pragma once

#include <array>
#include <bandwright/quantity.hpp>
#include <cstddef>
#include <limits>
#include <optional>
#include <string_view>

namespace bandwright {

enum class Figure {
  gain,
  lower_cutoff,
  upper_cutoff,
  bandwidth,
  input_resistance,
  output_resistance,
  output_swing,
  input_overload,
  supply_current,
  collector_current,
  collector_emitter_voltage,
  dissipation,
  // reserved: refused by name until a version computes them
  input_noise_density,
  output_noise,
  noise_figure,
  second_harmonic,
  third_harmonic,
  settling_time,
  supply_rejection,
  cost,
  // reported, never required
  base_voltage,
  emitter_voltage,
  collector_voltage,
  junction_temperature,
  midband_gain,
  swing_to_cutoff,
  swing_to_saturation,
  stability_factor,
  divider_current_ratio,
  emitter_voltage_share,
  collector_emitter_share,
};
inline constexpr std::size_t kFigureCount = 31;

enum class FigureUse {
  required,  ///< may be a requirement
  reserved,  ///< a known name that this version does not compute
  reported,  ///< shown only
};

/// One row a figure.
struct FigureInfo {
  Figure figure;
  FigureUse use;
  Dimension dimension;
  double default_tolerance;  ///< relative; 0 where the figure is never required
  bool positive;       ///< compared as ratio (logarithm); false: a voltage that may be 0 or negative takes no target
  const char* key;     ///< JSON key, option and column: "lower_cutoff"
  const char* symbol;  ///< "fL"
  const char* label;   ///< words on the screen: "lower cutoff"
  const char* definition;  ///< one line, printed with every result
  const char* source;      ///< who defines it so, or "ours"
};

const std::array<FigureInfo, kFigureCount>& figures();
const FigureInfo& info(Figure figure);
std::optional<Figure> find_figure(std::string_view key);

constexpr std::size_t index(Figure figure) { return static_cast<std::size_t>(figure); }

/// True where a figure differs from unit to unit.
constexpr bool varies(Figure figure) { return figure != Figure::cost; }

inline constexpr double kNotComputed = std::numeric_limits<double>::quiet_NaN();

/// A value for each figure, SI; NaN where it was not computed or does not exist.
using FigureValues = std::array<double, kFigureCount>;

}  // namespace bandwright
