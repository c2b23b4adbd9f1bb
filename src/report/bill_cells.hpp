// Cells of a bill of materials, as every writer has them.
#pragma once

#include <array>
#include <bandwright/purchase.hpp>
#include <string>

namespace bandwright {

/// The columns, in their order.
inline constexpr std::array<const char*, 17> kBillHeadings = {"item",
                                                              "designators",
                                                              "quantity_per_board",
                                                              "quantity_total",
                                                              "kind",
                                                              "value",
                                                              "value_code",
                                                              "tolerance",
                                                              "rating",
                                                              "family",
                                                              "temperature_coefficient",
                                                              "polarity",
                                                              "part_number",
                                                              "alternates",
                                                              "unit_cost",
                                                              "total_cost",
                                                              "note"};

/// "resistor"
const char* kind_word(PartKind kind);

/// "0.25 W, 250 V", of a transistor "45 V VCEO, 0.5 W"; "none holds" where the family has no rating for the stress.
std::string bill_rating(const Part& part);

/// "±50 ppm/K"; empty where none is stated.
std::string bill_temperature_coefficient(const Part& part);

/// The row's note, and whether its cost is a real one.
std::string bill_note(const BillRow& row);

}  // namespace bandwright
