#include "cli/command_line.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <bandwright/figure.hpp>
#include <boost/program_options.hpp>
#include <charconv>
#include <set>

#include "units/printable.hpp"
#include "units/suggest.hpp"

namespace bandwright::cli {

namespace {

namespace po = boost::program_options;

// Every form but guessing from the first letters: an option added later must not change what a script means.
constexpr int kStyle = po::command_line_style::allow_long | po::command_line_style::allow_short |
                       po::command_line_style::allow_dash_for_short | po::command_line_style::long_allow_adjacent |
                       po::command_line_style::long_allow_next | po::command_line_style::short_allow_adjacent |
                       po::command_line_style::short_allow_next;

po::options_description described(const std::vector<OptionGroup>& groups) {
  po::options_description all;
  for (const OptionGroup& group : groups) {
    for (const Option& option : group.options) {
      const std::string forms = option.letter == 0 ? option.name : option.name + "," + option.letter;
      if (option.argument.empty())
        all.add_options()(forms.c_str(), option.help.c_str());
      else
        all.add_options()(forms.c_str(), po::value<std::string>(), option.help.c_str());
    }
  }
  return all;
}

std::vector<std::string> names_of(const std::vector<OptionGroup>& groups) {
  std::vector<std::string> names;
  for (const OptionGroup& group : groups)
    for (const Option& option : group.options) names.push_back(option.name);
  return names;
}

std::string without_dashes(std::string text) {
  text.erase(0, text.find_first_not_of('-'));
  return text.substr(0, text.find('='));
}

/// The key of the reserved figure that an option speaks of, or nothing.
std::string reserved_figure(std::string option) {
  std::replace(option.begin(), option.end(), '-', '_');
  for (const FigureInfo& f : figures()) {
    const std::string key = f.key;
    const bool speaks = option == key || option.rfind(key + "_", 0) == 0;
    if (f.use == FigureUse::reserved && speaks) return key;
  }
  return "";
}

std::string unknown_option(const std::string& token, const std::vector<OptionGroup>& groups) {
  const std::string name = without_dashes(token);
  const std::string nearest = nearest_name(name, names_of(groups));
  if (const std::string reserved = reserved_figure(name); !reserved.empty()) {
    return fmt::format("--{}: {} is not computed by this version", printable(name), reserved);
  }
  std::string text = fmt::format("unknown option '{}'", printable(token.substr(0, token.find('='))));
  if (!nearest.empty()) text += fmt::format("; did you mean --{}?", nearest);
  return text;
}

po::basic_parsed_options<char> parsed(const po::options_description& options, const std::vector<std::string>& words) {
  try {
    return po::basic_command_line_parser<char>(words).options(options).style(kStyle).allow_unregistered().run();
  } catch (const po::invalid_command_line_syntax& fault) {
    const std::string name = "--" + without_dashes(fault.get_option_name());
    using Kind = po::invalid_syntax::kind_t;
    if (fault.kind() == Kind::extra_parameter) throw UsageError(name + " takes no value");
    throw UsageError(name + " needs a value");
  } catch (const po::error& fault) {
    throw UsageError(fault.what());
  }
}

bool is_known(const std::string& name, const std::vector<std::string>& names) {
  return std::find(names.begin(), names.end(), name) != names.end();
}

// An option in the place of a value means that the value was forgotten; a negative number starts with one dash too.
bool is_option(const std::string& text, const std::vector<OptionGroup>& groups) {
  if (text.starts_with("--")) return true;
  if (text.size() != 2 || text[0] != '-') return false;
  for (const OptionGroup& group : groups)
    for (const Option& option : group.options)
      if (option.letter == text[1]) return true;
  return false;
}

std::set<std::string> spec_keys(const std::vector<OptionGroup>& groups) {
  std::set<std::string> keys;
  for (const OptionGroup& group : groups)
    if (group.is_spec)
      for (const Option& option : group.options) keys.insert(option.name);
  return keys;
}

void add_line(std::string& lines, const std::string& line) { lines += (lines.empty() ? "" : "\n") + line; }

}  // namespace

std::optional<std::string> Arguments::value(const std::string& option) const {
  const auto found = values.find(option);
  if (found == values.end()) return std::nullopt;
  return found->second;
}

Arguments read_arguments(const std::vector<OptionGroup>& groups, const std::vector<std::string>& words) {
  const po::options_description options = described(groups);
  const auto names = names_of(groups);
  const auto of_spec = spec_keys(groups);
  Arguments arguments;
  std::string faults;
  std::set<std::string> seen;
  for (const auto& option : parsed(options, words).options) {
    const std::string token = option.original_tokens.empty() ? option.string_key : option.original_tokens.front();
    if (option.position_key >= 0) {
      arguments.operands.push_back(option.value.front());
    } else if (option.unregistered || !is_known(option.string_key, names)) {
      add_line(faults, unknown_option(token, groups));
    } else if (!option.value.empty() && is_option(option.value.front(), groups)) {
      add_line(faults, "--" + option.string_key + " needs a value");
    } else if (!seen.insert(option.string_key).second) {
      add_line(faults, "--" + option.string_key + " is given twice");
    } else {
      const std::string value = option.value.empty() ? "" : option.value.front();
      if (of_spec.count(option.string_key) > 0)
        arguments.overrides.emplace_back(option.string_key, value);
      else
        arguments.values[option.string_key] = value;
    }
  }
  if (!faults.empty()) throw UsageError(faults);
  return arguments;
}

int whole_number(const std::string& option, const std::string& text, int lowest, int highest) {
  int number = 0;
  const char* end = text.data() + text.size();
  const auto [stop, error] = std::from_chars(text.data(), end, number);
  if (error != std::errc() || stop != end || number < lowest || number > highest)
    throw UsageError(fmt::format("--{}: found '{}'; expected a whole number from {} to {}", option, printable(text),
                                 lowest, highest));
  return number;
}

void at_most_operands(const Arguments& arguments, std::size_t count, const std::string& what) {
  if (arguments.operands.size() <= count) return;
  throw UsageError(fmt::format("unexpected '{}': {}", printable(arguments.operands[count]), what));
}

}  // namespace bandwright::cli
