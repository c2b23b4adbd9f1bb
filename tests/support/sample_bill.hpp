// Parts and boards made by hand for bills of materials. All of it is invented, costs and part numbers too.
#pragma once

#include <bandwright/purchase.hpp>
#include <string>
#include <vector>

namespace bandwright::test {

/// A metal film resistor, ±1 %, 0.25 W and 250 V, at 0.02 each.
Part bought_resistor(const std::string& designator, double value, const std::string& code);

/// An aluminium electrolytic, ±20 %, at 0.06 each.
Part bought_electrolytic(const std::string& designator, double value, const std::string& code, double volts,
                         const std::string& polarity);

/// A transistor of 45 V and 0.5 W at 0.08.
Part bought_transistor(const std::string& type);

/// Four parts on 12.6 V: R1 and R3 of 10 kΩ, C1 of 10 µF, Q1.
BoardParts sample_board(const std::string& prefix);

/// Two such boards, 250 of each, 5 % attrition, with decoupling; costs invented.
Bill sample_bill();

}  // namespace bandwright::test
