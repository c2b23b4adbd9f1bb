// Runs a program and hands back all that it said.
//
//   TemporaryFolder folder;
//   auto spec = folder.write("stage.json", text);
//   Outcome outcome = run_bandwright({"design", spec.string()});
//   CHECK(outcome.status == 0);
#pragma once

#include <chrono>
#include <filesystem>
#include <optional>
#include <string>
#include <vector>

namespace bandwright::test {

/// What a finished program left behind.
struct Outcome {
  int status = -1;  ///< exit status; -1 where a signal ended it
  int signal = 0;   ///< the signal that ended it, or 0
  std::string out;  ///< standard output
  std::string err;  ///< standard error
};

/// The circumstances of a run.
struct Circumstances {
  std::string input;                     ///< standard input
  std::vector<std::string> environment;  ///< "NAME=value", set on top of this process's own
  std::filesystem::path folder;          ///< working directory; empty: this process's own
  std::optional<std::chrono::milliseconds> interrupt_after;
  std::chrono::seconds patience{120};  ///< then it is killed: signal 9 in the outcome
};

/// Runs command[0] with the rest as arguments; without a slash it is looked up in PATH.
/// Throws std::system_error where it cannot be started.
Outcome run_command(const std::vector<std::string>& command, const Circumstances& circumstances = {});

/// Runs the bandwright program that was built beside the tests.
Outcome run_bandwright(const std::vector<std::string>& arguments, const Circumstances& circumstances = {});

std::string read_file(const std::filesystem::path& file);

/// An empty folder of its own, removed at the end of its scope.
class TemporaryFolder {
public:
  TemporaryFolder();
  ~TemporaryFolder();
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;

  const std::filesystem::path& path() const { return path_; }

  /// Writes a file (folders on its way are made) and returns its full path.
  std::filesystem::path write(const std::filesystem::path& name, const std::string& text) const;

private:
  std::filesystem::path path_;
};

}  // namespace bandwright::test
