// bom: the bill of materials of candidates of result documents.
#include <fmt/format.h>

#include <algorithm>
#include <bandwright/board.hpp>
#include <bandwright/fault.hpp>

#include "cli/bom_boards.hpp"
#include "cli/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

constexpr int kMostBoardsOfAKind = 1000000;

std::vector<OptionGroup> options() {
  OptionGroup list{
      "List",
      {{"pick", "N,N,...", "candidate by rank (default 1): one for all documents, or one for each in their order"},
       {"quantity", "N", "boards of each kind (default 1)"},
       {"attrition", "SHARE", "bought on top of what is needed, such as \"5 %\", each row rounded up (default 0)"},
       {"no-decoupling", "", "without 100 nF and 10 uF across the supply of each stage"},
       {"no-alternates", "", "without the values and types that may take a part's place; faster"},
       {"consolidate", "", "propose one value for two roles, with the change of capability; nothing is applied"}},
      false};
  OptionGroup surroundings{"Catalogue and limits", {catalogue_option(), high_voltage_option()}, false};
  return {list, output_options(), surroundings};
}

double attrition_of(const Arguments& arguments) {
  const auto text = arguments.value("attrition");
  if (!text) return 0;
  const char* expected = "expected a share from 0 to 100 %, such as 5 %";
  try {
    const double share = parse_quantity(*text, Dimension::fraction).value;
    if (share >= 0 && share <= 1) return share;
  } catch (const QuantityError& fault) {
    throw UsageError(fmt::format("--attrition: {}", fault.what()));
  }
  throw UsageError(fmt::format("--attrition: found '{}'; {}", printable(*text), expected));
}

BillOptions bill_options(const Arguments& arguments) {
  BillOptions choice;
  if (const auto quantity = arguments.value("quantity"))
    choice.quantity = whole_number("quantity", *quantity, 1, kMostBoardsOfAKind);
  choice.attrition = attrition_of(arguments);
  choice.decoupling = !arguments.has("no-decoupling");
  return choice;
}

BoardParts parts_of(const PickedBoard& board, bool with_alternates) {
  BoardParts parts = board_of(board.spec, board.catalogue, board.candidate(), with_alternates);
  parts.prefix = board.prefix;
  parts.name += fmt::format(", candidate {} of {}", board.stored.rank, board.file);
  return parts;
}

// Where decoupling comes from: the first catalogue with a stock, since all is bought in one list.
const Catalogue& catalogue_for_all(const PickedBoards& boards) {
  const auto stocked = std::find_if(boards.begin(), boards.end(),
                                    [](const PickedBoard& board) { return !board.catalogue.stock.parts.empty(); });
  return stocked != boards.end() ? stocked->catalogue : boards.front().catalogue;
}

void demand_stock_kept(const PickedBoards& boards, const Arguments& arguments) {
  const std::string output = arguments.value("output").value_or("-");
  for (const PickedBoard& board : boards)
    if (output != "-" && same_file(board.catalogue.stock.name, output))
      throw UsageError(fmt::format("--output: '{}' is the stock that is read; choose another name", printable(output)));
}

PurchaseList purchase_list(const PickedBoards& boards, const BillOptions& choice, const Arguments& arguments) {
  const bool with_alternates = !arguments.has("no-alternates");
  Progress progress("trying alternates", arguments.has("quiet") || !with_alternates);
  std::vector<BoardParts> all;
  std::vector<BoardConsolidations> proposals;
  for (const PickedBoard& board : boards) {
    progress.show(static_cast<double>(all.size()) / static_cast<double>(boards.size()));
    all.push_back(parts_of(board, with_alternates));
    if (arguments.has("consolidate"))
      proposals.push_back({board.prefix, consolidations(board.spec, board.catalogue, board.candidate())});
  }
  PurchaseList list{bill_of_materials(all, catalogue_for_all(boards), choice), std::nullopt};
  if (arguments.has("consolidate")) list.consolidations = std::move(proposals);
  return list;
}

std::string formatted_bill(const PurchaseList& list, Format format, const Destination& destination) {
  if (format == Format::json) return write_bill_json(list);
  if (format == Format::csv) return write_bill_csv(list.bill);
  return write_bill_table(list, destination.is_standard_output() ? standard_output_style() : TableStyle{});
}

void tell_notes(const Bill& bill, Format format, const Arguments& arguments) {
  if (format == Format::table || arguments.has("quiet")) return;
  for (const std::string& note : bill.notes) complain(fmt::format("note: {}", note));
}

int run_bom(const Arguments& arguments) {
  const Format format = format_of(arguments);
  if (format == Format::csv && arguments.has("consolidate"))
    throw UsageError("--consolidate: CSV holds the list alone; choose --format table or json");
  const BillOptions choice = bill_options(arguments);
  const Destination destination = destination_of(arguments);
  const PickedBoards boards = picked_boards(arguments);
  demand_stock_kept(boards, arguments);
  for (const PickedBoard& board : boards) tell_state(board, arguments.has("quiet"));
  const PurchaseList list = purchase_list(boards, choice, arguments);
  tell_notes(list.bill, format, arguments);
  destination.write(formatted_bill(list, format, destination));
  tell_written(destination, arguments);
  const bool met = std::all_of(boards.begin(), boards.end(), [](const PickedBoard& board) { return board.result.met; });
  return met ? kMet : kNotMet;
}

}  // namespace

Command bom_command() {
  return {"bom",
          "RESULT...",
          "what to buy for one board or many: a bill of materials",
          "Lists the parts of a candidate, or of several with designators such as A.R1 and B.R1, one row for each "
          "distinct part: quantities, ratings, polarity, what may take a part's place, costs where they are known. "
          "Each candidate is recomputed first; where its figures differ from the document's, or fall short of its "
          "spec, the list is written all the same and standard error says so. Costs that come with the program are "
          "invented for demonstration. In CSV no cell is taken for a formula: \"+ to base\" is written \"plus to "
          "base\", and a text of the user's that begins with = + - or @ gets an apostrophe in front.",
          {"bandwright bom result.json --pick 2 --quantity 10",
           "bandwright bom preamplifier.json line.json --quantity 250 --attrition \"5 %\" -o list.csv",
           "bandwright bom result.json result.json --pick 1,3 --consolidate"},
          options,
          run_bom};
}

}  // namespace bandwright::cli
