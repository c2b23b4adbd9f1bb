// The tolerance letters of IEC 60062.
//
// Source: IEC 60062:2016, clause 5. The standard was not opened. B, C, D, F, G, J, K and M through text copies of data
// sheets and ordering codes; N, S and Z through secondary sources; E, L, P, W, Q and T from memory. Left out: H, which
// lists give as 3 % or 2.5 %, and A, which makers use for 0.05 %.
#include <array>
#include <bandwright/quantity.hpp>
#include <cmath>

namespace bandwright {

namespace {

struct Letter {
  char letter;
  Tolerance tolerance;
};
constexpr std::array<Letter, 17> kLetters = {{{'E', {0.00005, 0.00005}},
                                              {'L', {0.0001, 0.0001}},
                                              {'P', {0.0002, 0.0002}},
                                              {'W', {0.0005, 0.0005}},
                                              {'B', {0.001, 0.001}},
                                              {'C', {0.0025, 0.0025}},
                                              {'D', {0.005, 0.005}},
                                              {'F', {0.01, 0.01}},
                                              {'G', {0.02, 0.02}},
                                              {'J', {0.05, 0.05}},
                                              {'K', {0.1, 0.1}},
                                              {'M', {0.2, 0.2}},
                                              {'N', {0.3, 0.3}},
                                              {'Q', {0.1, 0.3}},
                                              {'S', {0.2, 0.5}},
                                              {'T', {0.1, 0.5}},
                                              {'Z', {0.2, 0.8}}}};

// Below 10 pF a letter is a capacitance. B, C, D and F through text copies of data sheets, G from memory.
struct SmallLetter {
  char letter;
  double capacitance;  // F
};
constexpr std::array<SmallLetter, 5> kSmallLetters = {
    {{'B', 0.1e-12}, {'C', 0.25e-12}, {'D', 0.5e-12}, {'F', 1e-12}, {'G', 2e-12}}};

// The noise of a few operations on a decimal fraction.
constexpr double kSameShare = 1e-9;
bool same_share(double a, double b) { return std::fabs(a - b) <= kSameShare * b; }

}  // namespace

std::string tolerance_letter(const Tolerance& tolerance) {
  for (const Letter& row : kLetters)
    if (same_share(tolerance.below, row.tolerance.below) && same_share(tolerance.above, row.tolerance.above))
      return std::string(1, row.letter);
  return "";
}

std::optional<Tolerance> tolerance_of_letter(char letter) {
  for (const Letter& row : kLetters)
    if (row.letter == letter) return row.tolerance;
  return std::nullopt;
}

std::optional<double> small_capacitance_tolerance_of_letter(char letter) {
  for (const SmallLetter& row : kSmallLetters)
    if (row.letter == letter) return row.capacitance;
  return std::nullopt;
}

}  // namespace bandwright
