// The comparison as JSON and as CSV.
#include <algorithm>
#include <bandwright/report.hpp>

#include "catch.hpp"
#include "comparison_documents.hpp"

using namespace bandwright;
using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

TEST_CASE("the JSON document holds the numbers to the last digit") {
  Json a = candidate(1);
  a["error"] = 0.1 + 0.2;  // not 0.3: shows lost digits
  a["figures"]["junction_temperature_degc"] = 31 + kThird;
  const Json written = Json::parse(write_comparison_json(compared({document({a, second()})})));
  CHECK(written["format"] == "bandwright/comparison");
  CHECK_THAT(write_comparison_table(compared({document({a, second()})}), {false, 1000}),
             StartsWith(written["choice"].get<std::string>() + "\n"));
  const Json& one = written["candidates"][0];
  CHECK(one["name"] == "A");
  CHECK(one["measures"]["error"].get<double>() == 0.1 + 0.2);
  CHECK(one["figures"]["lower_cutoff"].get<double>() == 38 + kThird);
  CHECK(one["figures"]["upper_cutoff"].is_null());
  CHECK(one["notes"].contains("upper_cutoff"));
  CHECK(one["margins"] == a["margins"]);
  CHECK(one["worst_case"]["gain"] == a["worst_case"]["gain"]);
  CHECK(one["yield"]["passed"] == 20000);
  CHECK(one["parts"].size() == a["parts"].size());
  CHECK(written["differing_parts"].empty());
  CHECK(written["cautions"].size() == cautions().size());
}

TEST_CASE("differing parts are listed with what each candidate has there") {
  Json b = second();
  b["parts"].erase(3);
  const Json written = Json::parse(write_comparison_json(compared({document({candidate(1), b})})));
  REQUIRE(written["differing_parts"].size() == 1);
  const Json& row = written["differing_parts"][0];
  CHECK(row["designator"] == "R4");
  CHECK(row["candidates"]["A"]["value"] == 220.0);
  CHECK(row["candidates"]["B"].is_null());
}

TEST_CASE("the CSV has a row for each candidate and as many fields in each") {
  const std::string text = write_comparison_csv(compared({document({candidate(1), second()})}));
  CHECK_THAT(text, StartsWith("name,file,rank,device,variant,error,tolerance_sensitivity,capability,yield,"));
  CHECK_THAT(text,
             ContainsSubstring(",R1,R2,R3,R4,R5,C1,C2,C3,C4\r\nA,file1.json,1,BC547B,unbypassed emitter,0.0231,"));
  CHECK_THAT(text, ContainsSubstring(",47000,10000,4700,220,,1e-06,1e-06,,\r\nB,file1.json,2,"));
  std::vector<std::ptrdiff_t> commas;
  for (std::size_t at = 0; at < text.size(); at = text.find('\n', at) + 1)
    commas.push_back(std::count(text.begin() + static_cast<std::ptrdiff_t>(at),
                                text.begin() + static_cast<std::ptrdiff_t>(text.find('\n', at)), ','));
  CHECK(commas == std::vector<std::ptrdiff_t>(3, commas.front()));
}
