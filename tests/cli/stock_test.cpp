// stock: help, summary, the starting file, exit statuses, and files that are none.
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"
#include "places.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

std::string example() { return (examples_folder() / "drawer.csv").string(); }

Outcome stock_of(const std::string& text, const std::vector<std::string>& more = {}) {
  const TemporaryFolder folder;
  return run_bandwright(joined({"stock", folder.write("drawer.csv", text).string()}, more));
}

void check_refused(const Outcome& outcome, int status, const char* says) {
  CHECK(outcome.status == status);
  CHECK(outcome.out.empty());
  CHECK_THAT(outcome.err, StartsWith("bandwright: "));
  CHECK_THAT(outcome.err, ContainsSubstring(says));
}

}  // namespace

TEST_CASE("help of stock") {
  const Outcome outcome = run_bandwright({"help", "stock"});
  CHECK(outcome.status == 0);
  for (const char* piece : {"bandwright stock FILE", "--start", "--format", "--output", "--catalogue", "table or json"})
    CHECK_THAT(outcome.out, ContainsSubstring(piece));
  CHECK(run_bandwright({"stock", "--help"}).out == outcome.out);
  CHECK_THAT(run_bandwright({"help"}).out, ContainsSubstring("stock FILE"));
}

TEST_CASE("a stock is summarised") {
  const Outcome outcome = run_bandwright({"stock", example()});
  CHECK(outcome.status == 0);
  CHECK(outcome.err.empty());
  for (const char* piece : {"84 rows, no fault", "resistor", "1 MΩ", "electrolytic", "BC547B", "never runs short"})
    CHECK_THAT(outcome.out, ContainsSubstring(piece));
  CHECK(run_bandwright({"stock", "-"}, with_input(read_file(example()))).status == 0);
}

TEST_CASE("the summary as JSON, to standard output or a file") {
  const Outcome outcome = run_bandwright({"stock", example(), "--format", "json"});
  CHECK(outcome.status == 0);
  CHECK(nlohmann::json::parse(outcome.out).at("rows") == 84);
  const TemporaryFolder folder;
  const std::string file = (folder.path() / "summary.json").string();
  CHECK(run_bandwright({"stock", example(), "-o", file}).status == 0);
  CHECK(read_file(file) == outcome.out);
}

TEST_CASE("the starting file is written, and read back without a fault") {
  const Outcome start = run_bandwright({"stock", "--start"});
  CHECK(start.status == 0);
  CHECK(start.err.empty());
  const TemporaryFolder folder;
  const std::string file = (folder.path() / "drawer.csv").string();
  const Outcome written = run_bandwright({"stock", "--start", "-o", file});
  CHECK(written.status == 0);
  CHECK(written.out.empty());
  CHECK(read_file(file) == start.out);
  CHECK(run_bandwright({"stock", file}).status == 0);
}

TEST_CASE("every fault of a stock is told, with status 2") {
  const Outcome outcome = stock_of("kind,value,family\nresistor,4x7,\ncapacitor,10u,flim\n");
  CHECK(outcome.status == 2);
  CHECK(outcome.out.empty());
  CHECK_THAT(outcome.err, ContainsSubstring("drawer.csv, line 2, column 2 (value): found \"4x7\""));
  CHECK_THAT(outcome.err, ContainsSubstring("drawer.csv, line 3, column 3 (family): found \"flim\""));
  CHECK_THAT(outcome.err, ContainsSubstring("did you mean \"film\"?"));
}

TEST_CASE("a command line that makes no sense is refused with status 2") {
  check_refused(run_bandwright({"stock"}), 2, "a stock file is missing");
  check_refused(run_bandwright({"stock", "--start", example()}), 2, "no file is read");
  check_refused(run_bandwright({"stock", "--start", "--format", "json"}), 2, "leave --format out");
  check_refused(run_bandwright({"stock", example(), example()}), 2, "one stock file at a time");
  check_refused(run_bandwright({"stock", example(), "--format", "csv"}), 2, "table or json");
  check_refused(run_bandwright({"stock", example(), "--strat"}), 2, "did you mean --start?");
}

TEST_CASE("a file that cannot be read or written is status 3") {
  const TemporaryFolder folder;
  check_refused(run_bandwright({"stock", (folder.path() / "nothing.csv").string()}), 3, "cannot read");
  check_refused(run_bandwright({"stock", folder.path().string()}), 3, "cannot read");
  check_refused(run_bandwright({"stock", example(), "-o", folder.path().string()}), 3, "cannot write");
}

TEST_CASE("the file that is read is not written over") {
  const TemporaryFolder folder;
  const std::string file = folder.write("drawer.csv", "kind,value\nresistor,1K\n").string();
  check_refused(run_bandwright({"stock", file, "-o", file}), 2, "choose another name");
  CHECK(read_file(file) == "kind,value\nresistor,1K\n");
}

TEST_CASE("files that are no stock") {
  check_refused(stock_of(""), 2, "expected headings such as kind, value");
  check_refused(stock_of("# one\n\n# two"), 2, "expected headings such as kind, value");
  check_refused(stock_of(std::string(1 << 20, '\0')), 2, "expected text: comma-separated values or JSON");
  std::string bytes;
  for (int i = 0; i < 100000; ++i) bytes += static_cast<char>(1 + (i * 131 + i / 7) % 255);
  const Outcome binary = stock_of(bytes);
  check_refused(binary, 2, "drawer.csv");
  CHECK(binary.err.size() < 20000);
  // The program's own file, which is no text either.
  check_refused(run_bandwright({"stock", program_file().string()}), 2, "expected text");
}

TEST_CASE("100 MB of zeros are not taken for a stock") {
  const TemporaryFolder folder;
  const auto file = folder.write("drawer.csv", "");
  std::filesystem::resize_file(file, 100'000'000);
  check_refused(run_bandwright({"stock", file.string()}), 3, "longer than 64 MiB");
}

TEST_CASE("a locale with a decimal comma changes nothing of a stock") {
  const Circumstances comma = with_environment({"LC_ALL=de_DE.UTF-8", "LANG=de_DE.UTF-8"});
  CHECK(run_bandwright({"stock", example()}, comma).out == run_bandwright({"stock", example()}).out);
  CHECK(run_bandwright({"stock", "--start"}, comma).out == run_bandwright({"stock", "--start"}).out);
}

TEST_CASE("families and types of one's own catalogue are known to a stock") {
  const TemporaryFolder folder;
  folder.write("own/families.json", R"({"families": [{"key": "mica", "name": "mica capacitor", "kind": "capacitor",
    "series": {"names": ["E12"]}, "made": {"min": "1 pF", "max": "1 nF"}, "tolerances": {"offered": ["1 %"]},
    "temperature_coefficient": {"max": "50 ppm/K"}, "ratings": {"rows": [{"voltage": "500 V"}]}}]})");
  const std::string file = folder.write("drawer.csv", "kind,value,family\ncapacitor,100p,mica\n").string();
  CHECK(run_bandwright({"stock", file}).status == 2);
  const Outcome outcome = run_bandwright({"stock", file, "--catalogue", (folder.path() / "own").string()});
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, ContainsSubstring("mica ±1 %"));
}
