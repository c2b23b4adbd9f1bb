#include "catalogue/costs_json.hpp"

#include "catalogue/names.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

constexpr double kMicro = 1e-6;
constexpr const char* kOther = "other";

double amount(const JsonPlace& place) {
  const double cost = place.quantity(Dimension::money).value_or(0);
  if (cost < 0) place.fault("an amount of at least 0");
  return cost;
}

FamilyCost family_cost(const JsonPlace& place) {
  FamilyCost cost;
  cost.where = place.where();
  if (!place.is_object("a cost such as {\"each\": 0.02}")) return cost;
  place.only_keys({"each", "per_microfarad"});
  if (place.has("each")) cost.each = amount(place.member("each"));
  if (place.has("per_microfarad")) cost.per_microfarad = amount(place.member("per_microfarad"));
  return cost;
}

}  // namespace

CostTable read_costs(const JsonPlace& place) {
  CostTable table;
  if (!place.is_object("an object with families and transistors")) return table;
  place.only_keys({"invented", "note", "families", "transistors"});
  if (place.has("invented")) table.invented = place.member("invented").truth().value_or(false);
  for (const char* key : {"families", "transistors"}) {
    if (!place.has(key) || !place.member(key).is_object("an object of costs")) continue;
    const JsonPlace list = place.member(key);
    for (const auto& [name, value] : list.value().items()) {
      if (key == std::string_view("families"))
        table.families[name] = family_cost(list.member(name));
      else
        table.transistors[name] = amount(list.member(name));
    }
  }
  return table;
}

void set_costs(const CostTable& table, Catalogue& catalogue, std::vector<Fault>& faults) {
  std::vector<std::string> keys;
  for (const Family& f : catalogue.families) keys.push_back(f.key);
  for (const auto& [key, cost] : table.families) {
    bool found = false;
    for (Family& f : catalogue.families) {
      if (!same_name(f.key, key)) continue;
      f.unit_cost = cost.each;
      f.unit_cost_per_value = cost.per_microfarad / kMicro;
      f.invented_cost = table.invented;
      found = true;
    }
    if (!found) faults.push_back({cost.where, key, "a family of the catalogue", nearest_name(key, keys)});
  }
  for (Transistor& t : catalogue.transistors) {
    const auto own = table.transistors.find(t.type);
    const auto row = own == table.transistors.end() ? table.transistors.find(kOther) : own;
    if (row == table.transistors.end()) continue;
    t.unit_cost = row->second;
    t.invented_cost = table.invented;
  }
}

}  // namespace bandwright
