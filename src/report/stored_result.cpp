// Reads a candidate back from a result document, and compares it with a recomputed one.
#include <algorithm>
#include <bandwright/fault.hpp>
#include <bandwright/report.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "report/shown_figures.hpp"
#include "report/stored_result_parts.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

using Json = nlohmann::json;

[[noreturn]] void refuse(const std::string& where, const std::string& found, const std::string& expected) {
  throw InputError({Fault{where, found, expected, ""}});
}

std::string at(std::string_view name, const std::string& path) { return std::string(name) + ": " + path; }

Json parsed(std::string_view json, std::string_view name) {
  try {
    return Json::parse(json);
  } catch (const Json::parse_error& fault) {
    refuse(std::string(name), "text that breaks off or goes wrong at byte " + std::to_string(fault.byte),
           "a result document in JSON");
  }
}

const Json& candidate_of(const Json& document, std::string_view name, int rank) {
  static const Json none = Json::array();
  const bool listed = document.is_object() && document.contains("candidates") && document["candidates"].is_array();
  const Json& list = listed ? document["candidates"] : none;
  for (const Json& one : list)
    if (one.is_object() && one.value("rank", Json()) == rank) return one;
  const std::string range =
      list.empty() ? "a result with at least one candidate" : "a rank from 1 to " + std::to_string(list.size());
  refuse(at(name, "candidates"), "no candidate of rank " + std::to_string(rank), range);
}

FigureValues figures_of(const Json& candidate) {
  FigureValues values;
  values.fill(kNotComputed);
  const Json& stored = candidate["figures"];
  for (const FigureInfo& figure : figures()) {
    const auto cell = stored.find(shown_key(figure));
    if (cell == stored.end() || !cell->is_number()) continue;
    const double offset = figure.dimension == Dimension::temperature ? kZeroCelsius : 0;
    values[index(figure.figure)] = cell->get<double>() + offset;
  }
  return values;
}

// NaN on both sides agrees; on one side it is as far apart as can be.
double difference(double a, double b) {
  if (std::isnan(a) && std::isnan(b)) return 0;
  if (std::isnan(a) || std::isnan(b)) return std::numeric_limits<double>::infinity();
  const double scale = std::max(std::fabs(a), std::fabs(b));
  return scale == 0 ? 0 : std::fabs(a - b) / scale;
}

}  // namespace

bool is_result(std::string_view json) {
  const Json document = Json::parse(json, nullptr, false);
  return document.is_object() && document.contains("candidates");
}

StoredCandidate read_candidate(std::string_view json, std::string_view name, int rank) {
  const Json document = parsed(json, name);
  const Json& candidate = candidate_of(document, name, rank);
  const std::string path = at(name, "candidates[rank " + std::to_string(rank) + "]");
  StoredCandidate stored;
  stored.rank = rank;
  std::vector<Fault> faults;
  if (candidate.contains("device") && candidate["device"].is_string())
    stored.device = candidate["device"].get<std::string>();
  else
    faults.push_back({path + ".device", "", "the transistor's type", ""});
  PartReader reader(path + ".parts");
  if (candidate.contains("parts") && candidate["parts"].is_array()) {
    std::size_t position = 0;
    for (const Json& part : candidate["parts"]) reader.read(part, position++);
  } else {
    faults.push_back({path + ".parts", "", "an array of parts, each with role and value", ""});
  }
  stored.parts = reader.finish();
  faults.insert(faults.end(), reader.faults().begin(), reader.faults().end());
  if (!faults.empty()) throw InputError(faults);
  stored.has_figures = candidate.contains("figures") && candidate["figures"].is_object();
  if (stored.has_figures) stored.figures = figures_of(candidate);
  return stored;
}

Agreement compare(const StoredCandidate& stored, const Candidate& recomputed) {
  Agreement agreement;
  for (const FigureInfo& figure : figures()) {
    const double before = stored.figures[index(figure.figure)];
    const double offset = figure.dimension == Dimension::temperature ? kZeroCelsius : 0;
    const double now = shown_value(recomputed, figure) + offset;
    if (std::isnan(before) && std::isnan(now)) continue;
    ++agreement.compared;
    const double apart = difference(before, now);
    if (apart > kAgreementTolerance) agreement.differing.push_back(figure.figure);
    if (apart <= agreement.largest) continue;
    agreement.largest = apart;
    agreement.worst = figure.figure;
  }
  return agreement;
}

}  // namespace bandwright
