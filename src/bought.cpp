#include "bought.hpp"

#include <bandwright/stress.hpp>
#include <cmath>

#include "catalogue/offer.hpp"

namespace bandwright {

namespace {

WorstStress stress_of(const Spec& spec, const BipolarParameters& device, const OfferedParts& parts) {
  PartValues working{}, printed{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    working[i] = parts[i].working_value;
    printed[i] = parts[i].value;
  }
  const Analysis nominal = analyse({working, &device, surroundings(spec)}, gain_definition(spec));
  if (nominal.point.state != BiasState::active) return rail_to_rail(spec, printed);
  return worst_stress(spec, population_of(spec, device, parts, nominal));
}

/// A class 2 ceramic works at what its DC voltage leaves; no capacitor changes that voltage.
void count_bias_loss(const Spec& spec, const BipolarParameters& device, const WorstStress& worst, OfferedParts& parts) {
  PartValues working{};
  for (std::size_t i = 0; i < kRoleCount; ++i) working[i] = parts[i].working_value;
  const Stage stage{working, &device, surroundings(spec)};
  const Analysis nominal = analyse(stage, gain_definition(spec));
  if (nominal.point.state != BiasState::active) return;
  const Stress now = stress(stage, nominal.point, spec.supply_magnitude(), spec.source.dc, spec.load.dc);
  for (std::size_t i = kResistorRoles; i < kRoleCount; ++i) {
    OfferedValue& part = parts[i];
    part.bias_factor = bias_factor(part, spec.parts.derating, now.volts[i], worst.volts[i].largest());
    part.working_value *= part.bias_factor;
  }
}

/// Which parts the cost knows by invention only, or not at all.
void add_cost_notes(Candidate& c) {
  std::string unknown, invented;
  const auto look = [&](const Part& part) {
    std::string* list = std::isnan(part.unit_cost) ? &unknown : part.invented_cost ? &invented : nullptr;
    if (list != nullptr) *list += (list->empty() ? "" : ", ") + part.designator;
  };
  for (const Part& part : c.parts) look(part);
  look(c.transistor);
  if (!unknown.empty()) c.notes["cost"] = "no unit cost is known of " + unknown;
  if (unknown.empty() && !invented.empty()) c.notes["cost"] = "rests on costs invented for demonstration: " + invented;
}

/// What a class 2 ceramic works at.
void add_bias_notes(Candidate& c) {
  for (Part& part : c.parts) {
    const double left = c.offered[index(part.role)].bias_factor;
    if (part.kind != PartKind::capacitor || left == 1) continue;
    part.note += (part.note.empty() ? "" : "; ") + format_quantity(100 * left, Dimension::fraction, 3) +
                 " % left of it at its DC voltage, assumed";
  }
}

/// Roles that a family of the spec may not take.
std::string refused_roles(const Spec& spec, const Family& family) {
  std::string roles_text;
  for (const RoleInfo& r : roles())
    if (r.kind == family.kind && is_too_loose(family, spec, r.role))
      roles_text += (roles_text.empty() ? "" : ", ") + std::string(r.designator);
  return roles_text;
}

}  // namespace

std::vector<std::string> stock_and_family_assumptions(const Spec& spec, const Catalogue& catalogue) {
  std::vector<std::string> list;
  if (spec.parts.stock_only) list.push_back("parts come from the stock " + spec.parts.stock + " alone");
  if (!spec.parts.stock.empty() && !spec.parts.stock_only)
    list.push_back("parts at hand in the stock " + spec.parts.stock +
                   " come before bought ones among stages of the same error class, or that meet the spec with a "
                   "capability of at least 1");
  for (const std::string& key : spec.parts.capacitors.families) {
    const Family* family = catalogue.find_family(key);
    if (family == nullptr || family->bias_loss == 0) continue;
    list.push_back(family->name + ": C (1 - " + format_quantity(family->bias_loss, Dimension::fraction) +
                   " V/Vrated) at its DC voltage V at the nominal supply, assumed; temperature and ageing join its "
                   "tolerance");
    if (const std::string refused = refused_roles(spec, *family); !refused.empty())
      list.push_back(family->name + " is not offered as " + refused +
                     ": the cutoff that it sets must be better than ±40 %");
  }
  return list;
}

double cost_of(const Candidate& c) {
  double cost = c.transistor.unit_cost;
  for (const Part& part : c.parts) cost += part.unit_cost;
  return cost;
}

void buy(const Spec& spec, const Catalogue& catalogue, const OfferedParts& chosen, Candidate& c) {
  c.stress = stress_of(spec, c.parameters, chosen);
  c.offered = with_settled_polarity(spec, chosen, c.stress);
  count_bias_loss(spec, c.parameters, c.stress, c.offered);
  std::string reason;
  c.parts = parts_list(spec, c.offered, c.stress, &reason);
  c.transistor = transistor_part(catalogue, c.device, spec.parts.boards, c.stress);
  c.stress_table = stress_table(spec, c.parts, c.parameters, c.stress);
  if (!reason.empty()) c.notes["parts"] = reason;
  add_bias_notes(c);
  add_cost_notes(c);
}

}  // namespace bandwright
