// catalogue: lists what may be bought, or shows single entries with their figures and sources.
#include <fmt/format.h>

#include <bandwright/report.hpp>

#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "units/printable.hpp"
#include "units/suggest.hpp"

namespace bandwright::cli {

namespace {

std::vector<OptionGroup> options() {
  OptionGroup group = output_options();
  std::erase_if(group.options, [](const Option& option) { return option.name == "format"; });
  group.options.push_back(catalogue_option());
  return {group};
}

std::string unknown_entry(const Catalogue& catalogue, const std::string& name) {
  std::vector<std::string> known;
  for (const Transistor& t : catalogue.transistors) known.push_back(t.type);
  for (const Family& f : catalogue.families) known.push_back(f.key);
  for (const Series& s : series()) known.push_back(s.name);
  const std::string nearest = nearest_name(name, known);
  return fmt::format("'{}' is no transistor, part family or series of the catalogue; {}", printable(name),
                     nearest.empty() ? "bandwright catalogue lists them all" : "did you mean " + nearest + "?");
}

std::string entry(const Catalogue& catalogue, const std::string& name) {
  if (const Transistor* found = catalogue.find_transistor(name)) return write_transistor(catalogue, *found);
  if (const Family* found = catalogue.find_family(name)) return write_family(catalogue, *found);
  if (const Series* found = find_series(name)) return write_series(*found);
  throw UsageError(unknown_entry(catalogue, name));
}

int run_catalogue(const Arguments& arguments) {
  const Destination destination(arguments.value("output"));
  const Catalogue catalogue = catalogue_of(arguments);
  std::string text = arguments.operands.empty() ? write_catalogue(catalogue) : "";
  for (const std::string& name : arguments.operands) {
    if (!text.empty()) text += '\n';
    text += entry(catalogue, name);
  }
  destination.write(text);
  tell_written(destination, arguments);
  return kMet;
}

}  // namespace

Command catalogue_command() {
  return {"catalogue",
          "[NAME...]",
          "list transistors, part families and series, or show entries in full",
          "Without a name it lists everything; with names of transistors, part families or preferred-number series it "
          "shows each with its figures, their provenance and sources, and the lead order.",
          {"bandwright catalogue BC547B", "bandwright catalogue", "bandwright catalogue film E24"},
          options,
          run_catalogue};
}

}  // namespace bandwright::cli
