// The catalogue as it is shown: each entry with figures, provenance, lead order and sources.
#include <bandwright/report.hpp>

#include "catch.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;

TEST_CASE("the list names every entry") {
  const Catalogue& catalogue = built_in_catalogue();
  const std::string text = write_catalogue(catalogue);
  for (const Transistor& t : catalogue.transistors) CHECK_THAT(text, ContainsSubstring(t.type));
  for (const Family& f : catalogue.families) CHECK_THAT(text, ContainsSubstring(f.key));
  for (const Series& s : series()) CHECK_THAT(text, ContainsSubstring(s.name));
}

TEST_CASE("a transistor shows figures, provenance, lead order and sources") {
  const Catalogue& catalogue = built_in_catalogue();
  for (const Transistor& t : catalogue.transistors) {
    const std::string text = write_transistor(catalogue, t);
    INFO(t.type);
    for (const char* piece : {"hFE", "VCEO", "fT", "Packages and lead order", "Sources"})
      CHECK_THAT(text, ContainsSubstring(piece));
    CHECK_THAT(text, ContainsSubstring(t.pnp ? "PNP" : "NPN"));
    for (const Package& p : t.packages) CHECK_THAT(text, ContainsSubstring(p.lead_order));
    CHECK_THAT(text, !ContainsSubstring("nan ") && !ContainsSubstring("not described"));
  }
}

TEST_CASE("a family shows its range, ratings and series") {
  const Catalogue& catalogue = built_in_catalogue();
  for (const Family& f : catalogue.families) {
    const std::string text = write_family(catalogue, f);
    INFO(f.key);
    for (const char* piece : {"made from", "series", "tolerance", "rated voltages"})
      CHECK_THAT(text, ContainsSubstring(piece));
  }
}

TEST_CASE("a family of two-sided tolerance and cold loss shows both") {
  Family family;
  family.key = "invented";
  family.name = "invented capacitor";
  family.kind = PartKind::capacitor;
  family.made = {1e-6, 1e-3};
  family.tolerances = {{0.2, 0.5}};
  family.cold_loss = 0.005;
  family.polarised = true;
  const std::string text = write_family({}, family);
  CHECK_THAT(text, ContainsSubstring("-20/+50 %") && ContainsSubstring("0.5 % a kelvin") &&
                       ContainsSubstring("only when asked for"));
}

TEST_CASE("E6 shows the six numbers of the standard") {
  // IEC 60063, E6: 1.0 1.5 2.2 3.3 4.7 6.8
  CHECK_THAT(write_series(*find_series("E6")), ContainsSubstring("1.0 1.5 2.2 3.3 4.7 6.8"));
}
