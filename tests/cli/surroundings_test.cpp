// What surrounds the program changes nothing of its answer: locale, colour settings, working folder.
#include <cstdlib>

#include "catch.hpp"
#include "cli_specs.hpp"
#include "places.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

namespace {

// Runs under a terminal of its own, if the machine can give one; empty where it cannot.
std::string under_a_terminal(const std::vector<std::string>& environment) {
  std::string command = "'" + program_file().string() + "' check";
  for (const std::string& word : joined(kPartOptions, {"--supply", "12V"})) command += " " + word;
  Circumstances circumstances;
  circumstances.environment = environment;
  const Outcome outcome =
      run_command({"sh", "-c", "command -v script >/dev/null && script -qec \"$0\" /dev/null", command}, circumstances);
  return outcome.status == 0 ? outcome.out : "";
}

}  // namespace

TEST_CASE("a locale with a decimal comma changes no byte") {
  const TemporaryFolder folder;
  // A real locale is compiled where the machine has the sources; the variables are set in any case.
  run_command({"sh", "-c", "localedef -i de_DE -f UTF-8 \"$0\"/de_DE.UTF-8 2>/dev/null", folder.path().string()});
  const Circumstances comma =
      with_environment({"LC_ALL=de_DE.UTF-8", "LANG=de_DE.UTF-8", "LOCPATH=" + folder.path().string()});
  for (const char* format : {"table", "json", "csv"}) {
    const Outcome plain = check_parts({"--supply", "12.5V", "--format", format});
    CHECK(plain.status == 0);
    CHECK(check_parts({"--supply", "12.5V", "--format", format}, comma).out == plain.out);
  }
  CHECK(check_parts({"--supply", "12,5V"}, comma).status == 2);
}

TEST_CASE("a locale that does not exist is no fault") {
  CHECK(check_parts({"--supply", "12V"}, with_environment({"LC_ALL=no_SUCH"})).status == 0);
}

TEST_CASE("without a terminal there is no colour and no progress, whatever is set") {
  for (const char* setting : {"TERM=xterm-256color", "TERM=dumb", "NO_COLOR=1", "NO_COLOR="}) {
    const Outcome outcome = design_easy({}, with_environment({setting}));
    CHECK(outcome.out.find('\x1b') == std::string::npos);
    CHECK(outcome.err.empty());
  }
}

TEST_CASE("on a terminal NO_COLOR and TERM=dumb take the colour away") {
  const std::string coloured = under_a_terminal({"TERM=xterm", "NO_COLOR="});
  if (coloured.empty()) return;  // no such tool here; the writer's own test covers colour
  CHECK_THAT(coloured, ContainsSubstring("\x1b["));
  CHECK(under_a_terminal({"TERM=xterm", "NO_COLOR=1"}).find('\x1b') == std::string::npos);
  CHECK(under_a_terminal({"TERM=dumb", "NO_COLOR="}).find('\x1b') == std::string::npos);
}
