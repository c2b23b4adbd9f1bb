// The command line: options of a command, and what stood on it.
#pragma once

#include <bandwright/spec.hpp>
#include <map>
#include <optional>
#include <stdexcept>
#include <string>
#include <vector>

namespace bandwright::cli {

/// One option of a command.
struct Option {
  std::string name;      ///< "output", without dashes
  std::string argument;  ///< word that stands for its value in the help; empty: it takes none
  std::string help;      ///< one line
  char letter = 0;       ///< short form, or 0
};

/// Options under one heading of the help.
struct OptionGroup {
  std::string heading;
  std::vector<Option> options;
  bool is_spec = false;  ///< keys of the spec in their command-line form
};

/// What stood on a command line.
struct Arguments {
  std::vector<std::string> operands;
  std::map<std::string, std::string> values;  ///< options that are not keys of the spec; flags are empty
  std::vector<Override> overrides;            ///< keys of the spec, in the order given

  bool has(const std::string& option) const { return values.count(option) > 0; }
  std::optional<std::string> value(const std::string& option) const;
};

/// A command line that is wrong: one line a fault.
class UsageError : public std::runtime_error {
public:
  using std::runtime_error::runtime_error;
};

/// Reads the words behind the command's name. Throws UsageError with every unknown option and its nearest known one.
Arguments read_arguments(const std::vector<OptionGroup>& groups, const std::vector<std::string>& words);

/// A whole number from an option's text.
int whole_number(const std::string& option, const std::string& text, int lowest, int highest);

/// Refuses more operands than a command takes.
void at_most_operands(const Arguments& arguments, std::size_t count, const std::string& what);

}  // namespace bandwright::cli
