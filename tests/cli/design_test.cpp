// The main job through the program: formats, files, streams, statuses.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;
using Json = nlohmann::json;

TEST_CASE("a spec from a file, from standard input and from options gives candidates") {
  const TemporaryFolder folder;
  const auto file = folder.write("spec.json", kEasySpec);
  const Outcome from_file = run_bandwright({"design", file.string()});
  const Outcome from_input = run_bandwright({"design", "-"}, with_input(kEasySpec));
  INFO(from_file.err);
  CHECK(from_file.status == 0);
  CHECK_THAT(from_file.out, ContainsSubstring("every requirement") && ContainsSubstring("BC547B"));
  CHECK(from_file.err.empty());
  CHECK(from_input.out == from_file.out);
  CHECK(design_easy({}).status == 0);
}

TEST_CASE("options override the file") {
  const Outcome outcome = run_bandwright({"design", "-", "--supply", "9V", "--format", "json"}, with_input(kEasySpec));
  CHECK(Json::parse(outcome.out)["spec"]["supply"]["nominal"] == 9);
}

TEST_CASE("an impossible spec ends with status 1, the nearest candidates and each shortfall") {
  const Outcome outcome = run_bandwright({"design", "-"}, with_input(kImpossibleSpec));
  CHECK(outcome.status == 1);
  CHECK_THAT(outcome.out, StartsWith("None of") || StartsWith("The candidate does not") || StartsWith("No candidate"));
  CHECK_THAT(outcome.out, ContainsSubstring("gain"));
  CHECK(outcome.err.empty());
}

TEST_CASE("JSON and CSV go to standard output, whole and alone") {
  const Json document = Json::parse(design_easy({"--format", "json"}).out);
  CHECK(document["format"] == "bandwright/result");
  CHECK(document["met"] == true);
  CHECK(document["candidates"].size() >= 1);
  CHECK_THAT(design_easy({"--format", "csv"}).out, StartsWith("rank,device,variant,error,tolerance_sensitivity,gain"));
}

TEST_CASE("the format follows the ending of the output's name unless it is stated") {
  const TemporaryFolder folder;
  CHECK(design_easy({"-o", "r.json"}, in_folder(folder.path())).status == 0);
  CHECK(Json::parse(read_file(folder.path() / "r.json"))["version"] == 1);
  CHECK(design_easy({"-o", "r.csv"}, in_folder(folder.path())).status == 0);
  CHECK_THAT(read_file(folder.path() / "r.csv"), StartsWith("rank,"));
  CHECK(design_easy({"-o", "s.csv", "--format", "table"}, in_folder(folder.path())).status == 0);
  CHECK_THAT(read_file(folder.path() / "s.csv"), ContainsSubstring("Before building"));
}

TEST_CASE("the printed spec is a fixed point and gives the same answer") {
  const TemporaryFolder folder;
  folder.write("spec.json", kEasySpec);
  const Outcome filled = run_bandwright({"design", "spec.json", "--print-spec"}, in_folder(folder.path()));
  REQUIRE(filled.status == 0);
  const Outcome again = run_bandwright({"design", "-", "--print-spec"}, with_input(filled.out));
  CHECK(again.out == filled.out);
  const Outcome direct = run_bandwright({"design", "spec.json", "--format", "csv"}, in_folder(folder.path()));
  const Outcome through = run_bandwright({"design", "-", "--format", "csv"}, with_input(filled.out));
  CHECK(direct.out == through.out);
}

TEST_CASE("a result document serves as a spec") {
  const Outcome first = design_easy({"--format", "json"});
  const Outcome second = run_bandwright({"design", "-", "--format", "json"}, with_input(first.out));
  CHECK(second.out == first.out);
}

TEST_CASE("the same bytes on any number of threads, and twice") {
  const Outcome one = design_easy({"--threads", "1", "--format", "json"});
  CHECK(one.status == 0);
  CHECK(design_easy({"--threads", "2", "--format", "json"}).out == one.out);
  CHECK(design_easy({"--threads", "1", "--format", "json"}).out == one.out);
}

TEST_CASE("option --rank sensitivity puts the least sensitive first") {
  const Json document = Json::parse(design_easy({"--rank", "sensitivity", "--format", "json"}).out);
  CHECK(document["ranked_by"] == "sensitivity");
}

TEST_CASE("a supply above 60 V is refused unless it is allowed") {
  const std::vector<std::string> words = {"--supply", "72V", "--device", "2N5551"};
  const std::vector<std::string> parts = {"--upper-divider",  "47k", "--lower-divider",   "3k3",
                                          "--collector",      "10k", "--emitter",         "1k",
                                          "--input-coupling", "1u",  "--output-coupling", "1u"};
  const Outcome refused = run_bandwright(joined(joined({"check"}, words), parts));
  CHECK(refused.status == 2);
  CHECK_THAT(refused.err, ContainsSubstring("60 V"));
  const Outcome allowed = run_bandwright(joined(joined({"check", "--allow-high-voltage"}, words), parts));
  INFO(allowed.err);
  CHECK(allowed.status == 0);
}

TEST_CASE("what reading changed is told once, and not with --quiet") {
  const std::vector<std::string> level = {"--output-swing-min", "1 Vpp", "--format", "json"};
  CHECK_THAT(design_easy(level).err, ContainsSubstring("note: ") && ContainsSubstring("peak"));
  CHECK(design_easy(joined(level, {"--quiet"})).err.empty());
}
