// The search against brute force: every combination of small catalogues evaluated.
#include <algorithm>
#include <atomic>
#include <bandwright/margins.hpp>
#include <bandwright/search.hpp>
#include <cmath>
#include <iostream>
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
};

/// Advances a grid point like an odometer; false after the last.
bool next(const DesignSpace& space, GridPoint& p) {
  // capacitors turn fastest, so that operating points are reused
  for (std::size_t i = kRoleCount; i-- > 0;) {
    if (!space.has(i)) continue;
    if (++p[i] < static_cast<int>(space.offered[i]->size())) return true;
    p[i] = 0;
  }
  return false;
}

void enumerate(const Spec& spec, const DesignSpace& space, BestClass& best) {
  Evaluator evaluator(spec, space, RankBy::error);
  GridPoint p;
  for (std::size_t i = 0; i < kRoleCount; ++i) p[i] = space.has(i) ? 0 : -1;
  do {
    const double error = evaluator.error(p);
    const int e = error_class(error);
    if (e > best.error || error > kWorstError) continue;
    const int s = sensitivity_class(evaluator.key(p).tolerance_sensitivity);
    if (e < best.error || s < best.sensitivity) best = {e, s};
  } while (next(space, p));
}

BestClass enumerate_all(const SmallProblem& problem) {
  const std::vector<DerivedDevice> devices = {problem.device};  // the spaces point into it
  const DesignSpaces all = design_spaces(problem.spec, built_in_catalogue(), devices);
  BestClass best;
  for (const DesignSpace& space : all.spaces) enumerate(problem.spec, space, best);
  return best;
}

/// The highest estimated capability among all combinations that meet the spec; -1e9 where none does.
double most_capable(const SmallProblem& problem) {
  const std::vector<DerivedDevice> devices = {problem.device};  // the spaces point into it
  const DesignSpaces all = design_spaces(problem.spec, built_in_catalogue(), devices);
  double best = -1e9;
  for (const DesignSpace& space : all.spaces) {
    Evaluator evaluator(problem.spec, space, RankBy::capability);
    GridPoint p;
    for (std::size_t i = 0; i < kRoleCount; ++i) p[i] = space.has(i) ? 0 : -1;
    do {
      if (evaluator.error(p) <= 1) best = std::max(best, evaluator.key(p).capability);
    } while (next(space, p));
  }
  return best;
}

}  // namespace

TEST_CASE("centring finds what enumeration finds to be the most producible, on small catalogues", "[search]") {
  constexpr int kProblems = 24;
  constexpr double kAlike = 0.02;  // of capability: far less than what a simulation can tell
  std::vector<double> truth(kProblems), found(kProblems, -1e9);
  std::atomic<int> turn{0};
  const auto work = [&] {
    for (int i; (i = turn++) < kProblems;) {
      const SmallProblem problem = small_problem(i);
      truth[i] = most_capable(problem);
      const SearchOutcome outcome = search(problem.spec, built_in_catalogue(), {problem.device}, {});
      if (!outcome.found.empty() && outcome.found.front().standing.key.meets())
        found[i] = outcome.found.front().standing.key.capability;
    }
  };
  std::thread second(work);
  work();
  second.join();
  int agree = 0, possible = 0;
  for (int i = 0; i < kProblems; ++i) {
    INFO("problem " << i << ": enumeration " << truth[i] << ", search " << found[i]);
    possible += truth[i] > -1e9;
    const bool alike = found[i] >= truth[i] - kAlike;
    agree += alike;
    CHECK(alike);
  }
  std::cout << "centring against enumeration: " << agree << " of " << kProblems << " agree, " << possible
            << " of them can be met\n";
}

TEST_CASE("the search finds the best class that enumeration finds, on 50 small catalogues", "[search]") {
  constexpr int kProblems = 50;
  std::vector<BestClass> truth(kProblems), found(kProblems);
  std::vector<double> combinations(kProblems);
  std::atomic<int> turn{0};
  const auto work = [&] {
    for (int i; (i = turn++) < kProblems;) {
      const SmallProblem problem = small_problem(i);
      combinations[i] = problem.combinations;
      truth[i] = enumerate_all(problem);
      const SearchOutcome outcome =
          search(problem.spec, built_in_catalogue(), {problem.device}, {RankBy::error, 0, {}});
      if (outcome.found.empty()) continue;
      const RankKey& key = outcome.found.front().standing.key;
      found[i] = {error_class(key.error), sensitivity_class(key.tolerance_sensitivity)};
    }
  };
  std::thread second(work);
  work();
  second.join();
  int agree = 0;
  for (int i = 0; i < kProblems; ++i) {
    INFO("problem " << i << ", " << combinations[i] << " combinations: enumeration (" << truth[i].error << ", "
                    << truth[i].sensitivity << "), search (" << found[i].error << ", " << found[i].sensitivity << ")");
    CHECK(found[i].error == truth[i].error);
    CHECK(found[i].sensitivity == truth[i].sensitivity);
    agree += found[i].error == truth[i].error && found[i].sensitivity == truth[i].sensitivity;
  }
  const auto [least, most] = std::minmax_element(combinations.begin(), combinations.end());
  std::cout << "search against enumeration: " << agree << " of " << kProblems
            << " agree in error class and sensitivity class; " << *least << " to " << *most << " combinations each\n";
}
