// Next values and shared values. The truth of each outcome is check() of the changed parts; the neighbours are those of
// IEC 60063, E24 and E6.
#include <algorithm>
#include <map>

#include "catch.hpp"
#include "sample_changes.hpp"

using namespace bandwright;
using namespace bandwright::test;

namespace {

/// Printed values below and above; 0: none is offered there.
using Neighbours = std::map<Role, std::array<double, 2>>;

Neighbours neighbours_of(const std::vector<IfUnavailable>& list) {
  Neighbours found;
  for (const IfUnavailable& one : list) found[one.role][one.up ? 1 : 0] = one.value.value;
  return found;
}

void check_neighbours(const std::vector<IfUnavailable>& list, const Neighbours& expected) {
  const Neighbours found = neighbours_of(list);
  CHECK(found.size() == expected.size());
  for (const auto& [role, values] : expected) {
    INFO(info(role).designator);
    REQUIRE(found.count(role) == 1);
    CHECK(found.at(role)[0] == Approx(values[0]).epsilon(1e-12));
    CHECK(found.at(role)[1] == Approx(values[1]).epsilon(1e-12));
  }
}

void check_outcome(const Spec& spec, const Outcome& outcome, const Candidate& again) {
  CHECK(same_figures(outcome.figures, again.analysis.figures));
  CHECK(same_numbers(outcome.error, again.error));
  CHECK(outcome.active);
  REQUIRE(again.assessment);
  CHECK(same_numbers(outcome.capability, again.assessment->capability));
  CHECK(same_numbers(outcome.yield, again.assessment->yield.share()));
  CHECK(outcome.from_moments == again.assessment->from_moments);
  CHECK(outcome.verdict == again.assessment->verdict);
  CHECK(outcome.holds == holds_the_spec(spec, again));
  CHECK(outcome.reason.empty() == outcome.holds);
}

}  // namespace

TEST_CASE("every role has its next printed value down and up", "[alternates]") {
  const Spec spec = changeable_spec(kChangeableRequirements);
  const auto list = if_unavailable(spec, built_in_catalogue(), changeable_candidate(spec));
  check_neighbours(list, {{Role::upper_divider, {75e3, 91e3}},
                          {Role::lower_divider, {20e3, 24e3}},
                          {Role::collector, {3.6e3, 4.3e3}},
                          {Role::emitter, {56, 68}},
                          {Role::emitter_bypassed, {1.1e3, 1.3e3}},
                          {Role::input_coupling, {3.3e-6, 6.8e-6}},
                          {Role::output_coupling, {680e-9, 1.5e-6}},
                          {Role::bypass, {68e-6, 150e-6}},
                          {Role::shunt, {2.2e-9, 3.3e-9}}});
}

TEST_CASE("each next value is what check says of the changed parts, and the verdicts differ", "[alternates]") {
  const Spec spec = changeable_spec(kChangeableRequirements);
  const Candidate before = changeable_candidate(spec);
  REQUIRE(holds_the_spec(spec, before));
  int held = 0, missed = 0;
  for (const IfUnavailable& one : if_unavailable(spec, built_in_catalogue(), before)) {
    INFO(info(one.role).designator << (one.up ? " up" : " down"));
    const PartChoices parts = with_choice(test::choices_of(before), one.role, one.value);
    check_outcome(spec, one.outcome, checked(spec, "BC547B", parts));
    (one.outcome.holds ? held : missed) += 1;
  }
  CHECK(held > 0);
  CHECK(missed > 0);
}

TEST_CASE("a pinned or absent role has no next value, nor a side on which none is offered", "[alternates]") {
  Spec spec = changeable_spec(kChangeableRequirements);
  spec.parts.pinned[index(Role::collector)] = 3.9e3;
  spec.parts.ranges[index(Role::emitter)] = ValueRange{62, 100};
  PartChoices parts = bandwright::choices_of(kChangeable);
  parts[index(Role::shunt)].value = 0;
  const auto found = neighbours_of(if_unavailable(spec, built_in_catalogue(), checked(spec, "BC547B", parts)));
  CHECK(found.count(Role::collector) == 0);
  CHECK(found.count(Role::shunt) == 0);
  CHECK(found.at(Role::emitter) == std::array<double, 2>{0, 68});
  CHECK(found.size() == 7);
}

TEST_CASE("a stage that a next value drives out of its active region says so", "[alternates]") {
  // R3 at which VCE lies just above the edge, so that its next value up saturates: own example
  const Spec spec = changeable_spec(R"({"gain": {"min": 1}})");
  PartChoices parts = bandwright::choices_of(kChangeable);
  bool seen = false;
  for (double collector : {5.1e3, 5.6e3, 6.2e3, 6.8e3, 7.5e3, 8.2e3, 9.1e3, 10e3}) {
    parts[index(Role::collector)].value = collector;
    const Candidate c = checked(spec, "BC547B", parts);
    if (c.analysis.point.state != BiasState::active) break;
    for (const IfUnavailable& one : if_unavailable(spec, built_in_catalogue(), c)) {
      if (one.outcome.active) continue;
      seen = true;
      CHECK_FALSE(one.outcome.holds);
      CHECK_THAT(one.outcome.reason, Catch::Matchers::ContainsSubstring("VCE"));
      CHECK(std::isnan(one.outcome.capability));
      CHECK(std::isnan(one.outcome.figures[index(Figure::gain)]));
    }
  }
  CHECK(seen);
}

TEST_CASE("every shared value holds when it is checked again, and no pair that holds is missing", "[alternates]") {
  const Spec spec = changeable_spec(R"({"gain": {"min": 4}, "lower_cutoff": {"max": "90 Hz"},
                                        "upper_cutoff": {"min": "9 kHz"}})");
  const Candidate before = changeable_candidate(spec);
  REQUIRE(holds_the_spec(spec, before));
  const auto list = consolidations(spec, built_in_catalogue(), before);
  CHECK_FALSE(list.empty());
  std::size_t holding = 0, failing = 0;
  for (const RoleInfo& kept : roles()) {
    for (const RoleInfo& changed : roles()) {
      if (kept.role == changed.role || kept.kind != changed.kind) continue;
      INFO(changed.designator << " as " << kept.designator);
      const OfferedValue& value = before.offered[index(kept.role)];
      const Candidate again = checked(spec, "BC547B", with_choice(test::choices_of(before), changed.role, value));
      const bool holds = holds_the_spec(spec, again);
      const auto found = std::find_if(list.begin(), list.end(), [&](const Consolidation& c) {
        return c.kept == kept.role && c.changed == changed.role;
      });
      // polarity may ask for another family than the kept part's, which the check then settles alike
      CHECK((found != list.end()) == holds);
      (holds ? holding : failing) += 1;
      if (found == list.end()) continue;
      CHECK(found->value.value == value.value);
      CHECK(found->capability_before == before.assessment->capability);
      check_outcome(spec, found->outcome, again);
    }
  }
  CHECK(holding == list.size());
  CHECK(failing > 0);
  CHECK(std::is_sorted(list.begin(), list.end(), [](const Consolidation& a, const Consolidation& b) {
    return a.outcome.capability > b.outcome.capability;
  }));
}

TEST_CASE("a value is not shared with a pinned role", "[alternates]") {
  Spec spec = changeable_spec(R"({"gain": {"min": 1}})");
  const Candidate before = changeable_candidate(spec);
  const auto all = consolidations(spec, built_in_catalogue(), before);
  const auto touches = [](const Consolidation& c) { return c.kept == Role::bypass || c.changed == Role::bypass; };
  CHECK(std::any_of(all.begin(), all.end(), touches));
  spec.parts.pinned[index(Role::bypass)] = 100e-6;
  const auto rest = consolidations(spec, built_in_catalogue(), before);
  CHECK_FALSE(rest.empty());
  CHECK(std::none_of(rest.begin(), rest.end(), touches));
}

TEST_CASE("what the stock lacks is passed over for the bought one, or named", "[alternates][stock]") {
  Catalogue catalogue = built_in_catalogue();
  StockPart part;
  part.kind = PartKind::resistor;
  part.value = 1.1e3;
  part.family = "metal-film";
  part.quantity = 3;
  catalogue.stock = {"drawer.csv", {part}};
  Spec spec = changeable_spec(kChangeableRequirements);
  const auto of_r5 = [&](int boards) {
    spec.parts.boards = boards;
    const Candidate c = check(spec, catalogue, "BC547B", bandwright::choices_of(kChangeable)).candidates.at(0);
    for (const IfUnavailable& one : if_unavailable(spec, catalogue, c))
      if (one.role == Role::emitter_bypassed && !one.up) return one;
    return IfUnavailable{};
  };
  CHECK(of_r5(1).value.stock != nullptr);
  CHECK(of_r5(1).outcome.available);
  CHECK(of_r5(4).value.stock == nullptr);
}
