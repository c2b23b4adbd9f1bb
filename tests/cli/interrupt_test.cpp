// The interrupt key: the best so far is printed, marked, with status 130.
#include <csignal>
#include <nlohmann/json.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using namespace std::chrono_literals;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

// Every transistor and many candidates: long enough to be interrupted.
const std::vector<std::string> kLongSearch = {"design", "--gain",         "34dB",  "--gain-tolerance",
                                              "0.1 dB", "--lower-cutoff", "40Hz",  "--lower-cutoff-tolerance",
                                              "1 %",    "--upper-cutoff", "20kHz", "--upper-cutoff-tolerance",
                                              "1 %",    "--supply",       "12V",   "--resistors-series",
                                              "E96",    "--threads",      "1"};

Outcome interrupted(const std::vector<std::string>& words) {
  Circumstances circumstances;
  circumstances.interrupt_after = 100ms;
  return run_bandwright(words, circumstances);
}

}  // namespace

TEST_CASE("an interrupted search prints its best, marked, with status 130") {
  const Outcome outcome = interrupted(kLongSearch);
  INFO(outcome.err);
  CHECK(outcome.signal == 0);
  CHECK(outcome.status == 130);
  CHECK_THAT(outcome.out, StartsWith("INTERRUPTED"));
  CHECK_THAT(outcome.err, ContainsSubstring("interrupted"));
}

TEST_CASE("an interrupted document is whole and says so") {
  const Outcome outcome = interrupted(joined(kLongSearch, {"--format", "json", "--quiet"}));
  CHECK(outcome.status == 130);
  CHECK(nlohmann::json::parse(outcome.out)["interrupted"] == true);
}
