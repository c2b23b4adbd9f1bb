// Physical constants. The kelvin, coulomb and joule are defined by them: exact. Source: BIPM, The International System
// of Units (SI), 9th ed., 2019; CODATA 2018.
#pragma once

namespace bandwright {

inline constexpr double kBoltzmann = 1.380649e-23;            ///< J/K, exact
inline constexpr double kElementaryCharge = 1.602176634e-19;  ///< C, exact
inline constexpr double kZeroCelsius = 273.15;                ///< K, exact
inline constexpr double kReferenceTemperature = 298.15;       ///< K, 25 °C, to which device figures refer
inline constexpr double kColdBegins = 293.15;  ///< K, 20 °C, to which the capacitance of an electrolytic is printed
inline constexpr double kPi = 3.14159265358979323846;
inline constexpr double kLn2 = 0.69314718055994530942;

}  // namespace bandwright
