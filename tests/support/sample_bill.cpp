#include "sample_bill.hpp"

namespace bandwright::test {

Part bought_resistor(const std::string& designator, double value, const std::string& code) {
  Part part;
  part.designator = designator;
  part.kind = PartKind::resistor;
  part.value = value;
  part.code = code;
  part.tolerance = {0.01, 0.01};
  part.family = "metal film resistor";
  part.temperature_coefficient = 50e-6;
  part.power_rating = 0.25;
  part.voltage_rating = 250;
  part.unit_cost = 0.02;
  return part;
}

Part bought_electrolytic(const std::string& designator, double value, const std::string& code, double volts,
                         const std::string& polarity) {
  Part part;
  part.designator = designator;
  part.kind = PartKind::capacitor;
  part.value = value;
  part.code = code;
  part.tolerance = {0.2, 0.2};
  part.family = "aluminium electrolytic capacitor";
  part.voltage_rating = volts;
  part.polarity = polarity;
  part.unit_cost = 0.06;
  return part;
}

Part bought_transistor(const std::string& type) {
  Part part;
  part.designator = "Q1";
  part.kind = PartKind::transistor;
  part.code = type;
  part.family = "NPN transistor";
  part.voltage_rating = 45;
  part.power_rating = 0.5;
  part.unit_cost = 0.08;
  return part;
}

BoardParts sample_board(const std::string& prefix) {
  BoardParts board;
  board.prefix = prefix;
  board.name = "Tide gauge preamplifier, BC547B";
  board.supply = 12.6;
  board.parts = {bought_resistor("R1", 10e3, "10K"), bought_resistor("R3", 10e3, "10K"),
                 bought_electrolytic("C1", 10e-6, "10u", 16, "+ to base"), bought_transistor("BC547B")};
  return board;
}

Bill sample_bill() {
  std::vector<BoardParts> boards = {sample_board("A"), sample_board("B")};
  boards[1].parts[2].polarity = "+ to source";
  boards[0].parts[0].alternates = {"11K"};
  for (BoardParts& board : boards)
    for (Part& part : board.parts) part.invented_cost = true;
  return bill_of_materials(boards, built_in_catalogue(), {250, 0.05, true});
}

}  // namespace bandwright::test
