// Commands: one table, from which the help is printed too.
#pragma once

#include <string>
#include <vector>

#include "cli/command_line.hpp"

namespace bandwright::cli {

/// One row a command.
struct Command {
  const char* name;
  const char* operands;  ///< "[SPEC]"
  const char* summary;   ///< one line
  const char* about;     ///< a paragraph
  std::vector<const char*> examples;
  std::vector<OptionGroup> (*options)();
  int (*run)(const Arguments&);
};

const std::vector<Command>& commands();
const Command* find_command(const std::string& name);

/// Options that every command knows.
OptionGroup general_options();

std::string overall_help();
std::string command_help(const Command& command);

/// Runs the program on the words behind its name; the exit status.
int run(const std::vector<std::string>& words);

// The rows of the table, each in a file of its own.
Command design_command();
Command check_command();
Command compare_command();
Command bom_command();
Command catalogue_command();
Command stock_command();

}  // namespace bandwright::cli
