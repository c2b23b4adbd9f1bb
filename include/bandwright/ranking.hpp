// Ranking: the order of candidates, alternatives that differ, and what each is best at. No search.
//
// Order by error: error class (nearest multiple of 0.05, halves up); then round(ln(tolerance_sensitivity)/ln 1.05);
// then fewer distinct (kind, value) pairs; then the smaller sum of series numbers (E6 counts 6); then the values of
// R1..R5, C1..C4 in that order, smaller first, absent before present.
#pragma once

#include <bandwright/role.hpp>
#include <cstddef>
#include <string>
#include <vector>

namespace bandwright {

enum class RankBy { error, sensitivity };

/// What the order looks at.
struct RankKey {
  double error = 0;
  double tolerance_sensitivity = 0;
  int distinct_values = 0;
  int series_sum = 0;
  PartValues values{};
};

/// What else tells candidates apart.
struct Standing {
  RankKey key;
  double collector_current = 0;
  double input_resistance = 0;
  double total_capacitance = 0;
  std::string device;
  std::string variant;
};

int error_class(double error);
int sensitivity_class(double tolerance_sensitivity);

/// The part of the order that the error alone decides: by error its class; by sensitivity 0 for all that meet the spec.
int leading_class(double error, RankBy by);

/// Distinct (kind, value) pairs among the present parts.
int distinct_values(const PartValues& values);

/// True where a comes before b: a strict weak order. By sensitivity: candidates that meet the spec first, then the
/// sensitivity class, then the error class, then as by error.
bool comes_before(const RankKey& a, const RankKey& b, RankBy by);

/// The same for standings; ties go by device, then variant.
bool comes_before(const Standing& a, const Standing& b, RankBy by);

/// True where the two differ in at least one way: another device, another variant, a collector current apart by a
/// factor of 1.5, or three parts apart by more than 20 %.
bool differ(const Standing& a, const Standing& b);

/// Indices of up to `count` alternatives, best first, each different from every one kept before it.
std::vector<std::size_t> alternatives(const std::vector<Standing>& all, RankBy by, std::size_t count);

/// For each standing the titles it holds among the list: "most exact", "least sensitive", "lowest current",
/// "highest input resistance", "fewest distinct values", "smallest capacitors".
std::vector<std::vector<std::string>> best_at(const std::vector<Standing>& list);

}  // namespace bandwright
