// Ranking: the order of candidates, alternatives that differ, and what each is best at. No search.
//
// By error: error class (nearest multiple of 0.05, halves up); then round(ln(tolerance_sensitivity)/ln 1.05); then
// fewer distinct (kind, value) pairs; then the smaller sum of series numbers (E6 counts 6); then the values of R1..R5,
// C1..C4 in that order, smaller first, absent before present. By anything else: candidates that meet the spec nominally
// first, then the measure of the order, then as by error. Where the user has a stock, fewer parts to buy come right
// after the class that leads: among stages of the same error class, or that meet the spec; by capability, yield and
// worst case among those with a capability of at least 1.
#pragma once

#include <bandwright/role.hpp>
#include <cstddef>
#include <string>
#include <vector>

namespace bandwright {

enum class RankBy { capability, error, sensitivity, yield, worst_case, current, parts, cost };

/// One row an order: its word on the command line and what it puts first.
struct RankOrder {
  RankBy by;
  const char* word;    ///< "worst-case"
  const char* reason;  ///< "largest margin at the worst corner first, ties by error"
};
const std::vector<RankOrder>& rank_orders();
const RankOrder& info(RankBy by);

/// What the order looks at.
struct RankKey {
  double error = 0;
  double tolerance_sensitivity = 0;
  double capability = 0;      ///< estimated while searching, simulated in the end
  double supply_current = 0;  ///< A
  int parts = 0;
  int to_buy = -1;  ///< parts that do not come from the stock; -1: there is no stock
  double cost = 0;  ///< of all parts of one board; NaN where one is not known
  int distinct_values = 0;
  int series_sum = 0;
  PartValues values{};

  bool meets() const { return error <= 1; }  ///< every requirement, nominally
};

/// What else tells candidates apart.
struct Standing {
  RankKey key;
  double yield = 0;                   ///< simulated; 0 where it is not
  double worst_case_margin = -1e300;  ///< the same; lowest where a corner has no value
  double collector_current = 0;
  double input_resistance = 0;
  double total_capacitance = 0;
  std::string device;
  std::string variant;
};

/// A capability from which parts at hand come first.
inline constexpr double kProducible = 1;

int error_class(double error);
int sensitivity_class(double tolerance_sensitivity);

/// The part of the order that the error alone decides: by error its class, else 0 for all that meet the spec.
int leading_class(double error, RankBy by);

/// True for the orders that lead the search by the estimated capability.
bool wants_capability(RankBy by);

/// What an order puts first among stages that meet the spec, smaller first. While searching, yield and worst case are
/// led by the estimated capability.
double measure(const RankKey& key, RankBy by);
double measure(const Standing& standing, RankBy by);

/// Distinct (kind, value) pairs among the present parts.
int distinct_values(const PartValues& values);

/// True where a comes before b: a strict weak order.
bool comes_before(const RankKey& a, const RankKey& b, RankBy by);

/// The same for standings; ties go by device, then variant.
bool comes_before(const Standing& a, const Standing& b, RankBy by);

/// True where the two differ in at least one way: another device, another variant, a collector current apart by a
/// factor of 1.5, or three parts apart by more than 20 %.
bool differ(const Standing& a, const Standing& b);

/// For each, true where none of the others is at least as good in error, capability, supply current and number of parts
/// and better in one of them.
std::vector<bool> non_dominated(const std::vector<Standing>& list);

/// Indices of up to `count` alternatives, best first, each different from every one kept before it.
std::vector<std::size_t> alternatives(const std::vector<Standing>& all, RankBy by, std::size_t count);

/// For each standing the titles it holds among the list: "most exact", "least sensitive", "lowest current",
/// "highest input resistance", "fewest distinct values", "smallest capacitors".
std::vector<std::vector<std::string>> best_at(const std::vector<Standing>& list);

}  // namespace bandwright
