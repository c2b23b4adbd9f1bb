// Unit costs of families and transistors from JSON:
//
//   {"costs": {"invented": false, "families": {"metal-film": {"each": 0.02}, "film": {"each": 0.1, "per_microfarad":
//   0.2}},
//              "transistors": {"BC547B": 0.05, "other": 0.08}}}
#pragma once

#include <bandwright/catalogue.hpp>
#include <map>
#include <string>
#include <vector>

#include "catalogue/json_place.hpp"

namespace bandwright {

struct FamilyCost {
  double each = 0;
  double per_microfarad = 0;
  std::string where;
};

struct CostTable {
  bool invented = false;
  std::map<std::string, FamilyCost> families;  ///< by key
  std::map<std::string, double> transistors;   ///< by type; "other": all that are not named
};

CostTable read_costs(const JsonPlace& place);

/// Notes a fault for each family that the catalogue does not hold.
void set_costs(const CostTable& table, Catalogue& catalogue, std::vector<Fault>& faults);

}  // namespace bandwright
