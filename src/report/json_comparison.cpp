// "bandwright/comparison" version 1. A field that has no value is null, and the candidate's `notes` say why.
#include <bandwright/report.hpp>
#include <bandwright/version.hpp>
#include <cmath>

#include "report/comparison.hpp"
#include "report/json_assessment.hpp"
#include "report/json_notes.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr int kDocumentVersion = 1;
constexpr const char* kNotStated = "not stated by the document";

Json text_or_null(const std::string& text) { return text.empty() ? Json(nullptr) : Json(text); }

Json number_or_null(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

Json part_document(const Part& part) {
  const RoleInfo& role = info(part.role);
  Json out;
  out["designator"] = role.designator;
  out["role"] = role.key;
  out["kind"] = role.kind == PartKind::resistor ? "resistor" : "capacitor";
  out["value"] = part.value;
  out["value_code"] = text_or_null(part.code);
  out["series"] = text_or_null(part.series);
  out["tolerance"] =
      std::isnan(part.tolerance.above) ? Json(nullptr) : Json{-part.tolerance.below, part.tolerance.above};
  out["family"] = text_or_null(part.family);
  out["power_rating"] = number_or_null(part.power_rating);
  out["voltage_rating"] = number_or_null(part.voltage_rating);
  out["polarity"] = text_or_null(part.polarity);
  out["part_number"] = part.part_number;
  return out;
}

Json measures(const Candidate& one, Notes& notes) {
  Json out;
  for (const ComparedMeasure& measure : compared_measures()) {
    const double value = measure.value(one);
    out[measure.key] = measure.is_count ? Json(static_cast<int>(value)) : notes.number(value, measure.key, kNotStated);
  }
  return out;
}

Json figures_of(const Candidate& one, Notes& notes) {
  Json out;
  for (const FigureInfo& figure : figures())
    out[shown_key(figure)] = notes.number(shown_value(one, figure), shown_key(figure), kNotStated);
  return out;
}

Json margins(const ComparedCandidate& one, Notes& notes) {
  Json out = Json::object();
  for (const FigureInfo& figure : figures())
    if (one.spec.requirement(figure.figure))
      out[figure.key] =
          notes.number(one.stated.margins[index(figure.figure)], std::string("margins.") + figure.key, kNotStated);
  return out;
}

Json capability(const ComparedCandidate& one, Notes& notes) {
  const Assessment& assessment = *one.stated.assessment;
  if (one.stated.notes.count("capability") > 0) return nullptr;
  Json out;
  for (const FigureInfo& figure : figures())
    if (one.spec.requirement(figure.figure))
      out[figure.key] = notes.number(assessment.spread[index(figure.figure)].capability,
                                     std::string("capability.") + figure.key, kNotStated);
  out["smallest"] = notes.number(assessment.capability, "capability.smallest", kNotStated);
  out["set_by"] = Json::array();
  for (const Figure figure : least_capable_figures(one)) out["set_by"].push_back(info(figure).key);
  out["from_moments"] = assessment.from_moments;
  return out;
}

Json worst_cases(const Candidate& one, Notes& notes) {
  if (one.notes.count("worst_case") > 0) return nullptr;
  Json out = Json::object();
  for (const FigureInfo& figure : figures()) {
    const WorstCase& worst = one.assessment->worst_case[index(figure.figure)];
    if (std::isnan(worst.min) && std::isnan(worst.max)) continue;
    const std::string field = "worst_case." + shown_key(figure);
    out[shown_key(figure)] = {{"min", notes.number(shown_value(worst.min, figure), field, kNotStated)},
                              {"max", notes.number(shown_value(worst.max, figure), field, kNotStated)},
                              {"at_min", text_or_null(worst.at_min)},
                              {"at_max", text_or_null(worst.at_max)}};
  }
  return out;
}

Json shortfalls(const Candidate& one) {
  Json out = Json::array();
  for (const Shortfall& shortfall : one.shortfalls) out.push_back(shortfall.text);
  return out;
}

Json candidate_document(const Compared& list, std::size_t position) {
  const ComparedCandidate& compared = list[position];
  const Candidate& one = compared.stated;
  const Yield& yield = one.assessment->yield;
  Notes notes(one.notes);
  Json out;
  out["name"] = compared_name(position);
  out["file"] = compared.file;
  out["rank"] = one.rank;
  out["device"] = one.device;
  out["variant"] = notes.text(one.variant, "variant", kNotStated);
  out["best_at"] = one.best_at;
  out["non_dominated"] = one.notes.count("non_dominated") > 0 ? Json(nullptr) : Json(one.non_dominated);
  out["verdict"] = notes.text(one.assessment->verdict, "verdict", kNotStated);
  out["measures"] = measures(one, notes);
  out["figures"] = figures_of(one, notes);
  out["margins"] = margins(compared, notes);
  out["shortfalls"] = shortfalls(one);
  out["capability"] = capability(compared, notes);
  out["yield"] = yield.units == 0 ? notes.nothing("yield", kNotStated) : yield_count(yield, "yield", notes);
  out["worst_case"] = worst_cases(one, notes);
  out["parts"] = Json::array();
  for (const Part& part : one.parts) out["parts"].push_back(part_document(part));
  out["notes"] = notes.to_json();
  return out;
}

Json differing_part(const Compared& list, const RoleInfo& role) {
  Json out = {{"designator", role.designator}, {"role", role.key}, {"candidates", Json::object()}};
  for (std::size_t i = 0; i < list.size(); ++i) {
    const Part* part = part_of(list[i].stated, role.role);
    out["candidates"][compared_name(i)] = part != nullptr ? part_document(*part) : Json(nullptr);
  }
  return out;
}

Json differing_parts(const Compared& list) {
  Json out = Json::array();
  for (const RoleInfo& role : roles())
    if (part_difference(list, role.role).any()) out.push_back(differing_part(list, role));
  if (!devices_differ(list)) return out;
  Json device = {{"designator", "Q1"}, {"role", "transistor"}, {"candidates", Json::object()}};
  for (std::size_t i = 0; i < list.size(); ++i)
    device["candidates"][compared_name(i)] = {{"device", list[i].stated.device}};
  out.push_back(device);
  return out;
}

}  // namespace

std::string write_comparison_json(const Comparison& comparison) {
  const Compared& list = comparison.candidates;
  Json out;
  out["format"] = "bandwright/comparison";
  out["version"] = kDocumentVersion;
  out["program"] = version();
  out["choice"] = choice_text(list);
  out["differing_requirements"] = differing_requirements(list);
  out["differing_conditions"] = differing_conditions(list);
  out["notes"] = comparison.notes;
  out["candidates"] = Json::array();
  for (std::size_t i = 0; i < list.size(); ++i) out["candidates"].push_back(candidate_document(list, i));
  out["differing_parts"] = differing_parts(list);
  out["cautions"] = caution_list();
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace bandwright
