// A spec held against a catalogue: names that the catalogue does not hold, and rules under which nothing is sold.
#include <algorithm>
#include <bandwright/catalogue.hpp>
#include <bandwright/fault.hpp>

#include "catalogue/choice.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

const char* plural(PartKind kind) { return kind == PartKind::resistor ? "resistors" : "capacitors"; }
Dimension dimension_of(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

std::string shown(double value, PartKind kind) { return format_quantity(value, dimension_of(kind)); }

void check_devices(const Spec& spec, const Catalogue& catalogue, std::vector<Fault>& faults) {
  std::vector<std::string> types;
  for (const Transistor& t : catalogue.transistors) types.push_back(t.type);
  for (std::size_t i = 0; i < spec.devices.size(); ++i) {
    const std::string& type = spec.devices[i];
    const std::string where = "devices[" + std::to_string(i) + "]";
    const Transistor* found = catalogue.find_transistor(type);
    if (found == nullptr) {
      faults.push_back({where, type,
                        "a transistor of the catalogue; a file in a folder given with --catalogue adds one",
                        nearest_name(type, types)});
    } else if (found->pnp != spec.pnp()) {
      faults.push_back({where, type + (found->pnp ? ", PNP" : ", NPN"),
                        spec.pnp() ? "a PNP transistor, as the negative supply needs"
                                   : "an NPN transistor, as the positive supply needs",
                        ""});
    }
  }
}

std::vector<std::string> offered_keys(const Catalogue& catalogue, PartKind kind) {
  std::vector<std::string> keys;
  for (const Family& f : catalogue.families) {
    if (f.kind == kind) keys.push_back(f.key);
  }
  return keys;
}

void check_family(const std::string& key, const std::string& where, const Catalogue& catalogue, PartKind kind,
                  std::vector<Fault>& faults) {
  const Family* family = catalogue.find_family(key);
  const std::vector<std::string> keys = offered_keys(catalogue, kind);
  std::string listed;
  for (const std::string& k : keys) listed += (listed.empty() ? "" : ", ") + k;
  if (family == nullptr) {
    faults.push_back({where, key, "one of: " + listed, nearest_name(key, keys)});
  } else if (family->kind != kind) {
    faults.push_back({where, key, std::string("a family of ") + plural(kind) + ", one of: " + listed, ""});
  }
}

void check_rules(const PartRules& rules, PartKind kind, const Catalogue& catalogue, std::vector<Fault>& faults) {
  const std::string parts = std::string("parts.") + plural(kind);
  for (std::size_t i = 0; i < rules.families.size(); ++i) {
    // A spec names one family of resistors, several of capacitors.
    const std::string key = kind == PartKind::resistor ? ".family" : ".families[" + std::to_string(i) + "]";
    check_family(rules.families[i], parts + key, catalogue, kind, faults);
  }
  if (!rules.series.empty() && find_series(rules.series) == nullptr) {
    std::vector<std::string> names;
    for (const Series& s : series()) names.push_back(s.name);
    faults.push_back({parts + ".series", rules.series, "a series of IEC 60063: E3, E6, E12, E24, E48, E96 or E192",
                      nearest_name(rules.series, names)});
  }
}

void check_pinned(const Spec& spec, const Catalogue& catalogue, const RoleInfo& role, std::vector<Fault>& faults) {
  const double value = *spec.parts.pinned[index(role.role)];
  if (!(value > 0)) return;
  const PartRules& rules = rules_for(spec, role.role);
  const std::string where = std::string("parts.pinned.") + role.key;
  const Choice sold = Choice::tightest(catalogue, rules, role.kind);
  ValueRange made;
  bool is_made = false;
  for (const OfferedFamily& f : sold.families()) {
    is_made = is_made || holds(f.family->made, value);
    made = {made.max == 0 ? f.family->made.min : std::min(made.min, f.family->made.min),
            std::max(made.max, f.family->made.max)};
  }
  if (!is_made) {
    faults.push_back({where, shown(value, role.kind),
                      "a value that is sold: " + shown(made.min, role.kind) + " to " + shown(made.max, role.kind), ""});
  } else if (Choice(catalogue, rules, role.kind).families().empty()) {
    faults.push_back({where, shown(value, role.kind),
                      "a tolerance in parts." + std::string(plural(role.kind)) + " that some family offers", ""});
  }
}

bool takes_class_2_only(const PartRules& rules, const Catalogue& catalogue) {
  return !rules.families.empty() &&
         std::all_of(rules.families.begin(), rules.families.end(), [&](const std::string& key) {
           const Family* f = catalogue.find_family(key);
           return f != nullptr && f->bias_loss > 0;
         });
}

bool is_at_hand(const Catalogue& catalogue, const RoleInfo& role, double value) {
  return std::any_of(catalogue.stock.parts.begin(), catalogue.stock.parts.end(),
                     [&](const StockPart& s) { return s.kind == role.kind && same_value(s.value, value); });
}

/// A stock that lists transistors is all there is of them.
void check_stock_transistors(const Spec& spec, const Catalogue& catalogue, std::vector<Fault>& faults) {
  if (!holds_transistors(catalogue.stock)) return;
  const int boards = spec.parts.boards;
  for (std::size_t i = 0; i < spec.devices.size(); ++i) {
    if (is_at_hand(catalogue.stock, spec.devices[i], boards)) continue;
    faults.push_back({"devices[" + std::to_string(i) + "]", spec.devices[i],
                      "a transistor of the stock, one for each board; or parts.stock_only left out", ""});
  }
  if (!spec.devices.empty()) return;
  const bool any = std::any_of(catalogue.transistors.begin(), catalogue.transistors.end(), [&](const Transistor& t) {
    return t.pnp == spec.pnp() && is_at_hand(catalogue.stock, t.type, boards);
  });
  if (!any)
    faults.push_back({"parts.stock",
                      std::string("no ") + (spec.pnp() ? "PNP" : "NPN") + " transistor for " + std::to_string(boards) +
                          (boards == 1 ? " board" : " boards"),
                      "one that the supply takes; a stock without any transistor leaves the choice to the catalogue",
                      ""});
}

/// A stock that is named and not there, or too small for what is asked.
void check_stock(const Spec& spec, const Catalogue& catalogue, std::vector<Fault>& faults) {
  if (!spec.parts.stock.empty() && catalogue.stock.name.empty()) {
    faults.push_back(
        {"parts.stock", spec.parts.stock, "the stock's parts in the catalogue, as read_stock gives them", ""});
  }
  if (!spec.parts.stock_only) return;
  check_stock_transistors(spec, catalogue, faults);
  for (const RoleInfo& role : roles()) {
    const auto& pin = spec.parts.pinned[index(role.role)];
    if (pin && *pin > 0 && !is_at_hand(catalogue, role, *pin)) {
      faults.push_back({std::string("parts.pinned.") + role.key, shown(*pin, role.kind),
                        "a value of the stock, or parts.stock_only left out", ""});
    }
  }
}

void check_roles(const Spec& spec, const Catalogue& catalogue, std::vector<Fault>& faults) {
  for (const RoleInfo& role : roles()) {
    if (spec.parts.pinned[index(role.role)]) {
      if (!is_at_hand(catalogue, role, *spec.parts.pinned[index(role.role)]))
        check_pinned(spec, catalogue, role, faults);
    } else if (!role.may_be_absent && spec.parts.stock_only && offered_values(catalogue, spec, role.role).empty()) {
      faults.push_back({"parts.stock", std::string("no part for ") + role.key,
                        std::string("a row of ") + plural(role.kind) +
                            " within the spec's ranges and families, with at "
                            "least as many pieces as boards; or parts.stock_only left out",
                        ""});
    } else if (!role.may_be_absent && offered_values(catalogue, spec, role.role).empty()) {
      faults.push_back({std::string("parts.") + plural(role.kind), std::string("no value for ") + role.key,
                        std::string("families, series, tolerance and range under which at least one value is sold") +
                            (takes_class_2_only(rules_for(spec, role.role), catalogue)
                                 ? "; a class 2 ceramic is refused where the cutoff it sets must be better than ±40 %"
                                 : ""),
                        ""});
    }
  }
}

}  // namespace

std::vector<Fault> check_against_catalogue(const Spec& spec, const Catalogue& catalogue) {
  std::vector<Fault> faults;
  check_devices(spec, catalogue, faults);
  const std::size_t before = faults.size();
  check_rules(spec.parts.resistors, PartKind::resistor, catalogue, faults);
  check_rules(spec.parts.capacitors, PartKind::capacitor, catalogue, faults);
  // An unknown family or series would show again at every role.
  const bool rules_hold = faults.size() == before;
  const bool stock_is_read = spec.parts.stock.empty() || !catalogue.stock.name.empty();
  check_stock(spec, catalogue, faults);
  if (rules_hold && stock_is_read) check_roles(spec, catalogue, faults);
  return faults;
}

}  // namespace bandwright
