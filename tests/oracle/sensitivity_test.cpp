// Exact sensitivities against central differences: gain, cutoffs and operating point through the oracle's whole chain
// in long double, every figure through the library's own analysis in double. The junction's rise is held in both.
#include <fmt/format.h>

#include <cmath>
#include <iostream>

#include "agreement.hpp"
#include "bias.hpp"
#include "catch.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;
using bandwright::Figure;
using bandwright::FigureValues;
using bandwright::index;
using bandwright::Role;
using bandwright::Sensitivity;

namespace {

// Central differences of a step h in ln x are off by h^2/6 of the third derivative and by the solves' noise over h.
constexpr double kSensitivity = 1e-6;
constexpr double kStep = 1e-5;
constexpr double kKink = 1e-3;  // the swing's two sides this near to each other have no derivative
constexpr int kStages = 300;

using Cause = std::size_t;
constexpr Cause kGainMultiplier = bandwright::kRoleCount;

bool varies(const RandomCircuit& c, Cause cause) { return cause == kGainMultiplier || c.stage.parts[cause] > 0; }

const Figure kChain[] = {Figure::gain,
                         Figure::lower_cutoff,
                         Figure::upper_cutoff,
                         Figure::collector_current,
                         Figure::collector_emitter_voltage,
                         Figure::input_resistance};

/// The figures of kChain at a factor on one cause, from bias to cutoffs in long double.
std::array<Real, std::size(kChain)> chain(const RandomCircuit& c, const Edges& nominal, Real temperature, Cause cause,
                                          Real factor) {
  BiasNetwork bias{widen(c.stage.parts), c.stage.around.supply, c.device.get(), 1};
  (cause == kGainMultiplier ? bias.gain_multiplier : bias.parts[cause]) *= factor;
  const Bias b = solve_bias(bias, temperature);
  Circuit x{bias.parts, hybrid_pi(*c.device, b), c.stage.around, c.definition.from_input};
  const Edges e = edges_near(network(x), nominal, c.definition.frequency);
  x.from_input = false;
  x.around.source_resistance = std::numeric_limits<double>::infinity();
  const Real r_in = midband_network(x).impedance(0, input, ground).real();
  return {e.gain, e.lower.value_or(NAN), e.upper.value_or(NAN), b.i_c, b.v_ce, r_in};
}

/// The library's figures with the junction held and a factor on one cause.
FigureValues held(const RandomCircuit& c, double temperature, Cause cause, double factor) {
  bandwright::BipolarParameters device = *c.device;
  device.thermal_resistance = 0;
  bandwright::Stage stage = c.stage;
  stage.device = &device;
  stage.around.ambient = temperature;
  if (cause != kGainMultiplier) stage.parts[cause] *= factor;
  if (cause == kGainMultiplier)
    for (double& log_gain : device.gain.log_gain) log_gain += std::log(factor);
  return analyse(stage, c.definition).figures;
}

void against_chain(const RandomCircuit& c, const Edges& nominal, const Analysis& a, const Sensitivity& s, Cause cause,
                   const std::string& name, Agreement& agreement) {
  const auto up = chain(c, nominal, a.point.junction_temperature, cause, std::exp(Real(kStep)));
  const auto down = chain(c, nominal, a.point.junction_temperature, cause, std::exp(-Real(kStep)));
  for (std::size_t i = 0; i < std::size(kChain); ++i) {
    const double found = s[index(kChain[i])][cause];
    const auto expected = static_cast<double>(std::log(up[i] / down[i]) / (2 * kStep));
    INFO(name << " " << info(kChain[i]).key << " cause " << cause << ": " << found << " against " << expected);
    CHECK(std::isnan(found) == std::isnan(expected));
    if (!std::isnan(found)) agreement.add(std::fabs(found - expected), name + " " + info(kChain[i]).key);
  }
}

bool has_kink(const Analysis& a, Figure figure) {
  const double sides = a.figures[index(Figure::swing_to_cutoff)] / a.figures[index(Figure::swing_to_saturation)];
  return (figure == Figure::output_swing || figure == Figure::input_overload) && std::fabs(sides - 1) < kKink;
}

/// Central differences of every figure in ln x: an error of h^2 taken out by a second step twice as long.
FigureValues differences(const RandomCircuit& c, double temperature, Cause cause) {
  const auto over = [&](double h) {
    const FigureValues up = held(c, temperature, cause, std::exp(h)), down = held(c, temperature, cause, std::exp(-h));
    FigureValues d;
    for (std::size_t i = 0; i < d.size(); ++i) d[i] = std::log(up[i] / down[i]) / (2 * h);
    return d;
  };
  const FigureValues once = over(kStep), twice = over(2 * kStep);
  FigureValues d;
  for (std::size_t i = 0; i < d.size(); ++i) d[i] = (4 * once[i] - twice[i]) / 3;
  return d;
}

void against_analysis(const RandomCircuit& c, const Analysis& a, const Sensitivity& s, Cause cause,
                      const std::string& name, Agreement& agreement) {
  const FigureValues expected = differences(c, a.point.junction_temperature, cause);
  for (const bandwright::FigureInfo& f : bandwright::figures()) {
    const double found = s[index(f.figure)][cause], difference = expected[index(f.figure)];
    INFO(name << " " << f.key << " cause " << cause << ": " << found << " against " << difference);
    CHECK(std::isnan(found) == std::isnan(difference));
    if (!std::isnan(found) && !has_kink(a, f.figure)) agreement.add(std::fabs(found - difference), name + " " + f.key);
  }
}

}  // namespace

TEST_CASE("sensitivities against central differences", "[oracle][sensitivity]") {
  Agreement chained("S by the long double chain"), analysed("S by the analysis itself");
  int rising = 0;
  CircuitSource source(6001, Breadth::ordinary);
  for (int done = 0, drawn = 0; done < kStages; ++drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    if (a.point.state != BiasState::active) continue;
    ++done;
    const std::string name = fmt::format("stage {}", drawn);
    const Edges nominal =
        edges(network({widen(c.stage.parts), widen(a.small), c.stage.around, c.definition.from_input}),
              c.definition.frequency);
    rising += nominal.rises_to_the_end;
    const Sensitivity s = sensitivity(c.stage, a, c.definition);
    for (Cause cause = 0; cause < bandwright::kSensitivityCauses; ++cause) {
      if (!varies(c, cause)) continue;
      against_chain(c, nominal, a, s, cause, name, chained);
      against_analysis(c, a, s, cause, name, analysed);
    }
  }
  std::cout << "sensitivities, absolute: " << kStages << " stages, " << rising << " rising to the end\n";
  for (const Agreement* a : {&chained, &analysed}) {
    std::cout << "  " << a->summary() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->worst() <= kSensitivity);
  }
}
