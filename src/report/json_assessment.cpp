#include "report/json_assessment.hpp"

#include "report/shown_assessment.hpp"
#include "report/shown_causes.hpp"
#include "report/shown_figures.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr std::array kFields = {
    "spread_share", "worst_case", "spread", "worst_case_margin",       "capability", "yield",
    "verdict",      "conditions", "causes", "temperature_coefficients"};

constexpr std::array kScales = {"share", "logarithm", "volts"};  // in the order of CauseScale

constexpr const char* kNoUnit = "no unit has a value";

// Everything that the fields are made from.
struct Assessed {
  const Candidate& candidate;
  const Assessment& assessment;
  const Spec& spec;
  Notes& notes;

  Json number(double value, const std::string& field, const std::string& reason) const {
    return notes.number(value, field, reason);
  }
};

// A cell for each figure that has a value and each cause that the design has.
Json by_figure_and_cause(const std::string& field, const Sensitivity& cells, const std::string& reason,
                         const Candidate& candidate, const Spec& spec, Notes& notes) {
  Json out = Json::object();
  for (const FigureInfo& figure : figures()) {
    const bool held = figure.figure == Figure::junction_temperature;  // its rise is, for every unit
    if (held || !std::isfinite(candidate.analysis.figures[index(figure.figure)])) continue;
    const std::string key = shown_key(figure);
    Json& row = out[key] = Json::object();
    for (const CauseInfo& cause : causes()) {
      if (!is_there(cause, candidate, spec)) continue;
      const double value = cells[index(figure.figure)][index(cause.cause)];
      row[shown_key(cause)] = notes.number(value, field + "." + key, reason);
    }
  }
  return out;
}

Json worst_case(const WorstCase& worst, const FigureInfo& figure, Notes& notes) {
  const std::string field = "worst_case." + shown_key(figure);
  const std::string reason = worst.reason.empty() ? "no value at some condition" : worst.reason;
  const auto number = [&](double value) { return notes.number(shown_value(value, figure), field, reason); };
  Json out;
  out["min"] = number(worst.min);
  out["max"] = number(worst.max);
  out["at_min"] = notes.text(worst.at_min, field, reason);
  out["at_max"] = notes.text(worst.at_max, field, reason);
  out["rss_min"] = number(worst.rss_min);
  out["rss_max"] = number(worst.rss_max);
  return out;
}

Json worst_cases(const Assessed& from) {
  Json out = Json::object();
  for (const Figure figure : bounded_figures(from.assessment, from.spec))
    out[shown_key(info(figure))] = worst_case(from.assessment.worst_case[index(figure)], info(figure), from.notes);
  return out;
}

Json spreads(const Assessed& from) {
  Json out = Json::object();
  for (const Figure figure : required_figures(from.spec, true)) {
    const FigureSpread& spread = from.assessment.spread[index(figure)];
    const std::string key = shown_key(info(figure));
    out[key] = {{"mean", from.number(shown_value(spread.mean, info(figure)), "spread." + key, kNoUnit)},
                {"sigma", from.number(spread.sigma, "spread." + key, kNoUnit)}};
  }
  return out;
}

Json capabilities(const Assessed& from) {
  const std::vector<Figure> required = required_figures(from.spec, false);
  Json out = Json::object();
  for (const Figure figure : required) {
    const std::string key = shown_key(info(figure));
    out[key] = from.number(from.assessment.spread[index(figure)].capability, "capability." + key, kNoUnit);
  }
  out["smallest"] = required.empty() ? from.notes.nothing("capability.smallest", "no requirement was stated")
                                     : from.number(from.assessment.capability, "capability.smallest", kNoUnit);
  out["from_moments"] = from.assessment.from_moments;
  return out;
}

Json most_failures(const Assessed& from) {
  const auto figure = most_failed(from.assessment, from.spec);
  if (!figure) return from.notes.nothing("yield.fails_most", "no unit misses a requirement");
  const FigureSpread& spread = from.assessment.spread[index(*figure)];
  return {{"figure", shown_key(info(*figure))},
          {"units", spread.failed},
          {"condition", condition_name(from.assessment.population, spread.most_failed_at)}};
}

Json yields(const Assessed& from) {
  if (from.assessment.yield.units == 0) return from.notes.nothing("yield", "not simulated");
  Json out = yield_count(from.assessment.yield, "yield", from.notes);
  out["fails_most"] = most_failures(from);
  Json& failed = out["failed"] = Json::object();
  for (const Figure figure : required_figures(from.spec, false))
    failed[shown_key(info(figure))] = from.assessment.spread[index(figure)].failed;
  return out;
}

Json verdict(const Assessed& from) {
  const Assessment& a = from.assessment;
  if (a.verdict.empty()) return from.notes.nothing("verdict", "no requirement was stated");
  return {{"nominal", a.nominal_met}, {"worst_case", a.worst_case_met}, {"overall", a.verdict}};
}

Json condition(const Assessed& from, std::size_t position) {
  const OperatingCondition& at = from.assessment.population.conditions[position];
  Json out;
  out["name"] = condition_name(from.assessment.population, position);
  out["supply"] = from.spec.pnp() ? -at.supply : at.supply;
  out["ambient_degc"] = at.ambient - kZeroCelsius;
  Json& values = out["figures"] = Json::object();
  for (const Figure figure : required_figures(from.spec, true)) {
    const std::string key = shown_key(info(figure));
    const double value = from.assessment.at_condition[position][index(figure)];
    values[key] = from.number(shown_value(value, info(figure)), "conditions.figures." + key,
                              "the nominal unit has no such figure at this condition");
  }
  return out;
}

Json conditions(const Assessed& from) {
  Json out = Json::array();
  for (std::size_t i = 0; i < from.assessment.at_condition.size(); ++i) out.push_back(condition(from, i));
  return out;
}

Json cause_rows(const Assessed& from) {
  Json out = Json::array();
  for (const CauseInfo& cause : causes()) {
    if (!is_there(cause, from.candidate, from.spec)) continue;
    const CauseSpread& spread = from.assessment.population.spread[index(cause.cause)];
    out.push_back({{"cause", cause.key},
                   {"symbol", cause.symbol},
                   {"scale", kScales[static_cast<std::size_t>(cause.scale)]},
                   {"centre", spread.centre},
                   {"low", spread.low()},
                   {"high", spread.high()},
                   {"distribution", spread.varies() ? distribution_text(from.assessment.population) : "exact"},
                   {"basis", spread.basis}});
  }
  return out;
}

Json temperature_coefficients(const Assessed& from) {
  Json out = Json::array();
  for (const Part& part : from.candidate.parts)
    out.push_back({{"part", info(part.role).designator},
                   {"coefficient", from.assessment.population.temperature_coefficient[index(part.role)]},
                   {"distribution", "uniform"}});
  return out;
}

}  // namespace

Json yield_count(const Yield& yield, const std::string& field, Notes& notes) {
  Json out;
  out["passed"] = yield.passed;
  out["units"] = yield.units;
  out["low"] = notes.number(yield.low, field, "not simulated");
  out["high"] = notes.number(yield.high, field, "not simulated");
  out["method"] = "clopper-pearson";
  out["seed"] = yield.seed;
  out["not_active"] = yield.not_active;
  return out;
}

void add_assessment_fields(Json& out, const Candidate& candidate, const Spec& spec, Notes& notes) {
  out["sensitivity"] =
      by_figure_and_cause("sensitivity", candidate.sensitivity, "no derivative exists", candidate, spec, notes);
  if (!candidate.assessment) {
    for (const char* field : kFields) out[field] = notes.nothing(field, why_not_assessed(candidate));
    return;
  }
  const Assessed from{candidate, *candidate.assessment, spec, notes};
  out["spread_share"] =
      by_figure_and_cause("spread_share", from.assessment.share, "no derivative exists", candidate, spec, notes);
  out["worst_case"] = worst_cases(from);
  out["spread"] = spreads(from);
  out["worst_case_margin"] = from.number(from.assessment.worst_case_margin, "worst_case_margin",
                                         "no requirement, or one whose figure has no worst case");
  out["capability"] = capabilities(from);
  out["yield"] = yields(from);
  out["verdict"] = verdict(from);
  out["conditions"] = conditions(from);
  out["causes"] = cause_rows(from);
  out["temperature_coefficients"] = temperature_coefficients(from);
}

}  // namespace bandwright
