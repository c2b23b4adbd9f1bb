// Causes: what varies from unit to unit of one design, one table.
//
// Sensitivities, limits, spreads, worst cases and the simulation are arrays indexed by Cause. The first nine causes are
// the parts, in the order of the roles. A new cause is one row in the table (src/spec/causes.cpp), its nominal spread
// (src/assessment/) and the place where a unit takes it (src/analysis/unit.hpp).
#pragma once

#include <array>
#include <bandwright/role.hpp>
#include <cstddef>
#include <optional>
#include <string_view>

namespace bandwright {

enum class Cause {
  upper_divider,
  lower_divider,
  collector,
  emitter,
  emitter_bypassed,
  input_coupling,
  output_coupling,
  bypass,
  shunt,
  current_gain,          ///< a multiplier on the nominal hFE curve, the same at every current and temperature
  early_voltage,         ///< VA
  feedback_capacitance,  ///< Cmu0
  emitter_capacitance,   ///< Cje
  transition_frequency,  ///< fT at its published point
  base_resistance,       ///< rbb'
  cutoff_current,        ///< ICBO
  base_emitter_voltage,  ///< VBE at its published point
  source_resistance,
  source_capacitance,
  load_resistance,
  load_capacitance,
  stray_input,
  stray_output,
  stray_feedback,
};
inline constexpr std::size_t kCauseCount = 24;

constexpr std::size_t index(Cause cause) { return static_cast<std::size_t>(cause); }
constexpr Cause cause_of(Role role) { return static_cast<Cause>(index(role)); }

/// How a deviation d of a cause acts on its nominal value.
enum class CauseScale {
  share,      ///< value (1 + d)
  logarithm,  ///< value e^d
  volts,      ///< value + d
};

enum class CauseKind { part, device, surroundings };

/// One row a cause.
struct CauseInfo {
  Cause cause;
  CauseKind kind;
  CauseScale scale;
  const char* key;     ///< word in files: "current_gain"
  const char* symbol;  ///< on the screen and in JSON's sensitivities: "R1", "hFE"
  const char* label;   ///< words: "current gain"
};

/// All causes, in the order of the enum.
const std::array<CauseInfo, kCauseCount>& causes();
const CauseInfo& info(Cause cause);
std::optional<Cause> find_cause(std::string_view key);

}  // namespace bandwright
