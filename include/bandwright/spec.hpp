// Spec: the written requirement, read from JSON or the command line, every default filled in.
//
//   Spec spec = read_spec(json_text, "hydrophone.json");
//   double target = spec.requirement(Figure::gain)->target;  // V/V
//
// Units are SI, temperatures kelvin, the supply carries its sign (negative: PNP).
#pragma once

#include <array>
#include <bandwright/cause.hpp>
#include <bandwright/figure.hpp>
#include <bandwright/role.hpp>
#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bandwright {

/// A condition with its nominal value and its ends: min <= nominal <= max.
struct Condition {
  double nominal = 0;
  double min = 0;
  double max = 0;
};

/// A requirement with its limits resolved: a NaN target or limit is absent (an open side).
struct Requirement {
  double target = kNotComputed;
  double lower = kNotComputed;  ///< L
  double upper = kNotComputed;  ///< U
};

struct Source {
  double resistance = 0;   ///< ohm
  double capacitance = 0;  ///< farad, at the node between RS and Cin
  double dc = 0;           ///< volt, for the polarity of the input coupling capacitor
};

struct Load {
  double conductance = 0;  ///< siemens; 0: open
  double capacitance = 0;  ///< farad
  double dc = 0;           ///< volt
};

/// Wiring capacitance at the transistor's terminals, farad.
struct Stray {
  double input = 0;     ///< base to 0 V
  double output = 0;    ///< collector to 0 V
  double feedback = 0;  ///< collector to base
};

struct ValueRange {
  double min = 0;
  double max = 0;
};

/// What may be bought for one kind of part.
struct PartRules {
  std::vector<std::string> families;   ///< catalogue keys in order of preference; empty: the catalogue's first choices
  std::string series;                  ///< "E24"; empty: the families' own
  std::optional<Tolerance> tolerance;  ///< tightens the families' own, never loosens
  std::optional<double> min, max;      ///< limits on the value
};

/// Shares of a rating that a part may be loaded to at its worst corner. The defaults are from memory of
/// ECSS-Q-ST-30-11C, which was not read.
struct Derating {
  double capacitor_voltage = 0.6;     ///< of the rated DC voltage
  double electrolytic_voltage = 0.8;  ///< the same of an aluminium electrolytic
  double resistor_power = 0.5;
  double resistor_voltage = 0.8;
  double transistor_voltage = 0.75;  ///< VCE of VCEO
  double transistor_current = 0.75;
  double transistor_power = 0.65;
  double junction_margin = 40;  ///< K under the highest junction temperature
};

struct Parts {
  PartRules resistors;
  PartRules capacitors;
  std::array<std::optional<ValueRange>, kRoleCount> ranges;  ///< overrides min and max for a role
  std::array<std::optional<double>, kRoleCount> pinned;      ///< fixed value; 0: the part is absent
  std::string stock;                                         ///< name of the stock file; empty: none
  bool stock_only = false;                                   ///< nothing but the stock is used
  bool pairs = false;                                        ///< two parts may stand in one role where one misses
  int boards = 1;                                            ///< boards that the stock must last for
  Derating derating;
};

/// How built units are assessed.
struct Assess {
  int units = 20000;        ///< simulated at most
  double yield = 0.99;      ///< share of units that must pass
  double interval = 0.005;  ///< the simulation stops when the 95 % interval is narrower; 0: never early
  bool uniform = false;     ///< tolerances spread uniformly in place of normally
  /// The user's limits in place of the usual ones: shares below and above, volts for the base-emitter voltage; both 0:
  /// the cause is switched off.
  std::array<std::optional<Tolerance>, kCauseCount> causes;
  std::optional<double> temperature_coefficient;  ///< 1/K, two-sided, of every part; 0: switched off
};

struct Spec {
  std::string title;
  Condition supply;  ///< volt, signed
  Source source;
  Load load;
  Stray stray;
  Condition ambient;  ///< kelvin
  std::array<std::optional<Requirement>, kFigureCount> requirements;
  bool gain_from_input = false;   ///< gain and cutoffs from the node between RS and Cin
  std::optional<double> gain_at;  ///< Hz: gain is |H| there; absent: at the peak
  Parts parts;
  std::vector<std::string> devices;     ///< types; empty: every fitting one
  std::vector<std::string> topologies;  ///< "common-emitter"
  int candidates = 10;
  Assess assess;
  std::uint64_t seed = 1;
  bool allow_high_voltage = false;  ///< from the command line only
  std::vector<std::string> notes;   ///< what reading changed: "output_swing: 2 Vpp read as 1 V peak"

  const std::optional<Requirement>& requirement(Figure f) const { return requirements[index(f)]; }
  bool pnp() const { return supply.nominal < 0; }
  double supply_magnitude() const { return supply.nominal < 0 ? -supply.nominal : supply.nominal; }
  double highest_supply() const { return pnp() ? -supply.min : supply.max; }  ///< magnitude
};

/// What a reader demands of a spec.
enum class SpecUse {
  design,  ///< supply, gain, lower and upper cutoff are needed
  check,   ///< only the supply is needed
};

/// One command-line override: ("gain-min", "30 dB"): option name without dashes in front, text.
using Override = std::pair<std::string, std::string>;

/// One key of the spec in its command-line form.
struct OptionKey {
  std::string option;  ///< "gain-min", "supply", "source-resistance"
  std::string path;    ///< "requirements.gain.min"
  std::string help;    ///< one line: what it is, unit, default
  bool flag = false;   ///< it takes no value; its text is empty, or "false"
};

/// Every command-line form of the spec, from the same table the JSON reader uses, in the table's order.
const std::vector<OptionKey>& spec_options();

/// Reads a spec (JSON; empty text: no file) and applies the overrides (option name, text) on top.
/// A result document is accepted too: its "spec" is read. Throws InputError with every fault found.
Spec read_spec(std::string_view json, std::string_view name, const std::vector<Override>& overrides = {},
               SpecUse use = SpecUse::design, bool allow_high_voltage = false);

/// The filled-in spec as JSON text: valid input of read_spec, SI numbers, temperatures as strings.
std::string write_spec(const Spec& spec);

}  // namespace bandwright
