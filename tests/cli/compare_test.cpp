// compare: candidates of result documents beside each other.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

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
  Outcome compare(const std::vector<std::string>& words) const {
    return run_bandwright(joined({"compare"}, words), in_folder(folder.path()));
  }
  void refused(const std::vector<std::string>& words, const std::string& message, int status = 2) const {
    const Outcome outcome = compare(words);
    INFO(outcome.err);
    CHECK(outcome.status == status);
    CHECK(outcome.out.empty());
    CHECK_THAT(outcome.err, ContainsSubstring(message));
  }
};

}  // namespace

TEST_CASE("candidates of one file and of several are set beside each other") {
  const Results results;
  const Outcome one = results.compare({"designed.json"});
  INFO(one.err);
  CHECK(one.status == 0);
  CHECK(one.err.empty());
  CHECK_THAT(one.out, StartsWith("A") && ContainsSubstring("B  rank 2") && ContainsSubstring("Before building"));
  const Outcome two = results.compare({"designed.json", "checked.json"});
  CHECK(two.status == 0);
  CHECK_THAT(two.out, ContainsSubstring("A  designed.json, rank 1") && ContainsSubstring("B  checked.json, rank 1") &&
                          ContainsSubstring("The requirements differ: gain") &&
                          ContainsSubstring("Of each file its first candidate"));
}

TEST_CASE("what is compared is what the documents state") {
  const Results results;
  const Outcome outcome = results.compare({"designed.json", "--pick", "2,1", "--format", "json"});
  INFO(outcome.err);
  REQUIRE(outcome.status == 0);
  const Json written = Json::parse(outcome.out);
  for (const std::size_t i : {0, 1}) {
    const Json& shown = written["candidates"][i];
    const Json& stated = results.designed["candidates"][1 - i];
    CHECK(shown["rank"] == stated["rank"]);
    for (const char* field : {"figures", "margins", "device", "variant", "best_at", "non_dominated"}) {
      INFO(field);
      CHECK(shown[field] == stated[field]);
    }
    CHECK(shown["measures"]["error"] == stated["error"]);
    CHECK(shown["capability"]["smallest"] == stated["capability"]["smallest"]);
    CHECK(shown["yield"]["passed"] == stated["yield"]["passed"]);
  }
}

TEST_CASE("standard input is a file among others, and CSV goes where it is told") {
  const Results results;
  Circumstances circumstances = in_folder(results.folder.path());
  circumstances.input = results.designed.dump();
  const Outcome outcome = run_bandwright({"compare", "-", "checked.json", "-o", "choice.csv"}, circumstances);
  INFO(outcome.err);
  CHECK(outcome.status == 0);
  CHECK(outcome.out.empty());
  CHECK_THAT(outcome.err, ContainsSubstring("note: Of each file") && ContainsSubstring("wrote"));
  CHECK_THAT(read_file(results.folder.path() / "choice.csv"), StartsWith("name,file,rank,") &&
                                                                  ContainsSubstring("\r\nA,standard input,1,") &&
                                                                  ContainsSubstring("\r\nB,checked.json,1,"));
  CHECK(results.compare({"designed.json", "checked.json", "-o", "choice.csv", "-q"}).err.empty());
}

TEST_CASE("a choice needs two candidates, each once") {
  const Results results;
  results.refused({}, "nothing to compare");
  results.refused({"checked.json"}, "holds one candidate");
  results.refused({"designed.json", "--pick", "2"}, "only rank 2");
  results.refused({"designed.json", "designed.json"}, "'designed.json' is given twice");
  results.refused({"designed.json", "./designed.json"}, "'./designed.json' is given twice");
  results.refused({"designed.json", "--pick", "1,1"}, "rank 1 is given twice");
  results.refused({"designed.json", "--pick", "1,first,0"}, "found 'first'");
  results.refused({"designed.json", "--pick", "1,first,0"}, "found '0'");
  results.refused({"designed.json", "--pick", "1,"}, "found ''");
}

TEST_CASE("ranks that are not there are told for every file at once") {
  const Results results;
  const Outcome outcome = results.compare({"designed.json", "checked.json", "--pick", "2,9"});
  CHECK(outcome.status == 2);
  CHECK_THAT(outcome.err, ContainsSubstring("designed.json: candidates: found \"no candidate of rank 9\"; expected a "
                                            "rank from 1 to 2") &&
                              ContainsSubstring("checked.json: candidates: found \"no candidate of rank 2\"") &&
                              ContainsSubstring("checked.json: candidates: found \"no candidate of rank 9\""));
}

TEST_CASE("files that cannot be read and files that are no result are told together") {
  const Results results;
  results.folder.write("spec.json", kEasySpec);
  results.folder.write("text.txt", "a list of parts");
  results.refused({"designed.json", "spec.json"}, "spec.json: format: nothing found; expected bandwright/result");
  results.refused({"designed.json", "text.txt"}, "text.txt, line 1");
  const Outcome outcome = results.compare({"missing.json", "spec.json", "absent.json"});
  CHECK(outcome.status == 3);
  CHECK_THAT(outcome.err, ContainsSubstring("'missing.json'") && ContainsSubstring("'absent.json'") &&
                              ContainsSubstring("spec.json: format"));
}

TEST_CASE("no input is written over") {
  const Results results;
  const std::string before = read_file(results.folder.path() / "checked.json");
  results.refused({"designed.json", "checked.json", "-o", "./checked.json"}, "choose another name");
  CHECK(read_file(results.folder.path() / "checked.json") == before);
  results.refused({"designed.json", "checked.json", "-o", "no/such/folder.csv"}, "no/such", 3);
}
