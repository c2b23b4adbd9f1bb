// A stock in numbers: counts, ranges and costs against sums taken from the rows, and what is taken where rows say
// nothing.
#include <bandwright/report.hpp>
#include <locale>
#include <nlohmann/json.hpp>
#include <set>

#include "catalogue/stock_summary.hpp"
#include "catch.hpp"
#include "places.hpp"
#include "run_program.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using nlohmann::json;

namespace {

Catalogue with_stock(const std::string& text) {
  Catalogue catalogue = built_in_catalogue();
  catalogue.stock = read_stock(text, "drawer.csv", catalogue);
  return catalogue;
}

constexpr const char* kSmall =
    "kind,value,tolerance,rating,family,quantity,unit_cost\n"
    "resistor,4K7,,,,10,0.5\n"
    "resistor,10K,1 %,0.25 W,metal-film,20,\n"
    "resistor,10K,5 %,0.1 W 75 V,thick-film,,0.01\n"
    "resistor,22M,1 %,0.25 W 250 V,metal-film,4,0.25\n"
    "capacitor,100n,,,,1000,0.125\n"
    "capacitor,100p,5 %,50 V,c0g,1,\n"
    "transistor,BC547B,,,,7,0.25\n"
    "transistor,2N3904,,,,,\n";

std::string written(const Catalogue& catalogue) { return write_stock(catalogue) + write_stock_json(catalogue); }

}  // namespace

TEST_CASE("a small stock, counted by hand") {
  const Catalogue catalogue = with_stock(kSmall);
  const auto kinds = summarise(catalogue.stock, catalogue);
  REQUIRE(kinds.size() == 3);
  const StockGroup& r = kinds[0].all;
  CHECK(r.rows == 4);
  CHECK(r.values == 3);
  CHECK(r.range.min == 4700);
  CHECK(r.range.max == 22e6);
  CHECK(r.pieces == 34);
  CHECK(r.uncounted == 1);
  CHECK(r.cost == 10 * 0.5 + 4 * 0.25);
  CHECK(r.costed == 2);
  CHECK(r.without_family == 1);
  CHECK(r.without_tolerance == 1);
  CHECK(r.without_power == 1);
  CHECK(r.without_voltage == 2);
  CHECK(r.without_cost == 1);
  CHECK(r.outside == 1);  // metal film is made up to 4.7 Mohm
  REQUIRE(kinds[0].groups.size() == 2);
  CHECK(kinds[0].groups[0].name == "metal-film");
  CHECK(kinds[0].groups[0].rows == 3);
  CHECK(kinds[0].groups[1].name == "thick-film");
  const StockGroup& c = kinds[1].all;
  CHECK(c.pieces == 1001);
  CHECK(c.cost == 125);
  CHECK(c.without_power == 0);
  REQUIRE(kinds[1].groups.size() == 2);
  CHECK(kinds[1].groups[0].name == "c0g");
  CHECK(kinds[1].groups[1].name == "film");  // the first choice at 100 nF
  const StockGroup& q = kinds[2].all;
  CHECK(q.values == 2);
  CHECK(q.without_tolerance == 0);
  CHECK(kinds[2].groups[1].name == "2N3904");
}

TEST_CASE("the example's sums are those of its rows") {
  const Catalogue catalogue = with_stock(test::read_file(test::examples_folder() / "drawer.csv"));
  for (const StockKind& kind : summarise(catalogue.stock, catalogue)) {
    std::size_t rows = 0;
    long pieces = 0;
    double cost = 0;
    std::set<std::string> codes;
    for (const StockPart& part : catalogue.stock.parts) {
      if (part.kind != kind.kind) continue;
      ++rows;
      pieces += part.quantity.value_or(0);
      if (part.unit_cost > 0) cost += static_cast<double>(part.quantity.value_or(0)) * part.unit_cost;
      codes.insert(part.type + std::to_string(part.value * 1e12));
    }
    CHECK(kind.all.rows == rows);
    CHECK(kind.all.pieces == pieces);
    CHECK(kind.all.cost == Approx(cost).epsilon(1e-12));
    CHECK(kind.all.values == codes.size());
    std::size_t in_groups = 0;
    for (const StockGroup& group : kind.groups) in_groups += group.rows;
    CHECK(in_groups == rows);
  }
}

TEST_CASE("the table says what is held and what is taken where rows say nothing") {
  const std::string text = write_stock(with_stock(kSmall));
  for (const char* piece :
       {"drawer.csv: 8 rows, no fault", "4.7 kΩ", "22 MΩ", "1,001", "metal-film", "BC547B", "metal-film ±1 %",
        "film ±10 %", "metal-film 250 mW", "film 63 V", "as it is: made are 1 Ω to 4.7 MΩ", "never runs short"})
    CHECK_THAT(text, ContainsSubstring(piece));
  CHECK_THAT(write_stock(with_stock("kind,value\n")), ContainsSubstring("drawer.csv: 0 rows, no fault"));
  CHECK_THAT(write_stock(with_stock("kind,value\nresistor,1K\n")), ContainsSubstring("drawer.csv: 1 row, no fault"));
}

TEST_CASE("the JSON document carries every row, null where it says nothing") {
  const Catalogue catalogue = with_stock(kSmall);
  const json document = json::parse(write_stock_json(catalogue));
  CHECK(document.at("format") == "bandwright/stock");
  CHECK(document.at("version") == 1);
  CHECK(document.at("rows") == 8);
  CHECK(document.at("kinds").size() == 3);
  CHECK(document.at("kinds")[0].at("families")[0].at("family") == "metal-film");
  CHECK(document.at("kinds")[2].at("types")[0].at("type") == "BC547B");
  CHECK(document.at("kinds")[2].at("min").is_null());
  REQUIRE(document.at("parts").size() == 8);
  const json& first = document.at("parts")[0];
  CHECK(first.at("value") == 4700);
  CHECK(first.at("value_code") == "4K7");
  CHECK(first.at("tolerance").is_null());
  CHECK(first.at("family").is_null());
  CHECK(first.at("quantity") == 10);
  CHECK(document.at("parts")[1].at("tolerance") == json::array({-0.01, 0.01}));
  CHECK(document.at("parts")[1].at("unit_cost").is_null());
  CHECK(document.at("parts")[6].at("value") == "BC547B");
  bool told = false;
  for (const json& one : document.at("assumptions"))
    told = told || (one.at("kind") == "capacitor" && one.at("what") == "tolerance" && one.at("rows") == 1 &&
                    one.at("taken") == "film ±10 %");
  CHECK(told);
}

TEST_CASE("a decimal comma of the locale reaches no writer of a stock") {
  struct CommaNumbers : std::numpunct<char> {
    char do_decimal_point() const override { return ','; }
    char do_thousands_sep() const override { return '.'; }
    std::string do_grouping() const override { return "\3"; }
  };
  const Catalogue catalogue = with_stock(kSmall);
  const std::string plain = written(catalogue);
  const std::locale before = std::locale::global(std::locale(std::locale(), new CommaNumbers));
  const std::string with_comma = written(catalogue);
  std::locale::global(before);
  CHECK(with_comma == plain);
}
