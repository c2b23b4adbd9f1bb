// Purchase: the parts of a stage as they are bought: family, tolerance, rating, polarity.
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/catalogue.hpp>
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <optional>
#include <string>
#include <vector>

namespace bandwright {

/// One part of a parts list.
struct Part {
  Role role = Role::collector;
  double value = 0;    ///< printed, ohm or farad
  std::string code;    ///< IEC 60062
  std::string series;  ///< coarsest series that holds it; empty: none
  Tolerance tolerance;
  std::string family;         ///< words
  double voltage_rating = 0;  ///< V DC
  double power_rating = 0;    ///< W; 0 for a capacitor
  double volts = 0;           ///< highest nominal DC voltage across it, signed first node to second
  double watts = 0;           ///< highest nominal dissipation of a resistor
  std::string polarity;       ///< "+ to collector"; empty: not polarised
  std::array<std::string, 2> nodes;
  std::string part_number;  ///< filled from the user's stock only
};

/// The two nodes of each role where every role is present.
const std::array<std::string, 2>& nodes(Role role);

/// The two nodes of a role beside the parts that are present: without the unbypassed emitter resistor the junction is
/// the emitter, without the bypassed one it is ground.
std::array<std::string, 2> nodes(Role role, const PartValues& values);

/// The parts list of a stage at the highest nominal supply. `reason` is filled where a rating does not exist.
std::vector<Part> parts_list(const Spec& spec, const OfferedParts& parts, const Stage& stage, const Analysis& analysis,
                             std::string* reason = nullptr);

struct Caution {
  std::string code;
  std::string text;
};
/// The usual cautions, the same under every list.
const std::vector<Caution>& cautions();

}  // namespace bandwright
