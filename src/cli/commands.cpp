#include "cli/commands.hpp"

#include <fmt/format.h>

#include <bandwright/fault.hpp>
#include <bandwright/version.hpp>

#include "cli/exit_status.hpp"
#include "cli/files.hpp"
#include "cli/terminal.hpp"
#include "report/text_sheet.hpp"
#include "units/printable.hpp"
#include "units/suggest.hpp"

namespace bandwright::cli {

namespace {

constexpr const char* kJob =
    "bandwright: from a written requirement to the parts list of an RC-coupled transistor stage";

const OptionGroup& program_options() {
  static const OptionGroup group = {
      "Options", {{"help", "", "print this help", 'h'}, {"version", "", "print the version", 'V'}}, false};
  return group;
}

void add_options(TextSheet& sheet, const OptionGroup& group) {
  sheet.heading(group.heading);
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  for (const Option& option : group.options) {
    std::string form = option.letter == 0 ? "    " : fmt::format("-{}, ", option.letter);
    form += "--" + option.name;
    if (!option.argument.empty()) form += " " + option.argument;
    grid.add({form, option.help});
  }
  sheet.grid(grid);
}

void add_statuses(TextSheet& sheet) {
  sheet.heading("Exit status");
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  grid.add({"0", "a candidate meets every requirement nominally"});
  grid.add({"1", "none does: the nearest are printed, each shortfall named"});
  grid.add({"2", "the input or the command line is wrong"});
  grid.add({"3", "a file could not be read or written"});
  grid.add({"4", "an internal fault"});
  grid.add({"130", "interrupted: the best so far is printed and marked as such"});
  sheet.grid(grid);
}

int print(const std::string& text) {
  Destination(std::nullopt).write(text);
  return kMet;
}

// "design, check, compare or catalogue"
std::string command_names(const std::vector<std::string>& more = {}) {
  std::vector<std::string> names;
  for (const Command& command : commands()) names.push_back(command.name);
  names.insert(names.end(), more.begin(), more.end());
  const std::string last = names.back();
  names.pop_back();
  return fmt::format("{} or {}", join(names, ", "), last);
}

int print_help(const std::vector<std::string>& topics) {
  if (topics.empty()) return print(overall_help());
  const Command* command = find_command(topics.front());
  if (command == nullptr || topics.size() > 1)
    throw UsageError(fmt::format("no help on '{}'; expected one command: {}",
                                 printable(topics[topics.size() > 1 ? 1 : 0]), command_names()));
  return print(command_help(*command));
}

[[noreturn]] void refuse_command(const std::string& word) {
  std::vector<std::string> names;
  for (const Command& command : commands()) names.push_back(command.name);
  const bool option = word.starts_with("-");
  std::string text = fmt::format("unknown {} '{}'", option ? "option" : "command", printable(word));
  const std::string nearest = option ? "" : nearest_name(word, names);
  text += nearest.empty() ? fmt::format("; expected {}", command_names({"help"}))
                          : fmt::format("; did you mean {}?", nearest);
  if (!option && nearest.empty() && word.ends_with(".json"))
    text += fmt::format(" (bandwright design {})", printable(word));
  throw UsageError(text);
}

int run_command(const Command& command, const std::vector<std::string>& words) {
  auto groups = command.options();
  groups.push_back(general_options());
  try {
    const Arguments arguments = read_arguments(groups, words);
    if (arguments.has("help")) return print(command_help(command));
    return command.run(arguments);
  } catch (const UsageError& fault) {
    throw UsageError(fmt::format("{}\nsee: bandwright help {}", fault.what(), command.name));
  }
}

int dispatch(const std::vector<std::string>& words) {
  if (words.empty())
    throw UsageError(fmt::format("no command; expected {}\nsee: bandwright help", command_names({"help"})));
  const std::string& first = words.front();
  const std::vector<std::string> rest(words.begin() + 1, words.end());
  if (first == "help" || first == "--help" || first == "-h") return print_help(rest);
  if (first == "--version" || first == "-V") return print(fmt::format("bandwright {}\n", version()));
  const Command* command = find_command(first);
  if (command == nullptr) refuse_command(first);
  return run_command(*command, rest);
}

int complaining(const std::string& lines, ExitStatus status) {
  complain(lines);
  return status;
}

}  // namespace

const std::vector<Command>& commands() {
  static const std::vector<Command> table = {design_command(), check_command(),     compare_command(),
                                             bom_command(),    catalogue_command(), stock_command()};
  return table;
}

const Command* find_command(const std::string& name) {
  for (const Command& command : commands())
    if (name == command.name) return &command;
  return nullptr;
}

OptionGroup general_options() { return {"General", {{"help", "", "print this help", 'h'}}, false}; }

std::string overall_help() {
  TextSheet sheet{{}};
  sheet.paragraph(kJob);
  sheet.heading("Use");
  sheet.line("bandwright COMMAND [OPERANDS] [OPTIONS]");
  sheet.heading("Commands");
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  for (const Command& command : commands())
    grid.add({fmt::format("{} {}", command.name, command.operands), command.summary});
  grid.add({"help [COMMAND]", "this text, or all about one command"});
  sheet.grid(grid);
  add_options(sheet, program_options());
  sheet.heading("For example");
  for (const Command& command : commands()) sheet.literal(command.examples.front());
  add_statuses(sheet);
  return sheet.text();
}

std::string command_help(const Command& command) {
  TextSheet sheet{{}};
  sheet.paragraph(fmt::format("bandwright {} {} [OPTIONS]", command.name, command.operands));
  sheet.space();
  sheet.paragraph(command.about);
  sheet.heading("For example");
  for (const char* example : command.examples) sheet.literal(example);
  for (const OptionGroup& group : command.options()) add_options(sheet, group);
  add_options(sheet, general_options());
  add_statuses(sheet);
  return sheet.text();
}

int run(const std::vector<std::string>& words) {
  try {
    return dispatch(words);
  } catch (const UsageError& fault) {
    return complaining(fault.what(), kWrongInput);
  } catch (const InputError& fault) {
    return complaining(fault.what(), kWrongInput);
  } catch (const QuantityError& fault) {
    return complaining(fault.what(), kWrongInput);
  } catch (const FileError& fault) {
    return complaining(fault.what(), kFileTrouble);
  } catch (const std::exception& fault) {
    return complaining(fmt::format("internal fault: {}", fault.what()), kFault);
  }
}

}  // namespace bandwright::cli
