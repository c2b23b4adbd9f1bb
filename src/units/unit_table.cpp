#include "units/unit_table.hpp"

#include <algorithm>
#include <cassert>

#include "units/number_text.hpp"

namespace bandwright {

namespace {

using D = Dimension;

// One spelling for each sign: what is read has been through one_spelling.
constexpr std::array kUnits = {
    Unit{D::gain, "V/V", 0, false},
    Unit{D::gain, "dB", 0, false, UnitLaw::voltage_decibel},
    Unit{D::resistance, "Ω", 0, true},
    Unit{D::resistance, "ohm", 0, true},
    Unit{D::resistance, "ohms", 0, true},
    Unit{D::resistance, "Ohm", 0, true},
    Unit{D::resistance, "Ohms", 0, true},
    Unit{D::resistance, "R", 0, false},
    Unit{D::resistance, "L", -3, false},
    Unit{D::capacitance, "F", 0, true},
    Unit{D::voltage, "V", 0, true},
    Unit{D::voltage, "Vp", 0, true},
    Unit{D::voltage, "Vpp", 0, true, UnitLaw::peak_to_peak},
    Unit{D::voltage, "Vrms", 0, true, UnitLaw::rms},
    Unit{D::current, "A", 0, true},
    Unit{D::power, "W", 0, true},
    Unit{D::frequency, "Hz", 0, true},
    Unit{D::time, "s", 0, true},
    Unit{D::temperature, "K", 0, false},
    Unit{D::temperature, "°C", 0, false, UnitLaw::celsius},
    Unit{D::temperature, "degC", 0, false, UnitLaw::celsius},
    Unit{D::temperature, "C", 0, false, UnitLaw::celsius},
    Unit{D::noise_density, "V/√Hz", 0, true},
    Unit{D::noise_density, "V/sqrt(Hz)", 0, true},
    Unit{D::noise_density, "V/rtHz", 0, true},
    Unit{D::decibel, "dB", 0, false},
    Unit{D::fraction, "%", -2, false},
    Unit{D::thermal_resistance, "K/W", 0, false},
    Unit{D::thermal_resistance, "°C/W", 0, false},
};

constexpr std::array kPrefixes = {Prefix{"T", 12},  Prefix{"G", 9},  Prefix{"M", 6},  Prefix{"k", 3},
                                  Prefix{"K", 3},   Prefix{"m", -3}, Prefix{"u", -6}, Prefix{"n", -9},
                                  Prefix{"p", -12}, Prefix{"f", -15}};

// Capacitors are sold and spoken of in pF to µF, frequencies from Hz upwards.
constexpr std::array kDimensions = {
    DimensionInfo{D::gain, "gain", "a gain such as 50 or 34 dB", "", true, false, 0, 0, ""},
    DimensionInfo{D::resistance, "resistance", "a resistance such as 4.7k, 4K7 or 4700", "Ω", true, true, -3, 12,
                  "LRKkMGT"},
    DimensionInfo{D::capacitance, "capacitance", "a capacitance with its unit or prefix such as 10 uF, 2u2 or 100 pF",
                  "F", false, true, -12, -6, "pnumF"},
    DimensionInfo{D::voltage, "voltage", "a voltage such as 1.5 V", "V", true, true, -9, 3, ""},
    DimensionInfo{D::current, "current", "a current such as 5 mA", "A", true, true, -12, 0, ""},
    DimensionInfo{D::power, "power", "a power such as 100 mW", "W", true, true, -12, 3, ""},
    DimensionInfo{D::frequency, "frequency", "a frequency such as 40 Hz or 2.2 MHz", "Hz", true, true, 0, 12, ""},
    DimensionInfo{D::time, "time", "a time such as 10 ms", "s", true, true, -15, 0, ""},
    DimensionInfo{D::temperature, "temperature", "a temperature with its unit such as 25 °C or 298.15 K", "°C", false,
                  false, 0, 0, ""},
    DimensionInfo{D::noise_density, "noise density", "a noise density such as 5 nV/√Hz", "V/√Hz", true, true, -15, 0,
                  ""},
    DimensionInfo{D::decibel, "level", "a level such as 3 dB", "dB", true, false, 0, 0, ""},
    DimensionInfo{D::fraction, "ratio", "a pure number or a percentage such as 0.05 or 5 %", "", true, false, 0, 0, ""},
    DimensionInfo{D::thermal_resistance, "thermal resistance", "a thermal resistance such as 200 K/W", "K/W", true,
                  false, 0, 0, ""},
    DimensionInfo{D::money, "amount", "an amount such as 0.12", "", true, false, 0, 0, ""},
};

// Powers of ten that the multiplier letters stand for. Source: IEC 60062:2016; read through text copies, T from memory.
constexpr std::array kCodeLetters = {Prefix{"L", -3}, Prefix{"R", 0},  Prefix{"K", 3},  Prefix{"k", 3},
                                     Prefix{"M", 6},  Prefix{"G", 9},  Prefix{"T", 12}, Prefix{"p", -12},
                                     Prefix{"n", -9}, Prefix{"u", -6}, Prefix{"m", -3}, Prefix{"F", 0}};

std::optional<Suffix> whole_unit(std::string_view text, Dimension dimension, bool prefixed_only) {
  for (const Unit& unit : kUnits) {
    if (unit.dimension != dimension || text != unit.text) continue;
    if (prefixed_only && !unit.prefixed) continue;
    return Suffix{unit.power, unit.law};
  }
  return std::nullopt;
}

std::optional<Suffix> behind_prefix(std::string_view text, Dimension dimension) {
  if (text.empty()) return info(dimension).bare_prefix ? std::optional(Suffix{}) : std::nullopt;
  return whole_unit(text, dimension, true);
}

}  // namespace

std::span<const Unit> units() { return kUnits; }
std::span<const Prefix> prefixes() { return kPrefixes; }

const DimensionInfo& info(Dimension dimension) {
  const auto& row = kDimensions[static_cast<std::size_t>(dimension)];
  assert(row.dimension == dimension);
  return row;
}

std::optional<Suffix> find_suffix(std::string_view text, Dimension dimension) {
  if (auto found = whole_unit(text, dimension, false)) return found;
  for (const Prefix& prefix : kPrefixes) {
    if (!text.starts_with(prefix.text)) continue;
    auto found = behind_prefix(trimmed(text.substr(1)), dimension);
    if (!found) continue;
    found->power += prefix.power;
    return found;
  }
  return std::nullopt;
}

std::optional<int> code_power(char letter, Dimension dimension) {
  if (std::string_view(info(dimension).code).find(letter) == std::string_view::npos) return std::nullopt;
  for (const Prefix& row : kCodeLetters)
    if (row.text[0] == letter) return row.power;
  return std::nullopt;
}

std::string describe_dimension(Dimension dimension) { return info(dimension).expected; }

}  // namespace bandwright
