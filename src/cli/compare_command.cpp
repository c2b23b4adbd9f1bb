// compare: candidates of result documents beside each other.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/fault.hpp>

#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

constexpr int kHighestRank = 100000;

std::vector<OptionGroup> options() {
  OptionGroup choice{"Choice",
                     {{"pick", "N,N,...",
                       "candidates by rank, the same of each file (default: of one file the first and up to four that "
                       "are non-dominated or hold a title; of several files the first of each)"}},
                     false};
  return {choice, output_options()};
}

std::vector<std::string> pieces(const std::string& text) {
  std::vector<std::string> list(1);
  for (const char c : text) {
    if (c == ',')
      list.emplace_back();
    else
      list.back() += c;
  }
  return list;
}

// Adds one rank; what is wrong with it as a line.
std::string take_rank(const std::string& text, std::vector<int>& ranks) {
  try {
    const int rank = whole_number("pick", text, 1, kHighestRank);
    if (std::find(ranks.begin(), ranks.end(), rank) != ranks.end())
      return fmt::format("\n--pick: rank {} is given twice", rank);
    ranks.push_back(rank);
    return "";
  } catch (const UsageError& fault) {
    return fmt::format("\n{}", fault.what());
  }
}

// Empty: nobody picked any.
std::vector<int> picked_ranks(const Arguments& arguments) {
  std::vector<int> ranks;
  std::string faults;
  if (const auto pick = arguments.value("pick"))
    for (const std::string& piece : pieces(*pick)) faults += take_rank(piece, ranks);
  if (!faults.empty()) throw UsageError(faults.substr(1));
  return ranks;
}

void demand_distinct_files(const std::vector<std::string>& files) {
  std::string faults;
  for (std::size_t i = 0; i < files.size(); ++i)
    for (std::size_t j = 0; j < i; ++j)
      if (files[i] == files[j] || same_file(files[i], files[j]))
        faults += fmt::format("\n'{}' is given twice; candidates of one file are chosen with --pick 1,2",
                              printable(files[i]));
  if (!faults.empty()) throw UsageError(faults.substr(1));
}

// What could be read, and in lines what could not.
struct Gathered {
  Comparison comparison;
  std::string unreadable;
  std::vector<Fault> faults;
};

void gather(const std::string& file, const std::vector<int>& ranks, Gathered& gathered) {
  try {
    const NamedText document = read_text(file);
    for (ComparedCandidate& one : read_compared(document.text, document.name, ranks))
      gathered.comparison.candidates.push_back(std::move(one));
  } catch (const FileError& error) {
    gathered.unreadable += fmt::format("{}{}", gathered.unreadable.empty() ? "" : "\n", error.what());
  } catch (const InputError& error) {
    gathered.faults.insert(gathered.faults.end(), error.faults().begin(), error.faults().end());
  }
}

void demand_sound(const Gathered& gathered) {
  if (gathered.unreadable.empty() && gathered.faults.empty()) return;
  const InputError error(gathered.faults);
  if (gathered.unreadable.empty()) throw error;
  throw FileError(gathered.faults.empty() ? gathered.unreadable
                                          : fmt::format("{}\n{}", gathered.unreadable, error.what()));
}

void demand_choice(const std::vector<ComparedCandidate>& list) {
  if (list.size() > kMostCompared)
    throw UsageError(fmt::format("{} candidates; at most {} are compared", list.size(), kMostCompared));
  if (list.size() > 1) return;
  const ComparedCandidate& one = list.front();
  throw UsageError(one.listed > 1
                       ? fmt::format("only rank {} of '{}' is picked, and a choice needs two: pick two, such as "
                                     "--pick 1,2, or name a second result document",
                                     one.stated.rank, printable(one.file))
                       : fmt::format("'{}' holds one candidate, and a choice needs two: name a second result document",
                                     printable(one.file)));
}

std::string ranks_text(const std::vector<ComparedCandidate>& list) {
  std::string text;
  for (const ComparedCandidate& one : list) {
    if (!text.empty()) text += &one == &list.back() ? " and " : ", ";
    text += std::to_string(one.stated.rank);
  }
  return text;
}

// How candidates that nobody picked were chosen, and how to choose others.
std::string choice_note(const std::vector<ComparedCandidate>& list, std::size_t files) {
  if (files > 1) return "Of each file its first candidate; others by rank, such as --pick 1,2.";
  if (list.front().listed == list.size()) return "";
  return fmt::format(
      "Of {} candidates those of rank {}: the first, then those that are non-dominated, then those with a title, five "
      "at most; others by rank, such as --pick 1,2.",
      list.front().listed, ranks_text(list));
}

Comparison comparison_of(const Arguments& arguments) {
  const std::vector<int> picked = picked_ranks(arguments);
  const std::size_t files = arguments.operands.size();
  Gathered gathered;
  for (const std::string& file : arguments.operands)
    gather(file, picked.empty() && files > 1 ? std::vector<int>{1} : picked, gathered);
  demand_sound(gathered);
  demand_choice(gathered.comparison.candidates);
  const std::string note = picked.empty() ? choice_note(gathered.comparison.candidates, files) : "";
  if (!note.empty()) gathered.comparison.notes.push_back(note);
  return gathered.comparison;
}

std::string formatted_comparison(const Comparison& comparison, Format format, const Destination& destination) {
  if (format == Format::json) return write_comparison_json(comparison);
  if (format == Format::csv) return write_comparison_csv(comparison);
  return write_comparison_table(comparison, destination.is_standard_output() ? standard_output_style() : TableStyle{});
}

int run_compare(const Arguments& arguments) {
  if (arguments.operands.empty())
    throw UsageError("nothing to compare: give one result document or more, as bandwright design --format json writes");
  demand_distinct_files(arguments.operands);
  const Format format = format_of(arguments);
  const Destination destination = destination_of(arguments);
  const Comparison comparison = comparison_of(arguments);
  if (format != Format::table && !arguments.has("quiet"))
    for (const std::string& note : comparison.notes) complain("note: " + note);
  destination.write(formatted_comparison(comparison, format, destination));
  tell_written(destination, arguments);
  return kMet;
}

}  // namespace

Command compare_command() {
  return {"compare",
          "RESULT...",
          "candidates of result documents side by side",
          "Reads result documents, as written by design or check with --format json, and sets candidates beside each "
          "other: first what the choice is between, then measures, figures, margins, and the parts that differ. It "
          "shows what the documents state and recomputes nothing.",
          {"bandwright compare result.json", "bandwright compare result.json --pick 1,3",
           "bandwright compare result.json other.json -o choice.csv"},
          options,
          run_compare};
}

}  // namespace bandwright::cli
