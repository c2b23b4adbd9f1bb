// A bill of materials as CSV, JSON and table.
#include <bandwright/report.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "csv_records.hpp"
#include "sample_bill.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;
using Json = nlohmann::json;
using test::column;
using test::read_records;
using test::Record;

namespace {

std::string table_of(const Bill& bill) { return write_bill_table({bill, std::nullopt}); }

Json json_of(const Bill& bill) { return Json::parse(write_bill_json({bill, std::nullopt})); }

Bill bill_of(const Part& part) {
  BoardParts board;
  board.parts = {part};
  return bill_of_materials({board}, built_in_catalogue(), {1, 0, false});
}

std::string cell(const Bill& bill, const std::string& name, std::size_t row = 0) {
  const auto records = read_records(write_bill_csv(bill));
  return records.at(row + 1).at(column(records[0], name));
}

// Invented: R2 might take R1's value.
PurchaseList with_proposal() {
  Consolidation one;
  one.kept = Role::upper_divider;
  one.changed = Role::lower_divider;
  one.value.value = 47e3;
  one.capability_before = 1.25;
  one.outcome.capability = 1.1;
  one.outcome.yield = 0.998;
  one.outcome.verdict = "pass with notes";
  return {test::sample_bill(), {{{"A", {one}}, {"B", {}}}}};
}

}  // namespace

TEST_CASE("the headings of the list, byte by byte") {
  CHECK_THAT(
      write_bill_csv(test::sample_bill()),
      StartsWith("item,designators,quantity_per_board,quantity_total,kind,value,value_code,tolerance,rating,"
                 "family,temperature_coefficient,polarity,part_number,alternates,unit_cost,total_cost,note\r\n"));
}

TEST_CASE("the first rows of the list, byte by byte") {
  const std::string csv = write_bill_csv(test::sample_bill());
  CHECK_THAT(csv, ContainsSubstring("\r\n1,\"A.R1, A.R3, B.R1, B.R3\",4,1050,resistor,10000,10K,±1 %,\"0.25 W, 250 V\","
                                    "metal film resistor,±50 ppm/K,,,11K for A.R1,0.02,21,"
                                    "cost invented for demonstration\r\n"));
  CHECK_THAT(csv, ContainsSubstring("\r\n3,\"A.C1, B.C1\",2,525,capacitor,1e-05,10u,±20 %,16 V,aluminium electrolytic "
                                    "capacitor,,A.C1 + to base; B.C1 + to source,,,0.06,31.5,"
                                    "cost invented for demonstration\r\n"));
  CHECK_THAT(csv, ContainsSubstring("\r\n5,\"A.Q1, B.Q1\",2,525,transistor,,BC547B,,\"45 V VCEO, 0.5 W\",NPN "
                                    "transistor,,,,,0.08,42,cost invented for demonstration\r\n"));
}

TEST_CASE("records end with CRLF, have a field a heading, and no mark of byte order stands before them") {
  const std::string csv = write_bill_csv(test::sample_bill());
  const auto records = read_records(csv);  // refuses any other line end
  CHECK(records.size() == 6);
  for (const Record& record : records) CHECK(record.size() == 17);
  CHECK(csv[0] == 'i');
}

// = + - @ and control characters: RFC 4180's readers hand them on, and spreadsheets calculate them (common knowledge,
// no source).
TEST_CASE("no cell is taken for a formula, whatever the user wrote") {
  for (const std::string text : {"=1+1", "+1", "-1", "@name", "\t=1", "\r=1", "\n=1", " =1", "ordinary; =1+1", "a;-1",
                                 "a;\t@x", "＝1+1", "＋1", "－1", "＠x", "=", "a;b;+c", "'=1"}) {
    INFO(text);
    Part part = test::bought_resistor("R1", 1e3, "1K0");
    part.part_number = part.note = part.family = part.code = text;
    part.alternates = {text, text};
    part.polarity = text;
    for (const Record& record : read_records(write_bill_csv(bill_of(part))))
      for (std::string field : record) {
        std::size_t begin = 0;
        while (begin <= field.size()) {
          std::string piece = field.substr(begin, field.find(';', begin) - begin);
          piece.erase(0, piece.find_first_not_of(' '));
          INFO(field);
          CHECK(piece.find_first_of("=+-@\t\r\n") != 0);
          for (const char* wide : {"＝", "＋", "－", "＠"}) CHECK_FALSE(piece.starts_with(wide));
          const std::size_t next = field.find(';', begin);
          begin = next == field.npos ? field.size() + 1 : next + 1;
        }
        for (const char c : field) CHECK(static_cast<unsigned char>(c) >= 0x20);
      }
  }
}

TEST_CASE("what begins like a formula keeps its meaning") {
  Part part = test::bought_electrolytic("C1", 10e-6, "10u", 16, "+ to collector");
  part.tolerance = {0.2, 0.5};
  part.part_number = "-17";
  part.note = "shelf 3";
  const Bill bill = bill_of(part);
  CHECK(cell(bill, "polarity") == "plus to collector");
  CHECK(cell(bill, "tolerance") == "tolerance -20/+50 %");
  CHECK(cell(bill, "part_number") == "'-17");
  CHECK(cell(bill, "note") == "shelf 3");
  CHECK(json_of(bill)["rows"][0]["polarity"] == "+ to collector");
  CHECK(json_of(bill)["rows"][0]["part_number"] == "-17");
}

TEST_CASE("what has no value is an empty cell and null") {
  Part part = test::bought_resistor("R1", 1e3, "1K0");
  part.unit_cost = part.voltage_rating = part.power_rating = kNotComputed;
  part.temperature_coefficient = 0;
  const Bill bill = bill_of(part);
  CHECK(cell(bill, "unit_cost").empty());
  CHECK(cell(bill, "total_cost").empty());
  CHECK(cell(bill, "temperature_coefficient").empty());
  CHECK(cell(bill, "rating") == "none holds");
  CHECK_THAT(cell(bill, "note"), ContainsSubstring("no rating of its family holds"));
  const Json row = json_of(bill)["rows"][0];
  for (const char* key : {"unit_cost", "total_cost", "temperature_coefficient", "voltage_rating", "power_rating"})
    CHECK(row[key].is_null());
  CHECK(json_of(bill)["total_cost"].is_null());
}

TEST_CASE("JSON states what CSV states, numbers as numbers") {
  const Bill bill = test::sample_bill();
  const auto records = read_records(write_bill_csv(bill));
  const Json document = json_of(bill);
  CHECK(document["format"] == "bandwright/bill");
  CHECK(document["version"] == 1);
  CHECK(document["quantity"] == 250);
  CHECK(document["attrition"] == 0.05);
  CHECK(document["boards"][1]["prefix"] == "B");
  CHECK(document["costs_invented"] == true);
  CHECK(document["cautions"].size() == cautions().size());
  CHECK_FALSE(document.contains("consolidations"));
  REQUIRE(document["rows"].size() == records.size() - 1);
  for (std::size_t i = 0; i + 1 < records.size(); ++i) {
    const Json& row = document["rows"][i];
    const auto text = [&](const char* name) { return records[i + 1][column(records[0], name)]; };
    for (const char* name : {"item", "quantity_per_board", "quantity_total", "value", "unit_cost", "total_cost"}) {
      INFO(name);
      if (row[name].is_null())
        CHECK(text(name).empty());
      else
        CHECK(std::stod(text(name)) == row[name].get<double>());
    }
    for (const char* name : {"kind", "value_code", "family", "part_number", "rating", "note"}) {
      INFO(name);
      CHECK(text(name) == row[name].get<std::string>());
    }
    CHECK(row["designators"].size() == row["quantity_per_board"]);
  }
  CHECK(document["rows"][0]["tolerance"] == Json({-0.01, 0.01}));
  CHECK(document["rows"][0]["temperature_coefficient"] == 50e-6);
  CHECK(document["rows"][0]["alternates"] == Json({"11K for A.R1"}));
  CHECK(document["rows"][4]["tolerance"].is_null());
}

TEST_CASE("the keys of a row begin as the headings do") {
  const std::string json = write_bill_json({test::sample_bill(), std::nullopt});
  const auto records = read_records(write_bill_csv(test::sample_bill()));
  std::size_t before = json.find("\"rows\"");
  for (const std::string& heading : records[0]) {
    const std::size_t found = json.find("\"" + heading + "\"", before);
    INFO(heading);
    REQUIRE(found != json.npos);
    before = found;
  }
}

TEST_CASE("the table says what is invented and what the model does not see, and ends with the cautions") {
  const std::string table = table_of(test::sample_bill());
  for (const char* piece : {"Bill of materials for 250 boards of each of 2 stages, 5 % attrition", "A: Tide gauge",
                            "0.02*", "*: invented for demonstration", "supply decoupling, outside the model",
                            "11K for A.R1", "Before building", "60 V DC", "total cost "})
    CHECK_THAT(table, ContainsSubstring(piece));
  Bill real = test::sample_bill();
  for (BillRow& row : real.rows) row.part.invented_cost = false;
  real.has_invented_costs = false;
  CHECK(table_of(real).find('*') == std::string::npos);
}

TEST_CASE("lines of the table keep to the page") {
  for (const int width : {80, 100, 140}) {
    const std::string table = write_bill_table({test::sample_bill(), std::nullopt}, {false, width});
    std::size_t begin = 0;
    for (std::size_t end = table.find('\n'); end != table.npos; end = table.find('\n', begin)) {
      std::size_t columns = 0;
      for (const char c : table.substr(begin, end - begin)) columns += (static_cast<unsigned char>(c) & 0xC0) != 0x80;
      INFO(table.substr(begin, end - begin));
      CHECK(columns <= static_cast<std::size_t>(width));
      begin = end + 1;
    }
  }
}

TEST_CASE("control characters of the user reach no terminal") {
  Part part = test::bought_resistor("R1", 1e3, "1K0");
  part.part_number = "\x1b[31mred";
  part.note = "bell \a";
  const std::string table = table_of(bill_of(part));
  CHECK(table.find('\x1b') == std::string::npos);
  CHECK(table.find('\a') == std::string::npos);
}

TEST_CASE("proposals stand beside the list and change nothing in it") {
  const PurchaseList list = with_proposal();
  const std::string table = write_bill_table(list);
  CHECK_THAT(table, ContainsSubstring("One value for two (proposals; nothing above has changed)") &&
                        ContainsSubstring("47 kΩ") && ContainsSubstring("1.25") && ContainsSubstring("1.10"));
  const Json document = Json::parse(write_bill_json(list));
  REQUIRE(document["consolidations"].size() == 1);
  const Json& one = document["consolidations"][0];
  CHECK(one["board"] == "A");
  CHECK(one["kept"] == "R1");
  CHECK(one["changed"] == "R2");
  CHECK(one["value"] == 47e3);
  CHECK(one["capability_change"].get<double>() == Approx(-0.15));
  CHECK(document["rows"] == json_of(test::sample_bill())["rows"]);
  CHECK_THAT(write_bill_table({test::sample_bill(), {{{"A", {}}}}}), ContainsSubstring("None: no two roles"));
}
