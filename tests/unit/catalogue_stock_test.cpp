// The user's stock as it should be: every heading, every way to write a cell, JSON, the starting file, the example.
#include <bandwright/catalogue.hpp>
#include <cmath>
#include <locale>
#include <map>
#include <random>

#include "catch.hpp"
#include "places.hpp"
#include "run_program.hpp"

using namespace bandwright;

namespace {

std::vector<StockPart> parts_of(const std::string& text) {
  return read_stock(text, "drawer.csv", built_in_catalogue()).parts;
}

StockPart only_part(const std::string& text) {
  const auto parts = parts_of(text);
  REQUIRE(parts.size() == 1);
  return parts[0];
}

bool same(double a, double b) { return a == b || (std::isnan(a) && std::isnan(b)); }

bool same_but_place(const StockPart& a, const StockPart& b) {
  return a.kind == b.kind && a.value == b.value && a.type == b.type && a.tolerance == b.tolerance &&
         same(a.voltage_rating, b.voltage_rating) && same(a.power_rating, b.power_rating) && a.family == b.family &&
         a.quantity == b.quantity && same(a.unit_cost, b.unit_cost) && a.part_number == b.part_number &&
         a.note == b.note;
}

void check_same(const std::vector<StockPart>& a, const std::vector<StockPart>& b) {
  REQUIRE(a.size() == b.size());
  for (std::size_t i = 0; i < a.size(); ++i) {
    INFO(a[i].where << " against " << b[i].where);
    CHECK(same_but_place(a[i], b[i]));
  }
}

constexpr const char* kFull =
    "kind,value,tolerance,rating,family,quantity,unit_cost,part_number,note\r\n"
    "resistor,4K7,1 %,\"0.25 W, 250 V\",metal-film,100,0.02,DRAWER-R-1,\"said \"\"1 %\"\"\"\r\n"
    "capacitor,100n,K,63 V,film,0,0.12,,\r\n"
    "transistor,bc547b,,,,50,,,\r\n";

}  // namespace

TEST_CASE("a stock with every heading") {
  const Stock stock = read_stock(kFull, "drawer.csv", built_in_catalogue());
  CHECK(stock.name == "drawer.csv");
  REQUIRE(stock.parts.size() == 3);
  const StockPart& r = stock.parts[0];
  CHECK(r.kind == PartKind::resistor);
  CHECK(r.value == 4700);
  CHECK(r.tolerance == Tolerance{0.01, 0.01});
  CHECK(r.power_rating == 0.25);
  CHECK(r.voltage_rating == 250);
  CHECK(r.family == "metal-film");
  CHECK(r.quantity == 100);
  CHECK(r.unit_cost == 0.02);
  CHECK(r.part_number == "DRAWER-R-1");
  CHECK(r.note == "said \"1 %\"");
  CHECK(r.where == "drawer.csv, line 2");
  const StockPart& c = stock.parts[1];
  CHECK(c.kind == PartKind::capacitor);
  CHECK(c.value == 100e-9);
  CHECK(c.tolerance == Tolerance{0.1, 0.1});
  CHECK(c.voltage_rating == 63);
  CHECK(std::isnan(c.power_rating));
  CHECK(c.quantity == 0);
  const StockPart& q = stock.parts[2];
  CHECK(q.kind == PartKind::transistor);
  CHECK(q.type == "BC547B");
  CHECK(q.value == 0);
  CHECK_FALSE(q.tolerance);
  CHECK(std::isnan(q.unit_cost));
}

TEST_CASE("headings in any order and case, spaces, underscores and dashes alike") {
  const char* shuffled =
      " NOTE ,Part-Number,UNIT COST,Quantity,Family,rating,Tolerance,VALUE,Kind\n"
      "\"said \"\"1 %\"\"\",DRAWER-R-1,0.02,100,METAL FILM,250 V 0.25 W,F,4.7 kohm,Resistor\n"
      ",,,,,,,,\n"
      ",,0.12,0,polyester film capacitor,63V,±10 %,0.1 µF,CAPACITOR\n"
      ",,,50,,,,BC547B,transistor\n";
  check_same(parts_of(shuffled), parts_of(kFull));
}

TEST_CASE("only kind and value are needed") {
  const StockPart part = only_part("value,kind\n2M2,resistor\n");
  CHECK(part.value == 2.2e6);
  CHECK_FALSE(part.tolerance);
  CHECK_FALSE(part.quantity);
  CHECK(std::isnan(part.voltage_rating));
  CHECK(std::isnan(part.power_rating));
  CHECK(std::isnan(part.unit_cost));
  CHECK(part.family.empty());
  CHECK(part.part_number.empty());
  CHECK(parts_of("kind,value\n").empty());
}

TEST_CASE("ratings") {
  struct Row {
    const char* kind;
    const char* text;
    double power, voltage;
  };
  constexpr double kNone = std::numeric_limits<double>::quiet_NaN();
  for (const Row& row : {Row{"resistor", "0.25 W", 0.25, kNone}, Row{"resistor", "250mW", 0.25, kNone},
                         Row{"resistor", "350 V", kNone, 350}, Row{"resistor", "0.5 W 350 V", 0.5, 350},
                         Row{"resistor", "0.5W/350V", 0.5, 350}, Row{"resistor", "350V;0.5W", 0.5, 350},
                         Row{"resistor", "0.5W350V", 0.5, 350}, Row{"capacitor", "63 V", kNone, 63},
                         Row{"capacitor", "1 kV", kNone, 1000}, Row{"capacitor", "6.3", kNone, 6.3}}) {
    INFO(row.text);
    const std::string value = row.kind == std::string("resistor") ? "1K0" : "1n0";
    const StockPart part =
        only_part(std::string("kind,value,rating\n") + row.kind + "," + value + "," + row.text + "\n");
    CHECK(same(part.power_rating, row.power));
    CHECK(same(part.voltage_rating, row.voltage));
  }
}

TEST_CASE("tolerances by letter, below 10 pF as a capacitance") {
  const auto tolerance = [](const std::string& cells) {
    return only_part("kind,value,tolerance\n" + cells + "\n").tolerance.value();
  };
  CHECK(tolerance("resistor,4K7,B") == Tolerance{0.001, 0.001});
  CHECK(tolerance("capacitor,10u,S") == Tolerance{0.2, 0.5});
  CHECK(tolerance("capacitor,10p,D") == Tolerance{0.005, 0.005});
  // Source: makers' C0G sheets, text copies: C is 0.25 pF below 10 pF, here of 5 pF.
  CHECK(tolerance("capacitor,5p0,C").below == Approx(0.05).epsilon(1e-12));
  CHECK(tolerance("capacitor,4p7,5 %") == Tolerance{0.05, 0.05});
  CHECK(tolerance("resistor,4R7,C") == Tolerance{0.0025, 0.0025});
}

TEST_CASE("the same part twice is two parts where rating or part number differ") {
  CHECK(parts_of("kind,value,rating,part number\n"
                 "capacitor,1u,63 V,\ncapacitor,1u,100 V,\ncapacitor,1u,63 V,A\ncapacitor,1u,63 V,B\n"
                 "resistor,1K,0.25 W,\nresistor,1K,0.5 W,\nresistor,1K,,\nresistor,1K1,,\n")
            .size() == 8);
  CHECK(parts_of("kind,value,tolerance,family\nresistor,1K,1 %,\nresistor,1K,5 %,\nresistor,1K,1 %,thick-film\n")
            .size() == 3);
}

TEST_CASE("a value outside what its family is made in is in the drawer all the same") {
  CHECK(only_part("kind,value,family\nresistor,100M,metal-film\n").value == 100e6);
}

TEST_CASE("JSON says the same as comma-separated values") {
  const char* list = R"([
    {"kind": "resistor", "value": 4700, "tolerance": 0.01, "rating": "0.25 W 250 V", "family": "metal film resistor",
     "quantity": 100, "unit_cost": 0.02, "part_number": "DRAWER-R-1", "note": "said \"1 %\""},
    {"Kind": "capacitor", "Value": 1e-7, "Tolerance": "10 %", "Rating": 63, "Family": "film", "Quantity": "0",
     "Unit cost": "0.12", "Part number": "", "Note": null},
    {"value": "BC547B", "kind": "transistor", "quantity": 50}])";
  const auto parts = parts_of(list);
  check_same(parts, parts_of(kFull));
  CHECK(parts[1].where == "drawer.csv: [1]");
  const auto inside = parts_of(std::string("\xEF\xBB\xBF{\"stock\": ") + list + "}");
  check_same(inside, parts);
  CHECK(inside[1].where == "drawer.csv: stock[1]");
  CHECK(parts_of("[]").empty());
}

TEST_CASE("the starting file reads back without a fault and explains every heading") {
  const std::string text = stock_to_start_from();
  const auto parts = parts_of(text);
  REQUIRE(parts.size() >= 3);
  for (const PartKind kind : {PartKind::resistor, PartKind::capacitor, PartKind::transistor})
    CHECK(std::any_of(parts.begin(), parts.end(), [&](const StockPart& p) { return p.kind == kind; }));
  for (const char* heading :
       {"kind", "value", "tolerance", "rating", "family", "quantity", "unit_cost", "part_number", "note"})
    CHECK(text.find("\n# " + std::string(heading) + " ") != std::string::npos);
  for (const Family& family : built_in_catalogue().families) CHECK(text.find(family.key) != std::string::npos);
  CHECK(text.find("invented") != std::string::npos);
  // A spreadsheet keeps a comment whole only where it holds no comma and no quote.
  for (std::size_t at = text.find('#'); at != std::string::npos; at = text.find("\n#", at + 1)) {
    const std::string line = text.substr(at, text.find('\n', at + 1) - at);
    CHECK(line.find_first_of(",\"") == std::string::npos);
  }
}

TEST_CASE("the example is a drawer of 60 resistor and 20 capacitor values and four types") {
  const auto parts = parts_of(test::read_file(test::examples_folder() / "drawer.csv"));
  std::map<PartKind, int> rows;
  for (const StockPart& part : parts) ++rows[part.kind];
  CHECK(rows[PartKind::resistor] == 60);
  CHECK(rows[PartKind::capacitor] == 20);
  CHECK(rows[PartKind::transistor] == 4);
  for (const StockPart& part : parts) {
    INFO(part.where);
    CHECK((part.part_number.empty() || part.part_number.starts_with("DRAWER-")));
    CHECK((part.kind == PartKind::transistor || coarsest_series(part.value) != nullptr));
  }
}

TEST_CASE("whatever the bytes, a stock is read or its faults are told") {
  std::mt19937 random(12);
  const std::string letters = ",\"\n\r#;0-%/ .eKVWF\xC2\xB5\xFF{[]}:";
  int read = 0;
  int refused = 0;
  for (int run = 0; run < 400; ++run) {
    std::string text = run % 2 == 0 ? stock_to_start_from() : R"([{"kind": "resistor", "value": "4K7", "rating": 5}])";
    for (int change = 0; change < 3; ++change) {
      const std::size_t at = random() % text.size();
      if (random() % 2 == 0)
        text[at] = letters[random() % letters.size()];
      else
        text.erase(at, random() % 20);
    }
    try {
      parts_of(text);
      ++read;
    } catch (const InputError& error) {
      CHECK_FALSE(error.faults().empty());
      ++refused;
    }
  }
  CHECK(read > 20);
  CHECK(refused > 100);
}

TEST_CASE("a locale with a decimal comma changes nothing of what is read") {
  struct CommaNumbers : std::numpunct<char> {
    char do_decimal_point() const override { return ','; }
    char do_thousands_sep() const override { return '.'; }
    std::string do_grouping() const override { return "\3"; }
  };
  const auto plain = parts_of(kFull);
  const std::string start = stock_to_start_from();
  const std::locale before = std::locale::global(std::locale(std::locale(), new CommaNumbers));
  const auto with_comma = parts_of(kFull);
  const std::string start_with_comma = stock_to_start_from();
  CHECK_THROWS_AS(parts_of("kind,value\nresistor,\"4,7k\"\n"), InputError);
  std::locale::global(before);
  check_same(with_comma, plain);
  CHECK(start_with_comma == start);
}
