// The parts list: what is bought for each role, with its nodes, ratings and polarity.
#include <bandwright/purchase.hpp>
#include <cmath>

#include "purchase/polarity.hpp"

namespace bandwright {

namespace {

using Nodes = std::array<std::string, 2>;

const std::array<Nodes, kRoleCount> kNodes = {{
    {"supply", "base"},
    {"base", "ground"},
    {"supply", "collector"},
    {"emitter", "junction"},
    {"junction", "ground"},
    {"source", "base"},
    {"collector", "output"},
    {"junction", "ground"},
    {"collector", "ground"},
}};

Dimension dimension_of(Role role) {
  return info(role).kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

void add(std::string& text, const std::string& more) {
  if (!text.empty() && !more.empty()) text += "; ";
  text += more;
}

std::string volts_text(double v) { return format_quantity(v, Dimension::voltage, 3); }

std::string missing_rating(const Part& part, const OfferedValue& offered, const Derating& derating) {
  const Family& family = *offered.family;
  std::string text = part.designator + " " + info(part.role).label + ": no " + family.name +
                     (offered.stock != nullptr ? " of the stock" : "") + " may stand " +
                     volts_text(std::fabs(part.volts));
  if (part.kind == PartKind::resistor) text += " and " + format_quantity(part.watts, Dimension::power, 3);
  text += " at " + format_quantity(100 * voltage_share(derating, family), Dimension::fraction) + " % of its voltage";
  if (part.kind == PartKind::resistor)
    text += " and " + format_quantity(100 * derating.resistor_power, Dimension::fraction) + " % of its power";
  return text;
}

std::string range_text(const StressRange& volts) {
  if (volts.largest() == 0) return "there is no DC voltage across it";
  return "its voltage lies between " + volts_text(volts.min) + " and " + volts_text(volts.max);
}

/// Which end of a polarised part is positive; where no end is, that is a reason not to build it.
std::string polarity_of(const Part& part, const StressRange& volts, std::string& reason) {
  if (keeps_one_sign(volts)) return "+ to " + part.nodes[part.volts < 0 ? 1 : 0];
  add(reason, part.designator + " " + info(part.role).label + ": polarised, and " + range_text(volts));
  return "none is right";
}

/// Why a part without polarity stands where one with it might have stood.
std::string unpolarised_note(const Family& family, const StressRange& volts) {
  if (family.kind != PartKind::capacitor) return "";
  const char* word = family.electrolytic ? "bipolar" : "without polarity";
  if (volts.changes_sign() || (family.electrolytic && !keeps_one_sign(volts)))
    return std::string(word) + ": " + range_text(volts);
  return family.electrolytic ? "bipolar, as asked for" : "";
}

/// The share of the role's voltage and power that falls to one part of a pair, this one and the other at the ends of
/// their tolerances that make it largest.
struct Share {
  double volts = 1, watts = 1;
};
Share share_of(const OfferedValue& o, std::size_t half) {
  if (o.connection == Connection::single) return {};
  const PairedPart &own = o.pair[half], &other = o.pair[1 - half];
  const bool resistor = o.family == nullptr || o.family->kind == PartKind::resistor;
  // capacitors in series share DC by their leakage, which nobody knows: each stands all of it
  if (!resistor) return {};
  const double sign = o.connection == Connection::series ? 1 : -1;  // in parallel the smaller one takes more
  const auto end = [](const PairedPart& p, double up) {
    return p.value * (up > 0 ? 1 + p.tolerance.above : 1 - p.tolerance.below);
  };
  const double a = end(own, sign), b = end(other, -sign);
  if (sign < 0) return {1, b / (a + b)};
  return {a / (a + b), a / (a + b)};
}

void take_stock(Part& part, const StockPart& stock) {
  part.part_number = stock.part_number;
  part.in_stock = stock.quantity;
  part.from_stock = true;
  add(part.note, stock.note);
}

/// One part of a pair as if it stood alone.
OfferedValue single(const OfferedValue& offered, std::size_t half) {
  if (offered.connection == Connection::single) return offered;
  const PairedPart& p = offered.pair[half];
  OfferedValue one = offered;
  one.value = p.value;
  one.tolerance = p.tolerance;
  one.series = p.series;
  one.stock = p.stock;
  one.unit_cost = p.unit_cost;
  return one;
}

/// "R1", of a pair "R1A" and "R1B".
std::string designator_of(Role role, const OfferedValue& offered, std::size_t half) {
  const std::string name = info(role).designator;
  if (offered.connection == Connection::single) return name;
  return name + (half == 0 ? "A" : "B");
}

/// What it is, before anything is known of its load.
Part named_part(Role role, const OfferedValue& offered, std::size_t half, const PartValues& values) {
  const OfferedValue one = single(offered, half);
  Part part;
  part.designator = designator_of(role, offered, half);
  part.kind = info(role).kind;
  part.role = role;
  part.connection = offered.connection;
  part.value = one.value;
  part.code = value_code(one.value, dimension_of(role));
  part.series = one.series == nullptr ? "" : one.series->name;
  part.tolerance = one.tolerance;
  part.nodes = nodes(role, values);
  if (offered.connection == Connection::series)
    part.nodes[1 - half] = "between " + designator_of(role, offered, 0) + " and " + designator_of(role, offered, 1);
  part.unit_cost = one.unit_cost;
  part.invented_cost = one.invented_cost;
  return part;
}

void set_rating(Part& part, const OfferedValue& one, const Derating& derating, std::string& reason) {
  const auto rating = rating_that_holds(one, derating, part.volts, part.watts);
  if (!rating) add(reason, missing_rating(part, one, derating));
  const auto stated = [&](double r) { return rating ? (std::isnan(r) ? 0 : r) : kNotComputed; };
  part.voltage_rating = stated(rating.value_or(Rating{}).voltage);
  part.power_rating = part.kind == PartKind::resistor ? stated(rating.value_or(Rating{}).power) : 0;
}

/// `half`: which part of a pair.
Part bought_part(const Spec& spec, Role role, const OfferedValue& offered, std::size_t half, const WorstStress& stress,
                 const PartValues& values, std::string& reason) {
  const OfferedValue one = single(offered, half);
  const StressRange &volts = stress.volts[index(role)], &watts = stress.watts[index(role)];
  const Share share = share_of(offered, half);
  Part part = named_part(role, offered, half, values);
  part.volts = share.volts * (-volts.min > volts.max ? volts.min : volts.max);
  part.watts = part.kind == PartKind::resistor ? share.watts * watts.max : 0;
  if (one.family == nullptr) return part;
  part.family = one.family->name;
  part.electrolytic = one.family->electrolytic;
  part.temperature_coefficient = one.family->temperature_coefficient;
  set_rating(part, one, spec.parts.derating, reason);
  if (one.family->polarised)
    part.polarity = polarity_of(part, volts, reason);
  else
    add(part.note, unpolarised_note(*one.family, volts));
  if (one.stock != nullptr) take_stock(part, *one.stock);
  if (offered.connection != Connection::single)
    add(part.note, std::string("in ") + word(offered.connection) + " with " + designator_of(role, offered, 1 - half));
  return part;
}

}  // namespace

const std::array<std::string, 2>& nodes(Role role) { return kNodes[index(role)]; }

std::array<std::string, 2> nodes(Role role, const PartValues& values) {
  Nodes result = nodes(role);
  const bool split = values[index(Role::emitter)] > 0;
  const bool bypassed_resistor = values[index(Role::emitter_bypassed)] > 0;
  for (std::string& node : result) {
    if (node != "junction") continue;
    if (!split) node = "emitter";
    if (split && !bypassed_resistor) node = "ground";
  }
  return result;
}

std::vector<Part> parts_list(const Spec& spec, const OfferedParts& parts, const WorstStress& stress,
                             std::string* reason) {
  PartValues values{};
  for (std::size_t i = 0; i < kRoleCount; ++i) values[i] = parts[i].value;
  std::string missing;
  std::vector<Part> list;
  for (const RoleInfo& row : roles()) {
    const OfferedValue& offered = parts[index(row.role)];
    if (!(offered.value > 0)) continue;
    const std::size_t halves = offered.connection == Connection::single ? 1 : 2;
    for (std::size_t half = 0; half < halves; ++half)
      list.push_back(bought_part(spec, row.role, offered, half, stress, values, missing));
  }
  if (reason != nullptr) *reason = missing;
  return list;
}

Part transistor_part(const Catalogue& catalogue, const std::string& type, int boards, const WorstStress& stress) {
  Part part;
  part.designator = "Q1";
  part.kind = PartKind::transistor;
  part.code = type;
  part.volts = stress.collector_emitter_voltage.max;
  part.watts = stress.dissipation.max;
  if (const Transistor* t = catalogue.find_transistor(type)) {
    part.code = t->type;
    part.family = t->pnp ? "PNP transistor" : "NPN transistor";
    part.voltage_rating = t->collector_emitter_breakdown.max;
    part.power_rating = t->power_limit.max;
    part.unit_cost = t->unit_cost;
    part.invented_cost = t->invented_cost;
  }
  for (const StockPart& s : catalogue.stock.parts) {
    if (s.kind != PartKind::transistor || s.type != part.code || (s.quantity && *s.quantity < boards)) continue;
    if (!std::isnan(s.unit_cost)) {
      part.unit_cost = s.unit_cost;
      part.invented_cost = false;
    }
    take_stock(part, s);
    break;
  }
  return part;
}

}  // namespace bandwright
