#include "catalogue/stock_offers.hpp"

#include <algorithm>
#include <cmath>

#include "catalogue/choice.hpp"
#include "catalogue/names.hpp"
#include "catalogue/offer.hpp"

namespace bandwright {

namespace {

bool is_named(const PartRules& rules, const Family& family) {
  if (rules.families.empty()) return family.bias_loss == 0;  // a class 2 ceramic only where it is asked for
  return std::any_of(rules.families.begin(), rules.families.end(),
                     [&](const std::string& key) { return same_name(key, family.key); });
}

}  // namespace

const Family* family_of(const Catalogue& catalogue, const StockPart& part) {
  if (const Family* named = catalogue.find_family(part.family)) return named;
  const Choice choice(catalogue, {}, part.kind);
  const OfferedFamily* serving = choice.nearest(part.value);
  return serving == nullptr ? nullptr : serving->family;
}

OfferedValue stock_offer(const Catalogue& catalogue, const Spec& spec, const StockPart& part) {
  const Family* family = family_of(catalogue, part);
  if (family == nullptr) return {};
  OfferedValue o = offer(catalogue, spec, {family, part.tolerance.value_or(family->tolerances.front())}, part.value);
  o.stock = &part;
  if (!std::isnan(part.unit_cost)) {
    o.unit_cost = part.unit_cost;
    o.invented_cost = false;
  }
  return o;
}

std::vector<OfferedValue> stock_values(const Catalogue& catalogue, const Spec& spec, Role role,
                                       const ValueRange& allowed) {
  std::vector<OfferedValue> list;
  for (const StockPart& part : catalogue.stock.parts) {
    if (part.kind != info(role).kind || !holds(allowed, part.value)) continue;
    if (part.quantity && *part.quantity < spec.parts.boards) continue;
    const OfferedValue o = stock_offer(catalogue, spec, part);
    if (o.family != nullptr && is_named(rules_for(spec, role), *o.family) && !is_too_loose(*o.family, spec, role))
      list.push_back(o);
  }
  return list;
}

const StockPart* find_stock(const Catalogue& catalogue, PartKind kind, const PartChoice& choice) {
  for (const StockPart& part : catalogue.stock.parts) {
    if (part.kind != kind || !same_value(part.value, choice.value)) continue;
    if (!choice.part_number.empty() && part.part_number != choice.part_number) continue;
    const Family* family = family_of(catalogue, part);
    const bool fits = choice.family.empty() ||
                      (family != nullptr && (family->name == choice.family || same_name(family->key, choice.family)));
    if (fits) return &part;
  }
  return nullptr;
}

bool holds_transistors(const Stock& stock) {
  return std::any_of(stock.parts.begin(), stock.parts.end(),
                     [](const StockPart& s) { return s.kind == PartKind::transistor; });
}

bool is_at_hand(const Stock& stock, std::string_view type, int boards) {
  return std::any_of(stock.parts.begin(), stock.parts.end(), [&](const StockPart& s) {
    return s.kind == PartKind::transistor && same_name(s.type, type) && (!s.quantity || *s.quantity >= boards);
  });
}

}  // namespace bandwright
