// Figures as every writer shows them: temperatures in degrees Celsius under a name that says so.
#pragma once

#include <bandwright/design.hpp>
#include <string>

namespace bandwright {

/// JSON key and column: "lower_cutoff", "junction_temperature_degc".
std::string shown_key(const FigureInfo& figure);

/// The value in the unit of shown_key; NaN where it was not computed.
double shown_value(const Candidate& candidate, const FigureInfo& figure);
double shown_value(double value, const FigureInfo& figure);

/// The value in words: "4.7 kΩ", "50.1 (34 dB)", "45 %"; "-" where it was not computed.
std::string figure_text(const Candidate& candidate, const FigureInfo& figure, int digits = 4);
std::string figure_text(double value, const FigureInfo& figure, int digits = 4);

/// "metal film": the designator says already what kind of part it is.
std::string short_family(const std::string& family, Role role);

/// "±5 %", "-20/+50 %".
std::string tolerance_text(const Tolerance& tolerance);

/// The value in each role, of a pair that of both parts together; 0: absent.
PartValues role_values(const std::vector<Part>& parts);

/// What the order puts first, in words.
std::string order_reason(const DesignResult& result);

}  // namespace bandwright
