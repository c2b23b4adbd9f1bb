#include "report/shown_causes.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "numeric/elementary.hpp"
#include "report/shown_figures.hpp"

namespace bandwright {

namespace {

// What the spec says of the surroundings; load resistance as conductance, since an open load varies nothing.
double stated(const Spec& spec, Cause cause) {
  const std::pair<Cause, double> rows[] = {
      {Cause::source_resistance, spec.source.resistance},
      {Cause::source_capacitance, spec.source.capacitance},
      {Cause::load_resistance, spec.load.conductance},
      {Cause::load_capacitance, spec.load.capacitance},
      {Cause::stray_input, spec.stray.input},
      {Cause::stray_output, spec.stray.output},
      {Cause::stray_feedback, spec.stray.feedback},
  };
  const auto found =
      std::find_if(std::begin(rows), std::end(rows), [&](const auto& row) { return row.first == cause; });
  return found == std::end(rows) ? 0 : found->second;
}

bool has_part(const Candidate& candidate, Cause cause) {
  return std::any_of(candidate.parts.begin(), candidate.parts.end(),
                     [&](const Part& one) { return cause_of(one.role) == cause; });
}

std::string factors_text(const CauseSpread& spread) {
  return fmt::format("x{:.3g} to x{:.3g}", e_to(spread.low()), e_to(spread.high()));
}

std::string volts_text(const CauseSpread& spread) {
  const auto text = [](double volts) { return format_quantity(volts, Dimension::voltage, 3); };
  if (spread.low() == -spread.high()) return fmt::format("±{}", text(spread.high()));
  return fmt::format("{} to {}{}", text(spread.low()), spread.high() > 0 ? "+" : "", text(spread.high()));
}

}  // namespace

std::string shown_key(const CauseInfo& cause) { return cause.kind == CauseKind::part ? cause.symbol : cause.key; }

std::string cause_name(const CauseInfo& cause) { return fmt::format("{} {}", cause.symbol, cause.label); }

bool is_there(const CauseInfo& cause, const Candidate& candidate, const Spec& spec) {
  if (cause.kind == CauseKind::device) return true;
  if (cause.kind == CauseKind::part) return has_part(candidate, cause.cause);
  const bool varies = candidate.assessment && candidate.assessment->population.spread[index(cause.cause)].varies();
  return varies || stated(spec, cause.cause) != 0;
}

std::string limits_text(const CauseInfo& cause, const CauseSpread& spread) {
  if (cause.scale == CauseScale::logarithm) return factors_text(spread);
  if (cause.scale == CauseScale::volts) return volts_text(spread);
  return tolerance_text({0 - spread.low(), spread.high()});
}

const char* distribution_text(const Population& population) {
  return population.uniform ? "uniform" : "normal, 3 sigma at the limits, truncated there";
}

}  // namespace bandwright
