// bom: what to buy for candidates of result documents.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"
#include "csv_records.hpp"
#include "places.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;
using Json = nlohmann::json;

namespace {

// Two results in a folder: a design with two candidates, and given parts that were recomputed.
struct Results {
  TemporaryFolder folder;
  Json designed;

  Results() {
    REQUIRE(design_easy({"-q", "-o", "designed.json"}, in_folder(folder.path())).status == 0);
    REQUIRE(check_parts({"--supply", "12V", "-q", "-o", "checked.json"}, in_folder(folder.path())).status == 0);
    designed = Json::parse(read_file(folder.path() / "designed.json"));
    REQUIRE(designed["candidates"].size() == 2);
  }
  Outcome bom(const std::vector<std::string>& words) const {
    return run_bandwright(joined({"bom"}, words), in_folder(folder.path()));
  }
  Json bill(const std::vector<std::string>& words) const {
    const Outcome outcome = bom(joined(words, {"--format", "json"}));
    INFO(outcome.err);
    REQUIRE(outcome.status == 0);
    return Json::parse(outcome.out);
  }
  void refused(const std::vector<std::string>& words, const std::string& message, int status = 2) const {
    const Outcome outcome = bom(words);
    INFO(outcome.err);
    CHECK(outcome.status == status);
    CHECK(outcome.out.empty());
    CHECK_THAT(outcome.err, ContainsSubstring(message));
  }
};

const Json* row_of(const Json& bill, const std::string& designator) {
  for (const Json& row : bill["rows"])
    for (const Json& name : row["designators"])
      if (name == designator) return &row;
  return nullptr;
}

std::size_t alternates_in(const Json& bill) {
  std::size_t count = 0;
  for (const Json& row : bill["rows"]) count += row["alternates"].size();
  return count;
}

}  // namespace

TEST_CASE("the list of one candidate") {
  const Results results;
  const Outcome outcome = results.bom({"designed.json"});
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.err, ContainsSubstring("Candidate 1 of designed.json: all") && ContainsSubstring("agree"));
  CHECK_THAT(outcome.out, StartsWith("Bill of materials for 1 board\n") && ContainsSubstring("R1") &&
                              ContainsSubstring("BC547B") && ContainsSubstring("outside the model") &&
                              ContainsSubstring("invented for demonstration") && ContainsSubstring("Before building"));
  CHECK(outcome.out.find("A.R1") == std::string::npos);
  CHECK(results.bom({"designed.json", "-q"}).err.empty());
}

TEST_CASE("every part of the document is listed with its value, rating and polarity") {
  const Results results;
  for (const int rank : {1, 2}) {
    const Json bill = results.bill({"designed.json", "--pick", std::to_string(rank), "-q"});
    CHECK_THAT(bill["boards"][0]["name"].get<std::string>(),
               ContainsSubstring("BC547B, candidate " + std::to_string(rank) + " of designed.json"));
    const Json& candidate = results.designed["candidates"][static_cast<std::size_t>(rank - 1)];
    for (const Json& part : candidate["parts"]) {
      INFO(part["designator"]);
      const Json* row = row_of(bill, part["designator"].get<std::string>());
      REQUIRE(row != nullptr);
      for (const char* key : {"kind", "value", "value_code", "tolerance", "family", "voltage_rating", "power_rating",
                              "part_number", "temperature_coefficient", "cost_invented"})
        CHECK((*row)[key] == part[key]);
      if (part["polarity"].is_string())
        CHECK_THAT((*row)["polarity"].get<std::string>(), ContainsSubstring(part["polarity"].get<std::string>()));
    }
    const Json* transistor = row_of(bill, "Q1");
    REQUIRE(transistor != nullptr);
    CHECK((*transistor)["value_code"] == candidate["device"]);
  }
}

TEST_CASE("quantity and attrition count, decoupling and alternates may be left out") {
  const Results results;
  const Json plain = results.bill({"designed.json"});
  CHECK(plain["quantity"] == 1);
  REQUIRE(row_of(plain, "C901") != nullptr);
  CHECK((*row_of(plain, "C902"))["outside_model"] == true);
  CHECK(alternates_in(plain) > 0);
  const Json many =
      results.bill({"designed.json", "--quantity", "250", "--attrition", "5 %", "--no-decoupling", "--no-alternates"});
  CHECK(many["attrition"] == 0.05);
  CHECK(row_of(many, "C901") == nullptr);
  CHECK(alternates_in(many) == 0);
  for (const Json& row : many["rows"]) {
    const long board = row["quantity_per_board"].get<long>();
    CHECK(row["quantity_total"] == (board * 250 * 105 + 99) / 100);
  }
}

TEST_CASE("several boards share a list under prefixes, in the order given") {
  const Results results;
  const Json bill =
      results.bill({"checked.json", "designed.json", "designed.json", "--pick", "1,2,1", "--no-alternates"});
  REQUIRE(bill["boards"].size() == 3);
  for (const char* name : {"A.R1", "B.R1", "C.R1", "A.Q1", "B.Q1", "C.Q1", "B.C902"})
    CHECK(row_of(bill, name) != nullptr);
  CHECK_THAT(bill["boards"][1]["name"].get<std::string>(), ContainsSubstring("candidate 2 of designed.json"));
  CHECK(*row_of(bill, "A.Q1") == *row_of(bill, "C.Q1"));
  const Json both = results.bill({"designed.json", "designed.json", "--pick", "2", "--no-alternates"});
  for (const Json& row : both["rows"]) CHECK(row["quantity_per_board"].get<long>() % 2 == 0);
}

TEST_CASE("picks that do not fit the documents are refused") {
  const Results results;
  results.refused({}, "nothing to buy");
  results.refused({"designed.json", "--pick", "1,2"}, "2 ranks for 1 result document; give one rank for all");
  results.refused({"designed.json", "designed.json", "--pick", "1,2,1"}, "3 ranks for 2 result documents");
  results.refused({"designed.json", "--pick", "0"}, "found '0'");
  results.refused({"designed.json", "checked.json", "--pick", "first,"}, "found 'first'");
  results.refused({"designed.json", "checked.json", "--pick", "first,"}, "found ''");
  const Outcome outcome = results.bom({"designed.json", "checked.json", "--pick", "9"});
  CHECK(outcome.status == 2);
  CHECK_THAT(outcome.err, ContainsSubstring("designed.json: candidates: found \"no candidate of rank 9\"") &&
                              ContainsSubstring("checked.json: candidates: found \"no candidate of rank 9\""));
  results.refused(std::vector<std::string>(27, "designed.json"), "27 boards; at most 26");
}

TEST_CASE("options outside their range are refused") {
  const Results results;
  for (const char* quantity : {"0", "1000001", "-1", "two", "1.5", ""})
    results.refused({"designed.json", "--quantity", quantity}, "--quantity");
  for (const char* attrition : {"-1 %", "101 %", "5", "much", "5,5 %", "nan"})
    results.refused({"designed.json", "--attrition", attrition}, "--attrition");
  results.refused({"designed.json", "--format", "xml"}, "expected table, json or csv");
  results.refused({"designed.json", "--catalogue", "no/such"}, "no/such", 3);
  results.refused({"designed.json", "--gain", "3"}, "unknown option");
  CHECK(results.bill({"designed.json", "--quantity", "1000000", "--attrition", "1", "--no-alternates"})["attrition"] ==
        1);
}

TEST_CASE("documents that hold no candidate are refused, all at once") {
  const Results results;
  results.folder.write("spec.json", kEasySpec);
  Json empty = results.designed;
  empty["candidates"] = Json::array();
  results.folder.write("empty.json", empty.dump());
  results.folder.write("list.csv", "item,designators\r\n");
  results.refused({"empty.json"},
                  "empty.json: candidates: found \"no candidate of rank 1\"; expected a result with at "
                  "least one candidate");
  results.refused({"spec.json"}, "spec.json: found \"a text without candidates\"");
  const Outcome outcome = results.bom({"missing.json", "list.csv", "absent.json", "spec.json"});
  CHECK(outcome.status == 3);
  for (const char* piece : {"'missing.json'", "'absent.json'", "list.csv", "spec.json"})
    CHECK_THAT(outcome.err, ContainsSubstring(piece));
  Json foreign = results.designed;
  foreign["candidates"][0]["device"] = "BC000X";
  results.folder.write("foreign.json", foreign.dump());
  results.refused({"designed.json", "foreign.json"}, "foreign.json: device");
}

TEST_CASE("a candidate that misses its spec is listed all the same, with status 1") {
  const Results results;
  results.folder.write("impossible.json", kImpossibleSpec);
  REQUIRE(run_bandwright({"design", "impossible.json", "-q", "-o", "missed.json"}, in_folder(results.folder.path()))
              .status == 1);
  const Outcome outcome = results.bom({"designed.json", "missed.json", "--no-alternates", "-q", "--format", "csv"});
  CHECK(outcome.status == 1);
  CHECK_THAT(outcome.err, ContainsSubstring("Candidate 1 of missed.json does not meet its spec: ") &&
                              ContainsSubstring("gain") && !ContainsSubstring("designed.json does not"));
  CHECK_THAT(outcome.out, ContainsSubstring("B.R1"));
}

TEST_CASE("figures that differ from the document are told, and the list is written") {
  const Results results;
  Json altered = results.designed;
  altered["candidates"][0]["figures"]["gain"] = 7;
  results.folder.write("altered.json", altered.dump());
  const Outcome outcome = results.bom({"altered.json", "-q", "--no-alternates"});
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.err, ContainsSubstring("differ from the file (gain)"));
  CHECK_THAT(outcome.out, ContainsSubstring("R1"));
}

TEST_CASE("standard input is a document, twice if need be") {
  const Results results;
  Circumstances circumstances = in_folder(results.folder.path());
  circumstances.input = results.designed.dump();
  const Outcome outcome =
      run_bandwright({"bom", "-", "checked.json", "-", "--pick", "1,1,2", "--no-alternates", "-q"}, circumstances);
  INFO(outcome.err);
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, ContainsSubstring("A.R1") && ContainsSubstring("C: ") &&
                              ContainsSubstring("candidate 2 of standard input"));
}

TEST_CASE("a list goes through pipes from design to a reader that stops early") {
  std::string command = "\"$0\" design";
  for (const std::string& word : kSpecOptions) command += " '" + word + "'";
  command += " -q --format json | ( \"$0\" bom - -q --no-alternates --format csv; echo status $? >&2 ) | head -c 5";
  const Outcome outcome = run_command({"sh", "-c", command, program_file().string()});
  CHECK(outcome.out == "item,");
  CHECK(outcome.err == "status 0\n");
}

TEST_CASE("CSV goes where it is told, by the ending of its name") {
  const Results results;
  const Outcome outcome = results.bom({"designed.json", "-o", "list.csv", "--no-alternates"});
  CHECK(outcome.status == 0);
  CHECK(outcome.out.empty());
  CHECK_THAT(outcome.err, ContainsSubstring("note: C901 and C902") && ContainsSubstring("wrote"));
  const std::string csv = read_file(results.folder.path() / "list.csv");
  CHECK(read_records(csv).size() > 5);
  CHECK(csv.find("Before building") == std::string::npos);
  CHECK(csv.find("60 V") == std::string::npos);  // no caution among the data
  CHECK(results.bom({"designed.json", "-o", "-", "--format", "csv", "-q", "--no-alternates"}).out == csv);
}

TEST_CASE("no input of a list is written over") {
  const Results results;
  const std::string before = read_file(results.folder.path() / "checked.json");
  results.refused({"designed.json", "checked.json", "-o", "./checked.json"}, "choose another name");
  CHECK(read_file(results.folder.path() / "checked.json") == before);
  results.refused({"designed.json", "-o", "no/such/list.csv"}, "no/such", 3);
}

TEST_CASE("proposals are made when asked for, and CSV has no place for them") {
  const Results results;
  const Json bill = results.bill({"designed.json", "--consolidate", "--no-alternates", "-q"});
  REQUIRE(bill["consolidations"].is_array());
  for (const Json& one : bill["consolidations"]) {
    CHECK(one["verdict"] != "not met");
    CHECK(one["kept"] != one["changed"]);
  }
  CHECK(bill["rows"] == results.bill({"designed.json", "--no-alternates", "-q"})["rows"]);
  CHECK_THAT(results.bom({"designed.json", "--consolidate", "--no-alternates"}).out,
             ContainsSubstring("nothing above has changed"));
  results.refused({"designed.json", "--consolidate", "-o", "list.csv"}, "CSV holds the list alone");
}

TEST_CASE("a locale with a decimal comma changes no byte of the list") {
  const Results results;
  // A real locale is compiled where the machine has the sources; the variables are set in any case.
  const std::string folder = results.folder.path().string();
  run_command({"sh", "-c", "localedef -i de_DE -f UTF-8 \"$0\"/de_DE.UTF-8 2>/dev/null", folder});
  Circumstances comma = with_environment({"LC_ALL=de_DE.UTF-8", "LANG=de_DE.UTF-8", "LOCPATH=" + folder});
  comma.folder = results.folder.path();
  for (const char* format : {"table", "json", "csv"}) {
    const std::vector<std::string> words = {"designed.json", "-q", "--attrition", "2.5 %", "--format", format};
    CHECK(run_bandwright(joined({"bom"}, words), comma).out == results.bom(words).out);
  }
}
