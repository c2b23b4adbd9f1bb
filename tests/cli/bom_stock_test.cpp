// bom: a spec that names the user's stock.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;
using Json = nlohmann::json;

namespace {

const Json* row_of(const Json& bill, const std::string& designator) {
  for (const Json& row : bill["rows"])
    for (const Json& name : row["designators"])
      if (name == designator) return &row;
  return nullptr;
}

}  // namespace

// The drawer is invented, part numbers, costs and all.
TEST_CASE("what the drawer holds is named, and what it lacks is counted") {
  const TemporaryFolder folder;
  folder.write("drawer.csv",
               "kind,value,tolerance,rating,family,quantity,unit_cost,part_number\r\n"
               "resistor,47k,1 %,,metal-film,300,0.011,RX-47K\r\n"
               "resistor,10k,1 %,,metal-film,20,0.012,=RX-10K\r\n"
               "capacitor,100n,10 %,50 V,x7r,4,0.05,CX-100N\r\n");
  folder.write("stage.json", R"({
    "supply": "12 V", "load": {"resistance": "10k"},
    "requirements": {"gain": {"target": "30 dB", "tolerance": "3 dB"}, "lower_cutoff": {"max": "60 Hz"},
                     "upper_cutoff": {"min": "20 kHz"}},
    "parts": {"stock": "drawer.csv",
              "pinned": {"upper_divider": "47k", "lower_divider": "10k", "collector": "4k7", "emitter_bypassed": "1k",
                         "input_coupling": "10 uF", "output_coupling": "10 uF", "bypass": "100 uF", "shunt": "absent"}},
    "devices": ["BC547B"], "search": {"candidates": 1}})");
  const Outcome designed =
      run_bandwright({"design", "stage.json", "-q", "-o", "result.json"}, in_folder(folder.path()));
  INFO(designed.err);
  REQUIRE(designed.status == 0);
  const std::vector<std::string> words = {"bom", "result.json", "--quantity", "250", "--no-alternates", "-q"};
  const Outcome outcome = run_bandwright(joined(words, {"--format", "json"}), in_folder(folder.path()));
  INFO(outcome.err);
  REQUIRE(outcome.status == 0);
  const Json bill = Json::parse(outcome.out);
  const Json& upper = *row_of(bill, "R1");
  CHECK(upper["part_number"] == "RX-47K");
  CHECK(upper["unit_cost"] == 0.011);
  CHECK(upper["cost_invented"] == false);
  CHECK(upper["missing_in_stock"] == 0);
  const Json& lower = *row_of(bill, "R2");
  CHECK(lower["missing_in_stock"] == 230);
  CHECK_THAT(lower["note"].get<std::string>(), ContainsSubstring("230 of 250 missing in the stock"));
  CHECK((*row_of(bill, "C901"))["part_number"] == "CX-100N");
  CHECK((*row_of(bill, "C901"))["missing_in_stock"] == 246);
  CHECK((*row_of(bill, "R3"))["part_number"] == "");
  CHECK_THAT(run_bandwright(joined(words, {"--format", "csv"}), in_folder(folder.path())).out,
             ContainsSubstring(",'=RX-10K,"));
  const Outcome over = run_bandwright(joined(words, {"-o", "drawer.csv"}), in_folder(folder.path()));
  CHECK(over.status == 2);
  CHECK_THAT(over.err, ContainsSubstring("is the stock that is read"));
  CHECK_THAT(read_file(folder.path() / "drawer.csv"), StartsWith("kind,value"));
}
