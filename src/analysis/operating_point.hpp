// Solves the bias network: bracketed Newton in ln IC on the residual template.
#pragma once

#include <bandwright/analysis.hpp>

#include "stage/common_emitter.hpp"

namespace bandwright {

/// A solved bias network at one junction temperature.
struct BiasSolution {
  BiasTrial<double> trial;
  double log_current = 0;
  bool reached = false;  ///< false: VCE would fall below 0 before the residual vanishes
};

/// `guess` is ln IC to start from, or NaN.
BiasSolution solve_bias(const Circuit<double>& circuit, const Bipolar<double>& device, double guess = kNotComputed);

/// Active, saturated or cut off, as the definitions say.
BiasState bias_state(const BiasSolution& solution, const Bipolar<double>& device);

inline constexpr double kActiveMargin = 0.3;    ///< V over VCE(sat)
inline constexpr double kLeakageRatio = 100.0;  ///< IC over ICBO

/// The VCE that the active region needs: max(VCE(sat) + 0.3 V, VBE).
double least_active_voltage(const BipolarParameters& device, double v_be);

/// The operating point at the ambient, the junction's rise taken once.
struct NominalBias {
  OperatingPoint point;
  Bipolar<double> device;  ///< at the junction temperature
  BiasSolution solution;
};
NominalBias nominal_bias(const Stage& stage, const Circuit<double>& circuit);

/// The operating point at a junction temperature that is given (the rise held), of the nominal or any other unit.
NominalBias bias_at(const Stage& stage, const Circuit<double>& circuit, double junction, double guess = kNotComputed,
                    const UnitFactors<double>& unit = {});

}  // namespace bandwright
