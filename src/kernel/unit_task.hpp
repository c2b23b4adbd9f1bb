// A block of units to be solved at every condition: what goes in and what comes out, as plain pointers, so that code
// for special instruction sets touches nothing else.
#pragma once

#include <bandwright/population.hpp>
#include <cstdint>

namespace bandwright {

/// Where the nominal unit stands at a condition: from there every unit is solved.
struct WarmStart {
  Stage stage;             ///< the nominal unit's
  double warmth = 0;       ///< K above 25 °C, by which parts drift
  double junction = 0;     ///< K
  double log_current = 0;  ///< ln IC
  double peak = 0;         ///< omega squared
  double peak_slope = 0;   ///< of u d ln|H|^2/d ln u over u^2 there: the first step's
  double lower = 0;        ///< omega squared
  double upper = 0;        ///< omega squared
  bool regular = false;    ///< active, one peak, a crossing on each side; else every unit is solved one by one
};

/// A frequency at which |H| alone tells whether a cutoff lies before or beyond it.
struct Probe {
  Figure cutoff = Figure::lower_cutoff;  ///< or upper_cutoff
  double frequency = 0;                  ///< Hz
};

enum class UnitOutcome : std::uint8_t { active, not_active, unsolved };

/// Draws of a block: uniform numbers between 0 and 1, [draw][unit]. Draws are the causes, then each part's drift, then
/// the second parts of pairs.
inline constexpr std::size_t kDrawCount = kCauseCount + 2 * kRoleCount;

struct UnitTask {
  const Population* population = nullptr;
  const WarmStart* conditions = nullptr;
  std::size_t condition_count = 0;
  const double* draws = nullptr;  ///< a row has `stride` places
  std::size_t stride = 0;         ///< at least `units`, a multiple of 8
  std::size_t units = 0;
  const Figure* figures = nullptr;  ///< wanted
  std::size_t figure_count = 0;
  bool band_only = false;  ///< gain and cutoffs are all that is wanted
  bool crossings = true;   ///< false: no wanted figure needs the cutoffs
  const Probe* probes = nullptr;
  std::size_t probe_count = 0;
  double* ratios = nullptr;         ///< [condition][probe][unit]: 2 |H|^2/A^2 at the probe, not beyond the peak
  double* values = nullptr;         ///< [condition][figure][unit], rows of `stride`
  UnitOutcome* outcomes = nullptr;  ///< [condition][unit], rows of `stride`
};

}  // namespace bandwright
