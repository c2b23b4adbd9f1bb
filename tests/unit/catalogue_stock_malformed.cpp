// Malformed stock files: each with the place that is named and a piece of the message.
#include <algorithm>
#include <bandwright/catalogue.hpp>

#include "catch.hpp"

using namespace bandwright;

namespace {

struct Malformed {
  std::string text;
  const char* where;
  const char* says;
};

std::vector<Fault> faults_of(const std::string& text) {
  try {
    read_stock(text, "drawer", built_in_catalogue());
  } catch (const InputError& error) {
    return error.faults();
  }
  return {};
}

void check_each(const std::vector<Malformed>& rows) {
  for (const Malformed& row : rows) {
    INFO(row.text);
    const std::vector<Fault> faults = faults_of(row.text);
    REQUIRE(!faults.empty());
    INFO(describe(faults.front()));
    CHECK(faults.size() == 1);  // one mistake is one fault, and not a trail of others
    CHECK(faults.front().where == row.where);
    CHECK(describe(faults.front()).find(row.says) != std::string::npos);
  }
}

// One row under all headings.
std::string row(const std::string& cells) {
  return "kind,value,tolerance,rating,family,quantity,unit cost,part number,note\n" + cells + "\n";
}

std::vector<Malformed> form() {
  const std::string head = "kind,value,tolerance\n";
  return {
      {"", "drawer", "nothing found; expected headings such as kind, value, tolerance"},
      {"# only\n\n# comments\n", "drawer", "and a row for each part"},
      {std::string("\0\0\0", 3), "drawer", "found \"\\x00\\x00\\x00\"; expected text"},
      {head + "resistor,\"4K7,1 %\nresistor,10K,1 %\n", "drawer, line 2, column 2 (value)", "closes the field"},
      {head + "resistor,\"4K7\"x,1 %\n", "drawer, line 2, column 2 (value)", "behind the closing quote"},
      {head + "resistor,4\"K7\",1 %\n", "drawer, line 2, column 2 (value)", "each quote inside doubled"},
      {head + "resistor,4K7\n", "drawer, line 2", "found \"2 fields\"; expected 3, one for each heading"},
      {head + "resistor,4,7k,1 %\n", "drawer, line 2", "found \"4 fields\"; expected 3"},
      {head + "resistor,4K7,1 %\r", "drawer, line 2, column 3 (tolerance)", "LF or CRLF"},
      {head + "resistor,4K7,1 %\ncapacitor,10 \xB5"
              "F,\n",
       "drawer, line 3, column 2 (value)", "expected text in UTF-8"},
      {"kind;value;tolerance\nresistor;4K7;1 %\n", "drawer, line 1", "parted by commas and by nothing else"},
      {"kind\tvalue\nresistor\t4K7\n", "drawer, line 1", "parted by commas"},
      {"resistor,4K7,1 %\nresistor,10K,1 %\n", "drawer, line 1",
       "found \"resistor,4K7,1 %\"; expected headings, among them kind and value"},
  };
}

std::vector<Malformed> headings() {
  return {
      {"kind,tolerance\nresistor,1 %\n", "drawer, line 1", "nothing found; expected a column with the heading value"},
      {"# mine\nvalue\n4K7\n", "drawer, line 2", "expected a column with the heading kind"},
      {"kind,vaule\nresistor,4K7\n", "drawer, line 1, column 2", "did you mean \"value\"?"},
      {"kind,value,shelf\nresistor,4K7,3\n", "drawer, line 1, column 3",
       "found \"shelf\"; expected one of the headings"},
      {"kind,value,Unit Cots\nresistor,4K7,3\n", "drawer, line 1, column 3", "did you mean \"unit_cost\"?"},
      {"kind,value,\nresistor,4K7,\n", "drawer, line 1, column 3", "nothing found; expected one of the headings"},
      {"kind,value,VALUE\nresistor,4K7,4K7\n", "drawer, line 1, column 3",
       "found \"VALUE\"; expected each heading once"},
      {"unit cost,unit_cost,kind,value\n1,2,resistor,4K7\n", "drawer, line 1, column 2", "each heading once"},
      {"kind,\"val\"ue\nresistor,4K7\n", "drawer, line 1, column 2", "behind the closing quote"},
  };
}

std::vector<Malformed> kinds_and_values() {
  return {
      {row("resistr,4K7,,,,,,,"), "drawer, line 2, column 1 (kind)", "did you mean \"resistor\"?"},
      {row(",4K7,,,,,,,"), "drawer, line 2, column 1 (kind)",
       "nothing found; expected resistor, capacitor or transistor"},
      {row("diode,4K7,,,,,,,"), "drawer, line 2, column 1 (kind)", "found \"diode\"; expected resistor, capacitor"},
      {row("resistor,,,,,,,,"), "drawer, line 2, column 2 (value)", "nothing found; expected a resistance such as"},
      {row("resistor,\"4,7k\",,,,,,,"), "drawer, line 2, column 2 (value)", "write a decimal point, not a comma"},
      {row("resistor,4n7,,,,,,,"), "drawer, line 2, column 2 (value)", "no unit of resistance"},
      {row("resistor,10 uF,,,,,,,"), "drawer, line 2, column 2 (value)", "is a unit of capacitance"},
      {row("resistor,0,,,,,,,"), "drawer, line 2, column 2 (value)",
       "found \"0\"; expected a resistance from 1 mΩ to 1 GΩ"},
      {row("resistor,-4K7,,,,,,,"), "drawer, line 2, column 2 (value)", "a resistance from 1 mΩ to 1 GΩ"},
      {row("resistor,1e999,,,,,,,"), "drawer, line 2, column 2 (value)", "too large or too small"},
      {row("capacitor,104,,,,,,,"), "drawer, line 2, column 2 (value)", "the unit is missing"},
      {row("capacitor,10 F,,,,,,,"), "drawer, line 2, column 2 (value)", "a capacitance from 0.01 pF to 1 F"},
      {row("capacitor,4M7,,,,,,,"), "drawer, line 2, column 2 (value)",
       "found \"4M7\"; expected a capacitance with its unit"},
      {row("transistor,BC574B,,,,,,,"), "drawer, line 2, column 2 (value)", "did you mean \"BC547B\"?"},
      {row("transistor,QX9000,,,,,,,"), "drawer, line 2, column 2 (value)",
       "the type of a transistor of the catalogue"},
  };
}

std::vector<Malformed> other_cells() {
  return {
      {row("resistor,4K7,5,,,,,,"), "drawer, line 2, column 3 (tolerance)", "write 5 %"},
      {row("resistor,4K7,H,,,,,,"), "drawer, line 2, column 3 (tolerance)", "a letter of IEC 60062 such as J"},
      {row("resistor,4K7,f,,,,,,"), "drawer, line 2, column 3 (tolerance)", "a letter of IEC 60062"},
      {row("resistor,4K7,100 %,,,,,,"), "drawer, line 2, column 3 (tolerance)", "under 100 % below"},
      {row("resistor,4K7,0 %,,,,,,"), "drawer, line 2, column 3 (tolerance)", "a tolerance from 0.0001 %"},
      {row("capacitor,10u,20/50 %,,,,,,"), "drawer, line 2, column 3 (tolerance)", "write the low side with -"},
      {row("capacitor,4p7,J,,,,,,"), "drawer, line 2, column 3 (tolerance)", "below 10 pF one of the letters B, C, D"},
      {row("resistor,4K7,,0.25,,,,,"), "drawer, line 2, column 4 (rating)", "the unit is missing"},
      {row("resistor,4K7,,1/4 W,,,,,"), "drawer, line 2, column 4 (rating)", "found \"1/4 W\"; expected a power"},
      {row("resistor,4K7,,250 MW,,,,,"), "drawer, line 2, column 4 (rating)", "a value from 1 mW to 1 kW"},
      {row("resistor,4K7,,0.25 W 0.5 W,,,,,"), "drawer, line 2, column 4 (rating)", "one of each at most"},
      {row("capacitor,10u,,0 V,,,,,"), "drawer, line 2, column 4 (rating)", "a value from 100 mV to 100 kV"},
      {row("capacitor,10u,,-25 V,,,,,"), "drawer, line 2, column 4 (rating)", "a value from 100 mV to 100 kV"},
      {row("capacitor,10u,,25 Vrms,,,,,"), "drawer, line 2, column 4 (rating)", "a DC voltage such as 50 V"},
      {row("capacitor,10u,,0.25 W,,,,,"), "drawer, line 2, column 4 (rating)", "a rating: a DC voltage such as 50 V"},
      {row("resistor,4K7,,,metal-flim,,,,"), "drawer, line 2, column 5 (family)", "did you mean \"metal-film\"?"},
      {row("resistor,4K7,,,film,,,,"), "drawer, line 2, column 5 (family)", "(this family is of another kind)"},
      {row("resistor,4K7,,,,-1,,,"), "drawer, line 2, column 6 (quantity)", "a whole number from 0 to 1000000000"},
      {row("resistor,4K7,,,,12.5,,,"), "drawer, line 2, column 6 (quantity)", "a whole number"},
      {row("resistor,4K7,,,,\"1,000\",,,"), "drawer, line 2, column 6 (quantity)", "without a unit or separators"},
      {row("resistor,4K7,,,,,\"0,02\",,"), "drawer, line 2, column 7 (unit_cost)",
       "write a decimal point, not a comma"},
      {row("resistor,4K7,,,,,-0.02,,"), "drawer, line 2, column 7 (unit_cost)", "an amount of at least 0"},
      {row("resistor,4K7,,,,,2 cents,,"), "drawer, line 2, column 7 (unit_cost)", "\"cents\" after the number"},
      {row("transistor,BC547B,5 %,,,,,,"), "drawer, line 2, column 3 (tolerance)",
       "nothing: the catalogue says it of the type"},
      {row("transistor,BC547B,,45 V,,,,,"), "drawer, line 2, column 4 (rating)", "the catalogue says it of the type"},
  };
}

std::vector<Malformed> doubles() {
  return {
      {row("resistor,4K7,1 %,,,10,,,\n\nresistor,4.7 kΩ,F,,,20,,,other"), "drawer, line 4",
       "found \"resistor 4.7 kΩ\"; expected each part once, or with another rating or part number; the same stands in "
       "drawer, line 2"},
      {row("transistor,BC547B,,,,10,,,\ntransistor,bc547b,,,,20,,,"), "drawer, line 3", "found \"transistor BC547B\""},
      {row("capacitor,1u,,63 V,film,,,C-1,\ncapacitor,1u,,63V,Film,,,C-1,"), "drawer, line 3",
       "stands in drawer, line 2"},
  };
}

std::vector<Malformed> json() {
  return {
      {"{\"stock\": [}", "drawer, line 1, column 12", "well-formed JSON"},
      {"[1]", "drawer: [0]", "found \"1\"; expected a part such as"},
      {"{\"stok\": []}", "drawer", "did you mean \"stock\"?"},
      {"{\"stock\": 3}", "drawer: stock", "a list of parts such as"},
      {R"([{"kind": "resistor", "vaule": "4K7"}])", "drawer: [0]", "did you mean \"value\"?"},
      {"{}", "drawer", "nothing found; expected the key stock with a list of parts"},
      {R"([{"kind": "resistor", "value": "4K7"}, {"kind": "resistor", "value": "4x7"}])", "drawer: [1].value",
       "found \"4x7\"; expected a resistance"},
      {R"({"stock": [{"kind": "resistor", "value": 4700, "unit cost": 1, "unit_cost": 2}]})", "drawer: stock[0]",
       "found \"unit_cost\"; expected each key once"},
      {R"([{"kind": "resistor", "value": ["4K7"]}])", "drawer: [0].value", "expected text or a number"},
      {R"([{"kind": "capacitor", "value": 1e-7, "quantity": 2.5}])", "drawer: [0].quantity",
       "found \"2.5\"; expected a whole"},
      {R"([{"value": 4700}])", "drawer: [0].kind", "nothing found; expected resistor"},
  };
}

}  // namespace

TEST_CASE("malformed stock files: form") { check_each(form()); }
TEST_CASE("malformed stock files: headings") { check_each(headings()); }
TEST_CASE("malformed stock files: kinds and values") { check_each(kinds_and_values()); }
TEST_CASE("malformed stock files: other cells") { check_each(other_cells()); }
TEST_CASE("malformed stock files: the same part twice") { check_each(doubles()); }
TEST_CASE("malformed stock files: JSON") { check_each(json()); }

TEST_CASE("all faults of a stock file are told at once, in its order") {
  const auto faults = faults_of(
      "Kind,Value,Tolerance,Rating,Family,Quantity,Unit-Cost,shelf\n"
      "resistor,4k7 x,5,50,metal,many,free,1\n"
      "# a comment\n"
      "coil,10,0,,,-3,,2\n"
      "capacitor,\"10u\"F,,,,,,3\n"
      "capacitor,10u\n"
      "transistor,BC547X,F,45 V,film,1,1,4\n");
  std::vector<std::string> places;
  for (const Fault& fault : faults) places.push_back(fault.where.substr(8));
  CHECK(places == std::vector<std::string>{
                      "line 1, column 8", "line 2, column 2 (value)", "line 2, column 4 (rating)",
                      "line 2, column 5 (family)", "line 2, column 3 (tolerance)", "line 2, column 6 (quantity)",
                      "line 2, column 7 (unit_cost)", "line 4, column 1 (kind)", "line 4, column 6 (quantity)",
                      "line 5, column 2 (value)", "line 6", "line 7, column 2 (value)", "line 7, column 3 (tolerance)",
                      "line 7, column 4 (rating)", "line 7, column 5 (family)"});
}

TEST_CASE("all faults of a stock in JSON are told at once") {
  const auto faults = faults_of(R"({"stock": [
    {"kind": "resistor", "value": "4x7", "shelf": 3, "quantity": -1},
    "resistor",
    {"kind": "capacitor", "value": {}, "family": "flim"},
    {"kind": "capacitor", "value": 0, "family": "flim"}], "owner": "me"})");
  std::vector<std::string> places;
  for (const Fault& fault : faults) places.push_back(fault.where);
  CHECK(places == std::vector<std::string>{"drawer", "drawer: stock[0]", "drawer: stock[0].value",
                                           "drawer: stock[0].quantity", "drawer: stock[1]", "drawer: stock[2].value",
                                           "drawer: stock[3].value", "drawer: stock[3].family"});
}

TEST_CASE("of very many faults the first are shown and the rest counted") {
  std::string text = "kind,value\n";
  for (int i = 0; i < 1234; ++i) text += "resistor,none\n";
  const auto faults = faults_of(text);
  REQUIRE(faults.size() == 51);
  CHECK(faults[49].where == "drawer, line 51, column 2 (value)");
  CHECK(describe(faults[50]) == "drawer: found \"and 1184 more\"; expected no fault; only the first 50 are shown");
}
