#include "cli/bom_boards.hpp"

#include <fmt/format.h>

#include <bandwright/fault.hpp>
#include <map>

#include "cli/agreement_text.hpp"
#include "cli/files.hpp"
#include "cli/shared_options.hpp"
#include "cli/terminal.hpp"
#include "units/printable.hpp"

namespace bandwright::cli {

namespace {

constexpr int kHighestRank = 100000;

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

std::vector<int> ranks_named(const std::string& text) {
  std::vector<int> ranks;
  std::string faults;
  for (const std::string& piece : pieces(text)) {
    try {
      ranks.push_back(whole_number("pick", piece, 1, kHighestRank));
    } catch (const UsageError& fault) {
      faults += fmt::format("\n{}", fault.what());
    }
  }
  if (!faults.empty()) throw UsageError(faults.substr(1));
  return ranks;
}

/// One for each document.
std::vector<int> picked_ranks(const Arguments& arguments) {
  const std::size_t documents = arguments.operands.size();
  std::vector<int> ranks = ranks_named(arguments.value("pick").value_or("1"));
  if (ranks.size() == 1) ranks.resize(documents, ranks.front());
  if (ranks.size() == documents) return ranks;
  throw UsageError(fmt::format(
      "--pick: {} ranks for {} result document{}; give one rank for all or one for each (a document may be named more "
      "than once)",
      ranks.size(), documents, documents == 1 ? "" : "s"));
}

/// The texts named, each read once: standard input comes only once.
class Documents {
public:
  const NamedText& text(const std::string& name) {
    const auto known = texts_.find(name);
    return known != texts_.end() ? known->second : texts_.emplace(name, read_text(name)).first->second;
  }

private:
  std::map<std::string, NamedText> texts_;
};

void read_board(const Arguments& arguments, const NamedText& document, int rank, PickedBoard& board) {
  board.file = document.name;
  if (!is_result(document.text))
    throw InputError({Fault{document.name, "a text without candidates",
                            "a result document, as bandwright design --format json writes it", ""}});
  board.stored = read_candidate(document.text, document.name, rank);
  board.spec = read_spec(document.text, document.name, {}, SpecUse::check, arguments.has("allow-high-voltage"));
  board.catalogue = catalogue_of(arguments, board.spec, document.name);
}

void recompute(PickedBoard& board) {
  try {
    board.result = check(board.spec, board.catalogue, board.stored.device, board.stored.parts);
  } catch (const InputError& error) {
    std::vector<Fault> faults = error.faults();
    for (Fault& fault : faults) fault.where = fmt::format("{}: {}", board.file, fault.where);
    throw InputError(std::move(faults));
  }
}

/// Works on each board in turn and throws at the end what went wrong with any of them.
template <class Work>
void with_each(PickedBoards& boards, Work work) {
  std::string unreadable;
  std::vector<Fault> faults;
  for (std::size_t i = 0; i < boards.size(); ++i) {
    try {
      work(boards[i], i);
    } catch (const FileError& error) {
      unreadable += fmt::format("{}{}", unreadable.empty() ? "" : "\n", error.what());
    } catch (const InputError& error) {
      faults.insert(faults.end(), error.faults().begin(), error.faults().end());
    }
  }
  if (unreadable.empty() && faults.empty()) return;
  const InputError wrong(faults);
  if (unreadable.empty()) throw wrong;
  throw FileError(faults.empty() ? unreadable : fmt::format("{}\n{}", unreadable, wrong.what()));
}

std::string shortfall_text(const PickedBoard& board) {
  std::string text;
  for (const Shortfall& one : board.candidate().shortfalls)
    text += fmt::format("{}{}", text.empty() ? "" : "; ", one.text);
  return text.empty() ? "the transistor is not in its active region" : text;
}

}  // namespace

PickedBoards picked_boards(const Arguments& arguments) {
  const std::vector<std::string>& files = arguments.operands;
  if (files.empty())
    throw UsageError("nothing to buy: give one result document or more, as bandwright design --format json writes");
  if (files.size() > kMostBoards)
    throw UsageError(fmt::format("{} boards; at most {} share a list", files.size(), kMostBoards));
  const std::vector<int> ranks = picked_ranks(arguments);
  PickedBoards boards(files.size());
  Documents documents;
  with_each(boards, [&](PickedBoard& board, std::size_t i) {
    if (files.size() > 1) board.prefix = std::string(1, static_cast<char>('A' + i));
    read_board(arguments, documents.text(files[i]), ranks[i], board);
  });
  with_each(boards, [](PickedBoard& board, std::size_t) { recompute(board); });
  return boards;
}

void tell_state(const PickedBoard& board, bool quiet) {
  if (board.stored.has_figures) {
    const Agreement agreement = compare(board.stored, board.candidate());
    if (!quiet || !agreement.differing.empty())
      complain(agreement_text(agreement, printable(board.file), board.stored.rank));
  }
  const auto& assessment = board.candidate().assessment;
  if (board.result.met && assessment && assessment->verdict == "not met")
    complain(fmt::format("Candidate {} of {} meets its spec nominally, but too few built units do: yield {:.3g} %",
                         board.stored.rank, printable(board.file), 100 * assessment->yield.share()));
  if (!board.result.met)
    complain(fmt::format("Candidate {} of {} does not meet its spec: {}", board.stored.rank, printable(board.file),
                         shortfall_text(board)));
}

}  // namespace bandwright::cli
