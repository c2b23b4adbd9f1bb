// The order of candidates, alternatives that differ, titles. Expected values are worked by hand.
#include <algorithm>
#include <bandwright/ranking.hpp>
#include <limits>

#include "catch.hpp"

using namespace bandwright;

namespace {

RankKey key(double error, double sensitivity, int distinct = 9, int series = 100) {
  RankKey k;
  k.error = error;
  k.tolerance_sensitivity = sensitivity;
  k.distinct_values = distinct;
  k.series_sum = series;
  k.values = {1e5, 1e4, 1e3, 100, 500, 1e-6, 1e-6, 1e-5, 1e-10};
  return k;
}

Standing standing(const RankKey& k, const char* device = "A", double current = 1e-3) {
  Standing s;
  s.key = k;
  s.device = device;
  s.variant = "split emitter";
  s.collector_current = current;
  s.key.supply_current = 1.1 * current;
  s.input_resistance = 5e3;
  s.total_capacitance = 12e-6;
  return s;
}

}  // namespace

TEST_CASE("error classes are multiples of 0.05, halves up", "[ranking]") {
  CHECK(error_class(0) == 0);
  CHECK(error_class(0.0249) == 0);
  CHECK(error_class(0.025) == 1);
  CHECK(error_class(0.0749) == 1);
  CHECK(error_class(1.0) == 20);
  CHECK(error_class(std::numeric_limits<double>::infinity()) > error_class(1e6));
}

TEST_CASE("sensitivity classes are steps of 5 %", "[ranking]") {
  CHECK(sensitivity_class(1) == 0);
  CHECK(sensitivity_class(1.05) == 1);
  CHECK(sensitivity_class(1.02) == 0);
  CHECK(sensitivity_class(1 / 1.05) == -1);
  CHECK(sensitivity_class(std::numeric_limits<double>::quiet_NaN()) == std::numeric_limits<int>::max());
}

TEST_CASE("by error the class comes first, then sensitivity, distinct values, series, values", "[ranking]") {
  const auto before = [](const RankKey& a, const RankKey& b) {
    return comes_before(a, b, RankBy::error) && !comes_before(b, a, RankBy::error);
  };
  CHECK(before(key(0.01, 9), key(0.03, 1)));
  CHECK(before(key(0.03, 1), key(0.05, 2)));  // one class
  CHECK(before(key(0.0, 1, 5), key(0.0, 1.01, 6)));
  CHECK(before(key(0.0, 1, 5, 40), key(0.0, 1, 5, 41)));
  RankKey smaller = key(0, 1), absent = key(0, 1);
  smaller.values[0] = 9e4;
  absent.values[8] = 0;
  CHECK(before(smaller, key(0, 1)));
  CHECK(before(absent, key(0, 1)));
  CHECK_FALSE(comes_before(key(0, 1), key(0, 1), RankBy::error));
}

TEST_CASE("by sensitivity candidates that meet the spec come first, least sensitive on top", "[ranking]") {
  CHECK(comes_before(key(0.9, 0.5), key(0.0, 1), RankBy::sensitivity));
  CHECK(comes_before(key(0.9, 2), key(1.1, 0.1), RankBy::sensitivity));
  CHECK(comes_before(key(0.1, 1), key(0.9, 1), RankBy::sensitivity));
}

TEST_CASE("alternatives differ in device, variant, current or three parts", "[ranking]") {
  const Standing a = standing(key(0, 1));
  Standing two_parts = a, three_parts = a, current = a;
  two_parts.key.values[0] *= 1.5;
  two_parts.key.values[1] *= 1.5;
  three_parts = two_parts;
  three_parts.key.values[2] *= 1.3;
  current.collector_current *= 1.6;
  CHECK_FALSE(differ(a, two_parts));
  CHECK(differ(a, three_parts));
  CHECK(differ(a, current));
  CHECK(differ(a, standing(key(0, 1), "B")));
  const auto kept = alternatives({standing(key(0.2, 1)), a, two_parts, three_parts}, RankBy::error, 10);
  REQUIRE(kept.size() == 2);
  CHECK(kept[0] == 1);
  CHECK(kept[1] == 3);
  CHECK(alternatives({a, three_parts, current}, RankBy::error, 2).size() == 2);
}

TEST_CASE("equal values count once in a kind", "[ranking]") {
  CHECK(distinct_values({1e3, 1e3, 2e3, 0, 1e3, 1e-6, 1e-6, 0, 0}) == 3);
  CHECK(distinct_values({10, 10, 10, 10, 10, 10, 10, 10, 10}) == 2);
}

TEST_CASE("titles go to the best of the list", "[ranking]") {
  const auto titles = best_at({standing(key(0.01, 2), "A", 2e-3), standing(key(0.02, 1), "B", 1e-3)});
  REQUIRE(titles.size() == 2);
  const auto holds = [&](std::size_t i, const char* t) {
    return std::find(titles[i].begin(), titles[i].end(), t) != titles[i].end();
  };
  CHECK(holds(0, "most exact"));
  CHECK(holds(1, "least sensitive"));
  CHECK(holds(1, "lowest current"));
}

TEST_CASE("every order puts its measure first among those that meet the spec", "[ranking]") {
  RankKey capable = key(0.4, 2), exact = key(0.01, 1), misses = key(1.2, 0.1);
  capable.capability = 1.5, exact.capability = 0.7, misses.capability = 2;
  capable.supply_current = 2e-3, exact.supply_current = 1e-3, misses.supply_current = 1e-4;
  capable.parts = 7, exact.parts = 9, misses.parts = 5;
  const auto first = [&](RankBy by) {
    std::vector<RankKey> list = {exact, misses, capable};
    std::sort(list.begin(), list.end(), [by](const RankKey& a, const RankKey& b) { return comes_before(a, b, by); });
    CHECK(list[2].error == (by == RankBy::error ? 1.2 : misses.error));
    return list[0].error;
  };
  CHECK(first(RankBy::capability) == capable.error);
  CHECK(first(RankBy::yield) == capable.error);  // while searching led by the capability
  CHECK(first(RankBy::worst_case) == capable.error);
  CHECK(first(RankBy::error) == exact.error);
  CHECK(first(RankBy::sensitivity) == exact.error);
  CHECK(first(RankBy::current) == exact.error);
  CHECK(first(RankBy::parts) == capable.error);
}

TEST_CASE("equal capability goes by error, equal yield by capability", "[ranking]") {
  Standing a = standing(key(0.4, 1)), b = standing(key(0.1, 1));
  a.key.capability = b.key.capability = 2;
  CHECK(comes_before(b, a, RankBy::capability));
  a.yield = b.yield = 1;
  a.key.capability = 1.9;
  CHECK(comes_before(b, a, RankBy::yield));
  a.yield = 0.9, a.key.capability = 2, b.yield = 0.8;
  CHECK(comes_before(a, b, RankBy::yield));
  a.worst_case_margin = -0.1, b.worst_case_margin = 0.2;
  CHECK(comes_before(b, a, RankBy::worst_case));
}

TEST_CASE("orders have a word and a reason, in the order of the enum", "[ranking]") {
  for (std::size_t i = 0; i < rank_orders().size(); ++i) CHECK(rank_orders()[i].by == static_cast<RankBy>(i));
  CHECK(std::string(info(RankBy::worst_case).word) == "worst-case");
}

TEST_CASE("non-dominated: no other is as good in all and better in one", "[ranking]") {
  Standing a = standing(key(0.1, 1), "A", 1e-3), worse = standing(key(0.1, 1), "B", 2e-3);
  Standing other = standing(key(0.3, 1), "C", 0.5e-3);
  CHECK(non_dominated({a, worse, other}) == std::vector<bool>{true, false, true});
  worse.key.capability = 1;  // now it is better in something
  CHECK(non_dominated({a, worse, other}) == std::vector<bool>{true, true, true});
  CHECK(non_dominated({a, a}) == std::vector<bool>{true, true});  // equals do not dominate each other
}

TEST_CASE("parts at hand come first in the class that leads, and by capability from 1 on", "[ranking]") {
  RankKey at_hand = key(0.9, 1), to_buy = key(0.1, 1);
  at_hand.to_buy = 0;
  to_buy.to_buy = 2;
  at_hand.capability = 1.1;
  to_buy.capability = 1.9;
  CHECK(comes_before(at_hand, to_buy, RankBy::capability));
  CHECK(comes_before(to_buy, at_hand, RankBy::error));  // another error class
  CHECK(comes_before(at_hand, to_buy, RankBy::current));
  at_hand.capability = 0.9;
  CHECK(comes_before(to_buy, at_hand, RankBy::capability));
  to_buy.capability = 0.95;  // neither is producible: the capability decides
  CHECK(comes_before(to_buy, at_hand, RankBy::capability));
  at_hand.to_buy = to_buy.to_buy = -1;  // no stock
  at_hand.capability = 1.1;
  to_buy.capability = 1.9;
  CHECK(comes_before(to_buy, at_hand, RankBy::capability));
}

TEST_CASE("by cost the cheaper comes first among those that meet the spec, unknown costs last", "[ranking]") {
  RankKey cheap = key(0.9, 1), dear = key(0.1, 1), unknown = key(0.1, 1), missed = key(1.1, 1);
  cheap.cost = 0.4;
  dear.cost = 0.5;
  unknown.cost = std::numeric_limits<double>::quiet_NaN();
  missed.cost = 0.1;
  CHECK(comes_before(cheap, dear, RankBy::cost));
  CHECK(comes_before(dear, unknown, RankBy::cost));
  CHECK(comes_before(dear, missed, RankBy::cost));
  CHECK(leading_class(missed.error, RankBy::cost) > leading_class(dear.error, RankBy::cost));
}
