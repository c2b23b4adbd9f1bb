// Options that several commands have, and what they mean.
#pragma once

#include <bandwright/catalogue.hpp>
#include <bandwright/report.hpp>

#include "cli/command_line.hpp"
#include "cli/files.hpp"

namespace bandwright::cli {

enum class Format { table, json, csv };

OptionGroup output_options();     ///< --format, --output, --quiet
OptionGroup spec_option_group();  ///< every key of the spec
Option catalogue_option();        ///< --catalogue
Option allocate_option();         ///< --allocate
Option alternates_option();       ///< --alternates
Option response_option();         ///< --with-response
Option high_voltage_option();     ///< --allow-high-voltage

/// --format, else by the ending of the output's name, else a table.
Format format_of(const Arguments& arguments);

/// The catalogue in force.
Catalogue catalogue_of(const Arguments& arguments);

/// The catalogue in force with the stock that a spec names; its file is looked for beside the spec, then where the
/// program runs. `spec_file`: the name under which the spec was read.
Catalogue catalogue_of(const Arguments& arguments, const Spec& spec, const std::string& spec_file);

/// Where results go. Refuses to write over the file that was read.
Destination destination_of(const Arguments& arguments);

/// The first operand's text; an empty text named "command line" where there is none.
NamedText spec_text_of(const Arguments& arguments);

/// Formats a result for a destination.
std::string formatted(const DesignResult& result, Format format, const Destination& destination);

/// Notes of the reading on standard error, where the format does not show them.
void tell_notes(const Spec& spec, Format format, const Arguments& arguments);

/// The exit status that goes with a result.
int status_of(const DesignResult& result);

/// Says which file was written.
void tell_written(const Destination& destination, const Arguments& arguments);

}  // namespace bandwright::cli
