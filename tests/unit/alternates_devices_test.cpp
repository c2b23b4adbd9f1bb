// Transistors that may stand in. The truth of each outcome is check() with that type; lead orders are those of the data
// sheets named in data/transistors: 2N3904 E-B-C (Fairchild, Motorola), BC547 C-B-E (TGS, Diotec).
#include <algorithm>
#include <set>

#include "catch.hpp"
#include "sample_changes.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

namespace {

std::string warning(const char* chosen, const char* other) {
  return lead_warning(*built_in_catalogue().find_transistor(chosen), *built_in_catalogue().find_transistor(other));
}

const Substitute* find(const std::vector<Substitute>& list, const std::string& device) {
  const auto found = std::find_if(list.begin(), list.end(), [&](const Substitute& s) { return s.device == device; });
  return found == list.end() ? nullptr : &*found;
}

Package package(const char* name, const char* lead_order) {
  Package p;
  p.name = name;
  p.lead_order = lead_order;
  return p;
}

std::string letters(const char* lead_order) { return lead_letters(package("TO-92", lead_order)); }

Transistor packaged(const char* type, const std::vector<Package>& packages) {
  Transistor t;
  t.type = type;
  t.packages = packages;
  return t;
}

}  // namespace

TEST_CASE("a substitute is listed where check says that the spec holds with it, and only there", "[alternates]") {
  const Spec spec = changeable_spec(kChangeableRequirements);
  const Candidate before = changeable_candidate(spec);
  const auto list = substitutes(spec, built_in_catalogue(), before);
  std::size_t listed = 0, failing = 0;
  for (const Transistor& t : built_in_catalogue().transistors) {
    INFO(t.type);
    const Substitute* one = find(list, t.type);
    if (t.pnp || t.type == "BC547B") {
      CHECK(one == nullptr);
      continue;
    }
    const Candidate again = checked(spec, t.type, test::choices_of(before));
    CHECK((one != nullptr) == holds_the_spec(spec, again));
    if (one == nullptr) ++failing;
    if (one == nullptr) continue;
    ++listed;
    CHECK(same_figures(one->outcome.figures, again.analysis.figures));
    CHECK(one->outcome.capability == again.assessment->capability);
    CHECK(one->outcome.yield == again.assessment->yield.share());
    CHECK(one->packages.size() == t.packages.size());
    CHECK(one->named);
  }
  CHECK(listed == list.size());
  CHECK(listed > 0);
  CHECK(failing > 0);
}

TEST_CASE("substitutes come by capability, then by type", "[alternates]") {
  const Spec spec = changeable_spec(R"({"gain": {"min": 1}})");  // easy: many reach the highest capability
  const auto list = substitutes(spec, built_in_catalogue(), changeable_candidate(spec));
  REQUIRE(list.size() > 3);
  std::set<double> capabilities;
  for (std::size_t i = 0; i < list.size(); ++i) {
    capabilities.insert(list[i].outcome.capability);
    if (i == 0) continue;
    const bool higher = list[i - 1].outcome.capability > list[i].outcome.capability;
    const bool tied = list[i - 1].outcome.capability == list[i].outcome.capability;
    CHECK((higher || (tied && list[i - 1].device < list[i].device)));
  }
  CHECK(capabilities.size() < list.size());
}

TEST_CASE("a substitute that the spec does not name is marked", "[alternates]") {
  Spec spec = changeable_spec(R"({"gain": {"min": 1}})");
  spec.devices = {"BC547B", "bc547c"};
  const auto list = substitutes(spec, built_in_catalogue(), changeable_candidate(spec));
  REQUIRE(find(list, "BC547C"));
  CHECK(find(list, "BC547C")->named);
  REQUIRE(find(list, "2N5088"));
  CHECK_FALSE(find(list, "2N5088")->named);
}

TEST_CASE("a PNP stage takes PNP types only", "[alternates]") {
  Spec spec = changeable_spec(R"({"gain": {"min": 1}})");
  spec.supply = {-12, -12.6, -11.4};
  const Candidate c = checked(spec, "BC557B", bandwright::choices_of(kChangeable));
  REQUIRE(c.analysis.point.state == BiasState::active);
  const auto list = substitutes(spec, built_in_catalogue(), c);
  REQUIRE(list.size() == 1);
  CHECK(list[0].device == "2N3906");
}

TEST_CASE("a higher rating, another family or polarity of a part that stays is told", "[alternates]") {
  const Spec spec = changeable_spec(R"({"gain": {"min": 1}})");
  Candidate before = changeable_candidate(spec);
  for (const Substitute& one : substitutes(spec, built_in_catalogue(), before)) CHECK(one.outcome.other_parts.empty());
  for (Part& part : before.parts)
    if (part.role == Role::output_coupling) part.voltage_rating = 1;  // V: less than any capacitor is made for
  for (const Substitute& one : substitutes(spec, built_in_catalogue(), before))
    CHECK_THAT(one.outcome.other_parts, ContainsSubstring("C2: ") && ContainsSubstring("in place of"));
}

TEST_CASE("lead orders are read with or without numbers", "[alternates]") {
  CHECK(letters("E-B-C (1-2-3)") == "E-B-C");
  CHECK(letters("1 C, 2 B, 3 E (flat side toward you)") == "C-B-E");
  CHECK(letters("3 C, 1 B, 2 E") == "B-E-C");
  CHECK(letters("1 E, 2 B, 3 C (case = C)") == "E-B-C");
  CHECK(letters("E-B-E").empty());
  CHECK(letters("see the drawing").empty());
  for (const Transistor& t : built_in_catalogue().transistors)
    for (const Package& p : t.packages) CHECK(lead_letters(p).size() == 5);
}

TEST_CASE("leads that differ from the chosen type's are warned of", "[alternates]") {
  CHECK(warning("BC547B", "2N3904") == "TO-92: E-B-C, BC547B has C-B-E (turned round)");
  CHECK(warning("2N3904", "2N4401").empty());
  CHECK(warning("BC547B", "BC550C").empty());
  CHECK_THAT(warning("2N3904", "2N5551"), ContainsSubstring("by source: suffix -C parts are E-C-B"));
  CHECK_THAT(warning("2N3904", "2N2222A"), ContainsSubstring("P2N2222A (onsemi) is C-B-E instead"));
  CHECK_THAT(warning("BC550C", "BC547A"), ContainsSubstring("Philips numbers the leads the other way"));
  CHECK(warning("BC547B", "BFR92A").starts_with("comes in SOT-23, BC547B in TO-92; "));
}

TEST_CASE("a type whose own packages differ is warned of", "[alternates]") {
  const Transistor chosen = packaged("A", {package("TO-92", "E-B-C")});
  CHECK(lead_warning(chosen, packaged("B", {package("TO-92", "1 E, 2 B, 3 C")})).empty());
  CHECK(lead_warning(chosen, packaged("B", {package("TO-92 (one)", "E-B-C"), package("TO-92 (two)", "E-C-B")})) ==
        "TO-92 (two): E-C-B, A has E-B-C; TO-92, by source: E-B-C or E-C-B");
  CHECK(lead_warning(chosen, packaged("B", {})) == "comes in an unstated package, A in TO-92");
}
