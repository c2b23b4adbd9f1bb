#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "spec/resolve.hpp"

namespace bandwright {

namespace {

constexpr std::array kNeeded = {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff};

std::string path_of(Figure figure) { return std::string("requirements.") + info(figure).key; }

std::string shown(double value, Figure figure) { return format_quantity(value, info(figure).dimension, 6); }

// Sides about the target: a tolerance alone is a ratio, so that its two sides are equally far away.
void set_sides(Requirement& out, const RequirementDraft& draft, const FigureInfo& figure) {
  if (!draft.tolerance && (draft.min || draft.max)) return;
  const WrittenTolerance t =
      draft.tolerance.value_or(WrittenTolerance{{figure.default_tolerance, figure.default_tolerance}, false});
  const double lower = t.asymmetric ? out.target * (1 - t.value.below) : out.target / (1 + t.value.above);
  if (!draft.min) out.lower = lower;
  if (!draft.max) out.upper = out.target * (1 + t.value.above);
}

void check_limits(const Requirement& r, const FigureInfo& figure, Statements& statements) {
  const std::string path = path_of(figure.figure);
  const std::string min = path + ".min", max = path + ".max";
  // Where a limit was not stated it follows from the target, and the other one is to blame.
  const std::string& blamed = statements.find(min) ? min : max;
  if (r.lower >= r.upper) {
    const bool is_min = blamed == min;
    statements.object(blamed, fmt::format("{} {}, {}", is_min ? "less than" : "more than", is_min ? "max" : "min",
                                          shown(is_min ? r.upper : r.lower, figure.figure)));
    return;
  }
  if (r.target < r.lower)
    statements.object(path + ".target", "a target of at least min, " + shown(r.lower, figure.figure));
  if (r.target > r.upper)
    statements.object(path + ".target", "a target of at most max, " + shown(r.upper, figure.figure));
}

Requirement resolved(const RequirementDraft& draft, const FigureInfo& figure, Statements& statements) {
  Requirement out;
  out.target = draft.target.value_or(kNotComputed);
  out.lower = draft.min.value_or(kNotComputed);
  out.upper = draft.max.value_or(kNotComputed);
  if (draft.target) set_sides(out, draft, figure);
  if (draft.tolerance && !draft.target)
    statements.object(path_of(figure.figure) + ".tolerance", "a target beside the tolerance");
  check_limits(out, figure, statements);
  return out;
}

// Of gain, `from` and `at` alone say how it is meant, and ask for nothing.
bool only_defines(const Statements& statements, Figure figure) {
  return figure == Figure::gain &&
         (statements.find("requirements.gain.from") || statements.find("requirements.gain.at"));
}

bool is_needed(Figure figure, SpecUse use) {
  return use == SpecUse::design && std::find(kNeeded.begin(), kNeeded.end(), figure) != kNeeded.end();
}

void resolve_one(Draft& draft, Statements& statements, const FigureInfo& figure, SpecUse use) {
  const RequirementDraft& said = draft.requirements[index(figure.figure)];
  const std::string path = path_of(figure.figure);
  if (statements.spoiled(path)) return;
  if (!said.empty()) {
    draft.spec.requirements[index(figure.figure)] = resolved(said, figure, statements);
    return;
  }
  const bool asks_nothing = only_defines(statements, figure.figure) || !statements.touched(path);
  if (is_needed(figure.figure, use) || !asks_nothing)
    statements.object(path, "a target, min or max: " + describe_dimension(figure.dimension));
}

double first_of(double a, double b, double c) { return !std::isnan(a) ? a : !std::isnan(b) ? b : c; }

// The cutoffs as targets, or as the limits that stand in for them.
struct Edges {
  double lower = kNotComputed, upper = kNotComputed;
};
Edges edges(const Spec& spec) {
  Edges out;
  if (const auto& r = spec.requirement(Figure::lower_cutoff)) out.lower = first_of(r->target, r->upper, r->lower);
  if (const auto& r = spec.requirement(Figure::upper_cutoff)) out.upper = first_of(r->target, r->lower, r->upper);
  return out;
}

void check_frequency_of_gain(const Spec& spec, Statements& statements) {
  if (!spec.gain_at) return;
  const Edges band = edges(spec);
  if (!(*spec.gain_at <= band.lower) && !(*spec.gain_at >= band.upper)) return;
  const auto end = [](double f) { return std::isnan(f) ? std::string("any") : shown(f, Figure::lower_cutoff); };
  statements.object("requirements.gain.at",
                    fmt::format("a frequency between the two cutoffs, {} and {}", end(band.lower), end(band.upper)));
}

// Impossible by definition: the lower cutoff lies under the upper one.
void check_band(const Spec& spec, Statements& statements) {
  const auto& lower = spec.requirement(Figure::lower_cutoff);
  const auto& upper = spec.requirement(Figure::upper_cutoff);
  if (!lower || !upper) return;
  const bool targets_crossed = lower->target >= upper->target;
  if (!targets_crossed && !(lower->lower >= upper->upper)) return;
  const std::string path = "requirements.lower_cutoff" + std::string(targets_crossed ? ".target" : ".min");
  statements.object(path, "a lower cutoff under the upper cutoff, " +
                              shown(targets_crossed ? upper->target : upper->upper, Figure::upper_cutoff));
}

}  // namespace

void resolve_requirements(Draft& draft, Statements& statements, SpecUse use) {
  for (const FigureInfo& figure : figures())
    if (figure.use == FigureUse::required) resolve_one(draft, statements, figure, use);
  if (statements.spoiled("requirements")) return;
  check_frequency_of_gain(draft.spec, statements);
  check_band(draft.spec, statements);
}

}  // namespace bandwright
