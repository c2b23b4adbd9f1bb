#include "cli/shared_options.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <bandwright/fault.hpp>
#include <filesystem>

#include "cli/exit_status.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

struct FormatName {
  Format format;
  const char* name;
  const char* ending;
};
constexpr std::array<FormatName, 3> kFormats = {
    {{Format::table, "table", ".txt"}, {Format::json, "json", ".json"}, {Format::csv, "csv", ".csv"}}};

}  // namespace

OptionGroup output_options() {
  return {"Output",
          {{"format", "FORMAT", "table, json or csv; without it, by the ending of the output's name, else a table"},
           {"output", "FILE", "write to FILE, whole or not at all, instead of standard output", 'o'},
           {"quiet", "", "no progress and no notes on standard error", 'q'}},
          false};
}

OptionGroup spec_option_group() {
  OptionGroup group{"Keys of the spec (they override the file)", {}, true};
  for (const OptionKey& key : spec_options()) group.options.push_back({key.option, key.flag ? "" : "VALUE", key.help});
  return group;
}

Option catalogue_option() { return {"catalogue", "FOLDER", "add the JSON files of FOLDER to the built-in catalogue"}; }

Option allocate_option() {
  return {"allocate", "", "the loosest tolerance of each part of the first candidate that still gives the yield"};
}

Option alternates_option() {
  return {"alternates", "",
          "next values up and down of every part, and transistors that may stand in, of each candidate"};
}

Option response_option() {
  return {"with-response", "",
          "response with the envelope of all units, histograms and node voltages of each candidate, in JSON"};
}

Option high_voltage_option() {
  return {"allow-high-voltage", "", "accept a supply above 60 V; read the cautions first"};
}

Format format_of(const Arguments& arguments) {
  const auto name = arguments.value("format");
  const std::string output = arguments.value("output").value_or("");
  for (const FormatName& row : kFormats)
    if (name ? *name == row.name : output.ends_with(row.ending)) return row.format;
  if (name) throw UsageError(fmt::format("--format: found '{}'; expected table, json or csv", printable(*name)));
  return Format::table;
}

Catalogue catalogue_of(const Arguments& arguments) {
  const auto folder = arguments.value("catalogue");
  return folder ? read_catalogue(*folder) : built_in_catalogue();
}

namespace {

/// Beside the spec; a name given on the command line, and one that is not there, where the program runs.
std::string stock_path(const std::string& stock, const std::string& spec_file, bool from_command_line) {
  namespace fs = std::filesystem;
  const fs::path beside = fs::path(spec_file).parent_path() / stock;
  std::error_code ignored;
  return !from_command_line && fs::exists(beside, ignored) ? beside.string() : stock;
}

}  // namespace

Catalogue catalogue_of(const Arguments& arguments, const Spec& spec, const std::string& spec_file) {
  Catalogue catalogue = catalogue_of(arguments);
  if (spec.parts.stock.empty()) return catalogue;
  const bool named_here = std::any_of(arguments.overrides.begin(), arguments.overrides.end(),
                                      [](const Override& o) { return o.first == "stock"; });
  try {
    const NamedText text = read_text(stock_path(spec.parts.stock, spec_file, named_here));
    catalogue.stock = read_stock(text.text, text.name, catalogue);
  } catch (const FileError& fault) {
    if (named_here) throw;
    throw FileError(fmt::format("{}\nit is the stock that {} names, looked for beside it and in this folder",
                                fault.what(), printable(spec_file)));
  }
  return catalogue;
}

Destination destination_of(const Arguments& arguments) {
  const auto output = arguments.value("output");
  for (const std::string& operand : arguments.operands)
    if (output && operand != "-" && same_file(operand, *output))
      throw UsageError(fmt::format("--output: '{}' is the file that is read; choose another name", printable(*output)));
  return Destination(output);
}

NamedText spec_text_of(const Arguments& arguments) {
  if (arguments.operands.empty()) return {"command line", ""};
  return read_text(arguments.operands.front());
}

std::string formatted(const DesignResult& result, Format format, const Destination& destination) {
  if (format == Format::json) return write_json(result);
  if (format == Format::csv) return write_csv(result);
  return write_table(result, destination.is_standard_output() ? standard_output_style() : TableStyle{});
}

void tell_notes(const Spec& spec, Format format, const Arguments& arguments) {
  if (format == Format::table || arguments.has("quiet")) return;
  for (const std::string& note : spec.notes) complain("note: " + note);
}

int status_of(const DesignResult& result) {
  if (result.interrupted) return kInterrupted;
  return result.met ? kMet : kNotMet;
}

void tell_written(const Destination& destination, const Arguments& arguments) {
  if (destination.is_standard_output() || arguments.has("quiet")) return;
  complain("wrote " + destination.path());
}

}  // namespace bandwright::cli
