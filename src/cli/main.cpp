// The program. Everything that prints, exits or opens files stands in this folder.
#include <csignal>
#include <string>
#include <vector>

#include "cli/commands.hpp"

int main(int argc, char** argv) {
  // A reader that has gone away shows as a failed write, which is no fault.
  std::signal(SIGPIPE, SIG_IGN);
  return bandwright::cli::run(std::vector<std::string>(argv + (argc > 0 ? 1 : 0), argv + argc));
}
