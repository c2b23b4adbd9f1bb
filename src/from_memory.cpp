#include "from_memory.hpp"

#include <algorithm>
#include <cmath>

#include "numeric/elementary.hpp"

namespace bandwright {

namespace {

constexpr double kGainShown = 0.1;  // dB
constexpr double kShareShown = 0.01;

/// The larger move of a figure under the two shifts, as |ln|; NaN where one has no value.
double move(const FigureValues& base, const FigureValues& low, const FigureValues& high, Figure f) {
  const double x = base[index(f)], a = low[index(f)], b = high[index(f)];
  if (std::isnan(x)) return 0;
  if (!(a > 0) || !(b > 0)) return kNotComputed;
  return std::max(std::fabs(ln(a / x)), std::fabs(ln(b / x)));
}

std::string words(Figure f, double moved) {
  const std::string label = info(f).label;
  if (std::isnan(moved)) return label + " may be lost (the stage leaves the active region or the crossing)";
  if (f == Figure::gain) return label + " by " + format_quantity(moved * 20 / ln(10.0), Dimension::fraction, 2) + " dB";
  return label + " by " + format_quantity(100 * (e_to(moved) - 1), Dimension::fraction, 2) + " %";
}

bool shown(Figure f, double moved) {
  if (std::isnan(moved)) return true;
  return f == Figure::gain ? moved * 20 / ln(10.0) > kGainShown : moved > ln(1 + kShareShown);
}

}  // namespace

std::vector<std::string> memory_effects(const Spec& spec, const DerivedDevice& device, const Candidate& candidate) {
  std::vector<std::string> lines;
  const GainDefinition definition = gain_definition(spec);
  const auto figures_with = [&](const BipolarParameters& p) {
    return analyse(Stage{candidate.working_values, &p, surroundings(spec)}, definition).figures;
  };
  std::string idle;  // those that move nothing worth a line of their own
  for (const WeakInput& w : device.weak_inputs) {
    const FigureValues low = figures_with(w.low), high = figures_with(w.high);
    std::string moves;
    for (Figure f : {Figure::gain, Figure::lower_cutoff, Figure::upper_cutoff}) {
      const double moved = move(candidate.analysis.figures, low, high, f);
      if (shown(f, moved)) moves += (moves.empty() ? "" : ", ") + words(f, moved);
    }
    const std::string input = w.name + " (" + w.description + ")";
    if (moves.empty()) {
      idle += (idle.empty() ? "" : ", ") + input;
    } else {
      lines.push_back(device.parameters.type + " " + input + ": in candidate " + std::to_string(candidate.rank) +
                      " moves " + moves);
    }
  }
  if (!idle.empty()) {
    lines.push_back(device.parameters.type + " " + idle + ": moves gain by less than 0.1 dB and no cutoff by 1 %");
  }
  return lines;
}

}  // namespace bandwright
