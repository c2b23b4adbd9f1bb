// The part of the two start scripts that installs packages, run against invented dpkg-query, apt-get, id and sudo: a
// machine on which packages, network or rights are missing.
#include "catch.hpp"
#include "places.hpp"
#include "run_program.hpp"

namespace bandwright::test {
namespace {

using Catch::Matchers::ContainsSubstring;

/// A machine as the script sees it. Nothing outside its folder is in PATH.
struct Machine {
  bool root = true;
  bool has_sudo = false;
  bool has_network = true;
  std::string installed;  ///< names parted by spaces, one at each end too
};

constexpr const char* kQuery = R"sh(#!/bin/bash
if [[ "$(<"$MACHINE/installed")" == *" ${*: -1} "* ]]; then printf installed; else exit 1; fi
)sh";
constexpr const char* kAptGet = R"sh(#!/bin/bash
echo "apt-get $*" >>"$MACHINE/log"
[ "$DEBIAN_FRONTEND" = noninteractive ] || { echo "would ask"; exit 1; }
[ -e "$MACHINE/network" ] || { echo "could not resolve"; exit 100; }
for word; do [[ $word == pack-* ]] && printf '%s ' "$word" >>"$MACHINE/installed"; done
exit 0
)sh";
constexpr const char* kSudo = R"sh(#!/bin/bash
echo sudo >>"$MACHINE/log"
"$@"
)sh";

void add_program(const TemporaryFolder& folder, const std::string& name, const std::string& text) {
  const auto file = folder.write("bin/" + name, text);
  std::filesystem::permissions(file, std::filesystem::perms::owner_all);
}

/// What the script says, and what it asked of apt-get and sudo.
struct Told {
  Outcome outcome;
  std::string log;
};

Told ask_for(const std::string& packages, const Machine& machine) {
  const TemporaryFolder folder;
  folder.write("installed", machine.installed);
  folder.write("log", "");
  if (machine.has_network) folder.write("network", "");
  add_program(folder, "dpkg-query", kQuery);
  add_program(folder, "apt-get", kAptGet);
  add_program(folder, "id", machine.root ? "#!/bin/bash\necho 0\n" : "#!/bin/bash\necho 1000\n");
  add_program(folder, "env", "#!/bin/bash\nexec /usr/bin/env \"$@\"\n");
  if (machine.has_sudo) add_program(folder, "sudo", kSudo);
  const std::string script = (project_folder() / "tests/support/packages.sh").string();
  Circumstances circumstances;
  circumstances.environment = {"PATH=" + (folder.path() / "bin").string(), "MACHINE=" + folder.path().string()};
  Told told;
  told.outcome = run_command(
      {"/bin/bash", "-euo", "pipefail", "-c", ". '" + script + "'; need_packages " + packages + "; echo ready"},
      circumstances);
  told.log = read_file(folder.path() / "log");
  return told;
}

TEST_CASE("where every package is there, nothing is installed and no rights are asked for") {
  const Told told = ask_for("pack-a pack-b", {.root = false, .has_sudo = true, .installed = " pack-a pack-b "});
  CHECK(told.outcome.status == 0);
  CHECK(told.outcome.out == "ready\n");
  CHECK(told.log.empty());
}

TEST_CASE("only what is missing is installed") {
  const Told told = ask_for("pack-a pack-b", {.installed = " pack-a "});
  CHECK(told.outcome.status == 0);
  CHECK_THAT(told.log, ContainsSubstring("install --yes --no-install-recommends pack-b"));
  CHECK_THAT(told.log, !ContainsSubstring("sudo"));
}

TEST_CASE("who is not root installs through sudo") {
  const Told told = ask_for("pack-a", {.root = false, .has_sudo = true, .installed = " "});
  CHECK(told.outcome.status == 0);
  CHECK_THAT(told.log, ContainsSubstring("sudo\napt-get"));
}

TEST_CASE("without root and sudo the script says what root should run") {
  const Told told = ask_for("pack-a", {.root = false, .has_sudo = false, .installed = " "});
  CHECK(told.outcome.status == 1);
  CHECK_THAT(told.outcome.err, ContainsSubstring("neither root nor sudo"));
  CHECK_THAT(told.outcome.err, ContainsSubstring("apt-get install pack-a"));
  CHECK(told.outcome.out.empty());
}

TEST_CASE("without a network the script names the packages it could not install") {
  const Told told = ask_for("pack-a pack-b", {.has_network = false, .installed = " pack-a "});
  CHECK(told.outcome.status == 1);
  CHECK_THAT(told.outcome.err, ContainsSubstring("could not install: pack-b"));
  CHECK_THAT(told.outcome.err, ContainsSubstring("no network"));
  CHECK(told.outcome.out.empty());
}

TEST_CASE("a package that is missing after a good end of apt-get is named") {
  const Told told = ask_for("unknown-a", {.installed = " "});
  CHECK(told.outcome.status == 1);
  CHECK_THAT(told.outcome.err, ContainsSubstring("still missing: unknown-a"));
}

}  // namespace
}  // namespace bandwright::test
