// The whole small-signal circuit of the stage as a nodal network, and its band by a dense scan.
#pragma once

#include <bandwright/analysis.hpp>
#include <optional>

#include "network.hpp"

namespace oracle {

/// Hybrid-pi parameters in the oracle's arithmetic.
struct HybridPi {
  Real g_m = 0, g_pi = 0, g_o = 0, c_pi = 0, c_mu = 0, r_bb = 0;
};
HybridPi widen(const bandwright::SmallSignal& small);

/// Part values in the oracle's arithmetic, so that a derivative can be taken by differences.
using Parts = std::array<Real, bandwright::kRoleCount>;
Parts widen(const bandwright::PartValues& parts);

struct Circuit {
  Parts parts{};
  HybridPi device;
  bandwright::Surroundings around;
  bool from_input = false;
};

enum Wire { ground, emf, input, base, inner_base, emitter, junction, collector, output, kWires };

/// Every resistor and capacitor as it is.
Network network(const Circuit& circuit);

/// The resistive midband network: Cin, Cout, CE short, all other capacitors open. One of the three may be left open.
struct Midband {
  std::optional<bandwright::Role> open;
  bool load = true;
};
Network midband_network(const Circuit& circuit, const Midband& how = {});

/// |v(output)| at a frequency in Hz.
Real magnitude(const Network& network, Real frequency);

struct Edges {
  Real reference = 0, gain = 0;
  std::optional<Real> lower, upper;
  Real lower_slope = 0, upper_slope = 0;  ///< d ln|H| / d ln f at the edges
  bool rises_to_the_end = false;          ///< no peak is as high as the limit at infinite frequency: that is A
};

/// Highest peak and half-power crossings nearest to it, or to `at` where that is not 0.
Edges edges(const Network& network, Real at = 0);

/// The same for a network a little apart from the one that gave `near`: no scan.
Edges edges_near(const Network& network, const Edges& near, Real at = 0);

}  // namespace oracle
