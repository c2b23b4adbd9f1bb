// Purchase: the parts of a stage as they are bought: family, tolerance, rating, polarity; the bill of materials.
#pragma once

#include <array>
#include <bandwright/analysis.hpp>
#include <bandwright/catalogue.hpp>
#include <bandwright/device.hpp>
#include <bandwright/role.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stress.hpp>
#include <optional>
#include <string>
#include <vector>

namespace bandwright {

/// One part of a parts list. NaN: not stated.
struct Part {
  std::string designator;  ///< "R1", of a pair "R1A" and "R1B", "Q1"
  PartKind kind = PartKind::resistor;
  Role role = Role::collector;  ///< of a resistor or capacitor
  double value = 0;             ///< printed, ohm or farad; 0 for a transistor
  std::string code;             ///< IEC 60062; a transistor's type
  std::string series;           ///< coarsest series that holds it; empty: none
  Tolerance tolerance;
  std::string family;                  ///< words
  double temperature_coefficient = 0;  ///< 1/K, two-sided
  double voltage_rating = 0;           ///< V DC; 0: none is stated
  double power_rating = 0;             ///< W; 0 for a capacitor
  double volts = 0;                    ///< DC voltage across it at the worst corner, signed first node to second
  double watts = 0;                    ///< dissipation of a resistor or transistor at the worst corner
  std::string polarity;                ///< "+ to collector"; empty: not polarised
  std::array<std::string, 2> nodes;
  Connection connection = Connection::single;  ///< how it is joined to the other part of its role
  std::string part_number;                     ///< filled from the user's stock only
  std::optional<long> in_stock;                ///< how many the stock holds, where it counts them
  bool from_stock = false;
  bool electrolytic = false;  ///< derated as one
  double unit_cost = kNotComputed;
  bool invented_cost = false;           ///< made up for demonstration
  std::vector<std::string> alternates;  ///< what may be fitted in its place: "BC547C", "43K"
  std::string note;                     ///< why this family, what the stock says
};

/// The two nodes of each role where every role is present.
const std::array<std::string, 2>& nodes(Role role);

/// The two nodes of a role beside the parts that are present: without the unbypassed emitter resistor the junction is
/// the emitter, without the bypassed one it is ground.
std::array<std::string, 2> nodes(Role role, const PartValues& values);

/// The parts with another family where a polarised capacitor's voltage may change its sign at some corner, or is 0: a
/// bipolar or film part of the same value. A part of the stock stays what it is.
OfferedParts with_settled_polarity(const Spec& spec, OfferedParts parts, const WorstStress& stress);

/// The parts list of a stage: each part in the smallest rating that its worst corner allows after derating. `reason` is
/// filled where a rating does not exist, or a polarised part is right at no polarity.
std::vector<Part> parts_list(const Spec& spec, const OfferedParts& parts, const WorstStress& stress,
                             std::string* reason = nullptr);

/// The transistor as a part: the stock's one where the stock holds the type for all boards.
Part transistor_part(const Catalogue& catalogue, const std::string& type, int boards, const WorstStress& stress);

/// What a part stands at its worst corner beside what it may.
struct StressRow {
  std::string designator;
  std::string quantity;  ///< "voltage", "power", "collector current", ...
  Dimension dimension = Dimension::voltage;
  double worst = kNotComputed;
  double rating = kNotComputed;
  double allowed = kNotComputed;  ///< after derating, in the unit of the rating
  std::string corner;
  double share() const { return worst / rating; }               ///< of the rating; without sense for temperatures
  bool holds() const { return worst <= allowed * (1 + 1e-9); }  ///< rounding aside, as ratings are chosen
};

/// One row for each rating of each part and of the transistor.
std::vector<StressRow> stress_table(const Spec& spec, const std::vector<Part>& parts, const BipolarParameters& device,
                                    const WorstStress& stress);

/// One board of a bill of materials.
struct BoardParts {
  std::string prefix;       ///< "A" makes "A.R1"; empty: none
  std::string name;         ///< "Hydrophone line amplifier, BC547B"
  std::vector<Part> parts;  ///< the transistor among them
  double supply = 0;        ///< V, magnitude, highest: rates the decoupling capacitors
  bool pnp = false;         ///< the supply is negative
  Derating derating;
};

struct BillOptions {
  long quantity = 1;       ///< of each board
  double attrition = 0;    ///< share added to what is bought, rounded up
  bool decoupling = true;  ///< supply decoupling at each stage: 100 nF and 10 uF, common practice, no source
};

/// One row of a bill of materials: one distinct part.
struct BillRow {
  int item = 1;
  std::vector<std::string> designators;  ///< singly, in order
  long quantity_per_board = 0;           ///< over one of each board
  long quantity_total = 0;
  Part part;  ///< of the first designator, but polarity and alternates those of all: "C1 + to base; C2 + to collector"
  bool outside_model = false;  ///< supply decoupling
  double total_cost = kNotComputed;
  long missing = 0;  ///< how many of quantity_total the stock does not hold
  std::string note;
};

struct Bill {
  BillOptions options;
  std::vector<BoardParts> boards;
  std::vector<BillRow> rows;
  double total_cost = kNotComputed;  ///< NaN where a row has none
  bool has_invented_costs = false;
  std::vector<std::string> notes;  ///< what does not come from the model, what the stock does not hold
};

/// One list for one board or several, resistors, capacitors, transistors, each by rising value: parts that are alike
/// share a row, supply decoupling stands in rows of its own and comes from the stock where that holds some. Costs are
/// rounded to a millionth.
Bill bill_of_materials(const std::vector<BoardParts>& boards, const Catalogue& catalogue, const BillOptions& options);

struct Caution {
  std::string code;
  std::string text;
};
/// The usual cautions, the same under every list.
const std::vector<Caution>& cautions();

}  // namespace bandwright
