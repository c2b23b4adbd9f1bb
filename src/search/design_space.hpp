// The design space of one device in one variant: the offered values in each role.
#pragma once

#include <array>
#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <bandwright/stage.hpp>
#include <cstdint>
#include <vector>

namespace bandwright {

/// A point on the grid: an index into the offered values of each role; -1 where the role is absent.
using GridPoint = std::array<std::int16_t, kRoleCount>;

/// One device in one variant.
struct DesignSpace {
  std::size_t device_index = 0;
  const DerivedDevice* device = nullptr;
  const Variant* variant = nullptr;
  std::array<const std::vector<OfferedValue>*, kRoleCount> offered{};  ///< nullptr: absent
  double unit_cost = kNotComputed;                                     ///< of the transistor
  bool has_stock = false;                                              ///< parts at hand come before bought ones
  bool device_in_stock = false;

  bool has(std::size_t role) const { return offered[role] != nullptr; }
  bool is_free(std::size_t role) const { return has(role) && offered[role]->size() > 1; }
  const OfferedValue& at(std::size_t role, const GridPoint& p) const { return (*offered[role])[p[role]]; }
};

using OfferedByRole = std::array<std::vector<OfferedValue>, kRoleCount>;

/// Every offered value of a spec, and the spaces that the variants make of them. Holds what the spaces point to.
struct DesignSpaces {
  OfferedByRole offered;
  std::vector<DesignSpace> spaces;
};

/// The spaces point into `devices`, which must outlive them.
DesignSpaces design_spaces(const Spec& spec, const Catalogue& catalogue, const std::vector<DerivedDevice>& devices);

/// How many points the grid has.
double combinations(const DesignSpace& space);

/// The values at work; 0 where absent.
PartValues working_values(const DesignSpace& space, const GridPoint& point);
OfferedParts offered_parts(const DesignSpace& space, const GridPoint& point);

/// Cost of one board; NaN where that of a part is not known.
double unit_cost(const DesignSpace& space, const GridPoint& point);

/// Parts, transistor included, that do not come from the stock.
int to_buy(const DesignSpace& space, const GridPoint& point);

/// The index of the next value at hand above (`step` 1) or below (-1) an index; -1: there is none.
int next_at_hand(const DesignSpace& space, std::size_t role, int index, int step);

/// The nearest offered value, by ratio, in each role.
GridPoint snap(const DesignSpace& space, const PartValues& values);

}  // namespace bandwright
