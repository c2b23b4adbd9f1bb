// A spec held against the catalogue: every fault, by name.
#include <bandwright/catalogue.hpp>

#include "catch.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;

namespace {

Spec spec_at(double supply) {
  Spec spec;
  spec.supply = {supply, supply, supply};
  spec.ambient = {298.15, 298.15, 298.15};
  return spec;
}

std::vector<Fault> faults_of(const Spec& spec) { return check_against_catalogue(spec, built_in_catalogue()); }

}  // namespace

TEST_CASE("a spec that the catalogue can serve has no fault") {
  Spec spec = spec_at(12);
  spec.devices = {"2N3904", "bc547b"};
  CHECK(faults_of(spec).empty());
  spec = spec_at(-12);
  spec.devices = {"2N3906"};
  CHECK(faults_of(spec).empty());
}

TEST_CASE("devices: unknown names and the wrong polarity") {
  Spec spec = spec_at(12);
  spec.devices = {"BC547D", "2N3906", "2N3904"};
  auto faults = faults_of(spec);
  REQUIRE(faults.size() == 2);
  CHECK(faults[0].where == "devices[0]");
  CHECK(faults[0].found == "BC547D");
  CHECK_THAT(faults[0].suggestion, ContainsSubstring("BC547"));
  CHECK(faults[1].where == "devices[1]");
  CHECK_THAT(faults[1].expected, ContainsSubstring("NPN"));
  spec = spec_at(-12);
  spec.devices = {"2N3904"};
  faults = faults_of(spec);
  REQUIRE(faults.size() == 1);
  CHECK_THAT(faults[0].expected, ContainsSubstring("PNP"));
}

TEST_CASE("X7R alone is refused where the cutoff it would set must be better than 40 %") {
  Spec spec = spec_at(12);
  spec.parts.capacitors.families = {"X7R"};
  CHECK(faults_of(spec).empty());
  spec.requirements[index(Figure::lower_cutoff)] = Requirement{40, 40 / 1.2, 40 * 1.2};
  const auto faults = faults_of(spec);
  REQUIRE(faults.size() == 2);  // input and output coupling; bypass may be absent
  CHECK(faults[0].where == "parts.capacitors");
  CHECK_THAT(describe(faults[0]), ContainsSubstring("input_coupling") &&
                                      ContainsSubstring("class 2 ceramic is refused") && ContainsSubstring("40 %"));
  spec.parts.capacitors.families = {"film", "X7R"};
  CHECK(faults_of(spec).empty());
}

TEST_CASE("families: unknown, and of the other kind") {
  Spec spec = spec_at(12);
  spec.parts.capacitors.families = {"electrolitic", "metal-film"};
  spec.parts.resistors.families = {"metal_film"};
  const auto faults = faults_of(spec);
  REQUIRE(faults.size() == 3);
  CHECK(faults[0].where == "parts.resistors.family");
  CHECK(faults[0].suggestion == "metal-film");
  CHECK(faults[1].suggestion == "electrolytic");
  CHECK_THAT(faults[2].expected, ContainsSubstring("a family of capacitors"));
}

TEST_CASE("a series that does not exist") {
  Spec spec = spec_at(12);
  spec.parts.resistors.series = "E42";
  const auto faults = faults_of(spec);
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].where == "parts.resistors.series");
}

TEST_CASE("pinned values that are not sold") {
  Spec spec = spec_at(12);
  spec.parts.pinned[index(Role::collector)] = 47e6;
  spec.parts.pinned[index(Role::bypass)] = 0.5;
  spec.parts.pinned[index(Role::shunt)] = 0;
  const auto faults = faults_of(spec);
  REQUIRE(faults.size() == 2);
  CHECK(faults[0].where == "parts.pinned.collector");
  CHECK_THAT(faults[0].expected, ContainsSubstring("4.7 MΩ"));
  CHECK(faults[1].where == "parts.pinned.bypass");
}

TEST_CASE("rules under which nothing is sold name the roles that cannot do without") {
  Spec spec = spec_at(12);
  spec.parts.capacitors.tolerance = Tolerance{0.001, 0.001};
  const auto faults = faults_of(spec);
  REQUIRE(faults.size() == 2);  // input and output coupling; bypass and shunt may be absent
  CHECK(faults[0].where == "parts.capacitors");
  CHECK_THAT(faults[0].found, ContainsSubstring("input_coupling"));
  CHECK_THAT(faults[1].found, ContainsSubstring("output_coupling"));
  spec.parts.pinned[index(Role::input_coupling)] = 1e-6;
  spec.parts.pinned[index(Role::output_coupling)] = 1e-6;
  CHECK(faults_of(spec).size() == 2);  // neither is sold at 0.1 %
}

TEST_CASE("faults of several kinds are told together") {
  Spec spec = spec_at(12);
  spec.devices = {"BC999"};
  spec.parts.resistors.series = "E25";
  spec.parts.capacitors.families = {"x8r"};
  CHECK(faults_of(spec).size() == 3);
}
