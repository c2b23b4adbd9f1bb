// Report: writers of a result. They format and never compute.
#pragma once

#include <bandwright/alternates.hpp>
#include <bandwright/design.hpp>
#include <optional>
#include <string>
#include <string_view>

namespace bandwright {

struct TableStyle {
  bool colour = false;
  int width = 100;  ///< columns to fill at most
};

/// For people: verdict, ranked table, the first candidate in full, definitions, cautions.
std::string write_table(const DesignResult& result, const TableStyle& style = {});

/// The result document, "bandwright/result" version 1.
std::string write_json(const DesignResult& result);

/// One row a candidate, RFC 4180.
std::string write_csv(const DesignResult& result);

/// For people: a list of all that the catalogue holds, or one entry with figures, provenance and lead order.
std::string write_catalogue(const Catalogue& catalogue);
std::string write_transistor(const Catalogue& catalogue, const Transistor& transistor);
std::string write_family(const Catalogue& catalogue, const Family& family);
std::string write_series(const Series& series);

/// The stock of a catalogue: for people what it holds and what is taken where rows say nothing; "bandwright/stock"
/// version 1.
std::string write_stock(const Catalogue& catalogue, const TableStyle& style = {});
std::string write_stock_json(const Catalogue& catalogue);

/// One candidate as a result document states it.
struct StoredCandidate {
  int rank = 1;
  std::string device;
  PartChoices parts;         ///< as the document states them
  FigureValues figures{};    ///< as the document states them, NaN where null; temperatures in kelvin
  bool has_figures = false;  ///< the document carries figures
};

/// True where a JSON text calls itself a result document.
bool is_result(std::string_view json);

/// Reads the candidate of a rank from a result document. Throws InputError with every fault found.
StoredCandidate read_candidate(std::string_view json, std::string_view name, int rank);

/// How far a stored candidate's figures and recomputed ones lie apart.
struct Agreement {
  int compared = 0;               ///< figures that either of the two states
  double largest = 0;             ///< largest relative difference; infinite where only one has a value
  Figure worst = Figure::gain;    ///< where it stands
  std::vector<Figure> differing;  ///< figures apart by more than kAgreementTolerance
};
/// Stored figures carry all digits, and the model gives the same bytes everywhere; this leaves room for hand-edited
/// digits at the very end only.
inline constexpr double kAgreementTolerance = 1e-9;
Agreement compare(const StoredCandidate& stored, const Candidate& recomputed);

/// One candidate of a result document to be set beside others: what the document states, nothing recomputed.
struct ComparedCandidate {
  std::string file;        ///< name of the document
  std::size_t listed = 1;  ///< candidates in the document
  Spec spec;               ///< requirements and conditions of the document
  /// NaN, 0 units or empty where the document states nothing, with the reason in its notes. Filled are rank, best_at,
  /// variant, device, parts, analysis.figures, error, tolerance_sensitivity, margins, shortfalls, notes, non_dominated
  /// and assessment (always there): worst cases, capabilities, yield and verdict.
  Candidate stated;
};

/// Candidates are named A to Z.
inline constexpr std::size_t kMostCompared = 26;

/// Reads the candidates of the given ranks from a result document; where no ranks are given its first, and up to four
/// that are non-dominated or hold a title. Throws InputError with every fault of the document.
std::vector<ComparedCandidate> read_compared(std::string_view json, std::string_view name,
                                             const std::vector<int>& ranks);

/// Two or more candidates beside each other.
struct Comparison {
  std::vector<ComparedCandidate> candidates;
  std::vector<std::string> notes;  ///< how they were chosen
};

/// For people: what the choice is between, then measures, figures and the parts that differ.
std::string write_comparison_table(const Comparison& comparison, const TableStyle& style = {});

/// "bandwright/comparison" version 1.
std::string write_comparison_json(const Comparison& comparison);

/// One row a candidate, RFC 4180.
std::string write_comparison_csv(const Comparison& comparison);

/// Pairs of roles of one board that might share a value.
struct BoardConsolidations {
  std::string prefix;  ///< of the board
  std::vector<Consolidation> list;
};

/// A bill of materials, and what might make it shorter.
struct PurchaseList {
  Bill bill;
  std::optional<std::vector<BoardConsolidations>> consolidations;  ///< absent: nobody asked
};

/// For people: rows, alternates, notes, proposals, cautions.
std::string write_bill_table(const PurchaseList& list, const TableStyle& style = {});

/// "bandwright/bill" version 1.
std::string write_bill_json(const PurchaseList& list);

/// One row a distinct part, RFC 4180. No cell is taken for a formula: a text that would begin like one gets a word, or
/// an apostrophe in front where it comes from the user.
std::string write_bill_csv(const Bill& bill);

}  // namespace bandwright
