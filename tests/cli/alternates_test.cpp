// Option --alternates of design and check.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Json = nlohmann::json;

TEST_CASE("option --alternates adds next values, transistors and the hFE needed to every candidate") {
  const Json plain = Json::parse(design_easy({"--format", "json"}).out);
  const Json asked = Json::parse(design_easy({"--alternates", "--format", "json"}).out);
  REQUIRE(asked["candidates"].size() == plain["candidates"].size());
  REQUIRE(asked["candidates"].size() > 1);
  for (std::size_t i = 0; i < plain["candidates"].size(); ++i) {
    const Json& with = asked["candidates"][i];
    CHECK(plain["candidates"][i]["if_unavailable"].is_null());
    CHECK(with["parts"] == plain["candidates"][i]["parts"]);
    CHECK(with["if_unavailable"].size() >= 2);
    CHECK(with["substitutes"].size() >= 1);
    CHECK(with["current_gain_needed"]["min"].is_number());
    for (const Json& one : with["if_unavailable"]) CHECK(one["role"] != "upper_divider");  // pinned
  }
}

TEST_CASE("alternates are the same bytes on any number of threads") {
  const Outcome one = design_easy({"--alternates", "--threads", "1", "--format", "json"});
  CHECK(one.status == 0);
  CHECK(design_easy({"--alternates", "--threads", "4", "--format", "json"}).out == one.out);
}

TEST_CASE("check answers for given parts, with and without a spec's requirements") {
  const Outcome table = check_parts({"--supply", "12V", "--alternates"});
  CHECK(table.status == 0);
  CHECK_THAT(table.out,
             ContainsSubstring("If a value is unavailable") && ContainsSubstring("Transistors that may stand in"));
  CHECK_THAT(check_parts({"--supply", "12V"}).out, !ContainsSubstring("If a value is unavailable"));
  const Json document = Json::parse(check_parts({"--supply", "12V", "--alternates", "--format", "json"}).out);
  const Json& candidate = document["candidates"][0];
  CHECK(candidate["if_unavailable"].size() == 16);  // eight parts, a value down and up
  for (const Json& one : candidate["if_unavailable"]) {
    CHECK(one["holds"] == true);
    CHECK(one["verdict"].is_null());
  }
}

TEST_CASE("what a result says of a next value is what check says of it") {
  const Json document = Json::parse(design_easy({"--alternates", "--format", "json"}).out);
  const Json& one = document["candidates"][0]["if_unavailable"].back();
  std::string option = one["role"];
  for (char& c : option)
    if (c == '_') c = '-';
  const TemporaryFolder folder;
  folder.write("result.json", document.dump());
  const Outcome again = run_bandwright({"check", "result.json", "--" + option, one["value_code"], "--format", "json"},
                                       in_folder(folder.path()));
  const Json checked = Json::parse(again.out)["candidates"][0];
  for (const auto& [figure, value] : one["figures"].items()) CHECK(checked["figures"][figure] == value);
  CHECK(checked["capability"]["smallest"] == one["capability"]);
  CHECK(checked["yield"]["passed"].get<double>() / checked["yield"]["units"].get<double>() == one["yield"]);
}
