#include <algorithm>
#include <bandwright/cause.hpp>

namespace bandwright {

namespace {

using enum CauseKind;
using enum CauseScale;

constexpr std::array<CauseInfo, kCauseCount> kCauses = {{
    {Cause::upper_divider, part, share, "upper_divider", "R1", "upper divider"},
    {Cause::lower_divider, part, share, "lower_divider", "R2", "lower divider"},
    {Cause::collector, part, share, "collector", "R3", "collector"},
    {Cause::emitter, part, share, "emitter", "R4", "emitter"},
    {Cause::emitter_bypassed, part, share, "emitter_bypassed", "R5", "emitter, bypassed"},
    {Cause::input_coupling, part, share, "input_coupling", "C1", "input coupling"},
    {Cause::output_coupling, part, share, "output_coupling", "C2", "output coupling"},
    {Cause::bypass, part, share, "bypass", "C3", "bypass"},
    {Cause::shunt, part, share, "shunt", "C4", "shunt"},
    {Cause::current_gain, device, logarithm, "current_gain", "hFE", "current gain"},
    {Cause::early_voltage, device, logarithm, "early_voltage", "VA", "Early voltage"},
    {Cause::feedback_capacitance, device, logarithm, "feedback_capacitance", "Cmu", "feedback capacitance"},
    {Cause::emitter_capacitance, device, logarithm, "emitter_capacitance", "Cje", "emitter depletion capacitance"},
    {Cause::transition_frequency, device, logarithm, "transition_frequency", "fT", "transition frequency"},
    {Cause::base_resistance, device, logarithm, "base_resistance", "rbb'", "base resistance"},
    {Cause::cutoff_current, device, logarithm, "cutoff_current", "ICBO", "collector cutoff current"},
    {Cause::base_emitter_voltage, device, volts, "base_emitter_voltage", "VBE", "base-emitter voltage"},
    {Cause::source_resistance, surroundings, share, "source_resistance", "RS", "source resistance"},
    {Cause::source_capacitance, surroundings, share, "source_capacitance", "Cs", "source capacitance"},
    {Cause::load_resistance, surroundings, share, "load_resistance", "RL", "load resistance"},
    {Cause::load_capacitance, surroundings, share, "load_capacitance", "CL", "load capacitance"},
    {Cause::stray_input, surroundings, share, "stray_input", "Cwi", "wiring capacitance at the base"},
    {Cause::stray_output, surroundings, share, "stray_output", "Cwo", "wiring capacitance at the collector"},
    {Cause::stray_feedback, surroundings, share, "stray_feedback", "Cwf", "wiring capacitance, collector to base"},
}};

constexpr bool in_enum_order() {
  for (std::size_t i = 0; i < kCauses.size(); ++i)
    if (index(kCauses[i].cause) != i || (i < kRoleCount) != (kCauses[i].kind == part)) return false;
  return true;
}
static_assert(in_enum_order());

}  // namespace

const std::array<CauseInfo, kCauseCount>& causes() { return kCauses; }

const CauseInfo& info(Cause cause) { return kCauses[index(cause)]; }

std::optional<Cause> find_cause(std::string_view key) {
  const auto found = std::find_if(kCauses.begin(), kCauses.end(),
                                  [&](const CauseInfo& row) { return key == row.key || key == row.symbol; });
  if (found == kCauses.end()) return std::nullopt;
  return found->cause;
}

}  // namespace bandwright
