// Files are written whole or not at all; streams that fail are told or, where the reader has gone, passed over.
#include <sys/stat.h>
#include <unistd.h>

#include <filesystem>

#include "catch.hpp"
#include "cli_specs.hpp"
#include "places.hpp"

using namespace bandwright::test;
using Catch::Matchers::ContainsSubstring;
namespace fs = std::filesystem;

namespace {

constexpr const char* kCatalogue = "catalogue";

std::size_t entries(const fs::path& folder) {
  return static_cast<std::size_t>(std::distance(fs::directory_iterator(folder), fs::directory_iterator()));
}

mode_t mode_of(const fs::path& file) {
  struct stat info = {};
  REQUIRE(stat(file.c_str(), &info) == 0);
  return info.st_mode & 07777;
}

Outcome shell(const std::string& command, const fs::path& folder = {}) {
  return run_command({"sh", "-c", command, program_file().string()}, in_folder(folder));
}

// Permissions bind no one who is root.
bool is_root() { return geteuid() == 0; }

}  // namespace

TEST_CASE("a written file is complete and stands alone") {
  const TemporaryFolder folder;
  const Outcome outcome = run_bandwright({kCatalogue, "-o", "list.txt"}, in_folder(folder.path()));
  CHECK(outcome.status == 0);
  CHECK(outcome.out.empty());
  CHECK_THAT(outcome.err, ContainsSubstring("wrote") && ContainsSubstring("list.txt"));
  CHECK(read_file(folder.path() / "list.txt") == run_bandwright({kCatalogue}).out);
  CHECK(entries(folder.path()) == 1);
}

TEST_CASE("option --output - is standard output, and --quiet says nothing") {
  const TemporaryFolder folder;
  CHECK(run_bandwright({kCatalogue, "-o", "-"}).out == run_bandwright({kCatalogue}).out);
  CHECK(run_bandwright({kCatalogue, "-o", "x", "--quiet"}, in_folder(folder.path())).err.empty());
}

TEST_CASE("a replaced file keeps its permissions; a new one follows the umask") {
  const TemporaryFolder folder;
  const fs::path old = folder.write("old.txt", "old");
  chmod(old.c_str(), 0640);
  CHECK(run_bandwright({kCatalogue, "-o", old.string()}).status == 0);
  CHECK(mode_of(old) == 0640);
  CHECK(shell("umask 027; \"$0\" catalogue -o new.txt", folder.path()).status == 0);
  CHECK(mode_of(folder.path() / "new.txt") == 0640);
}

TEST_CASE("a link stays a link, and what it leads to is replaced") {
  const TemporaryFolder folder;
  const fs::path target = folder.write("there/target.txt", "old");
  fs::create_symlink(target, folder.path() / "link.txt");
  CHECK(run_bandwright({kCatalogue, "-o", "link.txt"}, in_folder(folder.path())).status == 0);
  CHECK(fs::is_symlink(folder.path() / "link.txt"));
  CHECK(read_file(target) == run_bandwright({kCatalogue}).out);
  CHECK(entries(folder.path() / "there") == 1);
}

TEST_CASE("a folder is no output") {
  const TemporaryFolder folder;
  const Outcome outcome = run_bandwright({kCatalogue, "-o", folder.path().string()});
  CHECK(outcome.status == 3);
  CHECK_THAT(outcome.err, ContainsSubstring("Is a directory"));
  CHECK(entries(folder.path()) == 0);
}

TEST_CASE("a folder that cannot be written is told before any work") {
  if (is_root()) return;
  const TemporaryFolder folder;
  fs::permissions(folder.path(), fs::perms::owner_read | fs::perms::owner_exec);
  const Outcome outcome = run_bandwright({kCatalogue, "-o", (folder.path() / "x").string()});
  fs::permissions(folder.path(), fs::perms::owner_all);
  CHECK(outcome.status == 3);
  CHECK_THAT(outcome.err, ContainsSubstring("Permission denied"));
}

TEST_CASE("a file as folder is told") {
  const TemporaryFolder folder;
  const fs::path file = folder.write("file", "");
  const Outcome outcome = run_bandwright({kCatalogue, "-o", (file / "x").string()});
  CHECK(outcome.status == 3);
  CHECK_THAT(outcome.err, ContainsSubstring("Not a directory"));
}

TEST_CASE("the spec is not written over") {
  const TemporaryFolder folder;
  const fs::path spec = folder.write("spec.json", kEasySpec);
  const Outcome outcome = run_bandwright({"design", "spec.json", "-o", "./spec.json"}, in_folder(folder.path()));
  CHECK(outcome.status == 2);
  CHECK_THAT(outcome.err, ContainsSubstring("choose another name"));
  CHECK(read_file(spec) == kEasySpec);
}

TEST_CASE("a file that grows beyond its limit leaves the old one whole and nothing behind") {
  const TemporaryFolder folder;
  folder.write("x.txt", "old");
  // A limit of one block stands for a full disk; the signal that comes with it is ignored by trap.
  const Outcome outcome = shell("trap '' XFSZ; ulimit -f 1; exec \"$0\" catalogue -o x.txt", folder.path());
  CHECK(outcome.status == 3);
  CHECK_THAT(outcome.err, ContainsSubstring("cannot write 'x.txt'") || ContainsSubstring("x.txt"));
  CHECK(read_file(folder.path() / "x.txt") == "old");
  CHECK(entries(folder.path()) == 1);
}

TEST_CASE("a device takes the text directly") {
  CHECK(run_bandwright({kCatalogue, "-o", "/dev/null"}).status == 0);
  if (!fs::exists("/dev/full")) return;
  const Outcome full = run_bandwright({kCatalogue, "-o", "/dev/full"});
  CHECK(full.status == 3);
  CHECK_THAT(full.err, ContainsSubstring("No space left"));
}

TEST_CASE("a full or closed standard output is told") {
  if (fs::exists("/dev/full")) {
    const Outcome full = shell("\"$0\" catalogue > /dev/full");
    CHECK(full.status == 3);
    CHECK_THAT(full.err, ContainsSubstring("standard output"));
  }
  CHECK(shell("\"$0\" catalogue >&-").status == 3);
}

TEST_CASE("a reader that goes away is passed over in silence") {
  const Outcome outcome = shell("( \"$0\" catalogue; echo status $? >&2 ) | true");
  CHECK(outcome.err == "status 0\n");
}
