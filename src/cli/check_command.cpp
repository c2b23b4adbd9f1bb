// check: recomputes given parts, exactly as design does.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/design.hpp>
#include <bandwright/fault.hpp>
#include <cmath>

#include "cli/agreement_text.hpp"
#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

constexpr int kHighestRank = 100000;

// The option of a role: its key with dashes.
std::string option_of(const RoleInfo& role) {
  std::string name = role.key;
  std::replace(name.begin(), name.end(), '_', '-');
  return name;
}

OptionGroup part_options() {
  OptionGroup group{"Parts (they override those of the file)",
                    {{"device", "TYPE", "transistor, by its type"},
                     {"pick", "N", "candidate of a result document, by rank (default 1)"}},
                    false};
  for (const RoleInfo& role : roles()) {
    std::string help = fmt::format("{} {}", role.designator, role.label);
    if (role.may_be_absent) help += ", none where it is absent";
    group.options.push_back({option_of(role), "VALUE", help});
  }
  return group;
}

bool is_named(const OptionGroup& group, const std::string& name) {
  return std::any_of(group.options.begin(), group.options.end(), [&](const Option& o) { return o.name == name; });
}

std::vector<OptionGroup> options() {
  const OptionGroup parts = part_options();
  OptionGroup keys = spec_option_group();
  std::erase_if(keys.options, [&](const Option& option) { return is_named(parts, option.name); });
  OptionGroup surroundings{
      "Assessment, catalogue and limits",
      {allocate_option(), alternates_option(), response_option(), catalogue_option(), high_voltage_option()},
      false};
  return {parts, output_options(), surroundings, keys};
}

// What is to be recomputed.
struct Subject {
  std::string device;
  PartChoices parts;
  std::optional<StoredCandidate> stored;  ///< from a result document
  bool altered = false;                   ///< the command line changed something of it
};

double part_value(const RoleInfo& role, const std::string& text) {
  if (role.may_be_absent && text == "none") return 0;
  try {
    const Dimension dimension = role.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
    const double value = parse_quantity(text, dimension).value;
    if (value > 0 || (value == 0 && role.may_be_absent)) return value;
    throw QuantityError(fmt::format("found '{}'; expected {} above 0", printable(text), describe_dimension(dimension)));
  } catch (const QuantityError& fault) {
    throw UsageError(fmt::format("--{}: {}", option_of(role), fault.what()));
  }
}

void take_options(const Arguments& arguments, Subject& subject) {
  std::string faults;
  for (const RoleInfo& role : roles()) {
    const auto text = arguments.value(option_of(role));
    if (!text) continue;
    subject.altered = true;
    try {
      subject.parts[index(role.role)] = {part_value(role, *text)};
    } catch (const UsageError& fault) {
      if (!faults.empty()) faults += '\n';
      faults += fault.what();
    }
  }
  if (const auto device = arguments.value("device")) {
    subject.altered = true;
    subject.device = *device;
  }
  if (!faults.empty()) throw UsageError(faults);
}

Subject subject_of(const Arguments& arguments, const NamedText& input, const Spec& spec) {
  Subject subject;
  const auto pick = arguments.value("pick");
  const int rank = pick ? whole_number("pick", *pick, 1, kHighestRank) : 1;
  if (is_result(input.text)) {
    subject.stored = read_candidate(input.text, input.name, rank);
    subject.device = subject.stored->device;
    subject.parts = subject.stored->parts;
  } else if (pick) {
    throw UsageError("--pick: needs a result document, as written by bandwright design --format json");
  } else {
    for (std::size_t i = 0; i < kRoleCount; ++i) subject.parts[i].value = spec.parts.pinned[i].value_or(0);
    if (spec.devices.size() == 1) subject.device = spec.devices.front();
  }
  subject.altered = !arguments.overrides.empty();
  take_options(arguments, subject);
  return subject;
}

void demand_parts(const Subject& subject) {
  std::string missing;
  for (const RoleInfo& role : roles())
    if (!role.may_be_absent && subject.parts[index(role.role)].value == 0)
      missing += fmt::format("\n--{} is missing: {} {} is needed, for example from a result document or as an option",
                             option_of(role), role.designator, role.label);
  if (subject.device.empty()) missing += "\n--device is missing: the transistor's type is needed";
  if (!missing.empty()) throw UsageError(missing.substr(1));
  if (subject.parts[index(Role::bypass)].value > 0 && subject.parts[index(Role::emitter_bypassed)].value == 0)
    throw UsageError("--bypass: there is no resistor for it to bypass; give --emitter-bypassed, or --bypass none");
}

// What the comparison with the file says; empty where there is nothing to compare.
struct Confirmation {
  std::string text;
  bool agrees = true;
};

Confirmation confirm(const Subject& subject, const DesignResult& result, const std::string& name) {
  if (!subject.stored || !subject.stored->has_figures || subject.altered || result.candidates.empty()) return {};
  const Agreement agreement = compare(*subject.stored, result.candidates.front());
  return {agreement_text(agreement, name, subject.stored->rank), agreement.differing.empty()};
}

bool works(const DesignResult& result) {
  return !result.candidates.empty() && result.candidates.front().analysis.point.state == BiasState::active;
}

int run_check(const Arguments& arguments) {
  at_most_operands(arguments, 1, "check takes one spec or result document");
  if (arguments.operands.empty() && arguments.overrides.empty() && arguments.values.empty())
    throw UsageError("nothing to check: give a result document, or parts such as --upper-divider 47k with --device");
  const Format format = format_of(arguments);
  const Destination destination = destination_of(arguments);
  const NamedText input = spec_text_of(arguments);
  const Spec spec =
      read_spec(input.text, input.name, arguments.overrides, SpecUse::check, arguments.has("allow-high-voltage"));
  const Subject subject = subject_of(arguments, input, spec);
  demand_parts(subject);
  const Catalogue catalogue = catalogue_of(arguments, spec, input.name);
  DesignOptions choice;
  choice.with_response = arguments.has("with-response");
  choice.allocate = arguments.has("allocate");
  choice.alternates = arguments.has("alternates");
  const DesignResult result = check(spec, catalogue, subject.device, subject.parts, choice);
  const Confirmation confirmation = confirm(subject, result, input.name);
  tell_notes(spec, format, arguments);
  std::string text = formatted(result, format, destination);
  if (format == Format::table && !confirmation.text.empty()) text = confirmation.text + "\n" + text;
  if (format != Format::table && !confirmation.text.empty() && !(confirmation.agrees && arguments.has("quiet")))
    complain(confirmation.text);
  destination.write(text);
  tell_written(destination, arguments);
  return confirmation.agrees && works(result) ? status_of(result) : kNotMet;
}

}  // namespace

Command check_command() {
  return {
      "check",
      "[SPEC|RESULT]",
      "recompute given parts exactly, beside an optional spec",
      "Recomputes a candidate of a result document, the parts fixed in a spec, or parts given as options, and "
      "compares the figures with the requirements, if there are any. For an unaltered candidate it also says whether "
      "every figure agrees with what the file holds; a figure that differs gives exit status 1.",
      {"bandwright check result.json --pick 2",
       "bandwright check --supply 12V --device BC547B --upper-divider 47k --lower-divider 10k --collector 4k7 "
       "--emitter 470 --emitter-bypassed 560 --input-coupling 1u --output-coupling 1u --bypass 100u",
       "bandwright check result.json --collector 5k1 --load-resistance 22k"},
      options,
      run_check};
}

}  // namespace bandwright::cli
