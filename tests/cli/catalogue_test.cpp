// catalogue: lists, single entries, and a folder that adds to it.
#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

TEST_CASE("the catalogue lists transistors, families and series") {
  const Outcome outcome = run_bandwright({"catalogue"});
  CHECK(outcome.status == 0);
  for (const char* piece : {"2N3904", "BC557B", "BFR92A", "metal-film", "electrolytic", "x7r", "E24", "E192"})
    CHECK_THAT(outcome.out, ContainsSubstring(piece));
}

TEST_CASE("entries are shown one after the other in the order asked for") {
  const Outcome outcome = run_bandwright({"catalogue", "E6", "BC547B", "film"});
  CHECK(outcome.status == 0);
  const auto at = [&](const char* text) { return outcome.out.find(text); };
  CHECK(at("E6: 6 values") < at("BC547B: NPN"));
  CHECK(at("BC547B: NPN") < at("film: polyester"));
}

TEST_CASE("one unknown name prints nothing at all") {
  const Outcome outcome = run_bandwright({"catalogue", "E6", "nothing"});
  CHECK(outcome.status == 2);
  CHECK(outcome.out.empty());
}

TEST_CASE("a faulty folder is told with file and place") {
  const TemporaryFolder folder;
  folder.write("mine.json", "{\"transistors\": 3}");
  const Outcome outcome = run_bandwright({"catalogue", "--catalogue", folder.path().string()});
  CHECK(outcome.status == 2);
  CHECK_THAT(outcome.err, ContainsSubstring("mine.json"));
}
