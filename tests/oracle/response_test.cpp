// Exact response against the nodal solve, on random circuits over the whole range of parts and devices.
//
// The small-signal parameters are the library's own, so that this check does not hang on the operating point
// (bias_test.cpp). Truth: nodal solve in long double, itself held against fifty digits in textbook_test.cpp.
#include <fmt/format.h>

#include <cmath>
#include <iostream>

#include "agreement.hpp"
#include "catch.hpp"
#include "nodal.hpp"
#include "random_circuits.hpp"

using namespace oracle;
using bandwright::Analysis;
using bandwright::BiasState;

namespace {

constexpr double kResponse = 1e-9;   // |H| and gain: the definition of the exact response
constexpr double kCutoff = 1e-7;     // both cutoffs: the same
constexpr Real kSmallest = 1e-200L;  // |H| below this says nothing

constexpr int kCircuits = 2500;  // a quarter
constexpr int kAtLeast = 150;    // of each special case in a quarter
constexpr int kFrequencies = 15;

struct Quarter {
  Census census;
  Agreement response{"|H|"}, gain{"gain"}, lower{"lower cutoff"}, upper{"upper cutoff"};
  Agreement limit{"gain, at infinite frequency"}, limit_lower{"lower cutoff under such a gain"};
  int presence = 0, no_upper = 0;
  std::string where;
};

void compare_response(const Network& net, const Analysis& a, const std::string& name, Quarter& q) {
  for (int i = 0; i < kFrequencies; ++i) {
    const Real f = std::pow(10.0L, -3 + 13 * Real(i) / (kFrequencies - 1));
    const Real solved = magnitude(net, f);
    if (solved < kSmallest) continue;
    const double value = std::abs(a.transfer.at(static_cast<double>(f)));
    q.response.add(relative_difference(value, static_cast<double>(solved)),
                   fmt::format("{} at {} Hz", name, double(f)));
  }
}

void compare_cutoff(double value, std::optional<Real> solved, const std::string& name, Agreement& agreement,
                    Quarter& q) {
  if (std::isnan(value) == solved.has_value()) {
    ++q.presence;
    q.where += fmt::format("{}: {} against {}\n", name, value, solved ? double(*solved) : NAN);
  } else if (solved) {
    agreement.add(relative_difference(value, static_cast<double>(*solved)), name);
  }
}

void compare(const RandomCircuit& c, const Analysis& a, const std::string& name, Quarter& q) {
  const Network net = network({widen(c.stage.parts), widen(a.small), c.stage.around, c.definition.from_input});
  compare_response(net, a, name, q);
  const Edges e = edges(net, c.definition.frequency);
  // with nothing but Cmu and strays at the collector |H| may end above every peak: its limit is A then, and there is no
  // upper cutoff
  const bool rising = e.rises_to_the_end && c.definition.frequency == 0;
  if (rising)
    q.limit.add(relative_difference(a.band.gain, static_cast<double>(e.gain)), name);
  else
    q.gain.add(relative_difference(a.band.gain, static_cast<double>(e.gain)), name);
  compare_cutoff(a.band.lower, e.lower, name + " lower", rising ? q.limit_lower : q.lower, q);
  compare_cutoff(a.band.upper, e.upper, name + " upper", q.upper, q);
  q.no_upper += !e.upper;
}

void check_quarter(std::uint64_t seed) {
  CircuitSource source(seed);
  Quarter q;
  for (int drawn = 0; q.census.circuits < kCircuits; ++drawn) {
    const RandomCircuit c = source.next();
    const Analysis a = analyse(c.stage, c.definition);
    if (a.point.state != BiasState::active) continue;
    q.census.count(c);
    compare(c, a, fmt::format("seed {} circuit {}", seed, drawn), q);
  }
  std::cout << "response, seed " << seed << ": " << q.census.circuits << " circuits, " << q.no_upper
            << " without an upper cutoff\n";
  for (const Agreement* a : {&q.response, &q.gain, &q.lower, &q.upper, &q.limit, &q.limit_lower}) {
    std::cout << "  " << a->summary() << "\n";
    INFO(a->summary() << " in " << a->worst_where());
    CHECK(a->worst() <= (a == &q.response || a == &q.gain || a == &q.limit ? kResponse : kCutoff));
  }
  INFO(q.where);
  CHECK(q.presence == 0);
  for (const auto& [name, count] : q.census.rows()) {
    INFO(name);
    CHECK(count >= kAtLeast);
  }
}

}  // namespace

TEST_CASE("exact response against a nodal solve: first quarter", "[oracle][response]") { check_quarter(1001); }
TEST_CASE("exact response against a nodal solve: second quarter", "[oracle][response]") { check_quarter(1002); }
TEST_CASE("exact response against a nodal solve: third quarter", "[oracle][response]") { check_quarter(1003); }
TEST_CASE("exact response against a nodal solve: fourth quarter", "[oracle][response]") { check_quarter(1004); }
