// Report: writers of a result. They format and never compute.
#pragma once

#include <bandwright/design.hpp>
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

/// One candidate as a result document states it.
struct StoredCandidate {
  int rank = 1;
  std::string device;
  PartValues values{};       ///< ohm and farad as printed; 0: absent
  PartFamilies families;     ///< names of families; empty where the document states none
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

}  // namespace bandwright
