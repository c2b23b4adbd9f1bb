// Supply decoupling: two capacitors at each stage that the model does not see.
#include "purchase/bill_decoupling.hpp"

#include <algorithm>
#include <cmath>

#include "catalogue/choice.hpp"
#include "catalogue/stock_offers.hpp"

namespace bandwright {

namespace {

constexpr const char* kNote = "supply decoupling, outside the model";

/// The families that serve, the usual one first; an electrolytic is too slow for the small one (common practice, no
/// source).
struct Wanted {
  const char* designator;
  double value;
  std::vector<const char*> families;
};
const std::vector<Wanted>& wanted() {
  static const std::vector<Wanted> list = {{"C901", 100e-9, {"x7r", "film", "c0g"}},
                                           {"C902", 10e-6, {"electrolytic", "film", "x7r"}}};
  return list;
}

bool serves(const Wanted& want, const Family* family) {
  return family != nullptr &&
         std::any_of(want.families.begin(), want.families.end(), [&](const char* key) { return family->key == key; });
}

struct Rated {
  OfferedValue offer;
  double volts = kNotComputed;  ///< its rating; NaN: none holds
};

Rated rated(const OfferedValue& offer, const BoardParts& board) {
  const auto rating = rating_that_holds(offer, board.derating, board.supply, 0);
  if (!rating) return {offer, kNotComputed};
  return {offer, std::isnan(rating->voltage) ? 0 : rating->voltage};
}

OfferedValue of_family(const Family& family, double value) {
  OfferedValue o;
  o.value = value;
  o.family = &family;
  o.tolerance = family.tolerances.front();
  o.series = coarsest_series(value);
  o.unit_cost = family.unit_cost + family.unit_cost_per_value * value;
  o.invented_cost = family.invented_cost;
  return o;
}

OfferedValue of_stock(const Family& family, const StockPart& part) {
  OfferedValue o = of_family(family, part.value);
  o.stock = &part;
  if (part.tolerance) o.tolerance = *part.tolerance;
  if (std::isnan(part.unit_cost)) return o;
  o.unit_cost = part.unit_cost;
  o.invented_cost = false;
  return o;
}

std::optional<Rated> at_hand(const Wanted& want, const Catalogue& catalogue, const BoardParts& board) {
  for (const StockPart& part : catalogue.stock.parts) {
    if (part.kind != PartKind::capacitor || !same_value(part.value, want.value) || part.quantity == 0) continue;
    const Family* family = family_of(catalogue, part);
    if (!serves(want, family)) continue;
    const Rated one = rated(of_stock(*family, part), board);
    if (!std::isnan(one.volts)) return one;
  }
  return std::nullopt;
}

/// The first family with a rating that holds; where none has one, the first that is made at the value.
Rated sold(const Wanted& want, const Catalogue& catalogue, const BoardParts& board) {
  std::optional<Rated> usual;
  for (const char* key : want.families) {
    const Family* family = catalogue.find_family(key);
    if (family == nullptr || !holds(family->made, want.value)) continue;
    const Rated one = rated(of_family(*family, want.value), board);
    if (!std::isnan(one.volts)) return one;
    if (!usual) usual = one;
  }
  if (usual) return *usual;
  Rated unknown;
  unknown.offer.value = want.value;
  return unknown;
}

void add(std::string& text, const std::string& more) {
  if (!text.empty() && !more.empty()) text += "; ";
  text += more;
}

Part part_of(const Wanted& want, const Rated& from, const BoardParts& board) {
  const OfferedValue& o = from.offer;
  Part part;
  part.designator = want.designator;
  part.kind = PartKind::capacitor;
  part.value = o.value;
  part.code = value_code(o.value, Dimension::capacitance);
  part.series = o.series == nullptr ? "" : o.series->name;
  part.tolerance = o.tolerance;
  part.nodes = {"supply", "ground"};
  part.volts = board.pnp ? -board.supply : board.supply;
  part.voltage_rating = from.volts;
  part.unit_cost = o.unit_cost;
  part.invented_cost = o.invented_cost;
  part.note = kNote;
  if (std::isnan(from.volts))
    add(part.note, "no rating holds " + format_quantity(board.supply, Dimension::voltage, 3) + " after derating");
  if (o.family == nullptr) return part;
  part.family = o.family->name;
  part.temperature_coefficient = o.family->temperature_coefficient;
  part.electrolytic = o.family->electrolytic;
  if (o.family->polarised) part.polarity = board.pnp ? "+ to ground" : "+ to supply";
  if (o.stock == nullptr) return part;
  part.part_number = o.stock->part_number;
  part.in_stock = o.stock->quantity;
  part.from_stock = true;
  add(part.note, o.stock->note);
  return part;
}

}  // namespace

std::vector<Part> supply_decoupling(const Catalogue& catalogue, const BoardParts& board) {
  std::vector<Part> parts;
  for (const Wanted& want : wanted()) {
    const auto own = at_hand(want, catalogue, board);
    parts.push_back(part_of(want, own ? *own : sold(want, catalogue, board), board));
  }
  return parts;
}

}  // namespace bandwright
