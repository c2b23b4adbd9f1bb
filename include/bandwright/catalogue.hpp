// Catalogue: preferred-number series, part families and transistors, each number with its source.
//
// The program carries the catalogue inside itself; read_catalogue adds or overrides from a folder.
//
//   Catalogue catalogue = built_in_catalogue();
//   const Transistor* t = catalogue.find_transistor("BC547B");
#pragma once

#include <array>
#include <bandwright/fault.hpp>
#include <bandwright/quantity.hpp>
#include <bandwright/spec.hpp>
#include <bandwright/stock.hpp>
#include <filesystem>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bandwright {

/// Where a number comes from. The mark travels with the value.
enum class Provenance {
  several_sheets,  ///< text copies of two or more data sheets
  one_sheet,       ///< text copy of one data sheet or page
  derived,         ///< computed from published figures here
  memory,          ///< from memory
  assumed,         ///< a rule of the model where nothing is known
};
const char* describe(Provenance provenance);

/// One figure of a data sheet at its conditions. NaN: not stated.
struct SheetFigure {
  double min = kNotComputed;
  double typ = kNotComputed;
  double max = kNotComputed;
  double collector_current = kNotComputed;          ///< A
  double collector_emitter_voltage = kNotComputed;  ///< V, magnitude
  double reverse_voltage = kNotComputed;            ///< V: VCB of Cob and ICBO, VEB of Cib
  double temperature = kNotComputed;                ///< K; NaN: 25 °C
  Provenance provenance = Provenance::memory;
  std::vector<std::string> sources;  ///< keys of Catalogue::sources
  std::string note;
};

/// A package with its lead order.
struct Package {
  std::string name;        ///< "TO-92"
  std::string lead_order;  ///< "E-B-C (1-2-3)"
  std::string note;
  Provenance provenance = Provenance::memory;
  std::vector<std::string> sources;
};

/// A bipolar transistor as its data sheets describe it. Voltages and currents are magnitudes.
struct Transistor {
  std::string type;
  bool pnp = false;
  std::string use;
  std::string complement;
  SheetFigure collector_emitter_breakdown;        ///< VCEO, V
  SheetFigure collector_current_limit;            ///< IC max, A
  SheetFigure power_limit;                        ///< Ptot at 25 °C, W
  SheetFigure thermal_resistance;                 ///< junction to ambient, K/W
  SheetFigure junction_limit;                     ///< Tj max, K
  SheetFigure early_voltage;                      ///< VA, V; typ may be infinite
  SheetFigure base_resistance;                    ///< rbb', ohm
  SheetFigure saturation_voltage;                 ///< VCE(sat), V
  std::vector<SheetFigure> current_gain;          ///< hFE
  std::vector<SheetFigure> base_emitter_voltage;  ///< VBE, V
  std::vector<SheetFigure> transition_frequency;  ///< fT, Hz
  std::vector<SheetFigure> output_capacitance;    ///< Cob, F
  std::vector<SheetFigure> input_capacitance;     ///< Cib, F
  std::vector<SheetFigure> cutoff_current;        ///< ICBO, A
  std::vector<Package> packages;
  double unit_cost = kNotComputed;  ///< of one
  bool invented_cost = false;       ///< the cost is made up for demonstration
};

/// A family of resistors or capacitors that is really sold.
struct Family {
  std::string key;   ///< "metal-film"
  std::string name;  ///< "metal film resistor"
  PartKind kind = PartKind::resistor;
  std::vector<std::string> series;  ///< preferred-number series it is made in
  ValueRange made;                  ///< values it is made in, ohm or farad
  ValueRange first_choice;  ///< values at which it is the first choice; min exclusive where another family ends there
  std::vector<Tolerance> tolerances;    ///< offered, the usual one first
  double temperature_coefficient = 0;   ///< 1/K, two-sided
  std::vector<double> voltage_ratings;  ///< V DC, rising
  std::vector<double> power_ratings;    ///< W, rising
  bool polarised = false;
  bool electrolytic = false;  ///< derated as one, polarised or not
  std::string unpolarised;    ///< key of the family that takes its place where nothing settles the polarity
  Tolerance further_limits;   ///< class 2 ceramic: what temperature and ageing add to the tolerance
  double bias_loss = 0;       ///< class 2 ceramic: share of the capacitance lost at the rated DC voltage, linear below
  double cold_loss = 0;       ///< 1/K: share lost for each kelvin below 20 °C
  double unit_cost = kNotComputed;                ///< of one
  double unit_cost_per_value = 0;                 ///< added for each ohm or farad
  bool invented_cost = false;                     ///< the costs are made up for demonstration
  std::map<std::string, std::string> provenance;  ///< field to "source key: mark, note", for display
};

/// A source of figures.
struct SourceEntry {
  std::string title;  ///< maker, document, revision, date
  std::string read;   ///< how it was read
};

struct Catalogue {
  std::vector<Family> families;
  std::vector<Transistor> transistors;
  std::map<std::string, SourceEntry> sources;
  Stock stock;  ///< the user's own parts

  /// By name, capitals or not; nullptr where there is none.
  const Transistor* find_transistor(std::string_view type) const;
  const Family* find_family(std::string_view key) const;
};

/// The catalogue inside the program.
const Catalogue& built_in_catalogue();

/// The built-in catalogue with the JSON files of a folder added; an entry of the same type or key replaces.
/// Throws InputError with every fault (file, path, found, expected), FileError where the folder cannot be read.
Catalogue read_catalogue(const std::filesystem::path& folder);

/// A preferred-number series of IEC 60063.
struct Series {
  std::string name;  ///< "E24"
  int number;        ///< 24
  int digits;        ///< significant digits: 2 to E24, 3 from E48
};
const std::vector<Series>& series();
const Series* find_series(std::string_view name);

/// The numbers of one decade, 1 <= x < 10, rising: by rounding 10^(i/n), with the standard's exceptions.
std::vector<double> decade_values(const Series& series);

/// True where the value stands in the series (any decade).
bool in_series(const Series& series, double value);

/// The coarsest series that holds the value, or nullptr.
const Series* coarsest_series(double value);

/// How the parts of a role are joined.
enum class Connection { single, series, parallel };
const char* word(Connection connection);  ///< "series"

/// What two parts of a kind make together: the sum for resistors in series and capacitors in parallel, else the
/// reciprocal of the sum of reciprocals.
double paired_value(PartKind kind, Connection connection, double first, double second);

/// One part of a pair.
struct PairedPart {
  double value = 0;  ///< printed
  Tolerance tolerance;
  const Series* series = nullptr;
  const StockPart* stock = nullptr;
  double unit_cost = kNotComputed;
};

/// A value that can be bought for a role, resolved before any analysis. A pair acts as one value; its tolerance is that
/// of both parts at their ends.
struct OfferedValue {
  double value = 0;          ///< printed on the part, ohm or farad
  double working_value = 0;  ///< at the nominal ambient: cold electrolytics lose capacitance
  const Family* family = nullptr;
  Tolerance tolerance;
  const Series* series = nullptr;    ///< coarsest series that holds it; nullptr: none
  const StockPart* stock = nullptr;  ///< the user's own part; nullptr: to be bought
  double unit_cost = kNotComputed;
  bool invented_cost = false;
  const Family* unpolarised = nullptr;  ///< takes the place of a polarised one where nothing settles the polarity
  double bias_factor = 1;               ///< what DC voltage leaves of a class 2 ceramic; part of the working value
  Connection connection = Connection::single;
  std::array<PairedPart, 2> pair{};  ///< where the connection is not single
};

/// What a DC voltage leaves of a class 2 ceramic's capacitance: 1 - loss V/Vrated, in the rating that its worst corner
/// takes; 1 for all other parts.
double bias_factor(const OfferedValue& part, const Derating& derating, double volts, double worst_volts);

/// The tolerance of a part at work: what temperature and ageing do to a class 2 ceramic joins the printed one.
Tolerance tolerance_at_work(const OfferedValue& part);

/// The values offered for a role under a spec's rules, rising by working value; one value where it is pinned.
/// A capacitor comes from the family that is first choice at its value; where the spec names families, from each of
/// them that is made at it. The result points into `catalogue`.
std::vector<OfferedValue> offered_values(const Catalogue& catalogue, const Spec& spec, Role role);

/// A part that is given rather than searched for.
struct PartChoice {
  double value = 0;           ///< printed, ohm or farad; of a pair: of both together; 0: absent
  std::string family{};       ///< name or key; empty: as the spec's rules have it
  std::string part_number{};  ///< of the stock's part; empty: the first that fits
  bool from_stock = true;     ///< false: bought, whatever the stock holds
  Connection connection = Connection::single;
  std::array<double, 2> pair{};  ///< printed values, where the connection is not single
};
using PartChoices = std::array<PartChoice, kRoleCount>;
PartChoices choices_of(const PartValues& values);

/// One value resolved as offered_values would: family, tolerance, working value. A value in no family's range
/// takes the nearest family of its kind.
OfferedValue resolve_value(const Catalogue& catalogue, const Spec& spec, Role role, const PartChoice& choice);

/// The offered value in each role; an absent role has value 0.
using OfferedParts = std::array<OfferedValue, kRoleCount>;

/// What a part may stand. NaN: not stated.
struct Rating {
  double voltage = kNotComputed;  ///< V
  double power = kNotComputed;    ///< W
};

/// The share of its rated voltage that a part may be loaded to.
double voltage_share(const Derating& derating, const Family& family);

/// The smallest rating, next standard row up, that is loaded to no more than its derated share; a stock part has but
/// its own one (where it states none, the smallest of its family). nullopt where none holds, or the load is NaN.
std::optional<Rating> rating_that_holds(const OfferedValue& part, const Derating& derating, double volts, double watts);

/// What a spec asks for and a catalogue cannot give: unknown devices and families, a polarity that the supply does not
/// take, a family that is refused, a pinned value that is not sold, rules under which no value is sold.
std::vector<Fault> check_against_catalogue(const Spec& spec, const Catalogue& catalogue);

}  // namespace bandwright
