// The parts list: what is bought for each role, with its nodes, ratings and polarity.
#include <bandwright/purchase.hpp>
#include <cmath>

namespace bandwright {

namespace {

using Nodes = std::array<std::string, 2>;

const std::array<Nodes, kRoleCount> kNodes = {{
    {"supply", "base"},
    {"base", "ground"},
    {"supply", "collector"},
    {"emitter", "junction"},
    {"junction", "ground"},
    {"source", "base"},
    {"collector", "output"},
    {"junction", "ground"},
    {"collector", "ground"},
}};

Dimension dimension_of(Role role) {
  return info(role).kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

// Without an operating point nothing better is known than that no node leaves the rails: the whole supply stands
// across every part, and across the coupling capacitors what the outside adds.
Stress rail_to_rail(const Spec& spec, const PartValues& values) {
  const double rail = (spec.pnp() ? -1 : 1) * spec.highest_supply();
  Stress bound;
  bound.volts.fill(rail);
  bound.volts[index(Role::input_coupling)] = spec.source.dc - rail;
  bound.volts[index(Role::output_coupling)] = rail - spec.load.dc;
  for (std::size_t i = 0; i < kResistorRoles; ++i)
    if (values[i] > 0) bound.watts[i] = rail * rail / values[i];
  return bound;
}

Stress highest_stress(const Spec& spec, const Stage& stage, const Analysis& analysis) {
  if (analysis.point.state != BiasState::active) return rail_to_rail(spec, stage.parts);
  return stress(stage, analysis.point, spec.highest_supply(), spec.source.dc, spec.load.dc);
}

void add_reason(std::string* reason, const std::string& text) {
  if (reason == nullptr) return;
  if (!reason->empty()) *reason += "; ";
  *reason += text;
}

std::string missing_rating(const Part& part, const Family& family) {
  const RoleInfo& row = info(part.role);
  std::string text = std::string(row.designator) + " " + row.label + ": no " + family.name + " is rated for " +
                     format_quantity(std::fabs(part.volts), Dimension::voltage);
  if (!family.power_ratings.empty())
    text += " with " + format_quantity(part.watts, Dimension::power) + " at half its rating";
  return text;
}

void rate(Part& part, const Family& family, std::string* reason) {
  const auto row = rating_row(family, part.volts, part.watts);
  if (!row) add_reason(reason, missing_rating(part, family));
  const auto rating = [&](const std::vector<double>& ratings) {
    if (ratings.empty()) return 0.0;
    return row ? ratings[*row] : kNotComputed;
  };
  part.voltage_rating = rating(family.voltage_ratings);
  part.power_rating = rating(family.power_ratings);
}

std::string polarity_text(const Part& part, const Family& family) {
  if (!family.polarised) return "";
  return "+ to " + part.nodes[part.volts < 0 ? 1 : 0];
}

Part bought_part(Role role, const OfferedValue& offered, const Stress& highest, const PartValues& values,
                 std::string* reason) {
  Part part;
  part.role = role;
  part.value = offered.value;
  part.code = value_code(offered.value, dimension_of(role));
  part.series = offered.series == nullptr ? "" : offered.series->name;
  part.tolerance = offered.tolerance;
  part.nodes = nodes(role, values);
  part.volts = highest.volts[index(role)];
  part.watts = highest.watts[index(role)];
  if (offered.family == nullptr) return part;
  part.family = offered.family->name;
  rate(part, *offered.family, reason);
  part.polarity = polarity_text(part, *offered.family);
  return part;
}

}  // namespace

const std::array<std::string, 2>& nodes(Role role) { return kNodes[index(role)]; }

std::array<std::string, 2> nodes(Role role, const PartValues& values) {
  Nodes result = nodes(role);
  const bool split = values[index(Role::emitter)] > 0;
  const bool bypassed_resistor = values[index(Role::emitter_bypassed)] > 0;
  for (std::string& node : result) {
    if (node != "junction") continue;
    if (!split) node = "emitter";
    if (split && !bypassed_resistor) node = "ground";
  }
  return result;
}

std::vector<Part> parts_list(const Spec& spec, const OfferedParts& parts, const Stage& stage, const Analysis& analysis,
                             std::string* reason) {
  const Stress highest = highest_stress(spec, stage, analysis);
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = parts[i].value;
  std::vector<Part> list;
  for (const RoleInfo& row : roles()) {
    const OfferedValue& offered = parts[index(row.role)];
    if (offered.value > 0) list.push_back(bought_part(row.role, offered, highest, values, reason));
  }
  return list;
}

}  // namespace bandwright
