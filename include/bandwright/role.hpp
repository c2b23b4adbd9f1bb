// Roles: the places of a stage that a part can take, one table.
//
// Nodes: "source" is the node between the source and the input coupling capacitor, "base",
// "emitter", "junction" (between the two emitter resistors), "collector", "output", "supply",
// and "ground" (0 V).
#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <string_view>

namespace bandwright {

enum class PartKind { resistor, capacitor, transistor };  ///< no role takes a transistor

enum class Role {
  upper_divider,     ///< R1: supply to base
  lower_divider,     ///< R2: base to 0 V
  collector,         ///< R3: supply to collector
  emitter,           ///< R4: not bypassed
  emitter_bypassed,  ///< R5: bypassed by C3
  input_coupling,    ///< C1
  output_coupling,   ///< C2
  bypass,            ///< C3
  shunt,             ///< C4: collector to 0 V
};
inline constexpr std::size_t kRoleCount = 9;
inline constexpr std::size_t kResistorRoles = 5;  ///< the first five roles are resistors

/// One row a role.
struct RoleInfo {
  Role role;
  PartKind kind;
  bool may_be_absent;
  const char* key;         ///< word in files: "upper_divider"
  const char* designator;  ///< "R1"
  const char* symbol;      ///< symbol in equations: "R1", "RC", "Cin"
  const char* label;       ///< words on the screen: "upper divider"
};

/// All roles, in the order of the enum.
const std::array<RoleInfo, kRoleCount>& roles();
const RoleInfo& info(Role role);
std::optional<Role> find_role(std::string_view key);  ///< key or designator

/// A value for each role, in ohm or farad; 0 where the part is absent.
using PartValues = std::array<double, kRoleCount>;

constexpr std::size_t index(Role role) { return static_cast<std::size_t>(role); }

}  // namespace bandwright
