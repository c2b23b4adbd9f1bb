// check: given parts, a spec's fixed parts, a result's candidates.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;
using Json = nlohmann::json;

namespace {

struct Designed {
  TemporaryFolder folder;
  std::string file;
  Json document;

  Designed() {
    file = (folder.path() / "result.json").string();
    REQUIRE(design_easy({"-o", file}).status == 0);
    document = Json::parse(read_file(file));
  }
};

}  // namespace

TEST_CASE("parts given as options are recomputed without any requirement") {
  const Outcome outcome = check_parts({"--supply", "12V"});
  INFO(outcome.err);
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, StartsWith("Recomputed; no requirement was stated.") && ContainsSubstring("BC547B"));
}

TEST_CASE("requirements beside the parts decide the status") {
  CHECK(check_parts({"--supply", "12V", "--gain-min", "10"}).status == 0);
  const Outcome outcome = check_parts({"--supply", "12V", "--gain-min", "1000"});
  CHECK(outcome.status == 1);
  CHECK_THAT(outcome.out, ContainsSubstring("gain") && ContainsSubstring("does not meet"));
}

TEST_CASE("every candidate of a result agrees with its file to the last digit") {
  const Designed designed;
  const std::size_t count = designed.document["candidates"].size();
  REQUIRE(count >= 1);
  for (std::size_t rank = 1; rank <= count; ++rank) {
    const Outcome outcome = run_bandwright({"check", designed.file, "--pick", std::to_string(rank)});
    INFO(outcome.err);
    CHECK(outcome.status == 0);
    CHECK_THAT(outcome.out, StartsWith("Candidate " + std::to_string(rank) + " of ") &&
                                ContainsSubstring("agree with the file, largest relative difference 0."));
  }
}

TEST_CASE("a document that was altered is found out") {
  Designed designed;
  Json& figures = designed.document["candidates"][0]["figures"];
  figures["gain"] = figures["gain"].get<double>() * 1.001;
  const Outcome outcome = run_bandwright({"check", "-"}, with_input(designed.document.dump()));
  CHECK(outcome.status == 1);
  CHECK_THAT(outcome.out, ContainsSubstring("differ from the file (gain)"));
}

TEST_CASE("agreement goes to standard error where the output is for a program") {
  const Designed designed;
  const Outcome outcome = run_bandwright({"check", designed.file, "--format", "json"});
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.err, ContainsSubstring("agree with the file"));
  const Json checked = Json::parse(outcome.out);
  CHECK(checked["candidates"].size() == 1);
  CHECK(checked["candidates"][0]["figures"] == designed.document["candidates"][0]["figures"]);
  CHECK(run_bandwright({"check", designed.file, "--format", "json", "--quiet"}).err.empty());
}

TEST_CASE("a part of a candidate can be changed, and no agreement is claimed") {
  const Designed designed;
  const Outcome outcome = run_bandwright({"check", designed.file, "--bypass", "470u"});
  CHECK_THAT(outcome.out, ContainsSubstring("470 µF") && !ContainsSubstring("agree with the file"));
}

TEST_CASE("the parts fixed in a spec are recomputed") {
  const std::string spec = R"({
    "supply": "12 V", "devices": ["BC547B"],
    "parts": {"pinned": {"upper_divider": "47k", "lower_divider": "10k", "collector": "4k7", "emitter": "1k",
                         "input_coupling": "1 uF", "output_coupling": "1 uF"}}
  })";
  const Outcome outcome = run_bandwright({"check", "-"}, with_input(spec));
  INFO(outcome.err);
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, ContainsSubstring("unbypassed emitter"));
}

TEST_CASE("a rank or a part that is not there is told") {
  Designed designed;
  const Outcome beyond = run_bandwright({"check", designed.file, "--pick", "99"});
  CHECK(beyond.status == 2);
  CHECK_THAT(beyond.err, ContainsSubstring("rank 99"));
  designed.document["candidates"][0]["parts"].erase(0);
  const Outcome missing = run_bandwright({"check", "-"}, with_input(designed.document.dump()));
  CHECK(missing.status == 2);
  CHECK_THAT(missing.err, ContainsSubstring("--upper-divider is missing"));
  designed.document["candidates"][0]["parts"] = "none";
  CHECK(run_bandwright({"check", "-"}, with_input(designed.document.dump())).status == 2);
}

TEST_CASE("a device that the catalogue does not hold is told with the nearest") {
  const Outcome outcome = check_parts({"--supply", "12V", "--device", "x"});
  CHECK(outcome.status == 2);  // given twice
  std::vector<std::string> words = joined({"check", "--supply", "12V"}, kPartOptions);
  words[4] = "BC547Q";
  const Outcome unknown = run_bandwright(words);
  CHECK(unknown.status == 2);
  CHECK_THAT(unknown.err, ContainsSubstring("BC547Q") && ContainsSubstring("BC547"));
}

TEST_CASE("a stage that is not active is reported with its reason, status 1") {
  std::vector<std::string> words = joined({"check", "--supply", "12V"}, kPartOptions);
  words[words.size() - 11] = "100k";  // collector
  const Outcome outcome = run_bandwright(words);
  INFO(outcome.out);
  CHECK(outcome.status == 1);
  CHECK_THAT(outcome.out, StartsWith("The stage does not work") && ContainsSubstring("not active: VCE would be"));
}

TEST_CASE("a PNP stage shows node voltages with the sign of its supply") {
  const Outcome outcome = run_bandwright({"check", "--supply", "-12V", "--device", "BC557B", "--upper-divider", "47k",
                                          "--lower-divider", "10k", "--collector", "4k7", "--emitter", "1k",
                                          "--input-coupling", "10u", "--output-coupling", "10u", "--format", "json"});
  REQUIRE(outcome.status == 0);
  const Json one = Json::parse(outcome.out)["candidates"][0];
  CHECK(one["figures"]["collector_voltage"].get<double>() < 0);
  CHECK(one["figures"]["base_voltage"].get<double>() < 0);
  CHECK(one["figures"]["collector_current"].get<double>() > 0);
  CHECK(one["parts"][5]["polarity"] == "+ to output");
  CHECK(one["parts"][4]["polarity"] == "+ to source");
}
