#include "run_program.hpp"

#include <fcntl.h>
#include <spawn.h>
#include <sys/wait.h>
#include <unistd.h>

#include <csignal>
#include <cstdlib>
#include <fstream>
#include <iterator>
#include <stdexcept>
#include <system_error>
#include <thread>

#include "places.hpp"

namespace bandwright::test {
namespace {

using Clock = std::chrono::steady_clock;

void demand(int error, const std::string& what) {
  if (error != 0) throw std::system_error(error, std::generic_category(), what);
}

std::vector<char*> pointers(std::vector<std::string>& texts) {
  std::vector<char*> result;
  for (std::string& text : texts) result.push_back(text.data());
  result.push_back(nullptr);
  return result;
}

/// The first entry of a name wins, so additions stand in front.
std::vector<std::string> environment_with(std::vector<std::string> additions) {
  for (char** entry = environ; *entry != nullptr; ++entry) {
    const std::string text = *entry;
    const std::string name = text.substr(0, text.find('=') + 1);
    bool replaced = false;
    for (const std::string& addition : additions) replaced = replaced || addition.starts_with(name);
    if (!replaced) additions.push_back(text);
  }
  return additions;
}

/// Files instead of pipes: nothing can fill up and block, however much the program writes.
pid_t start(std::vector<std::string> command, const Circumstances& circumstances, const TemporaryFolder& streams) {
  const std::string input = streams.write("in", circumstances.input).string();
  const std::string output = (streams.path() / "out").string();
  const std::string errors = (streams.path() / "err").string();
  constexpr int kWriting = O_WRONLY | O_CREAT | O_TRUNC;

  posix_spawn_file_actions_t actions;
  demand(posix_spawn_file_actions_init(&actions), "file actions");
  demand(posix_spawn_file_actions_addopen(&actions, 0, input.c_str(), O_RDONLY, 0), "standard input");
  demand(posix_spawn_file_actions_addopen(&actions, 1, output.c_str(), kWriting, 0600), "standard output");
  demand(posix_spawn_file_actions_addopen(&actions, 2, errors.c_str(), kWriting, 0600), "standard error");
  if (!circumstances.folder.empty())
    demand(posix_spawn_file_actions_addchdir_np(&actions, circumstances.folder.c_str()), "working directory");

  std::vector<std::string> environment = environment_with(circumstances.environment);
  pid_t child = 0;
  const int error = posix_spawnp(&child, command.front().c_str(), &actions, nullptr, pointers(command).data(),
                                 pointers(environment).data());
  posix_spawn_file_actions_destroy(&actions);
  demand(error, "cannot start " + command.front());
  return child;
}

int wait_for(pid_t child, const Circumstances& circumstances) {
  const Clock::time_point begin = Clock::now();
  bool interrupted = false;
  int status = 0;
  while (true) {
    const pid_t ended = waitpid(child, &status, WNOHANG);
    if (ended == child) return status;
    if (ended < 0) demand(errno, "waiting");
    const auto elapsed = Clock::now() - begin;
    if (circumstances.interrupt_after && !interrupted && elapsed >= *circumstances.interrupt_after) {
      kill(child, SIGINT);
      interrupted = true;
    }
    if (elapsed >= circumstances.patience) kill(child, SIGKILL);
    std::this_thread::sleep_for(std::chrono::milliseconds(1));
  }
}

}  // namespace

Outcome run_command(const std::vector<std::string>& command, const Circumstances& circumstances) {
  const TemporaryFolder streams;
  const int status = wait_for(start(command, circumstances, streams), circumstances);
  Outcome outcome;
  if (WIFEXITED(status)) outcome.status = WEXITSTATUS(status);
  if (WIFSIGNALED(status)) outcome.signal = WTERMSIG(status);
  outcome.out = read_file(streams.path() / "out");
  outcome.err = read_file(streams.path() / "err");
  return outcome;
}

Outcome run_bandwright(const std::vector<std::string>& arguments, const Circumstances& circumstances) {
  std::vector<std::string> command{program_file().string()};
  command.insert(command.end(), arguments.begin(), arguments.end());
  return run_command(command, circumstances);
}

std::string read_file(const std::filesystem::path& file) {
  std::ifstream stream(file, std::ios::binary);
  if (!stream) throw std::runtime_error("cannot read " + file.string());
  return {std::istreambuf_iterator<char>(stream), {}};
}

TemporaryFolder::TemporaryFolder() {
  std::string pattern = (std::filesystem::temp_directory_path() / "bandwright-XXXXXX").string();
  if (mkdtemp(pattern.data()) == nullptr) demand(errno, "temporary folder");
  path_ = pattern;
}

TemporaryFolder::~TemporaryFolder() {
  std::error_code ignored;
  std::filesystem::remove_all(path_, ignored);
}

std::filesystem::path TemporaryFolder::write(const std::filesystem::path& name, const std::string& text) const {
  const std::filesystem::path file = path_ / name;
  std::filesystem::create_directories(file.parent_path());
  std::ofstream stream(file, std::ios::binary);
  stream << text;
  if (!stream.flush()) throw std::runtime_error("cannot write " + file.string());
  return file;
}

}  // namespace bandwright::test
