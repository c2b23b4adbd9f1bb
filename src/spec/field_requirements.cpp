// Requirements: target, tolerance, min and max of every figure that may be required.
#include <algorithm>
#include <array>

#include "spec/field_groups.hpp"
#include "spec/shown_value.hpp"

namespace bandwright {

namespace {

// What a stage of this kind can be asked for, by dimension.
struct Asked {
  Dimension dimension;
  ValueRange range;
};
constexpr std::array kAsked = {
    Asked{Dimension::gain, {1e-3, 1e6}},        Asked{Dimension::frequency, {1e-3, 1e11}},
    Asked{Dimension::resistance, {1e-3, 1e10}}, Asked{Dimension::voltage, {1e-9, 1e3}},
    Asked{Dimension::current, {1e-12, 100}},    Asked{Dimension::power, {1e-12, 1e3}},
    Asked{Dimension::money, {1e-6, 1e9}},
};
constexpr ValueRange kTolerance = {1e-6, 10};

ValueRange asked(Dimension dimension) {
  const auto row =
      std::find_if(kAsked.begin(), kAsked.end(), [&](const Asked& one) { return one.dimension == dimension; });
  return row == kAsked.end() ? ValueRange{-kUnlimited, kUnlimited} : row->range;
}

std::string path_of(const FigureInfo& figure, const char* member) {
  return std::string("requirements.") + figure.key + "." + member;
}

using DraftEnd = std::optional<double> RequirementDraft::*;

Field end(const FigureInfo& figure, const char* member, const char* help, DraftEnd draft_end,
          double Requirement::*shown) {
  const std::size_t at = index(figure.figure);
  return {.path = path_of(figure, member),
          .option = option_of(path_of(figure, member)),
          .shape = Shape::quantity,
          .dimension = figure.dimension,
          .allowed = asked(figure.dimension),
          .help = std::string(figure.label) + ": " + help +
                  (figure.dimension == Dimension::gain ? ", a ratio or in dB" : ""),
          .direct = figure.figure == Figure::collector_emitter_voltage,
          .store = [=](Draft& draft, const Reading& reading) { draft.requirements[at].*draft_end = reading.number; },
          .show =
              [=](const Spec& spec) {
                const auto& requirement = spec.requirements[at];
                return requirement ? shown_number(*requirement.*shown) : Json(nullptr);
              }};
}

std::string default_tolerance(const FigureInfo& figure) {
  if (figure.dimension == Dimension::gain) return "1 dB where there is neither min nor max";
  return format_quantity(100 * figure.default_tolerance, Dimension::fraction) + " % where there is neither min nor max";
}

Field tolerance(const FigureInfo& figure) {
  const std::size_t at = index(figure.figure);
  return {.path = path_of(figure, "tolerance"),
          .option = option_of(path_of(figure, "tolerance")),
          .shape = Shape::tolerance,
          .dimension = figure.dimension,
          .allowed = kTolerance,
          .help = std::string(figure.label) + ": tolerance about the target",
          .usual = default_tolerance(figure),
          .store = [=](Draft& draft, const Reading& reading) { draft.requirements[at].tolerance = reading.tolerance; }};
}

Field gain_from() {
  return {.path = "requirements.gain.from",
          .option = "gain-from",
          .shape = Shape::word,
          .help = "gain and cutoffs from the source's EMF (source) or from the node behind RS (input)",
          .usual = "source",
          .words = {"source", "input"},
          .store = [](Draft& draft, const Reading& r) { draft.spec.gain_from_input = r.text == "input"; },
          .show =
              [](const Spec& spec) {
                const bool said = spec.requirement(Figure::gain) || spec.gain_from_input || spec.gain_at;
                return said ? Json(spec.gain_from_input ? "input" : "source") : Json(nullptr);
              }};
}

Field gain_at() {
  return {.path = "requirements.gain.at",
          .option = "gain-at",
          .shape = Shape::quantity,
          .dimension = Dimension::frequency,
          .allowed = asked(Dimension::frequency),
          .help = "frequency at which the gain is meant",
          .usual = "the peak of the response",
          .store = [](Draft& draft, const Reading& reading) { draft.spec.gain_at = reading.number; },
          .show = [](const Spec& spec) { return spec.gain_at ? Json(*spec.gain_at) : Json(nullptr); }};
}

}  // namespace

std::vector<Field> requirement_fields() {
  std::vector<Field> rows;
  for (const FigureInfo& figure : figures()) {
    if (figure.use != FigureUse::required) continue;
    rows.push_back(end(figure, "target", "what is wanted", &RequirementDraft::target, &Requirement::target));
    rows.back().bare = true;
    rows.push_back(tolerance(figure));
    rows.push_back(end(figure, "min", "lower limit", &RequirementDraft::min, &Requirement::lower));
    rows.push_back(end(figure, "max", "upper limit", &RequirementDraft::max, &Requirement::upper));
    if (figure.figure != Figure::gain) continue;
    rows.push_back(gain_from());
    rows.push_back(gain_at());
  }
  return rows;
}

}  // namespace bandwright
