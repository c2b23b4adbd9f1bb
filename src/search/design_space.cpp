#include "search/design_space.hpp"

#include <algorithm>
#include <cmath>

namespace bandwright {

namespace {

/// A pinned part decides which variants are left: pinned to 0 the role must be absent, to a value present.
bool fits_pins(const Variant& variant, const Spec& spec) {
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    const auto& pin = spec.parts.pinned[i];
    if (pin && (*pin > 0) != variant.present[i]) return false;
  }
  return true;
}

int nearest(const std::vector<OfferedValue>& offered, double value) {
  const auto above = std::lower_bound(offered.begin(), offered.end(), value,
                                      [](const OfferedValue& o, double v) { return o.working_value < v; });
  if (above == offered.begin()) return 0;
  if (above == offered.end()) return static_cast<int>(offered.size()) - 1;
  const auto below = above - 1;
  const bool lower = value * value < above->working_value * below->working_value;
  return static_cast<int>((lower ? below : above) - offered.begin());
}

void add_stock(const Catalogue& catalogue, int boards, DesignSpace& space) {
  const std::string& type = space.device->parameters.type;
  if (const Transistor* t = catalogue.find_transistor(type)) space.unit_cost = t->unit_cost;
  space.has_stock = !catalogue.stock.parts.empty();
  space.device_in_stock = is_at_hand(catalogue.stock, type, boards);
  for (const StockPart& s : catalogue.stock.parts) {
    const bool own = space.device_in_stock && s.kind == PartKind::transistor && s.type == type;
    if (own && !std::isnan(s.unit_cost)) space.unit_cost = s.unit_cost;
  }
}

}  // namespace

DesignSpaces design_spaces(const Spec& spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices) {
  DesignSpaces all;
  for (const RoleInfo& r : roles()) {
    const auto& pin = spec.parts.pinned[index(r.role)];
    if (!(pin && *pin == 0)) all.offered[index(r.role)] = offered_values(catalogue, spec, r.role);
  }
  for (std::size_t d = 0; d < devices.size(); ++d) {
    for (const Variant& v : variants()) {
      if (!fits_pins(v, spec)) continue;
      DesignSpace space;
      space.device_index = d;
      space.device = &devices[d];
      space.variant = &v;
      add_stock(catalogue, spec.parts.boards, space);
      bool complete = true;
      for (std::size_t i = 0; i < kRoleCount; ++i) {
        if (!v.present[i]) continue;
        complete = complete && !all.offered[i].empty();
        space.offered[i] = &all.offered[i];
      }
      if (complete) all.spaces.push_back(space);
    }
  }
  return all;
}

double combinations(const DesignSpace& space) {
  double product = 1;
  for (std::size_t i = 0; i < kRoleCount; ++i)
    if (space.has(i)) product *= static_cast<double>(space.offered[i]->size());
  return product;
}

PartValues working_values(const DesignSpace& space, const GridPoint& point) {
  PartValues v{};
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.has(i)) v[i] = space.at(i, point).working_value;
  }
  return v;
}

OfferedParts offered_parts(const DesignSpace& space, const GridPoint& point) {
  OfferedParts parts;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.has(i)) parts[i] = space.at(i, point);
  }
  return parts;
}

double unit_cost(const DesignSpace& space, const GridPoint& point) {
  double cost = space.unit_cost;
  for (std::size_t i = 0; i < kRoleCount; ++i)
    if (space.has(i)) cost += space.at(i, point).unit_cost;
  return cost;
}

int to_buy(const DesignSpace& space, const GridPoint& point) {
  int count = space.device_in_stock ? 0 : 1;
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (!space.has(i)) continue;
    const OfferedValue& part = space.at(i, point);
    if (part.connection == Connection::single) {
      count += part.stock == nullptr;
    } else {
      for (const PairedPart& half : part.pair) count += half.stock == nullptr;
    }
  }
  return count;
}

int next_at_hand(const DesignSpace& space, std::size_t role, int index, int step) {
  const auto& offered = *space.offered[role];
  for (int i = index + step; i >= 0 && i < static_cast<int>(offered.size()); i += step)
    if (offered[static_cast<std::size_t>(i)].stock != nullptr) return i;
  return -1;
}

GridPoint snap(const DesignSpace& space, const PartValues& values) {
  GridPoint p;
  p.fill(-1);
  for (std::size_t i = 0; i < kRoleCount; ++i) {
    if (space.has(i)) p[i] = static_cast<std::int16_t>(nearest(*space.offered[i], values[i]));
  }
  return p;
}

}  // namespace bandwright
