#include <algorithm>
#include <bandwright/margins.hpp>
#include <cmath>
#include <limits>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr double kLeastDistance = 1e-3;  // a limit equal to the target counts as this far away, relative

bool given(double x) { return !std::isnan(x); }

double default_width(const FigureInfo& f) { return ln(1 + f.default_tolerance); }

double log_distance(double from, double to) { return std::max(ln(to / from), ln(1 + kLeastDistance)); }

/// Gain, frequencies and resistances are judged by ratio, everything else by difference.
bool by_ratio(const FigureInfo& f) {
  return f.dimension == Dimension::gain || f.dimension == Dimension::frequency || f.dimension == Dimension::resistance;
}

double side_margin(double distance, double whole, double least) { return distance / std::max(whole, least); }

double margin_with_target(const Requirement& r, const FigureInfo& f, double x) {
  const bool ratio = by_ratio(f);
  const auto scale = [ratio](double v) { return ratio ? ln(v) : v; };
  const double least = ratio ? ln(1 + kLeastDistance) : kLeastDistance * std::fabs(r.target);
  double m = std::numeric_limits<double>::infinity();
  if (given(r.upper)) m = std::min(m, side_margin(scale(r.upper) - scale(x), scale(r.upper) - scale(r.target), least));
  if (given(r.lower)) m = std::min(m, side_margin(scale(x) - scale(r.lower), scale(r.target) - scale(r.lower), least));
  return m;
}

}  // namespace

bool meets(const Requirement& r, double x) {
  if (!given(x)) return false;
  return !(given(r.lower) && x < r.lower) && !(given(r.upper) && x > r.upper);
}

bool meets_at_limit(Figure cutoff, bool upper_limit, double ratio) {
  const bool inside_is_high = (cutoff == Figure::lower_cutoff) == upper_limit;
  return inside_is_high ? ratio >= 1 : ratio <= 1;
}

Deviation deviation(const Requirement& r, const FigureInfo& f, double x) {
  if (given(r.target)) {
    const bool above = x > r.target;
    const double limit = above ? r.upper : r.lower;
    double width = default_width(f);
    if (given(limit)) width = above ? log_distance(r.target, limit) : log_distance(limit, r.target);
    return {ln(x / r.target) / width, 1 / width};
  }
  if (meets(r, x)) return {};
  const double limit = given(r.upper) && x > r.upper ? r.upper : r.lower;
  return {ln(x / limit) / default_width(f), 1 / default_width(f)};
}

double requirement_error(const Requirement& r, const FigureInfo& f, double x) {
  if (!given(x) || !(x > 0)) return kWorstError;
  const double distance = std::fabs(deviation(r, f, x).value);
  if (!given(r.target)) return meets(r, x) ? 0 : 1 + distance;
  const bool open_side = !given(x > r.target ? r.upper : r.lower);
  return open_side ? std::min(distance, 1.0) : distance;
}

double requirement_margin(const Requirement& r, const FigureInfo& f, double x) {
  if (!given(x)) return kNotComputed;
  if (given(r.target)) return margin_with_target(r, f, x);
  double m = std::numeric_limits<double>::infinity();
  if (given(r.upper)) m = std::min(m, (r.upper - x) / std::fabs(r.upper));
  if (given(r.lower)) m = std::min(m, (x - r.lower) / std::fabs(r.lower));
  return m;
}

double window_width(const Requirement& r, const FigureInfo& f) {
  if (given(r.target)) {
    double w = std::numeric_limits<double>::infinity();
    if (given(r.upper)) w = std::min(w, log_distance(r.target, r.upper));
    if (given(r.lower)) w = std::min(w, log_distance(r.lower, r.target));
    return std::isfinite(w) ? w : default_width(f);
  }
  if (given(r.lower) && given(r.upper)) return ln(r.upper / r.lower) / 2;
  return default_width(f);
}

double error(const Spec& spec, const FigureValues& values) {
  double largest = 0;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (r) largest = std::max(largest, requirement_error(*r, f, values[index(f.figure)]));
  }
  return largest;
}

bool meets_all(const Spec& spec, const FigureValues& values) { return shortfalls(spec, values).empty(); }

std::vector<Shortfall> shortfalls(const Spec& spec, const FigureValues& values) {
  std::vector<Shortfall> list;
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    const double x = values[index(f.figure)];
    if (!r || meets(*r, x)) continue;
    Shortfall s;
    s.figure = f.figure;
    s.value = x;
    const bool high = given(r->upper) && x > r->upper;
    s.limit = high || !given(r->lower) ? r->upper : r->lower;
    const bool at_most = high || !given(r->lower);
    s.text = std::string(f.label) + ": " + (given(x) ? format_quantity(x, f.dimension) : "none") + ", needs at " +
             (at_most ? "most " : "least ") + format_quantity(s.limit, f.dimension);
    if (given(x) && x > 0) {
      const double ratio = x / s.limit;
      s.text += f.dimension == Dimension::gain
                    ? " (" + format_quantity(std::fabs(20 * std::log10(ratio)), Dimension::fraction, 3) + " dB " +
                          (at_most ? "over)" : "short)")
                    : " (" + format_quantity(std::fabs(ratio - 1) * 100, Dimension::fraction, 3) + " % " +
                          (at_most ? "over)" : "short)");
    }
    list.push_back(std::move(s));
  }
  return list;
}

}  // namespace bandwright
