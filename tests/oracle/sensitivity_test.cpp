// Exact sensitivities to every cause against central differences of circuits that are changed by hand: gain, cutoffs
// and operating point through the oracle's whole chain in long double, every figure through the library's own analysis
// in double. The junction's rise is held in both.
#include <fmt/format.h>

#include <cmath>
#include <iostream>
#include <map>

#include "agreement.hpp"
#include "bias.hpp"
#include "catch.hpp"
#include "varied.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::BipolarParameters;
using bandwright::Cause;
using bandwright::Figure;
using bandwright::FigureValues;
using bandwright::index;
using bandwright::Sensitivity;

namespace {

// Central differences of a step h in ln x are off by h^2/6 of the third derivative and by the solves' noise over h.
constexpr double kSensitivity = 1e-6;
constexpr double kStep = 1e-5;
constexpr int kStages = 1000;

// Where a derivative jumps within the reach of the steps there is nothing to compare.
constexpr double kKink = 1e-3;
constexpr double kPlateau = 0.01;    // of d ln|H|/d ln f: a cutoff where the response creeps across the level runs away
constexpr double kMostKinks = 0.01;  // share of the stages, of each kind

constexpr double kMatters = 1e-3;  // an |S| that shows
constexpr int kLeastStages = 50;   // in which each cause must matter

const Figure kChain[] = {Figure::gain,
                         Figure::lower_cutoff,
                         Figure::upper_cutoff,
                         Figure::collector_current,
                         Figure::collector_emitter_voltage,
                         Figure::input_resistance};
using ChainValues = std::array<Real, std::size(kChain)>;

/// The figures of kChain, from bias to cutoffs in long double.
ChainValues chain(const RandomCircuit& c, const Edges& nominal, Real temperature) {
  const Bias b = solve_bias({widen(c.stage.parts), c.stage.around.supply, c.device.get(), 1}, temperature);
  Circuit x{widen(c.stage.parts), hybrid_pi(*c.device, b), c.stage.around, c.definition.from_input};
  const Edges e = edges_near(network(x), nominal, c.definition.frequency);
  x.from_input = false;
  x.around.source_resistance = std::numeric_limits<double>::infinity();
  const Real r_in = midband_network(x).impedance(0, input, ground).real();
  return {e.gain, e.lower.value_or(NAN), e.upper.value_or(NAN), b.i_c, b.v_ce, r_in};
}

/// (ln y(x e^h) - ln y(x e^-h))/(2h).
template <class Values>
Values central(const Values& up, const Values& down, double h) {
  Values d;
  for (std::size_t i = 0; i < d.size(); ++i) d[i] = std::log(up[i] / down[i]) / (2 * h);
  return d;
}

ChainValues chain_differences(const RandomCircuit& c, const Edges& nominal, double temperature, Cause cause) {
  const auto at = [&](double h) { return chain(varied(c, cause, std::exp(h)), nominal, temperature); };
  return central(at(kStep), at(-kStep), kStep);
}

/// Of every figure by the library: an error of h^2 taken out by a second step twice as long.
FigureValues differences(const RandomCircuit& held, Cause cause) {
  const auto at = [&](double h) {
    const RandomCircuit c = varied(held, cause, std::exp(h));
    return analyse(c.stage, c.definition).figures;
  };
  const FigureValues once = central(at(kStep), at(-kStep), kStep);
  const FigureValues twice = central(at(2 * kStep), at(-2 * kStep), 2 * kStep);
  FigureValues d;
  for (std::size_t i = 0; i < d.size(); ++i) d[i] = (4 * once[i] - twice[i]) / 3;
  return d;
}

bool at_curve_point(const BipolarParameters& q, double collector_current) {
  const double x = std::log(collector_current);
  const auto first = q.gain.log_current.begin();
  return q.gain.points > 1 &&
         std::any_of(first, first + q.gain.points, [x](double point) { return std::fabs(x - point) < kKink; });
}

bool at_transit_clamp(const BipolarParameters& q) {
  return q.transit_delay > 0 &&
         std::fabs(q.transit_delay - q.emitter_charging - q.feedback_charging) < kKink * q.transit_delay;
}

/// VCE near the least that the active region needs, which VBE (VCB = 0) is too; IC near 100 ICBO.
bool at_edge_of_active(const RandomCircuit& c, const Analysis& a) {
  const double least = std::max(c.device->saturation_voltage + 0.3, a.point.base_emitter_voltage);
  const double leakage = 100 * c.device->cutoff_current * std::exp2((a.point.junction_temperature - 298.15) / 10);
  return a.point.collector_emitter_voltage - least < kKink * c.stage.around.supply ||
         a.point.collector_current < (1 + kKink) * leakage;
}

bool on_plateau(const Edges& nominal) {
  const auto creeps = [](const std::optional<Real>& edge, Real slope) { return edge && std::abs(slope) < kPlateau; };
  return creeps(nominal.lower, nominal.lower_slope) || creeps(nominal.upper, nominal.upper_slope);
}

/// The first kink that the stage lies at; empty where it lies at none.
std::string kink(const RandomCircuit& c, const Edges& nominal, const Analysis& a) {
  if (at_transit_clamp(*c.device)) return "tauF at 0";
  if (at_edge_of_active(c, a)) return "edge of the active region";
  if (at_curve_point(*c.device, a.point.collector_current)) return "point of the hFE curve";
  if (on_plateau(nominal)) return "cutoff on a plateau";
  return "";
}

/// The swing is the smaller of two sides.
bool is_swing_kink(const Analysis& a, Figure figure) {
  const double sides = a.figures[index(Figure::swing_to_cutoff)] / a.figures[index(Figure::swing_to_saturation)];
  return (figure == Figure::output_swing || figure == Figure::input_overload) && std::fabs(sides - 1) < kKink;
}

/// What was compared, by kind of cause.
struct Findings {
  std::map<bandwright::CauseKind, Agreement> chained, analysed;
  std::map<std::string, int> kinks;
  std::array<int, bandwright::kCauseCount> matters{};
  int done = 0, drawn = 0, rising = 0, clamped = 0;
};

void compare(double found, double expected, const std::string& where, Agreement& agreement) {
  INFO(where << ": " << found << " against " << expected);
  CHECK(std::isnan(found) == std::isnan(expected));
  if (!std::isnan(found)) agreement.add(std::fabs(found - expected), where);
}

Agreement& agreement_of(std::map<bandwright::CauseKind, Agreement>& list, bandwright::CauseKind kind, const char* by) {
  static const std::map<bandwright::CauseKind, const char*> names = {
      {bandwright::CauseKind::part, "parts"},
      {bandwright::CauseKind::device, "device"},
      {bandwright::CauseKind::surroundings, "surroundings"}};
  return list.try_emplace(kind, fmt::format("S to {}, {}", names.at(kind), by)).first->second;
}

void compare_cause(const RandomCircuit& c, const Edges& nominal, const Analysis& a, const Sensitivity& s,
                   const bandwright::CauseInfo& cause, Findings& f) {
  const double temperature = a.point.junction_temperature;
  const std::size_t column = index(cause.cause);
  const auto where = [&](Figure figure) {
    return fmt::format("stage {} {} to {}", f.drawn, info(figure).key, cause.key);
  };
  Agreement& chained = agreement_of(f.chained, cause.kind, "long double chain");
  const ChainValues by_chain = chain_differences(c, nominal, temperature, cause.cause);
  for (std::size_t i = 0; i < std::size(kChain); ++i)
    compare(s[index(kChain[i])][column], static_cast<double>(by_chain[i]), where(kChain[i]), chained);
  Agreement& analysed = agreement_of(f.analysed, cause.kind, "analysis");
  const FigureValues by_analysis = differences(held_at(c, temperature), cause.cause);
  bool matters = false;
  for (const bandwright::FigureInfo& figure : bandwright::figures()) {
    if (is_swing_kink(a, figure.figure)) continue;
    const double found = s[index(figure.figure)][column];
    compare(found, by_analysis[index(figure.figure)], where(figure.figure), analysed);
    matters = matters || std::fabs(found) > kMatters;
  }
  f.matters[column] += matters;
}

void compare_stage(const RandomCircuit& c, const Edges& nominal, const Analysis& a, Findings& f) {
  f.rising += nominal.rises_to_the_end;
  f.clamped += c.device->transit_deficit > 0;
  f.kinks["sides of the swing equal"] += is_swing_kink(a, Figure::output_swing);
  const Sensitivity s =
      sensitivity(c.stage, a, c.definition, bandwright::ResponseModel::exact, bandwright::all_causes());
  for (const bandwright::CauseInfo& cause : bandwright::causes())
    if (is_there(c, cause.cause)) compare_cause(c, nominal, a, s, cause, f);
}

void report(const Findings& f) {
  std::cout << fmt::format("sensitivities, absolute: {} stages, {} rising to the end, {} with tauF at 0\n", f.done,
                           f.rising, f.clamped);
  for (const auto& [what, count] : f.kinks) {
    std::cout << fmt::format("  left out, {}: {}\n", what, count);
    CHECK(count <= kMostKinks * f.done);
  }
  for (const auto* list : {&f.chained, &f.analysed}) {
    for (const auto& [kind, agreement] : *list) {
      std::cout << "  " << agreement.summary() << "\n";
      INFO(agreement.summary() << " in " << agreement.worst_where());
      CHECK(agreement.worst() <= kSensitivity);
    }
  }
  for (const bandwright::CauseInfo& cause : bandwright::causes()) {
    INFO(cause.key);
    CHECK(f.matters[index(cause.cause)] >= kLeastStages);
  }
}

}  // namespace

TEST_CASE("sensitivities to every cause against central differences", "[oracle][sensitivity]") {
  Findings f;
  CircuitSource source(6001, Breadth::ordinary);
  for (; f.done < kStages; ++f.drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    if (a.point.state != BiasState::active) continue;
    const Network net = network({widen(c.stage.parts), widen(a.small), c.stage.around, c.definition.from_input});
    const Edges nominal = edges(net, c.definition.frequency);
    const std::string at = kink(c, nominal, a);
    if (!at.empty()) {
      ++f.kinks[at];
      continue;
    }
    compare_stage(c, nominal, a, f);
    ++f.done;
  }
  report(f);
}
