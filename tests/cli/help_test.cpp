// Help and version: on standard output, status 0, complete.
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/version.hpp>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

Outcome helped(const std::vector<std::string>& words) {
  const Outcome outcome = run_bandwright(words);
  CHECK(outcome.status == 0);
  CHECK(outcome.err.empty());
  return outcome;
}

}  // namespace

TEST_CASE("the version is that of the library") {
  const std::string expected = std::string("bandwright ") + bandwright::version() + "\n";
  CHECK(helped({"--version"}).out == expected);
  CHECK(helped({"-V"}).out == expected);
}

TEST_CASE("help names every command and every exit status") {
  const std::string text = helped({"--help"}).out;
  for (const char* piece : {"design", "check", "compare", "bom", "catalogue", "--version", "130"})
    CHECK_THAT(text, ContainsSubstring(piece));
  CHECK(helped({"help"}).out == text);
  CHECK(helped({"-h"}).out == text);
}

TEST_CASE("help of a command is the same on every way to it") {
  for (const char* command : {"design", "check", "compare", "bom", "catalogue"}) {
    const std::string text = helped({"help", command}).out;
    CHECK_THAT(text, StartsWith(std::string("bandwright ") + command));
    CHECK(helped({command, "--help"}).out == text);
    CHECK(helped({command, "-h"}).out == text);
    CHECK_THAT(text, ContainsSubstring("For example"));
  }
}

TEST_CASE("help lists every key of the spec and every option") {
  const std::string design = helped({"help", "design"}).out;
  const std::string check = helped({"help", "check"}).out;
  for (const bandwright::OptionKey& key : bandwright::spec_options()) {
    CHECK_THAT(design, ContainsSubstring("--" + key.option + " "));
    CHECK_THAT(check, ContainsSubstring("--" + key.option + " "));
  }
  for (const char* option : {"--print-spec", "--rank", "--format", "--output", "--catalogue", "--threads",
                             "--allow-high-voltage", "--quiet"})
    CHECK_THAT(design, ContainsSubstring(option));
  for (const bandwright::RoleInfo& role : bandwright::roles()) CHECK_THAT(check, ContainsSubstring(role.designator));
  const std::string compare = helped({"help", "compare"}).out;
  for (const char* option : {"--pick", "--format", "--output", "--quiet"})
    CHECK_THAT(compare, ContainsSubstring(option));
  const std::string bom = helped({"help", "bom"}).out;
  for (const char* option : {"--pick", "--quantity", "--attrition", "--no-decoupling", "--no-alternates",
                             "--consolidate", "--catalogue", "--format", "--output", "--quiet"})
    CHECK_THAT(bom, ContainsSubstring(option));
  for (const char* option : {"--pick", "--device", "--upper-divider", "--emitter-bypassed", "--shunt"})
    CHECK_THAT(check, ContainsSubstring(option));
}

TEST_CASE("the examples of the help are accepted") {
  // The command line that needs no file, as the help of design prints it.
  const Outcome outcome = run_bandwright({"design", "--gain", "34dB", "--lower-cutoff", "40Hz", "--upper-cutoff",
                                          "20kHz", "--supply", "12V", "--load-resistance", "10k", "--print-spec"});
  CHECK(outcome.status == 0);
}
