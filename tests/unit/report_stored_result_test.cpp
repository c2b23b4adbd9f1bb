// Reading a candidate back from a result document, and comparing it with a recomputed one.
#include <bandwright/fault.hpp>
#include <bandwright/report.hpp>
#include <cmath>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "sample_result.hpp"

using namespace bandwright;
using Catch::Matchers::ContainsSubstring;
using Json = nlohmann::json;

namespace {

Json document() { return Json::parse(write_json(test::sample_result())); }

std::string faults_of(const std::string& text, int rank = 1) {
  try {
    read_candidate(text, "file.json", rank);
  } catch (const InputError& fault) {
    return fault.what();
  }
  return "";
}

}  // namespace

TEST_CASE("a written candidate reads back as it was") {
  const DesignResult result = test::sample_result();
  const StoredCandidate stored = read_candidate(write_json(result), "file.json", 2);
  CHECK(stored.rank == 2);
  CHECK(stored.device == "BC547B");
  CHECK(stored.values == result.candidates[1].working_values);
  CHECK(stored.has_figures);
  const Agreement agreement = compare(stored, result.candidates[1]);
  CHECK(agreement.differing.empty());
  CHECK(agreement.largest == 0);
  CHECK(agreement.compared == 23);  // the sample's figures
}

TEST_CASE("a figure that was altered is found") {
  Json all = document();
  all["candidates"][0]["figures"]["gain"] = all["candidates"][0]["figures"]["gain"].get<double>() * (1 + 1e-6);
  const Agreement agreement = compare(read_candidate(all.dump(), "file.json", 1), test::sample_result().candidates[0]);
  REQUIRE(agreement.differing == std::vector<Figure>{Figure::gain});
  CHECK(agreement.worst == Figure::gain);
  CHECK(agreement.largest == Approx(1e-6).epsilon(1e-3));
}

TEST_CASE("a figure that only one side has disagrees without end") {
  Json all = document();
  all["candidates"][0]["figures"]["upper_cutoff"] = nullptr;
  const Agreement agreement = compare(read_candidate(all.dump(), "file.json", 1), test::sample_result().candidates[0]);
  CHECK(agreement.differing == std::vector<Figure>{Figure::upper_cutoff});
  CHECK(std::isinf(agreement.largest));
}

TEST_CASE("only a result document is taken for one") {
  CHECK(is_result(document().dump()));
  CHECK_FALSE(is_result(R"({"supply": "12 V"})"));
  CHECK_FALSE(is_result("not JSON"));
  CHECK_FALSE(is_result(""));
}

TEST_CASE("what is wrong with a document is said with its place") {
  CHECK_THAT(faults_of("{"), ContainsSubstring("file.json"));
  CHECK_THAT(faults_of(document().dump(), 3), ContainsSubstring("rank 3") && ContainsSubstring("1 to 2"));
  CHECK_THAT(faults_of(R"({"candidates": []})"), ContainsSubstring("at least one candidate"));
  CHECK_THAT(faults_of(R"({"candidates": [3, {"rank": 2}]})"), ContainsSubstring("rank 1"));
}

TEST_CASE("every fault of a candidate is told at once") {
  Json all = document();
  Json& one = all["candidates"][0];
  one.erase("device");
  one["parts"][0]["value"] = "47k";
  one["parts"][1]["role"] = "base";
  one["parts"][2]["value"] = -1;
  one["parts"][4]["role"] = "emitter";
  const std::string text = faults_of(all.dump());
  CHECK_THAT(text, ContainsSubstring("device") && ContainsSubstring("parts[0].value") &&
                       ContainsSubstring("parts[1].role") && ContainsSubstring("parts[2].value") &&
                       ContainsSubstring("parts[4].role"));
  one.erase("parts");
  CHECK_THAT(faults_of(all.dump()), ContainsSubstring("parts"));
}
