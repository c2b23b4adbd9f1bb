// What each part stands at its worst corner, beside its rating.
#include <fmt/format.h>

#include <cmath>

#include "report/candidate_sections.hpp"

namespace bandwright {

namespace {

constexpr int kDigits = 3;
constexpr double kShownShare = 0.1;  // of a rating: rows under it are only counted

bool is_temperature(const StressRow& row) { return row.dimension == Dimension::temperature; }

/// What stands close to nothing is left out; what is not known never is.
bool is_shown(const StressRow& row) { return is_temperature(row) || !row.holds() || !(row.share() < kShownShare); }

std::string text_of(double value, const StressRow& row) {
  return std::isfinite(value) ? format_quantity(value, row.dimension, kDigits) : "-";
}

std::string share_text(const StressRow& row) {
  return std::isfinite(row.share()) && !is_temperature(row) ? fmt::format("{:.3g} %", 100 * row.share()) : "-";
}

std::vector<std::string> cells(const StressRow& row) {
  const bool is_rated = std::isfinite(row.rating);
  return {row.designator,
          row.quantity,
          text_of(row.worst, row),
          is_rated ? text_of(row.rating, row) : "none holds",
          text_of(row.allowed, row),
          share_text(row),
          row.corner};
}

/// One share of the derating in words.
struct DeratingRow {
  double Derating::*share;
  const char* what;  // "{}" stands for the number
};
constexpr std::array kDerating = {DeratingRow{&Derating::capacitor_voltage, "capacitors {} % of their rated voltage"},
                                  DeratingRow{&Derating::electrolytic_voltage, "electrolytics {} % of theirs"},
                                  DeratingRow{&Derating::resistor_power, "resistors {} % of their power"},
                                  DeratingRow{&Derating::resistor_voltage, "resistors {} % of their voltage"},
                                  DeratingRow{&Derating::transistor_voltage, "the transistor {} % of VCEO"},
                                  DeratingRow{&Derating::transistor_current, "{} % of its collector current"},
                                  DeratingRow{&Derating::transistor_power, "{} % of its power"},
                                  DeratingRow{&Derating::junction_margin, "its junction {} K under the limit"}};

std::string derating_words(const DeratingRow& row, const Derating& derating) {
  const double number = derating.*row.share * (row.share == &Derating::junction_margin ? 1 : 100);
  return fmt::format(fmt::runtime(row.what), format_quantity(number, Dimension::fraction));
}

/// The shares in force, those that the user set apart from those that rest on memory.
void add_derating(TextSheet& sheet, const Derating& derating) {
  std::vector<std::string> set, usual;
  for (const DeratingRow& row : kDerating)
    (derating.*row.share == Derating{}.*row.share ? usual : set).push_back(derating_words(row, derating));
  if (!set.empty()) sheet.line(fmt::format("Allowed, as the spec sets it: {}.", join(set, ", ")));
  if (!usual.empty())
    sheet.line(fmt::format("Allowed, from memory of ECSS-Q-ST-30-11C, which was not read: {}.", join(usual, ", ")));
}

}  // namespace

void add_stress(TextSheet& sheet, const Candidate& candidate, const Spec& spec) {
  if (candidate.stress_table.empty()) return;
  sheet.heading("Stress at the worst corner");
  TextGrid grid;
  grid.columns = {{"part", false},   {"stress", false}, {"worst", true},  {"rating", true},
                  {"allowed", true}, {"share", true},   {"corner", false}};
  grid.flexible = {6, 1};
  grid.dispensable = {4};
  std::size_t left_out = 0;
  for (const StressRow& row : candidate.stress_table) {
    if (is_shown(row))
      grid.add(cells(row));
    else
      ++left_out;
  }
  sheet.grid(grid);
  if (left_out > 0)
    sheet.line(fmt::format("{} {} under {:.0f} % of {} rating.", left_out, left_out == 1 ? "more stands" : "more stand",
                           100 * kShownShare, left_out == 1 ? "its" : "their"));
  for (const StressRow& row : candidate.stress_table)
    if (!row.holds()) sheet.item(fmt::format("{} {}: more than is allowed", row.designator, row.quantity));
  add_derating(sheet, spec.parts.derating);
}

}  // namespace bandwright
