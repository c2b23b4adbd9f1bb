// design: searches for the parts of a stage that meets a spec.
#include <bandwright/design.hpp>

#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

constexpr int kMostThreads = 1024;

// "capability (default), error, ... or parts"
std::string orders_text(const char* last = ", ") {
  std::string text;
  for (const RankOrder& order : rank_orders()) {
    const bool is_last = &order == &rank_orders().back();
    if (!text.empty()) text += is_last ? last : ", ";
    text += order.word;
    if (order.by == RankBy::capability) text += " (default)";
  }
  return text;
}

std::vector<OptionGroup> options() {
  OptionGroup search{
      "Search",
      {{"rank", "ORDER", "what comes first in the list: " + orders_text()},
       {"threads", "N", "threads to use; the answer is the same on any number (default: as many as there are)"},
       allocate_option(),
       alternates_option(),
       response_option(),
       catalogue_option(),
       {"print-spec", "", "print the spec with every default filled in, and search nothing"},
       high_voltage_option()},
      false};
  return {output_options(), search, spec_option_group()};
}

RankBy rank_of(const Arguments& arguments) {
  const auto word = arguments.value("rank");
  if (!word) return RankBy::capability;
  for (const RankOrder& order : rank_orders())
    if (*word == order.word) return order.by;
  throw UsageError("--rank: found '" + printable(*word) + "'; expected " + orders_text(" or "));
}

DesignOptions design_options(const Arguments& arguments) {
  DesignOptions choice;
  choice.rank_by = rank_of(arguments);
  choice.with_response = arguments.has("with-response");
  choice.allocate = arguments.has("allocate");
  choice.alternates = arguments.has("alternates");
  if (const auto threads = arguments.value("threads"))
    choice.threads = whole_number("threads", *threads, 1, kMostThreads);
  return choice;
}

DesignResult search(const Spec& spec, const Catalogue& catalogue, DesignOptions choice, bool quiet) {
  Progress progress("searching", quiet);
  choice.keep_going = [&progress](double share) {
    progress.show(share);
    return !InterruptWatch::requested();
  };
  return design(spec, catalogue, choice);
}

int run_design(const Arguments& arguments) {
  at_most_operands(arguments, 1, "design takes one spec");
  if (arguments.operands.empty() && arguments.overrides.empty())
    throw UsageError(
        "no spec: give a file, - for standard input, or options such as --gain 34dB --lower-cutoff 40Hz "
        "--upper-cutoff 20kHz --supply 12V");
  const Format format = format_of(arguments);
  const DesignOptions choice = design_options(arguments);
  const Destination destination = destination_of(arguments);
  const NamedText input = spec_text_of(arguments);
  const Spec spec =
      read_spec(input.text, input.name, arguments.overrides, SpecUse::design, arguments.has("allow-high-voltage"));
  if (arguments.has("print-spec")) {
    tell_notes(spec, Format::json, arguments);
    destination.write(write_spec(spec));
    tell_written(destination, arguments);
    return kMet;
  }
  const InterruptWatch watch;
  const Catalogue catalogue = catalogue_of(arguments, spec, input.name);
  const DesignResult result = search(spec, catalogue, choice, arguments.has("quiet"));
  tell_notes(spec, format, arguments);
  if (result.interrupted)
    complain(result.candidates.empty() ? "interrupted before a candidate was found"
                                       : "interrupted: what follows is the best found so far");
  destination.write(formatted(result, format, destination));
  tell_written(destination, arguments);
  return status_of(result);
}

}  // namespace

Command design_command() {
  return {"design",
          "[SPEC]",
          "search for ranked parts lists that meet a spec",
          "Reads a spec (a JSON file, - for standard input, or only options), searches every fitting transistor and "
          "variant for purchasable parts, and prints ranked candidates, each recomputed exactly with the parts as they "
          "are sold. A result document is accepted in the place of a spec: its spec is read.",
          {"bandwright design examples/hydrophone-line.json",
           "bandwright design --gain 34dB --lower-cutoff 40Hz --upper-cutoff 20kHz --supply 12V --load-resistance 10k",
           "bandwright design stage.json --rank yield --format json -o result.json",
           "bandwright design stage.json --allocate", "bandwright design stage.json --supply 9V --print-spec"},
          options,
          run_design};
}

}  // namespace bandwright::cli
