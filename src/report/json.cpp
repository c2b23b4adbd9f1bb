// The result document, "bandwright/result" version 1. A field that has no value is null, and `notes` says why.
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>
#include <cmath>

#include "report/json_assessment.hpp"
#include "report/json_parts.hpp"
#include "report/json_stress.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr int kDocumentVersion = 1;
constexpr const char* kNotInThisVersion = "not computed by this version";

Json device_parameters(const Candidate& candidate, Notes& notes) {
  const BipolarParameters& p = candidate.parameters;
  const OperatingPoint& point = candidate.analysis.point;
  const char* no_point = "no operating point";
  const double rise = 1 + point.collector_emitter_voltage * p.inverse_early_voltage;
  Json out;
  out["current_gain"] = notes.number(point.gain_at_zero_vce * rise, "device_parameters.current_gain", no_point);
  out["current_gain_at_zero_vce"] =
      notes.number(point.gain_at_zero_vce, "device_parameters.current_gain_at_zero_vce", no_point);
  out["current_gain_limits_at_zero_vce"] = {
      notes.number(candidate.gain_limits[0], "device_parameters.current_gain_limits_at_zero_vce", no_point),
      notes.number(candidate.gain_limits[1], "device_parameters.current_gain_limits_at_zero_vce", no_point)};
  out["log_saturation_current"] = p.log_saturation_current;
  out["early_voltage"] = notes.number(1 / p.inverse_early_voltage, "device_parameters.early_voltage", "infinite");
  out["base_spreading_resistance"] = p.base_resistance;
  out["base_transit_time"] = p.transit_time;
  out["emitter_depletion_capacitance"] = p.emitter_capacitance;
  out["feedback_capacitance_at_zero_bias"] = p.feedback_capacitance;
  out["collector_built_in_potential"] = p.built_in_potential;
  out["collector_grading_exponent"] = p.grading_exponent;
  out["saturation_current_temperature_exponent"] = p.saturation_current_exponent;
  out["current_gain_temperature_exponent"] = p.gain_exponent;
  out["bandgap_voltage"] = p.bandgap;
  out["collector_cutoff_current"] = p.cutoff_current;
  out["saturation_voltage"] = p.saturation_voltage;
  out["thermal_resistance"] = p.thermal_resistance;
  return out;
}

Json figures_of(const Candidate& candidate, Notes& notes) {
  Json out;
  for (const FigureInfo& figure : figures()) {
    const std::string key = shown_key(figure);
    const char* reason = figure.use == FigureUse::reserved ? kNotInThisVersion : "no value at this operating point";
    out[key] = notes.number(shown_value(candidate, figure), key, reason);
  }
  return out;
}

Json time_constants(const std::vector<TimeConstant>& list, const std::string& field, Notes& notes) {
  Json out = Json::array();
  const char* reason = "a capacitor that sees no resistance, or no capacitance at all";
  for (const TimeConstant& one : list) {
    out.push_back({{"capacitor", one.capacitor},
                   {"resistance", notes.number(one.resistance, field + ".resistance", reason)},
                   {"time_constant", notes.number(one.seconds, field + ".time_constant", reason)},
                   {"frequency", notes.number(one.frequency, field + ".frequency", reason)},
                   {"share", notes.number(one.share, field + ".share", reason)}});
  }
  return out;
}

Json pole_model(const Candidate& candidate, Notes& notes) {
  PoleModel model = candidate.poles_estimate;
  if (candidate.analysis.point.state != BiasState::active)
    model = {kNotComputed, kNotComputed, kNotComputed, kNotComputed, kNotComputed, {}, {}};
  const char* reason = "no estimate at this operating point";
  Json out;
  out["midband_gain"] = notes.number(model.midband_gain, "pole_model.midband_gain", reason);
  out["textbook_gain"] = notes.number(model.textbook_gain, "pole_model.textbook_gain", reason);
  out["lower_cutoff"] = notes.number(model.lower_cutoff, "pole_model.lower_cutoff", reason);
  out["upper_cutoff"] = notes.number(model.upper_cutoff, "pole_model.upper_cutoff", reason);
  out["miller_upper_cutoff"] = notes.number(model.miller_upper_cutoff, "pole_model.miller_upper_cutoff", reason);
  out["low"] = time_constants(model.low, "pole_model.low", notes);
  out["high"] = time_constants(model.high, "pole_model.high", notes);
  return out;
}

Json roots(const std::vector<std::complex<double>>& list) {
  Json out = Json::array();
  for (const auto& root : list) {
    if (std::isfinite(root.real()) && std::isfinite(root.imag()))
      out.push_back({{"real", root.real()}, {"imaginary", root.imag()}});
  }
  return out;
}

Json margins(const Candidate& candidate, const Spec& spec, Notes& notes) {
  Json out = Json::object();
  for (const FigureInfo& figure : figures()) {
    if (!spec.requirement(figure.figure)) continue;
    out[figure.key] = notes.number(candidate.margins[index(figure.figure)], std::string("margins.") + figure.key,
                                   "the figure has no value");
  }
  return out;
}

Json shortfalls(const Candidate& candidate, Notes& notes) {
  Json out = Json::array();
  for (const Shortfall& one : candidate.shortfalls) {
    const std::string key = info(one.figure).key;
    out.push_back({{"figure", key},
                   {"value", notes.number(one.value, "shortfalls." + key, one.text)},
                   {"limit", notes.number(one.limit, "shortfalls." + key, one.text)},
                   {"text", one.text}});
  }
  return out;
}

Json packages(const Candidate& candidate) {
  Json out = Json::array();
  for (const Package& one : candidate.packages)
    out.push_back({{"package", one.name},
                   {"lead_order", one.lead_order},
                   {"note", one.note},
                   {"provenance", describe(one.provenance)}});
  return out;
}

Json candidate_document(const Candidate& candidate, const Spec& spec) {
  Notes notes(candidate.notes);
  Json out;
  out["rank"] = candidate.rank;
  out["best_at"] = candidate.best_at;
  out["topology"] = candidate.topology;
  out["variant"] = candidate.variant;
  out["device"] = candidate.device;
  out["device_parameters"] = device_parameters(candidate, notes);
  out["packages"] = packages(candidate);
  out["parts"] = part_documents(candidate, notes);
  out["transistor"] = transistor_document(candidate, notes);
  add_stress_fields(out, candidate, notes);
  out["figures"] = figures_of(candidate, notes);
  out["pole_model"] = pole_model(candidate, notes);
  out["poles"] = roots(candidate.poles.poles);
  out["zeros"] = roots(candidate.poles.zeros);
  out["notes"] = nullptr;  // keeps its place; filled last
  out["error"] = notes.number(candidate.error, "error", "a required figure has no value");
  out["tolerance_sensitivity"] = notes.number(candidate.tolerance_sensitivity, "tolerance_sensitivity",
                                              "no requirement to compare with, or a required figure has no value");
  out["margins"] = margins(candidate, spec, notes);
  out["shortfalls"] = shortfalls(candidate, notes);
  add_assessment_fields(out, candidate, spec, notes);
  out["non_dominated"] = candidate.non_dominated;
  add_allocation_fields(out, candidate, notes);
  add_alternates_fields(out, candidate, spec, notes);
  add_picture_fields(out, candidate, notes);
  out["notes"] = notes.to_json();
  return out;
}

}  // namespace

std::string write_json(const DesignResult& result) {
  Json out;
  out["format"] = "bandwright/result";
  out["version"] = kDocumentVersion;
  out["program"] = version();
  out["spec"] = Json::parse(write_spec(result.spec));
  out["met"] = result.met;
  out["interrupted"] = result.interrupted;
  out["ranked_by"] = info(result.ranked_by).word;
  out["order_reason"] = order_reason(result);
  out["definitions"] = result.definitions;
  out["assumptions"] = result.assumptions;
  out["from_memory"] = result.from_memory;
  out["dropped"] = result.dropped;
  out["explanations"] = result.explanations;
  out["cautions"] = caution_list();
  out["candidates"] = Json::array();
  for (const Candidate& one : result.candidates) out["candidates"].push_back(candidate_document(one, result.spec));
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace bandwright
