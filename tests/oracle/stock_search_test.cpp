// The search of a stock against brute force: every combination of small drawers evaluated, pieces counted here.
#include <algorithm>
#include <atomic>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <bandwright/stress.hpp>
#include <cmath>
#include <iostream>
#include <map>
#include <random>
#include <thread>

#include "catch.hpp"
#include "search/design_space.hpp"
#include "search/evaluator.hpp"
#include "small_problems.hpp"

using namespace bandwright;
using namespace bandwright::oracle;

namespace {

struct BestClass {
  int error = 1 << 30;
  int sensitivity = 1 << 30;
  friend bool operator==(const BestClass&, const BestClass&) = default;
};

class Dice {
public:
  explicit Dice(std::uint64_t seed) : engine_(seed * 104729 + 7) {}
  int below(int n) { return static_cast<int>(engine_() % static_cast<std::uint64_t>(n)); }

private:
  std::mt19937_64 engine_;
};

/// Invented rows: about three values in each role's range, tolerances of 1 to 10 %, two to five pieces each. The
/// ratings are wide, so that the pieces and the tolerances are what is tested.
Catalogue with_drawer(const Spec& spec, Dice& dice) {
  Catalogue catalogue = built_in_catalogue();
  catalogue.stock.name = "drawer";
  constexpr double kTolerances[] = {0.01, 0.02, 0.05, 0.1};
  std::map<std::pair<int, double>, bool> known;
  for (const RoleInfo& r : roles()) {
    for (const OfferedValue& o : offered_values(catalogue, spec, r.role)) {
      if (dice.below(4) == 0 || known[{int(r.kind), o.value}]) continue;
      known[{int(r.kind), o.value}] = true;
      StockPart part;
      part.kind = r.kind;
      part.value = o.value;
      part.family = o.family->key;
      const double t = kTolerances[dice.below(4)];
      part.tolerance = Tolerance{t, t};
      part.voltage_rating = 1000;
      if (r.kind == PartKind::resistor) part.power_rating = 100;
      part.quantity = 2 + dice.below(4);
      catalogue.stock.parts.push_back(part);
    }
  }
  return catalogue;
}

bool next(const DesignSpace& space, GridPoint& p) {
  for (std::size_t i = kRoleCount; i-- > 0;) {
    if (!space.has(i)) continue;
    if (++p[i] < static_cast<int>(space.offered[i]->size())) return true;
    p[i] = 0;
  }
  return false;
}

/// True where the drawer has enough pieces for all boards.
bool is_enough(const DesignSpace& space, const GridPoint& p, int boards) {
  std::map<const StockPart*, long> used;
  for (std::size_t i = 0; i < kRoleCount; ++i)
    if (space.has(i)) used[space.at(i, p).stock] += boards;
  return std::all_of(used.begin(), used.end(), [](const auto& row) { return row.second <= *row.first->quantity; });
}

double combinations_of(const DesignSpaces& all) {
  double sum = 0;
  for (const DesignSpace& space : all.spaces) sum += combinations(space);
  return sum;
}

/// The transistor's derated limits, at the exact worst corner.
bool is_within_limits(const Spec& spec, const DesignSpace& space, const GridPoint& p, const Analysis& nominal) {
  const BipolarParameters& device = space.device->parameters;
  const WorstStress w = worst_stress(spec, population_of(spec, device, offered_parts(space, p), nominal));
  const Derating& d = spec.parts.derating;
  return w.collector_emitter_voltage.max <= d.transistor_voltage * device.breakdown_voltage &&
         w.collector_current.max <= d.transistor_current * device.current_limit &&
         w.dissipation.max <= d.transistor_power * device.power_limit &&
         w.junction_temperature.max <= device.junction_limit - d.junction_margin;
}

/// Through the public analysis alone: no part of the search judges a stage here.
BestClass enumerated(const Spec& spec, const DesignSpaces& all) {
  BestClass best;
  for (const DesignSpace& space : all.spaces) {
    const BipolarParameters& device = space.device->parameters;
    GridPoint p;
    for (std::size_t i = 0; i < kRoleCount; ++i) p[i] = space.has(i) ? 0 : -1;
    do {
      if (!is_enough(space, p, spec.parts.boards)) continue;
      const Stage stage{working_values(space, p), &device, surroundings(spec)};
      const Analysis a = analyse(stage, gain_definition(spec));
      const double e = search_error(spec, a, stage.parts, device);
      if (e > kWorstError || error_class(e) > best.error) continue;
      CauseWidths widths{};
      for (std::size_t i = 0; i < kRoleCount; ++i)
        if (space.has(i)) widths[i] = half_width(space.at(i, p).tolerance);
      widths[index(Cause::current_gain)] = gain_half_width(device, a.point.collector_current);
      const int s =
          sensitivity_class(tolerance_sensitivity(spec, sensitivity(stage, a, gain_definition(spec)), widths));
      const BestClass here = {error_class(e), s};
      const bool better = here.error < best.error || here.sensitivity < best.sensitivity;
      if (better && is_within_limits(spec, space, p, a)) best = here;
    } while (next(space, p));
  }
  return best;
}

}  // namespace

TEST_CASE("a search limited to a drawer finds what enumeration of the drawer finds, 20 specs", "[search][stock]") {
  constexpr int kProblems = 20;
  constexpr double kMost = 1e6;
  std::vector<BestClass> truth(kProblems), found(kProblems);
  std::vector<double> combinations(kProblems);
  std::atomic<int> turn{0};
  const auto work = [&] {
    for (int i; (i = turn++) < kProblems;) {
      SmallProblem problem = small_problem(static_cast<std::uint64_t>(100 + i));
      Dice dice(static_cast<std::uint64_t>(i));
      const Catalogue catalogue = with_drawer(problem.spec, dice);
      problem.spec.parts.stock = "drawer";
      problem.spec.parts.stock_only = true;
      problem.spec.parts.boards = 1 + dice.below(2);
      const std::vector<DerivedDevice> devices = {problem.device};  // the spaces point into it
      const DesignSpaces all = design_spaces(problem.spec, catalogue, devices);
      combinations[i] = combinations_of(all);
      truth[i] = enumerated(problem.spec, all);
      const SearchOutcome outcome = search(problem.spec, catalogue, devices, {RankBy::error, 0, {}});
      if (outcome.found.empty()) continue;
      const RankKey& key = outcome.found.front().standing.key;
      found[i] = {error_class(key.error), sensitivity_class(key.tolerance_sensitivity)};
    }
  };
  std::thread second(work);
  work();
  second.join();
  int agree = 0, possible = 0;
  for (int i = 0; i < kProblems; ++i) {
    INFO("problem " << i << ", " << combinations[i] << " combinations: enumeration (" << truth[i].error << ", "
                    << truth[i].sensitivity << "), search (" << found[i].error << ", " << found[i].sensitivity << ")");
    CHECK(combinations[i] <= kMost);
    CHECK(found[i] == truth[i]);
    agree += found[i] == truth[i];
    possible += truth[i].error < 1 << 30;
  }
  const auto [least, most] = std::minmax_element(combinations.begin(), combinations.end());
  CHECK(possible > kProblems / 2);
  std::cout << "stock search against enumeration: " << agree << " of " << kProblems << " agree, " << possible
            << " have any stage; " << *least << " to " << *most << " combinations each\n";
}

namespace {

/// A drawer of 60 resistor values (E12 over five decades) and 20 capacitor values, invented quantities.
Catalogue with_wide_drawer() {
  Catalogue catalogue = built_in_catalogue();
  catalogue.stock.name = "drawer";
  const std::vector<double> e12 = decade_values(*find_series("E12")), e6 = decade_values(*find_series("E6"));
  const auto add = [&](PartKind kind, double value, const char* family, long quantity) {
    StockPart part;
    part.kind = kind;
    part.value = value;
    part.family = family;
    part.quantity = quantity;
    part.voltage_rating = 100;
    if (kind == PartKind::resistor) part.power_rating = 0.25;
    catalogue.stock.parts.push_back(part);
  };
  for (int k = 0; k < 60; ++k) {
    const double decade[] = {10, 100, 1e3, 1e4, 1e5};
    add(PartKind::resistor, e12[static_cast<std::size_t>(k % 12)] * decade[k / 12], "metal-film", 1 + k % 4);
  }
  for (int k = 0; k < 20; ++k) {
    const double decade[] = {100e-12, 1e-9, 100e-9, 10e-6};
    const char* family[] = {"c0g", "c0g", "film", "electrolytic"};
    const int row = k / 5;
    add(PartKind::capacitor, e6[static_cast<std::size_t>(k % 5)] * decade[row], family[row], 1 + k % 3);
  }
  return catalogue;
}

Spec line_stage() {
  Spec s;
  s.supply = {12, 11.4, 12.6};
  s.ambient = {298.15, 273.15, 318.15};
  s.source.resistance = 600;
  s.load.conductance = 1e-4;
  s.requirements[index(Figure::gain)] = {30, 27, 33};
  s.requirements[index(Figure::lower_cutoff)] = {40, 25, 50};
  s.requirements[index(Figure::upper_cutoff)] = {20e3, 17e3, 23e3};
  s.devices = {"BC547B"};
  s.parts.stock = "drawer";
  s.parts.stock_only = true;
  return s;
}

}  // namespace

TEST_CASE("on a drawer of 60 resistors and 20 capacitors no change of one or two parts improves the result",
          "[search][stock]") {
  const Catalogue catalogue = with_wide_drawer();
  REQUIRE(catalogue.stock.parts.size() == 80);
  const Spec spec = line_stage();
  const std::vector<DerivedDevice> devices = {derive_parameters(*catalogue.find_transistor("BC547B"))};
  for (const RankBy by : {RankBy::error, RankBy::capability, RankBy::cost}) {
    const SearchOutcome outcome = search(spec, catalogue, devices, {by, 0, {}});
    REQUIRE_FALSE(outcome.found.empty());
    const Found& best = outcome.found.front();
    const DesignSpaces all = design_spaces(spec, catalogue, devices);
    const auto space = std::find_if(all.spaces.begin(), all.spaces.end(),
                                    [&](const DesignSpace& s) { return s.variant == best.variant; });
    Evaluator evaluator(spec, *space, by);
    GridPoint at;
    at.fill(-1);
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      if (!space->has(i)) continue;
      for (std::size_t k = 0; k < space->offered[i]->size(); ++k)
        if ((*space->offered[i])[k].stock == best.parts[i].stock) at[i] = static_cast<std::int16_t>(k);
    }
    const RankKey key = evaluator.key(at);
    CHECK(key.error == best.standing.key.error);
    std::size_t tried = 0, better = 0;
    const auto look = [&](const GridPoint& p) {
      ++tried;
      if (leading_class(evaluator.error(p), by) > leading_class(key.error, by)) return;
      better += comes_before(evaluator.key(p), key, by);
    };
    for (std::size_t i = 0; i < kRoleCount; ++i) {
      for (int a = 0; space->has(i) && a < static_cast<int>(space->offered[i]->size()); ++a) {
        GridPoint p = at;
        p[i] = static_cast<std::int16_t>(a);
        look(p);
        for (std::size_t k = i + 1; k < kRoleCount; ++k) {
          for (int b = 0; space->has(k) && b < static_cast<int>(space->offered[k]->size()); ++b) {
            GridPoint q = p;
            q[k] = static_cast<std::int16_t>(b);
            look(q);
          }
        }
      }
    }
    INFO(info(by).word << ": " << tried << " changes");
    CHECK(tried > 40000);  // eight roles at least: 5 x 60 and 3 x 20 values, one and two at a time
    CHECK(better == 0);
    std::cout << "drawer of 80 values by " << info(by).word << ": error " << key.error << ", capability "
              << key.capability << ", cost " << key.cost << "; " << tried << " changes of one or two parts, " << better
              << " better\n";
  }
}
