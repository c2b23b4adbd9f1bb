// The tolerance allocation and the pictures of a candidate: fields that stand in a document only where they were asked
// for.
#include "report/json_assessment.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

constexpr const char* kNoActiveUnit = "no unit is active";

Json tolerance_class(const ToleranceClass& one) {
  return {{"family", one.family}, {"tolerance", {-one.tolerance.below, one.tolerance.above}}};
}

Json allocated_part(const AllocatedPart& part, Notes& notes) {
  const char* designator = info(part.role).designator;
  Json out;
  out["designator"] = designator;
  out["loosest"] = tolerance_class(part.loosest);
  out["needed"] = tolerance_class(part.needed);
  out["yield_if_looser"] =
      notes.number(part.yield_if_looser, std::string("allocation.parts.") + designator + ".yield_if_looser",
                   "no looser class is sold, or none was tried");
  return out;
}

Json allocation_step(const AllocationStep& step, Notes& notes) {
  const char* reason = "not simulated";
  return {{"designator", info(step.role).designator},
          {"from", tolerance_class(step.from)},
          {"to", tolerance_class(step.to)},
          {"yield_before", notes.number(step.yield_before, "allocation.steps.yield_before", reason)},
          {"yield_after", notes.number(step.yield_after, "allocation.steps.yield_after", reason)}};
}

Json numbers(const std::vector<double>& list, const std::string& field, const char* reason, Notes& notes) {
  Json out = Json::array();
  for (const double value : list) out.push_back(notes.number(value, field, reason));
  return out;
}

Json response(const ResponseCurve& curve, Notes& notes) {
  const auto envelope = [&](const std::vector<double>& list) {
    return numbers(list, "response.envelope", kNoActiveUnit, notes);
  };
  const char* reason = "no value at this frequency";
  Json out;
  out["frequency"] = numbers(curve.frequency, "response.frequency", reason, notes);
  out["magnitude"] = numbers(curve.magnitude, "response.magnitude", reason, notes);
  out["phase"] = numbers(curve.phase, "response.phase", reason, notes);
  out["envelope"] = {{"min", envelope(curve.min)},
                     {"low", envelope(curve.low)},
                     {"high", envelope(curve.high)},
                     {"max", envelope(curve.max)}};
  return out;
}

Json histograms(const Assessment& assessment, Notes& notes) {
  Json out = Json::object();
  for (const FigureInfo& figure : figures()) {
    const FigureSpread& spread = assessment.spread[index(figure.figure)];
    if (spread.edges.empty()) continue;
    const std::string key = shown_key(figure);
    std::vector<double> edges;
    for (const double edge : spread.edges) edges.push_back(shown_value(edge, figure));
    out[key] = {{"edges", numbers(edges, "histograms." + key, kNoActiveUnit, notes)}, {"counts", spread.counts}};
  }
  return out;
}

Json node_voltages(const std::vector<NodeVoltage>& nodes, Notes& notes) {
  Json out = Json::array();
  for (const NodeVoltage& one : nodes) {
    const auto number = [&](double value) { return notes.number(value, "node_voltages", kNoActiveUnit); };
    out.push_back(
        {{"node", one.node}, {"nominal", number(one.nominal)}, {"min", number(one.min)}, {"max", number(one.max)}});
  }
  return out;
}

}  // namespace

void add_allocation_fields(Json& out, const Candidate& candidate, Notes& notes) {
  if (!candidate.allocation) return;
  const Allocation& allocation = *candidate.allocation;
  Json& document = out["allocation"];
  document["reached"] = allocation.reached;
  document["yield"] = yield_count(allocation.yield, "allocation.yield", notes);
  document["parts"] = Json::array();
  for (const AllocatedPart& part : allocation.parts) document["parts"].push_back(allocated_part(part, notes));
  document["steps"] = Json::array();
  for (const AllocationStep& step : allocation.steps) document["steps"].push_back(allocation_step(step, notes));
}

void add_picture_fields(Json& out, const Candidate& candidate, Notes& notes) {
  if (!candidate.assessment) return;
  const Assessment& assessment = *candidate.assessment;
  if (!assessment.response.frequency.empty()) out["response"] = response(assessment.response, notes);
  if (const Json all = histograms(assessment, notes); !all.empty()) out["histograms"] = all;
  if (!assessment.node_voltages.empty()) out["node_voltages"] = node_voltages(assessment.node_voltages, notes);
}

}  // namespace bandwright
