// Parts from the user's stock, pairs, boards, and how far ratings are used.
#include <fmt/format.h>

#include "spec/field_groups.hpp"
#include "spec/shown_value.hpp"

namespace bandwright {

namespace {

constexpr ValueRange kBoards = {1, 1e6};
constexpr ValueRange kShare = {0.05, 1};
constexpr ValueRange kMargin = {0, 150};  // K

Field stock() {
  return {
      .path = "parts.stock",
      .option = "stock",
      .shape = Shape::text,
      .help =
          "file of the parts at hand (see bandwright stock), looked for beside the spec, then where the program runs",
      .usual = "none",
      .refuse = [](const Reading& r) -> std::string { return r.text.empty() ? "the name of a stock file" : ""; },
      .store = [](Draft& draft, const Reading& reading) { draft.spec.parts.stock = reading.text; },
      .show = [](const Spec& spec) { return spec.parts.stock.empty() ? Json(nullptr) : Json(spec.parts.stock); }};
}

Field flag(const char* path, const char* option, const char* help, bool Parts::*member) {
  return {.path = path,
          .option = option,
          .shape = Shape::flag,
          .help = help,
          .usual = "false",
          .store = [=](Draft& draft, const Reading& reading) { draft.spec.parts.*member = reading.number != 0; },
          .show = [=](const Spec& spec) { return Json(spec.parts.*member); }};
}

Field boards() {
  return {.path = "parts.boards",
          .option = "boards",
          .shape = Shape::count,
          .allowed = kBoards,
          .help = "boards that the stock must last for",
          .usual = "1",
          .store = [](Draft& draft, const Reading& r) { draft.spec.parts.boards = static_cast<int>(r.number); },
          .show = [](const Spec& spec) { return Json(spec.parts.boards); }};
}

Field derated(const char* path, const char* help, const char* usual, double Derating::*member) {
  return {.path = path,
          .option = option_of(path),
          .shape = Shape::quantity,
          .dimension = Dimension::fraction,
          .allowed = kShare,
          .help = help,
          .usual = usual,
          .store = [=](Draft& draft, const Reading& r) { draft.spec.parts.derating.*member = r.number; },
          .show = [=](const Spec& spec) { return Json(spec.parts.derating.*member); }};
}

Field junction_margin() {
  return {.path = "parts.derating.junction_margin",
          .option = option_of("parts.derating.junction_margin"),
          .shape = Shape::difference,
          .allowed = kMargin,
          .help = "kelvin that the junction stays under its highest temperature",
          .usual = "40 K, from memory of ECSS-Q-ST-30-11C, not read",
          .store = [](Draft& draft, const Reading& r) { draft.spec.parts.derating.junction_margin = r.number; },
          .show = [](const Spec& spec) { return Json(fmt::format("{} K", spec.parts.derating.junction_margin)); }};
}

}  // namespace

std::vector<Field> stock_fields() {
  return {
      stock(),
      flag("parts.stock_only", "stock-only", "use nothing but the stock", &Parts::stock_only),
      flag("parts.pairs", "pairs", "two parts may stand in one role, where one value misses", &Parts::pairs),
      boards(),
      derated("parts.derating.capacitor_voltage", "share of a capacitor's rated DC voltage that is used",
              "60 %, from memory of ECSS-Q-ST-30-11C, not read", &Derating::capacitor_voltage),
      derated("parts.derating.electrolytic_voltage", "the same of an aluminium electrolytic",
              "80 %, from memory, not read", &Derating::electrolytic_voltage),
      derated("parts.derating.resistor_power", "share of a resistor's rated power that is used",
              "50 %, from memory, not read", &Derating::resistor_power),
      derated("parts.derating.resistor_voltage", "share of a resistor's highest voltage that is used",
              "80 %, from memory, not read", &Derating::resistor_voltage),
      derated("parts.derating.transistor_voltage", "share of VCEO that is used", "75 %, from memory, not read",
              &Derating::transistor_voltage),
      derated("parts.derating.transistor_current", "share of the highest collector current that is used",
              "75 %, from memory, not read", &Derating::transistor_current),
      derated("parts.derating.transistor_power", "share of the transistor's power that is used",
              "65 %, from memory, not read", &Derating::transistor_power),
      junction_margin(),
  };
}

}  // namespace bandwright
