#include <algorithm>
#include <bandwright/role.hpp>

namespace bandwright {

namespace {

constexpr std::array<RoleInfo, kRoleCount> kRoles = {{
    {Role::upper_divider, PartKind::resistor, false, "upper_divider", "R1", "R1", "upper divider"},
    {Role::lower_divider, PartKind::resistor, false, "lower_divider", "R2", "R2", "lower divider"},
    {Role::collector, PartKind::resistor, false, "collector", "R3", "RC", "collector"},
    {Role::emitter, PartKind::resistor, true, "emitter", "R4", "RE1", "emitter"},
    {Role::emitter_bypassed, PartKind::resistor, true, "emitter_bypassed", "R5", "RE2", "emitter, bypassed"},
    {Role::input_coupling, PartKind::capacitor, false, "input_coupling", "C1", "Cin", "input coupling"},
    {Role::output_coupling, PartKind::capacitor, false, "output_coupling", "C2", "Cout", "output coupling"},
    {Role::bypass, PartKind::capacitor, true, "bypass", "C3", "CE", "bypass"},
    {Role::shunt, PartKind::capacitor, true, "shunt", "C4", "Csh", "shunt"},
}};

constexpr bool in_enum_order() {
  for (std::size_t i = 0; i < kRoles.size(); ++i)
    if (index(kRoles[i].role) != i || (i < kResistorRoles) != (kRoles[i].kind == PartKind::resistor)) return false;
  return true;
}
static_assert(in_enum_order());

}  // namespace

const std::array<RoleInfo, kRoleCount>& roles() { return kRoles; }

const RoleInfo& info(Role role) { return kRoles[index(role)]; }

std::optional<Role> find_role(std::string_view key) {
  const auto found = std::find_if(kRoles.begin(), kRoles.end(),
                                  [&](const RoleInfo& row) { return key == row.key || key == row.designator; });
  if (found == kRoles.end()) return std::nullopt;
  return found->role;
}

}  // namespace bandwright
