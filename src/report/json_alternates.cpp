// What may stand in for the parts of a candidate, as fields of the result document.
#include <cmath>

#include "report/json_assessment.hpp"
#include "report/shown_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr std::array kFields = {"if_unavailable", "substitutes", "current_gain_needed"};
constexpr const char* kHolds = "the spec still holds";
constexpr const char* kSpec = "no requirement was stated";
constexpr const char* kSimulated = "not simulated, or no requirement was stated";

// Everything that the fields are made from.
struct Given {
  const Candidate& candidate;
  const Spec& spec;
  Notes& notes;

  Json number(double value, const std::string& field, const std::string& reason) const {
    return notes.number(value, field, reason);
  }
};

Json figures_of(const Outcome& outcome, const Given& from, const std::string& field) {
  std::vector<Figure> shown = required_figures(from.spec, true);
  if (!from.spec.requirement(Figure::supply_current)) shown.push_back(Figure::supply_current);
  Json out = Json::object();
  for (const Figure figure : shown) {
    const std::string key = shown_key(info(figure));
    out[key] = from.number(shown_value(outcome.figures[index(figure)], info(figure)), field + ".figures." + key,
                           "not active, or no such figure");
  }
  return out;
}

void add_outcome(Json& out, const Outcome& outcome, const Given& from, const std::string& field) {
  out["figures"] = figures_of(outcome, from, field);
  out["error"] = from.number(outcome.error, field + ".error", kSpec);
  out["capability"] = from.number(outcome.capability, field + ".capability", kSimulated);
  out["from_moments"] = outcome.from_moments;
  out["yield"] = from.number(outcome.yield, field + ".yield", "not simulated");
  out["verdict"] = from.notes.text(outcome.verdict, field + ".verdict", kSimulated);
  out["holds"] = outcome.holds;
  out["reason"] = from.notes.text(outcome.reason, field + ".reason", kHolds);
  out["other_parts"] = from.notes.text(outcome.other_parts, field + ".other_parts", "no other part must change");
}

Json next_value(const IfUnavailable& one, const Given& from) {
  const RoleInfo& role = info(one.role);
  const bool resistor = role.kind == PartKind::resistor;
  Json out;
  out["designator"] = role.designator;
  out["role"] = role.key;
  out["direction"] = one.up ? "up" : "down";
  out["value"] = one.value.value;
  out["value_code"] = value_code(one.value.value, resistor ? Dimension::resistance : Dimension::capacitance);
  out["family"] = one.value.family != nullptr ? Json(one.value.family->name) : Json("");
  add_outcome(out, one.outcome, from, "if_unavailable");
  return out;
}

Json changes(const Outcome& outcome, const Given& from) {
  constexpr std::array kChanged = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff, Figure::supply_current};
  Json out;
  for (const Figure figure : kChanged) {
    const double ratio = outcome.figures[index(figure)] / from.candidate.analysis.figures[index(figure)];
    const std::string key = info(figure).key;
    out[key] = from.number(ratio - 1, "substitutes.changes." + key, "not active");
  }
  const double before = from.candidate.assessment ? from.candidate.assessment->capability : kNotComputed;
  out["capability"] = from.number(outcome.capability - before, "substitutes.changes.capability", kSimulated);
  return out;
}

Json packages(const std::vector<Package>& list) {
  Json out = Json::array();
  for (const Package& one : list)
    out.push_back({{"package", one.name},
                   {"lead_order", one.lead_order},
                   {"note", one.note},
                   {"provenance", describe(one.provenance)}});
  return out;
}

Json substitute(const Substitute& one, const Given& from) {
  Json out;
  out["device"] = one.device;
  out["named_in_spec"] = from.spec.devices.empty()
                             ? from.notes.nothing("substitutes.named_in_spec", "the spec names no transistors")
                             : Json(one.named);
  add_outcome(out, one.outcome, from, "substitutes");
  out["changes"] = changes(one.outcome, from);
  out["packages"] = packages(one.packages);
  out["lead_warning"] = from.notes.text(one.lead_warning, "substitutes.lead_warning",
                                        "leads as of " + from.candidate.device + ", and no source differs");
  return out;
}

Json gain_needed(const GainNeeded& needed, const Given& from) {
  const std::string field = "current_gain_needed";
  const char* missed = "the nominal unit is not active or misses a requirement at some condition";
  Json out;
  out["min"] = from.number(needed.min, field + ".min", missed);
  out["max"] = from.number(needed.max, field + ".max", std::isnan(needed.max) ? missed : "no upper bound");
  out["collector_current"] = from.number(needed.collector_current, field + ".collector_current", "not active");
  out["collector_emitter_voltage"] =
      from.number(needed.collector_emitter_voltage, field + ".collector_emitter_voltage", "not active");
  out["groups"] = needed.groups;
  return out;
}

}  // namespace

void add_alternates_fields(Json& out, const Candidate& candidate, const Spec& spec, Notes& notes) {
  if (!candidate.alternates) {
    for (const char* field : kFields) out[field] = notes.nothing(field, "asked for with --alternates");
    return;
  }
  const Given from{candidate, spec, notes};
  Json& values = out["if_unavailable"] = Json::array();
  for (const IfUnavailable& one : candidate.alternates->if_unavailable) values.push_back(next_value(one, from));
  Json& devices = out["substitutes"] = Json::array();
  for (const Substitute& one : candidate.alternates->substitutes) devices.push_back(substitute(one, from));
  out["current_gain_needed"] = gain_needed(candidate.alternates->gain_needed, from);
}

}  // namespace bandwright
