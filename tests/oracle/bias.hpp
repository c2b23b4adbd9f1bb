// Operating point by nested bisection in long double: no Newton, no derivative, nothing of the library's solver.
#pragma once

#include <bandwright/analysis.hpp>

#include "nodal.hpp"

namespace oracle {

/// beta0 at a current: a monotone piecewise cubic through the points of the curve, its slopes computed here (weighted
/// harmonic means, Fritsch and Butland, SIAM J. Sci. Stat. Comput. 5(2), 1984, from memory), constant beyond its ends.
Real gain_at(const bandwright::GainCurve& curve, Real current);

/// Slopes of that cubic, for curves made up in tests.
void set_slopes(bandwright::GainCurve& curve);

/// What the bias equations need of a stage, in the oracle's arithmetic.
struct BiasNetwork {
  Parts parts{};
  Real supply = 0;
  const bandwright::BipolarParameters* device = nullptr;
  Real gain_multiplier = 1;
};

struct Bias {
  bandwright::BiasState state = bandwright::BiasState::cut_off;
  Real temperature = 0;  ///< of the junction, K
  Real i_c = 0, i_b = 0, v_be = 0, v_ce = 0;
  Real beta0 = 0;  ///< at the temperature
};

/// At a given junction temperature.
Bias solve_bias(const BiasNetwork& network, Real temperature);

/// At the ambient, then once more at ambient + theta_JA x dissipation.
Bias solve_bias(const bandwright::Stage& stage);

HybridPi hybrid_pi(const bandwright::BipolarParameters& device, const Bias& bias);

}  // namespace oracle
