// Analysis: operating point and exact response of a stage. Knows nothing of a spec's requirements.
//
// Definitions. Midband gain A: |H| at its highest peak (peaks equal within 1e-9: the lower frequency; the limit at
// infinite frequency where it stands above every peak), or at a stated frequency. Lower and upper cutoff: the crossings
// of A/sqrt(2) nearest that frequency on each side. H(s) is a ratio of polynomials with nothing dropped. The junction's
// rise is taken once: the operating point is solved at the ambient, then again at ambient + theta_JA x dissipation.
#pragma once

#include <array>
#include <bandwright/cause.hpp>
#include <bandwright/figure.hpp>
#include <bandwright/stage.hpp>
#include <complex>
#include <string>
#include <vector>

namespace bandwright {

/// Why a stage has no small-signal figures.
enum class BiasState {
  active,
  saturated,  ///< VCE under max(VCE(sat) + 0.3 V, VBE)
  cut_off,    ///< IC under 100 ICBO
};

/// The solved operating point. Magnitudes.
struct OperatingPoint {
  BiasState state = BiasState::cut_off;
  double junction_temperature = 0;  ///< K
  double collector_current = 0;
  double base_current = 0;
  double base_emitter_voltage = 0;
  double collector_emitter_voltage = 0;
  double base_voltage = 0;  ///< to the common rail, magnitude
  double emitter_voltage = 0;
  double gain_at_zero_vce = 0;  ///< beta0 at 25 °C at this collector current
};

/// Hybrid-pi parameters at the operating point.
struct SmallSignal {
  double transconductance = 0;      ///< gm, S
  double input_conductance = 0;     ///< gpi = 1/rpi, S
  double output_conductance = 0;    ///< go = 1/ro, S
  double input_capacitance = 0;     ///< Cpi, F
  double feedback_capacitance = 0;  ///< Cmu, F
  double base_resistance = 0;       ///< rbb', ohm
};

/// H(s) = s^2 N(s)/D(s); coefficients of rising powers of s.
struct TransferFunction {
  std::array<double, 5> numerator{};
  std::array<double, 8> denominator{};
  std::complex<double> at(double frequency) const;  ///< H(j 2 pi f)
};

/// How the gain is defined.
struct GainDefinition {
  bool from_input = false;  ///< drops RS and Cs
  double frequency = 0;     ///< Hz; 0: at the peak
};
GainDefinition gain_definition(const Spec& spec);

/// Where the response stands. NaN: no such crossing.
struct Band {
  double reference = kNotComputed;  ///< Hz, where A is taken
  double gain = kNotComputed;       ///< A, V/V
  double lower = kNotComputed;      ///< Hz
  double upper = kNotComputed;      ///< Hz
};

/// Everything computed once for a stage.
struct Analysis {
  OperatingPoint point;
  SmallSignal small;
  TransferFunction transfer;
  Band band;
  FigureValues figures{};  ///< NaN where not active or not existing
};

/// Which response the gain and cutoffs are taken from.
enum class ResponseModel {
  exact,
  pole_model,  ///< closed form, for first steps of a search
};

/// Full analysis at one condition. Cheap: microseconds.
Analysis analyse(const Stage& stage, const GainDefinition& definition, ResponseModel model = ResponseModel::exact);

/// Why a figure is absent, in words with numbers ("VCE would be 0.1 V, needs 0.5 V"); empty where it is present.
std::string why_absent(const Analysis& analysis, const Stage& stage, const GainDefinition& definition, Figure figure);

/// One capacitor's part in the pole model.
struct TimeConstant {
  std::string capacitor;  ///< "C1 input coupling", "Cmu"
  double resistance = 0;  ///< seen by it, ohm
  double seconds = 0;
  double frequency = 0;  ///< 1/(2 pi tau), Hz
  double share = 0;      ///< of the sum that makes the estimate
};

/// The published one-capacitor-at-a-time estimates, beside the exact figures. Sources: short- and open-circuit time
/// constants, Gray & Searle, Electronic Principles, 1969; Miller form as in Gray & Meyer.
struct PoleModel {
  double midband_gain = 0;         ///< resistive midband network, from the same reference as the gain
  double textbook_gain = 0;        ///< hfe R'L/hie divided by F = 1 + gm RE1, times Rin/(Rin + RS)
  double lower_cutoff = 0;         ///< sum of short-circuit corner frequencies, Hz
  double upper_cutoff = 0;         ///< 1/(2 pi sum of open-circuit time constants), Hz
  double miller_upper_cutoff = 0;  ///< input pole alone with Cpi/F + Cmu (1 + gm R'L/F), Hz
  std::vector<TimeConstant> low;
  std::vector<TimeConstant> high;
};
PoleModel pole_model(const Stage& stage, const Analysis& analysis, const GainDefinition& definition);

/// All finite poles and zeros of H, Hz (s/2 pi), by rising magnitude; zeros at the origin included.
struct PolesAndZeros {
  std::vector<std::complex<double>> poles;
  std::vector<std::complex<double>> zeros;
};
PolesAndZeros poles_and_zeros(const TransferFunction& transfer);

/// DC voltage across each role, first node minus second, with its real sign (negative supply: mirrored), and power in
/// each resistor, at a supply magnitude other than nominal; junction rise held.
struct Stress {
  std::array<double, kRoleCount> volts{};
  std::array<double, kRoleCount> watts{};
};
Stress stress(const Stage& stage, const OperatingPoint& nominal, double supply_magnitude, double source_dc,
              double load_dc);

/// S(y, x) = (x/y) dy/dx, exact derivatives, by figure and cause; hFE: of the multiplier; VBE: x is its published
/// value.
using Sensitivity = std::array<std::array<double, kCauseCount>, kFigureCount>;

/// Which causes are asked for; the columns of the others stay 0.
using CauseSet = std::array<bool, kCauseCount>;
CauseSet parts_and_gain();  ///< the parts that may be there, and hFE
CauseSet all_causes();

/// Sensitivities of every computed figure, junction rise held.
Sensitivity sensitivity(const Stage& stage, const Analysis& analysis, const GainDefinition& definition,
                        ResponseModel model = ResponseModel::exact, const CauseSet& wanted = parts_and_gain());

}  // namespace bandwright
