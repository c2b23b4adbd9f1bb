// A candidate as the parts of one board.
#include <bandwright/alternates.hpp>
#include <bandwright/board.hpp>

namespace bandwright {

namespace {

Dimension dimension_of(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

bool may_be_fitted(const Outcome& outcome) { return outcome.holds && outcome.other_parts.empty(); }

/// "43K"; with the family where it is another one.
std::string value_text(const OfferedValue& value, const Part& part) {
  const std::string code = value_code(value.value, dimension_of(part.kind));
  if (value.family == nullptr || value.family->name == part.family) return code;
  return code + " " + value.family->name;
}

void add_values(const std::vector<IfUnavailable>& list, std::vector<Part>& parts) {
  for (const IfUnavailable& one : list) {
    if (!may_be_fitted(one.outcome) || one.value.connection != Connection::single) continue;
    for (Part& part : parts)
      if (part.role == one.role && part.connection == Connection::single)
        part.alternates.push_back(value_text(one.value, part));
  }
}

/// "BC547C", "2N3904 (not named in the spec, leads may differ)".
std::string type_text(const Substitute& one) {
  std::string remarks = one.named ? "" : "not named in the spec";
  if (!one.lead_warning.empty()) remarks += std::string(remarks.empty() ? "" : ", ") + "leads may differ";
  return remarks.empty() ? one.device : one.device + " (" + remarks + ")";
}

std::string name_of(const Spec& spec, const Candidate& candidate) {
  return spec.title.empty() ? candidate.device : spec.title + ", " + candidate.device;
}

}  // namespace

BoardParts board_of(const Spec& spec, const Catalogue& catalogue, const Candidate& candidate, bool with_alternates) {
  BoardParts board;
  board.name = name_of(spec, candidate);
  board.parts = candidate.parts;
  board.supply = spec.highest_supply();
  board.pnp = spec.pnp();
  board.derating = spec.parts.derating;
  Part transistor = candidate.transistor;
  if (with_alternates && candidate.analysis.point.state == BiasState::active) {
    add_values(if_unavailable(spec, catalogue, candidate), board.parts);
    for (const Substitute& one : substitutes(spec, catalogue, candidate))
      if (may_be_fitted(one.outcome)) transistor.alternates.push_back(type_text(one));
  }
  board.parts.push_back(transistor);
  return board;
}

}  // namespace bandwright
