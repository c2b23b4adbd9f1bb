#include "catalogue/stock_summary.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "catalogue/choice.hpp"
#include "catalogue/stock_offers.hpp"

namespace bandwright {

namespace {

using Rows = std::vector<const StockPart*>;

// The family or type that a row counts to.
struct Belonging {
  const Family* family = nullptr;
  std::string name;
};

Belonging belonging_of(const StockPart& part, const Catalogue& catalogue) {
  if (part.kind == PartKind::transistor) return {nullptr, part.type};
  const Family* family = family_of(catalogue, part);
  return {family, family == nullptr ? "" : family->key};
}

std::size_t distinct_values(const Rows& rows) {
  std::vector<double> values;
  for (const StockPart* part : rows) values.push_back(part->value);
  std::sort(values.begin(), values.end());
  return static_cast<std::size_t>(std::unique(values.begin(), values.end(), same_value) - values.begin());
}

void add_pieces(StockGroup& group, const StockPart& part) {
  if (!part.quantity) {
    ++group.uncounted;
  } else {
    group.pieces += *part.quantity;
    if (!std::isnan(part.unit_cost)) {
      ++group.costed;
      group.cost += static_cast<double>(*part.quantity) * part.unit_cost;
    }
  }
  if (std::isnan(part.unit_cost)) ++group.without_cost;
}

void add_left_out(StockGroup& group, const StockPart& part) {
  if (part.kind == PartKind::transistor) return;
  if (part.family.empty()) ++group.without_family;
  if (!part.tolerance) ++group.without_tolerance;
  if (std::isnan(part.voltage_rating)) ++group.without_voltage;
  if (std::isnan(part.power_rating) && part.kind == PartKind::resistor) ++group.without_power;
  if (group.family != nullptr && !holds(group.family->made, part.value)) ++group.outside;
}

StockGroup group_of(const Belonging& what, const Rows& rows) {
  StockGroup group;
  group.name = what.name;
  group.family = what.family;
  group.rows = rows.size();
  group.values = distinct_values(rows);
  const auto [low, high] = std::minmax_element(
      rows.begin(), rows.end(), [](const StockPart* a, const StockPart* b) { return a->value < b->value; });
  group.range = {(*low)->value, (*high)->value};
  for (const StockPart* part : rows) {
    add_pieces(group, *part);
    add_left_out(group, *part);
  }
  return group;
}

// What belongs together, in the order of first meeting.
struct Heap {
  Belonging what;
  Rows rows;
};

std::vector<Heap> heaps_of(const Rows& rows, const Catalogue& catalogue) {
  std::vector<Heap> heaps;
  for (const StockPart* part : rows) {
    Belonging what = belonging_of(*part, catalogue);
    const auto same = [&](const Heap& heap) { return heap.what.name == what.name; };
    auto heap = std::find_if(heaps.begin(), heaps.end(), same);
    if (heap == heaps.end()) heap = heaps.insert(heaps.end(), {std::move(what), {}});
    heap->rows.push_back(part);
  }
  return heaps;
}

StockKind kind_of(PartKind kind, const Rows& rows, const Catalogue& catalogue) {
  StockKind out{kind, group_of({}, rows), {}};
  for (const Heap& heap : heaps_of(rows, catalogue)) out.groups.push_back(group_of(heap.what, heap.rows));
  for (const StockGroup& group : out.groups) out.all.outside += group.outside;
  if (kind == PartKind::transistor) {
    out.all.values = out.groups.size();
    return out;
  }
  std::stable_sort(out.groups.begin(), out.groups.end(),
                   [](const StockGroup& a, const StockGroup& b) { return a.family < b.family; });
  return out;
}

}  // namespace

std::vector<StockKind> summarise(const Stock& stock, const Catalogue& catalogue) {
  std::vector<StockKind> kinds;
  for (const PartKind kind : {PartKind::resistor, PartKind::capacitor, PartKind::transistor}) {
    Rows rows;
    for (const StockPart& part : stock.parts)
      if (part.kind == kind) rows.push_back(&part);
    if (!rows.empty()) kinds.push_back(kind_of(kind, rows, catalogue));
  }
  return kinds;
}

}  // namespace bandwright
