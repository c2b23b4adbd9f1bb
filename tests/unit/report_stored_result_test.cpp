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
  for (const Part& part : result.candidates[1].parts) {
    const PartChoice& choice = stored.parts[index(part.role)];
    CHECK(choice.value == part.value);
    CHECK(choice.family == part.family);
    CHECK(choice.connection == Connection::single);
    CHECK_FALSE(choice.from_stock);
  }
  CHECK(stored.parts[index(Role::shunt)].value == 0);
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

TEST_CASE("a part of the stock reads back with its number, one of an earlier document as found") {
  Json all = document();
  Json& part = all["candidates"][0]["parts"][2];
  part["from_stock"] = true;
  part["part_number"] = "RX-4K7";
  all["candidates"][0]["parts"][3].erase("from_stock");
  const StoredCandidate stored = read_candidate(all.dump(), "file.json", 1);
  CHECK(stored.parts[index(Role::collector)].from_stock);
  CHECK(stored.parts[index(Role::collector)].part_number == "RX-4K7");
  CHECK(stored.parts[index(Role::emitter)].from_stock);
}

namespace {

// The first candidate with one more part in a role, both in a connection.
Json with_pair(std::size_t position, double second, const char* connection) {
  Json all = document();
  Json& parts = all["candidates"][0]["parts"];
  Json other = parts[position];
  other["value"] = second;
  if (connection != nullptr) parts[position]["connection"] = other["connection"] = connection;
  parts.insert(parts.begin() + static_cast<std::ptrdiff_t>(position) + 1, other);
  return all;
}

PartChoice pair_of(std::size_t position, Role role, double second, const char* connection) {
  return read_candidate(with_pair(position, second, connection).dump(), "file.json", 1).parts[index(role)];
}

}  // namespace

// The law of resistors and capacitors in series and in parallel, hand-worked.
TEST_CASE("two parts of one role are a pair") {
  const PartChoice series = pair_of(2, Role::collector, 300, "series");  // 4700 and 300
  CHECK(series.connection == Connection::series);
  CHECK(series.value == 5000);
  CHECK(series.pair == std::array<double, 2>{4700, 300});
  CHECK(pair_of(2, Role::collector, 4700, "parallel").value == 2350);
  CHECK(pair_of(5, Role::input_coupling, 1e-6, "series").value == Approx(0.5e-6).epsilon(1e-15));
  const PartChoice parallel = pair_of(5, Role::input_coupling, 3e-6, "parallel");  // 1 and 3 microfarad
  CHECK(parallel.value == Approx(4e-6).epsilon(1e-15));
  CHECK(parallel.connection == Connection::parallel);
}

TEST_CASE("a pair is of the stock where one of its parts is") {
  Json all = with_pair(2, 300, "series");
  CHECK_FALSE(read_candidate(all.dump(), "file.json", 1).parts[index(Role::collector)].from_stock);
  all["candidates"][0]["parts"][3]["from_stock"] = true;
  CHECK(read_candidate(all.dump(), "file.json", 1).parts[index(Role::collector)].from_stock);
}

TEST_CASE("a pair that is none is told with its place") {
  CHECK_THAT(faults_of(with_pair(2, 300, nullptr).dump()),
             ContainsSubstring("parts[3].role") && ContainsSubstring("two parts of one role state their connection"));
  Json half = document();
  half["candidates"][0]["parts"][2]["connection"] = "series";
  CHECK_THAT(faults_of(half.dump()), ContainsSubstring("parts[2].connection") && ContainsSubstring("a second part"));
  Json mixed = with_pair(2, 300, "series");
  mixed["candidates"][0]["parts"][3]["connection"] = "parallel";
  CHECK_THAT(faults_of(mixed.dump()),
             ContainsSubstring("parts[3].connection") && ContainsSubstring("the connection of the other part"));
  Json odd = document();
  odd["candidates"][0]["parts"][2]["connection"] = "sideways";
  CHECK_THAT(faults_of(odd.dump()), ContainsSubstring("sideways") && ContainsSubstring("series or parallel"));
  Json three = with_pair(2, 300, "series");
  Json& parts = three["candidates"][0]["parts"];
  parts.push_back(parts[2]);
  CHECK_THAT(faults_of(three.dump()), ContainsSubstring("at most two parts in one role"));
}

TEST_CASE("what is written of a pair reads back as the same pair") {
  DesignResult result = test::sample_result();
  Candidate& one = result.candidates[0];
  Part other = one.parts[2];
  other.designator = "R3B";
  other.value = 300;
  other.connection = one.parts[2].connection = Connection::series;
  one.parts[2].designator = "R3A";
  one.parts.insert(one.parts.begin() + 3, other);
  one.offered[index(Role::collector)].value = one.offered[index(Role::collector)].working_value = 5000;
  const Json written = Json::parse(write_json(result));
  CHECK(written["candidates"][0]["parts"][2]["designator"] == "R3A");
  CHECK(written["candidates"][0]["parts"][3]["designator"] == "R3B");
  CHECK(written["candidates"][0]["parts"][3]["connection"] == "series");
  CHECK(written["candidates"][0]["parts"][3]["working_value"] == 300);
  CHECK_FALSE(written["candidates"][0]["parts"][0].contains("connection"));
  CHECK(read_candidate(written.dump(), "file.json", 1).parts[index(Role::collector)].pair ==
        std::array<double, 2>{4700, 300});
}
