// stock: checks and summarises a file of the parts at hand, or writes one to start from.
#include <algorithm>
#include <bandwright/report.hpp>

#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"

namespace bandwright::cli {

namespace {

std::vector<OptionGroup> options() {
  OptionGroup output = output_options();
  for (Option& option : output.options)
    if (option.name == "format")
      option.help = "table or json; without it, by the ending of the output's name, else a table";
  const OptionGroup input = {
      "Input", {{"start", "", "write a commented file to start from; no file is read"}, catalogue_option()}, false};
  return {input, output};
}

std::string starting_file(const Arguments& arguments) {
  if (!arguments.operands.empty()) throw UsageError("--start: no file is read; leave the operand out");
  if (arguments.has("format")) throw UsageError("--start: comma-separated values are written; leave --format out");
  return stock_to_start_from();
}

std::string summary(const Arguments& arguments, const Destination& destination) {
  if (arguments.operands.empty()) throw UsageError("a stock file is missing; --start writes one to start from");
  at_most_operands(arguments, 1, "one stock file at a time");
  const Format format = format_of(arguments);
  if (format == Format::csv) throw UsageError("a stock is summarised as table or json, not as csv");
  Catalogue catalogue = catalogue_of(arguments);
  const NamedText input = read_text(arguments.operands.front());
  catalogue.stock = read_stock(input.text, input.name, catalogue);
  if (format == Format::json) return write_stock_json(catalogue);
  return write_stock(catalogue, destination.is_standard_output() ? standard_output_style() : TableStyle{});
}

int run_stock(const Arguments& arguments) {
  const Destination destination = destination_of(arguments);
  destination.write(arguments.has("start") ? starting_file(arguments) : summary(arguments, destination));
  tell_written(destination, arguments);
  return kMet;
}

}  // namespace

Command stock_command() {
  return {
      "stock",
      "FILE",
      "check and summarise a file of the parts at hand, or write one to start from",
      "Reads the user's own parts, comma-separated values or JSON, tells every fault with line and column, and says "
      "what the file holds and what is taken where a row says nothing. With - it reads standard input.",
      {"bandwright stock drawer.csv", "bandwright stock --start -o drawer.csv",
       "bandwright stock drawer.csv --format json -o summary.json"},
      options,
      run_stock};
}

}  // namespace bandwright::cli
