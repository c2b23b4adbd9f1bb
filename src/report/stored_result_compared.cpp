// Reads candidates of a result document to be set beside others: what it states, and nothing recomputed.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/report.hpp>
#include <cmath>

#include "report/shown_figures.hpp"
#include "report/stored_result_fields.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr const char* kFormat = "bandwright/result";
constexpr int kVersion = 1;
constexpr std::size_t kMostUsual = 5;  // candidates beside each other where nobody picked any
constexpr const char* kNotStated = "not stated by the document";

// Fields whose absence is noted; documents of earlier versions have null or nothing there.
constexpr std::array kNoted = {"variant",    "non_dominated", "error",      "tolerance_sensitivity",
                               "capability", "yield",         "worst_case", "verdict"};

// Kelvin, as everywhere inside, of a value in the unit of shown_key.
double inside(double shown, const FigureInfo& figure) {
  return figure.dimension == Dimension::temperature ? shown + kZeroCelsius : shown;
}

FigureValues figure_values(const std::optional<StoredFields>& fields) {
  FigureValues values;
  values.fill(kNotComputed);
  if (!fields) return values;
  for (const FigureInfo& figure : figures())
    values[index(figure.figure)] = inside(fields->number(shown_key(figure)), figure);
  return values;
}

Tolerance read_tolerance(const StoredFields& part) {
  const std::vector<double> ends = part.numbers("tolerance");
  if (ends.size() == 2) return {-ends[0], ends[1]};
  if (part.states("tolerance")) part.object_to("tolerance", "two numbers, such as [-0.01, 0.01]");
  return {kNotComputed, kNotComputed};
}

std::optional<Part> read_part(const StoredFields& fields) {
  const auto role = find_role(fields.text("role"));
  Part part;
  part.value = fields.number("value");
  if (!role) fields.object_to("role", "a role such as upper_divider");
  if (!(part.value > 0)) fields.object_to("value", "a number above 0, in ohm or farad");
  if (!role) return std::nullopt;
  part.role = *role;
  part.code = fields.text("value_code");
  part.series = fields.text("series");
  part.tolerance = read_tolerance(fields);
  part.family = fields.text("family");
  part.power_rating = fields.number("power_rating");
  part.voltage_rating = fields.number("voltage_rating");
  part.polarity = fields.text("polarity");
  part.part_number = fields.text("part_number");
  return part;
}

std::optional<Connection> connection_of(const StoredFields& part) {
  const std::string name = part.text("connection");
  for (const Connection connection : {Connection::series, Connection::parallel})
    if (name == word(connection)) return connection;
  return std::nullopt;
}

/// Two parts of a role as one: "47K+1K" in series, "47K||1K" in parallel.
void join_pair(Part& first, const Part& second, Connection connection) {
  first.connection = connection;
  first.value = paired_value(info(first.role).kind, connection, first.value, second.value);
  first.code += (connection == Connection::series ? "+" : "||") + second.code;
  first.series.clear();
}

std::vector<Part> read_parts(const StoredFields& candidate) {
  std::vector<Part> parts;
  candidate.demand("parts", "an array of parts, each with role and value");
  for (const StoredFields& fields : candidate.objects("parts")) {
    const auto part = read_part(fields);
    if (!part) continue;
    const auto same =
        std::find_if(parts.begin(), parts.end(), [&](const Part& other) { return other.role == part->role; });
    if (same == parts.end()) {
      parts.push_back(*part);
    } else if (const auto connection = connection_of(fields)) {
      join_pair(*same, *part, *connection);
    } else {
      fields.object_to("role", "each role once, or two parts with their connection");
    }
  }
  return parts;
}

void read_capability(const StoredFields& candidate, Assessment& assessment) {
  const auto fields = candidate.object("capability");
  if (!fields) return;
  const FigureValues values = figure_values(fields);
  for (std::size_t i = 0; i < kFigureCount; ++i) assessment.spread[i].capability = values[i];
  assessment.capability = fields->number("smallest");
  assessment.from_moments = fields->flag("from_moments").value_or(false);
}

Yield read_yield(const StoredFields& candidate) {
  Yield yield;
  const auto fields = candidate.object("yield");
  if (!fields) return yield;
  for (const char* key : {"passed", "units"}) fields->demand(key, "a whole number");
  yield.units = fields->count("units").value_or(0);
  yield.passed = fields->count("passed").value_or(0);
  if (yield.passed > yield.units) fields->object_to("passed", "at most as many as there are units");
  yield.low = fields->number("low");
  yield.high = fields->number("high");
  yield.seed = fields->count("seed").value_or(0);
  yield.not_active = fields->count("not_active").value_or(0);
  return yield;
}

WorstCase read_ends(const StoredFields& fields, const FigureInfo& figure) {
  WorstCase worst;
  worst.min = inside(fields.number("min"), figure);
  worst.max = inside(fields.number("max"), figure);
  worst.at_min = fields.text("at_min");
  worst.at_max = fields.text("at_max");
  return worst;
}

Assessment read_assessment(const StoredFields& candidate) {
  Assessment assessment;
  read_capability(candidate, assessment);
  assessment.yield = read_yield(candidate);
  assessment.worst_case_margin = candidate.number("worst_case_margin");
  if (const auto fields = candidate.object("worst_case"))
    for (const FigureInfo& figure : figures())
      if (const auto ends = fields->object(shown_key(figure)))
        assessment.worst_case[index(figure.figure)] = read_ends(*ends, figure);
  if (const auto fields = candidate.object("verdict")) {
    assessment.verdict = fields->text("overall");
    assessment.nominal_met = fields->flag("nominal").value_or(false);
    assessment.worst_case_met = fields->flag("worst_case").value_or(false);
  }
  return assessment;
}

std::vector<Shortfall> read_shortfalls(const StoredFields& candidate) {
  std::vector<Shortfall> list;
  for (const StoredFields& fields : candidate.objects("shortfalls")) {
    const auto figure = find_figure(fields.text("figure"));
    if (!figure) fields.object_to("figure", "a figure such as lower_cutoff");
    list.push_back(
        {figure.value_or(Figure::gain), fields.number("value"), fields.number("limit"), fields.text("text")});
  }
  return list;
}

std::map<std::string, std::string> read_notes(const StoredFields& candidate) {
  std::map<std::string, std::string> notes;
  if (const auto fields = candidate.object("notes")) notes = fields->texts_by_key();
  for (const char* key : kNoted)
    if (!candidate.states(key)) notes.try_emplace(key, kNotStated);
  return notes;
}

Candidate read_stated(const StoredFields& fields) {
  Candidate one;
  for (const char* key : {"rank", "device"}) fields.demand(key, "the candidate's " + std::string(key));
  one.rank = static_cast<int>(fields.count("rank").value_or(0));
  one.device = fields.text("device");
  one.variant = fields.text("variant");
  one.best_at = fields.texts("best_at");
  one.non_dominated = fields.flag("non_dominated").value_or(false);
  one.parts = read_parts(fields);
  one.analysis.figures = figure_values(fields.object("figures"));
  one.margins = figure_values(fields.object("margins"));
  one.error = fields.number("error");
  one.tolerance_sensitivity = fields.number("tolerance_sensitivity");
  one.shortfalls = read_shortfalls(fields);
  one.assessment = read_assessment(fields);
  one.notes = read_notes(fields);
  return one;
}

bool is_result_document(const StoredFields& document) {
  const bool is_format = document.text("format") == kFormat;
  const bool is_version = document.count("version") == kVersion;
  if (!is_format) document.object_to("format", fmt::format("{}, as design and check write it", kFormat));
  if (is_format && !is_version) document.object_to("version", fmt::format("{}, of the result document", kVersion));
  return is_format && is_version;
}

// Faults of readers that know the document by no name.
void add_named(std::vector<Fault>& faults, std::string_view name, const std::vector<Fault>& nameless) {
  for (Fault fault : nameless) {
    if (!fault.where.starts_with(name)) fault.where = fmt::format("{}: {}", name, fault.where);
    faults.push_back(fault);
  }
}

Spec spec_of(std::string_view json, std::string_view name, std::vector<Fault>& faults) {
  try {
    return read_spec(json, name, {}, SpecUse::check, true);
  } catch (const InputError& error) {
    add_named(faults, name, error.faults());
  }
  return {};
}

bool is_titled(const Candidate& one) { return !one.best_at.empty(); }
bool is_any(const Candidate&) { return true; }

// Where nobody picked any: the first, then those that none beats in every respect, then those with a title; never fewer
// than two where there are two.
std::vector<int> usual_ranks(const std::vector<Candidate>& all) {
  std::vector<int> ranks;
  const auto take = [&](bool (*is_wanted)(const Candidate&), std::size_t most) {
    for (const Candidate& one : all)
      if (ranks.size() < most && is_wanted(one) && std::find(ranks.begin(), ranks.end(), one.rank) == ranks.end())
        ranks.push_back(one.rank);
  };
  take(is_any, 1);
  take([](const Candidate& one) { return one.non_dominated; }, kMostUsual);
  take(is_titled, kMostUsual);
  take(is_any, 2);
  std::sort(ranks.begin(), ranks.end());
  return ranks;
}

Fault no_such_rank(std::string_view name, int rank, std::size_t listed) {
  return {fmt::format("{}: candidates", name), fmt::format("no candidate of rank {}", rank),
          listed == 0 ? std::string("at least one candidate") : fmt::format("a rank from 1 to {}", listed), ""};
}

std::vector<Candidate> read_candidates(const StoredFields& document) {
  std::vector<Candidate> all;
  document.demand("candidates", "an array of candidates");
  for (const StoredFields& fields : document.objects("candidates")) all.push_back(read_stated(fields));
  return all;
}

}  // namespace

std::vector<ComparedCandidate> read_compared(std::string_view json, std::string_view name,
                                             const std::vector<int>& ranks) {
  std::vector<Fault> faults, nameless;
  const auto text = read_document(json, name, nameless);
  add_named(faults, name, nameless);
  if (text && !text->is_object()) faults.push_back({std::string(name), found_text(*text), "a result document", ""});
  if (!faults.empty()) throw InputError(faults);
  const StoredFields document(*text, fmt::format("{}: ", name), faults);
  if (!is_result_document(document)) throw InputError(faults);
  const Spec spec = spec_of(json, name, faults);
  const std::vector<Candidate> all = read_candidates(document);
  std::vector<ComparedCandidate> chosen;
  if (all.empty()) faults.push_back(no_such_rank(name, 1, 0));
  for (const int rank : ranks.empty() ? usual_ranks(all) : ranks) {
    const auto one = std::find_if(all.begin(), all.end(), [&](const Candidate& c) { return c.rank == rank; });
    if (one != all.end())
      chosen.push_back({std::string(name), all.size(), spec, *one});
    else if (!all.empty())
      faults.push_back(no_such_rank(name, rank, all.size()));
  }
  if (!faults.empty()) throw InputError(faults);
  return chosen;
}

}  // namespace bandwright
