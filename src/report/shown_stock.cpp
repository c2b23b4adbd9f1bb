#include "report/shown_stock.hpp"

#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

std::string smallest(const std::vector<double>& ratings, Dimension dimension) {
  return ratings.empty() ? "unknown" : format_quantity(ratings.front(), dimension);
}

std::string made_text(const Family& family) {
  const Dimension dimension = dimension_of_value(family.kind);
  return format_quantity(family.made.min, dimension) + " to " + format_quantity(family.made.max, dimension);
}

// One thing that rows may leave to their family.
struct Omission {
  const char* what;
  std::size_t StockGroup::*rows;
  std::string (*taken)(const Family&);
};
constexpr Omission kOmissions[] = {
    {"family", &StockGroup::without_family, [](const Family&) -> std::string { return "first choice"; }},
    {"tolerance", &StockGroup::without_tolerance,
     [](const Family& f) { return f.tolerances.empty() ? "unknown" : tolerance_text(f.tolerances.front()); }},
    {"rated power", &StockGroup::without_power,
     [](const Family& f) { return smallest(f.power_ratings, Dimension::power); }},
    {"rated voltage", &StockGroup::without_voltage,
     [](const Family& f) { return smallest(f.voltage_ratings, Dimension::voltage); }},
    {"value its family is not made in", &StockGroup::outside,
     [](const Family& f) { return "as it is: made are " + made_text(f); }},
};

std::string taken_text(const StockKind& kind, const Omission& omission) {
  std::vector<std::string> taken;
  for (const StockGroup& group : kind.groups)
    if (group.family != nullptr && group.*omission.rows > 0)
      taken.push_back(group.name + " " + omission.taken(*group.family));
  return join(taken, ", ");
}

}  // namespace

std::vector<StockAssumption> stock_assumptions(const std::vector<StockKind>& kinds) {
  std::vector<StockAssumption> list;
  for (const StockKind& kind : kinds) {
    const auto add = [&](const char* what, std::size_t rows, const std::string& taken) {
      if (rows > 0) list.push_back({kind.kind, what, rows, taken});
    };
    for (const Omission& omission : kOmissions) add(omission.what, kind.all.*omission.rows, taken_text(kind, omission));
    add("quantity", kind.all.uncounted, "not counted: never runs short");
    add("unit cost", kind.all.without_cost, "the catalogue's cost");
  }
  return list;
}

Dimension dimension_of_value(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

}  // namespace bandwright
