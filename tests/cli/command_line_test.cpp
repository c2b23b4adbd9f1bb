// Command lines that are wrong: each says what and where, on standard error alone, with the status of the contract.
#include <filesystem>

#include "catch.hpp"
#include "cli_specs.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;

namespace {

struct Wrong {
  std::vector<std::string> words;
  std::string message;  ///< must stand in it
  int status = 2;
};

const std::vector<std::string> kWithSupply = {"design", "--supply",       "12V",  "--lower-cutoff",
                                              "60Hz",   "--upper-cutoff", "20kHz"};

std::vector<std::string> with_gain(const std::string& gain) { return joined(kWithSupply, {"--gain", gain}); }
std::vector<std::string> with_gain_and(const std::vector<std::string>& more) { return joined(with_gain("30dB"), more); }
std::vector<std::string> design(const std::vector<std::string>& more) {
  return joined(joined({"design"}, kSpecOptions), more);
}
std::vector<std::string> check(const std::vector<std::string>& more) {
  return joined(joined({"check"}, kPartOptions), more);
}

std::vector<Wrong> wrong_command_lines() {
  return {
      {{}, "no command"},
      {{"desing"}, "did you mean design?"},
      {{"frobnicate"}, "expected design, check, compare, bom, catalogue, stock or help"},
      {{"--gian"}, "unknown option '--gian'"},
      {{"stage.json"}, "bandwright design stage.json"},
      {{"help", "desing"}, "no help on 'desing'"},
      {{"help", "design", "check"}, "no help on 'check'"},
      {{"design"}, "no spec"},
      {{"design", "a.json", "b.json"}, "unexpected 'b.json'"},
      {{"design", "no-such-file.json"}, "cannot read 'no-such-file.json'", 3},
      {{"design", "/"}, "cannot read '/'", 3},
      {design({"--gian", "3"}), "did you mean --gain?"},
      {design({"--lower_cutoff", "3"}), "--lower-cutoff"},
      {design({"--zzz", "--qqq"}), "unknown option '--qqq'"},
      {design({"-x"}), "unknown option '-x'"},
      {design({"--gain", "3"}), "--gain is given twice"},
      {design({"--format"}), "--format needs a value"},
      {design({"--format", "--quiet"}), "--format needs a value"},
      {design({"--rank", "-q"}), "--rank needs a value"},
      {design({"--format="}), "--format"},
      {design({"--quiet=yes"}), "--quiet takes no value"},
      {design({"--format", "xml"}), "expected table, json or csv"},
      {design({"--rank", "price"}),
       "expected capability (default), error, sensitivity, yield, worst-case, current, parts or cost"},
      {design({"--threads", "0"}), "a whole number from 1"},
      {design({"--threads", "two"}), "found 'two'"},
      {design({"--threads", "1.5"}), "found '1.5'"},
      {design({"--threads", "99999999999999999999"}), "--threads"},
      {design({"--output", ""}), "the name is empty", 3},
      {design({"--output", "/"}), "Is a directory", 3},
      {design({"--output", "/no/such/folder/x.json"}), "/no/such/folder", 3},
      {design({"--catalogue", "/no/such/folder"}), "/no/such/folder", 3},
      {with_gain_and({"--devices", "BC547b9"}), "BC547b9"},
      {with_gain(""), "gain"},
      {with_gain("34 x"), "34 x"},
      {with_gain("-"), "gain"},
      {with_gain("3,5"), "3,5"},
      {with_gain("nan"), "nan"},
      {with_gain("40 Hz"), "gain"},
      {kWithSupply, "gain"},
      {{"design", "--gain", "30dB", "--lower-cutoff", "60Hz", "--upper-cutoff", "20kHz"}, "supply"},
      {design({"--source-resistance", "-600"}), "source"},
      {design({"--load-capacitance", "10"}), "10"},
      {design({"--ambient", "25"}), "ambient"},
      {design({"--assess-causes", "current_gain=off,current_gain=10%"}), "each key once"},
      {design({"--assess-units", "10"}), "a whole number from 100 to 1000000"},
      {design({"--assess-causes", "curent_gain=off"}), "did you mean \"current_gain\"?"},
      {{"check"}, "nothing to check"},
      {{"check", "--device", "BC547B"}, "supply"},
      {{"check", "--supply", "12V", "--device", "BC547B"}, "--upper-divider is missing"},
      {{"check", "--supply", "12V", "--upper-divider", "47k"}, "--device is missing"},
      {check({"--supply", "12V", "--pick", "2"}), "needs a result document"},
      {check({"--supply", "12V", "--shunt", "10"}), "--shunt"},
      {check({"--supply", "12V", "--shunt", "-1n"}), "--shunt"},
      {check({"--supply", "100V"}), "60 V"},
      {{"check", "--supply", "12V", "--device", "BC547X"}, "--upper-divider is missing"},
      {{"check", "--supply", "12V", "--upper-divider", "none"}, "--upper-divider"},
      {{"compare"}, "nothing to compare"},
      {{"compare", "a.json", "a.json"}, "'a.json' is given twice"},
      {{"compare", "a.json", "--pick", "0"}, "a whole number from 1"},
      {{"compare", "a.json", "b.json"}, "cannot read 'b.json'", 3},
      {{"compare", "a.json", "--gain", "3"}, "unknown option '--gain'"},
      {{"catalogue", "BC574B"}, "did you mean BC547B?"},
      {{"catalogue", "nothing-like-it"}, "bandwright catalogue lists them all"},
      {{"catalogue", "--format", "json"}, "unknown option '--format'"},
      {{"catalogue", "--catalogue", "/no/such/folder"}, "/no/such/folder", 3},
  };
}

std::string line_of(const std::vector<std::string>& words) {
  std::string line = "bandwright";
  for (const std::string& word : words) line += " '" + word + "'";
  return line;
}

bool every_line_is_ours(const std::string& text) {
  for (std::size_t at = 0; at < text.size(); at = text.find('\n', at) + 1)
    if (text.compare(at, 12, "bandwright: ") != 0) return false;
  return !text.empty() && text.back() == '\n';
}

}  // namespace

TEST_CASE("a wrong command line is refused with what would be right") {
  const TemporaryFolder folder;
  for (const Wrong& wrong : wrong_command_lines()) {
    INFO(line_of(wrong.words));
    const Outcome outcome = run_bandwright(wrong.words, in_folder(folder.path()));
    INFO(outcome.err);
    CHECK(outcome.signal == 0);
    CHECK(outcome.status == wrong.status);
    CHECK(outcome.out.empty());
    CHECK_THAT(outcome.err, ContainsSubstring(wrong.message));
    CHECK(every_line_is_ours(outcome.err));
  }
  CHECK(std::filesystem::is_empty(folder.path()));
}

TEST_CASE("every unknown option is told at once") {
  const Outcome outcome = design_easy({"--gian", "3", "--suply", "9V"});
  CHECK(outcome.status == 2);
  CHECK_THAT(outcome.err, ContainsSubstring("--gain?") && ContainsSubstring("--supply?"));
}

TEST_CASE("control characters of an argument are not echoed") {
  const Outcome outcome = run_bandwright({"catalogue", "\x1b[31mred\x07"});
  CHECK(outcome.status == 2);
  CHECK(outcome.err.find('\x1b') == std::string::npos);
  CHECK(outcome.err.find('\x07') == std::string::npos);
}

TEST_CASE("a negative value is a value, not an option") {
  const Outcome outcome = run_bandwright({"design", "--gain", "-30", "--lower-cutoff", "60Hz", "--upper-cutoff-min",
                                          "20kHz", "--supply", "-12V", "--print-spec"});
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, ContainsSubstring("-12"));
}

TEST_CASE("causes of variation are switched off and limited on the command line") {
  const Outcome outcome =
      design_easy({"--print-spec", "--assess-units=1000", "--assess-causes", "current_gain=off,collector=-20/+50%"});
  CHECK(outcome.status == 0);
  for (const char* written : {R"("units": 1000)", R"("current_gain": "off")", R"("collector": "-20/+50 %")"})
    CHECK_THAT(outcome.out, ContainsSubstring(written));
}

TEST_CASE("options may come before the operand, with = or a space, and -- ends them") {
  const TemporaryFolder folder;
  folder.write("-odd.json", kEasySpec);
  const Outcome outcome =
      run_bandwright({"design", "--print-spec", "--supply=9V", "--", "-odd.json"}, in_folder(folder.path()));
  INFO(outcome.err);
  CHECK(outcome.status == 0);
  CHECK_THAT(outcome.out, ContainsSubstring("Doorbell pickup"));
}
