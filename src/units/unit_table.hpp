// Units and SI prefixes, one table each. Source: BIPM, The International System of Units (SI), 9th ed., 2019.
#pragma once

#include <array>
#include <bandwright/quantity.hpp>
#include <optional>
#include <span>
#include <string_view>

namespace bandwright {

/// How the number in front of a unit becomes SI, beside its power of ten.
enum class UnitLaw { linear, peak_to_peak, rms, celsius, voltage_decibel };

struct Unit {
  Dimension dimension;
  const char* text;
  int power;      ///< of ten
  bool prefixed;  ///< takes SI prefixes
  UnitLaw law = UnitLaw::linear;
};
std::span<const Unit> units();

struct Prefix {
  const char* text;
  int power;  ///< of ten
};
std::span<const Prefix> prefixes();

/// What is peculiar to a dimension.
struct DimensionInfo {
  Dimension dimension;
  const char* noun;      ///< "resistance"
  const char* expected;  ///< "a resistance such as 4.7k, 4K7 or 4700"
  const char* shown;     ///< unit as it is printed
  bool bare_number;      ///< a number without unit or prefix is understood
  bool bare_prefix;      ///< "4.7k" is understood
  int least_power;       ///< smallest prefix in print
  int most_power;        ///< largest prefix in print
  const char* code;      ///< multiplier letters of IEC 60062, or empty
};
const DimensionInfo& info(Dimension dimension);

/// Unit and prefix that a suffix such as "kΩ" stands for.
struct Suffix {
  int power = 0;
  UnitLaw law = UnitLaw::linear;
};
std::optional<Suffix> find_suffix(std::string_view text, Dimension dimension);

/// Power of ten of a multiplier letter of IEC 60062.
std::optional<int> code_power(char letter, Dimension dimension);

}  // namespace bandwright
