#include "assemble.hpp"

#include <algorithm>
#include <bandwright/search.hpp>
#include <cmath>
#include <set>

#include "bought.hpp"
#include "from_memory.hpp"
#include "numeric/elementary.hpp"
#include "units/constants.hpp"

namespace bandwright {

namespace {

constexpr double kNarrowBand = 30;  // fH/fL below which A stands visibly under the idealised midband gain

std::string gain_words(const Spec& spec) {
  std::string words = spec.gain_from_input
                          ? "input node (between source resistance and input coupling capacitor) to load"
                          : "source EMF to load";
  words +=
      spec.gain_at ? ", at " + format_quantity(*spec.gain_at, Dimension::frequency) : ", at the peak of the response";
  return "gain: " + words;
}

std::vector<std::string> definitions_in_force(const Spec& spec) {
  std::vector<std::string> list = {gain_words(spec)};
  for (const FigureInfo& f : figures()) {
    const bool always = f.figure == Figure::lower_cutoff || f.figure == Figure::upper_cutoff;
    if (f.figure != Figure::gain && (always || spec.requirement(f.figure))) {
      list.push_back(std::string(f.label) + ": " + f.definition);
    }
  }
  return list;
}

std::vector<std::string> general_assumptions(const Spec& spec) {
  std::vector<std::string> list = {
      "figures are nominal: typical transistor, printed part values, supply " +
          format_quantity(spec.supply.nominal, Dimension::voltage) + ", ambient " +
          format_quantity(spec.ambient.nominal, Dimension::temperature),
      "searched: stages with VCE of at least " + format_quantity(kLeastCollectorEmitter, Dimension::voltage) +
          " and IC RC of at least " + format_quantity(kLeastCollectorDrop, Dimension::voltage) +
          ", within the transistor's limits, each part with a rating that holds",
      "ratings: the worst corner of tolerances, hFE, VBE, VA, ICBO, supply and ambient; derated from memory of "
      "ECSS-Q-ST-30-11C, which was not read"};
  if (spec.ambient.nominal < kColdBegins)
    list.push_back("electrolytics lose 0.5 % for each kelvin below 20 °C (from memory)");
  return list;
}

CauseWidths widths_of(const Spec& spec, const OfferedParts& parts, const BipolarParameters& device,
                      double collector_current) {
  CauseWidths w{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (parts[i].value > 0)
      w[i] = assessed_half_width(spec, static_cast<Cause>(i), half_width(tolerance_at_work(parts[i])));
  }
  w[index(Cause::current_gain)] =
      assessed_half_width(spec, Cause::current_gain, gain_half_width(device, collector_current));
  return w;
}

void add_notes(const Spec& spec, const Stage& stage, const GainDefinition& definition, Candidate& c) {
  for (const FigureInfo& f : figures()) {
    const std::string reason = why_absent(c.analysis, stage, definition, f.figure);
    if (!reason.empty()) c.notes[f.key] = reason;
  }
  const Band& band = c.analysis.band;
  if (band.upper / band.lower < kNarrowBand) {
    const double ideal = c.analysis.figures[index(Figure::midband_gain)];
    c.notes["midband_gain"] =
        "narrow band, fH/fL = " + format_quantity(band.upper / band.lower, Dimension::fraction, 3) +
        ": the idealised midband gain is " + format_quantity(ideal, Dimension::gain) + ", " +
        format_quantity(20 * std::log10(ideal / band.gain), Dimension::fraction, 3) +
        " dB over the gain; cutoffs are taken from the gain";
  }
  const GainCurve& curve = c.parameters.gain;
  const double first = e_to(curve.log_current[0]), last = e_to(curve.log_current[curve.points - 1]);
  const double i_c = c.analysis.point.collector_current;
  if (c.analysis.point.state == BiasState::active && curve.points > 1 && (i_c < first || i_c > last)) {
    c.notes["collector_current"] = "outside the currents at which hFE is published (" +
                                   format_quantity(first, Dimension::current) + " to " +
                                   format_quantity(last, Dimension::current) + "): hFE is taken as constant there";
  }
  for (const RoleInfo& r : roles()) {
    const auto& pin = spec.parts.pinned[index(r.role)];
    for (const Part& p : c.parts) {
      if (p.role == r.role && pin && p.series.empty()) c.notes[r.key] = "pinned to a value of no preferred series";
    }
  }
}

}  // namespace

DesignResult empty_result(const Spec& spec, const Catalogue& catalogue, RankBy by) {
  DesignResult r;
  r.spec = spec;
  r.ranked_by = by;
  r.definitions = definitions_in_force(spec);
  r.assumptions = general_assumptions(spec);
  for (std::string& text : stock_and_family_assumptions(spec, catalogue)) r.assumptions.push_back(std::move(text));
  return r;
}

std::vector<const Transistor*> fitting_transistors(const Spec& spec, const Catalogue& catalogue) {
  std::vector<const Transistor*> list;
  for (const std::string& type : spec.devices) list.push_back(catalogue.find_transistor(type));
  for (const Transistor& t : catalogue.transistors) {
    if (spec.devices.empty() && t.pnp == spec.pnp()) list.push_back(&t);
  }
  // a stock of resistors and capacitors alone leaves the transistor open
  if (spec.parts.stock_only && holds_transistors(catalogue.stock))
    std::erase_if(list, [&](const Transistor* t) { return !is_at_hand(catalogue.stock, t->type, spec.parts.boards); });
  return list;
}

Spec of_given_parts(Spec spec, const std::string& device) {
  spec.devices = {device};
  spec.parts.stock_only = false;
  return spec;
}

Candidate assemble(const Spec& spec, const DerivedDevice& device, const Catalogue& catalogue,
                   const OfferedParts& chosen) {
  Candidate c;
  c.device = device.parameters.type;
  c.parameters = device.parameters;
  buy(spec, catalogue, chosen, c);
  const OfferedParts& parts = c.offered;
  PartValues printed{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    c.working_values[i] = parts[i].working_value;
    printed[i] = parts[i].value;
  }
  const Variant* variant = variant_of(printed);
  c.variant = variant ? variant->key : "own arrangement";
  const Stage stage{c.working_values, &c.parameters, surroundings(spec)};
  const GainDefinition definition = gain_definition(spec);
  c.analysis = analyse(stage, definition);
  c.analysis.figures[index(Figure::cost)] = cost_of(c);
  c.poles_estimate = pole_model(stage, c.analysis, definition);
  c.poles = poles_and_zeros(c.analysis.transfer);
  c.sensitivity = sensitivity(stage, c.analysis, definition, ResponseModel::exact, all_causes());
  c.error = error(spec, c.analysis.figures);
  c.margins.fill(kNotComputed);
  for (const FigureInfo& f : figures()) {
    const auto& r = spec.requirement(f.figure);
    if (r) c.margins[index(f.figure)] = requirement_margin(*r, f, c.analysis.figures[index(f.figure)]);
  }
  c.shortfalls = shortfalls(spec, c.analysis.figures);
  if (c.analysis.point.state == BiasState::active) {
    const double i_c = c.analysis.point.collector_current;
    c.tolerance_sensitivity = tolerance_sensitivity(spec, c.sensitivity, widths_of(spec, parts, c.parameters, i_c));
    c.gain_limits = gain_limits(c.parameters, i_c);
  }
  add_notes(spec, stage, definition, c);
  if (const Transistor* t = catalogue.find_transistor(c.device)) c.packages = t->packages;
  return c;
}

void finish(DesignResult& result, const std::vector<DerivedDevice>& devices, const std::string& nearest_miss) {
  std::set<std::string> described;
  for (const Candidate& c : result.candidates) {
    result.met = result.met || (c.shortfalls.empty() && c.analysis.point.state == BiasState::active);
    if (!described.insert(c.device).second) continue;
    const auto used = std::find_if(devices.begin(), devices.end(),
                                   [&](const DerivedDevice& d) { return d.parameters.type == c.device; });
    result.assumptions.insert(result.assumptions.end(), used->assumptions.begin(), used->assumptions.end());
    const std::vector<std::string> weak = memory_effects(result.spec, *used, c);
    result.from_memory.insert(result.from_memory.end(), weak.begin(), weak.end());
  }
  if (result.met) return;
  result.explanations = explain_limits(result.spec, devices);
  if (!nearest_miss.empty()) result.explanations.push_back(nearest_miss);
}

}  // namespace bandwright
