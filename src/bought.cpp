#include "bought.hpp"

#include <bandwright/stress.hpp>
#include <cmath>

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

}  // namespace

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
  c.transistor = transistor_part(catalogue, c.device, c.stress);
  c.stress_table = stress_table(spec, c.parts, c.parameters, c.stress);
  if (!reason.empty()) c.notes["parts"] = reason;
  add_cost_notes(c);
}

}  // namespace bandwright
