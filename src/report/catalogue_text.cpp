// The catalogue for people: lists, and single entries with figures, conditions, provenance and lead order.
#include <fmt/format.h>

#include <bandwright/report.hpp>
#include <cmath>
#include <set>

#include "report/shown_figures.hpp"
#include "report/text_sheet.hpp"

namespace bandwright {

namespace {

std::string quantity(double value, Dimension dimension) {
  if (std::isnan(value)) return "";
  if (std::isinf(value)) return "infinite";
  return format_quantity(value, dimension);
}

// What is most worth one line: the guaranteed end or the usual value.
std::string brief(const SheetFigure& figure, Dimension dimension, bool limit) {
  const double first = limit ? figure.max : figure.typ;
  const double second = limit ? figure.typ : figure.min;
  if (!std::isnan(first)) return quantity(first, dimension);
  if (!std::isnan(second)) return quantity(second, dimension);
  return quantity(limit ? figure.min : figure.max, dimension);
}

std::string gain_window(const Transistor& transistor) {
  double lowest = kNotComputed;
  double highest = kNotComputed;
  for (const SheetFigure& figure : transistor.current_gain) {
    if (std::isnan(figure.max)) continue;
    lowest = figure.min;
    highest = figure.max;
  }
  for (const SheetFigure& figure : transistor.current_gain)
    if (std::isnan(lowest)) lowest = figure.min;
  const std::string upper = std::isnan(highest) ? "-" : fmt::format("{:.4g}", highest);
  return std::isnan(lowest) ? "" : fmt::format("{:.4g} to {}", lowest, upper);
}

std::string widest_band(const Transistor& transistor) {
  for (const SheetFigure& figure : transistor.transition_frequency) {
    const std::string text = brief(figure, Dimension::frequency, false);
    if (!text.empty()) return text;
  }
  return "";
}

void list_transistors(TextSheet& sheet, const Catalogue& catalogue) {
  sheet.heading("Transistors");
  TextGrid grid{{{"type", false},
                 {"polarity", false},
                 {"hFE", false},
                 {"VCEO", true},
                 {"IC max", true},
                 {"Ptot", true},
                 {"fT", true},
                 {"use", false}},
                {},
                {7}};
  for (const Transistor& t : catalogue.transistors)
    grid.add({t.type, t.pnp ? "PNP" : "NPN", gain_window(t),
              brief(t.collector_emitter_breakdown, Dimension::voltage, true),
              brief(t.collector_current_limit, Dimension::current, true), brief(t.power_limit, Dimension::power, true),
              widest_band(t), t.use});
  sheet.grid(grid);
}

Dimension dimension_of(const Family& family) {
  return family.kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

std::string range_text(const ValueRange& range, Dimension dimension) {
  return format_quantity(range.min, dimension) + " to " + format_quantity(range.max, dimension);
}

std::string tolerances_text(const Family& family) {
  std::vector<std::string> words;
  for (const Tolerance& one : family.tolerances) words.push_back(tolerance_text(one));
  return join(words, ", ");
}

std::string ratings_text(const std::vector<double>& ratings, Dimension dimension) {
  std::vector<std::string> words;
  for (const double one : ratings) words.push_back(format_quantity(one, dimension));
  return join(words, ", ");
}

void list_families(TextSheet& sheet, const Catalogue& catalogue) {
  sheet.heading("Part families");
  TextGrid grid{{{"key", false}, {"name", false}, {"values", false}, {"series", false}, {"tolerance", false}}, {}, {1}};
  for (const Family& f : catalogue.families)
    grid.add({f.key, f.name, range_text(f.made, dimension_of(f)), join(f.series, ", "), tolerances_text(f)});
  sheet.grid(grid);
}

void list_series(TextSheet& sheet) {
  sheet.heading("Preferred-number series (IEC 60063)");
  TextGrid grid{{{"series", false}, {"values a decade", true}, {"digits", true}}, {}, {0}};
  for (const Series& one : series()) grid.add({one.name, std::to_string(one.number), std::to_string(one.digits)});
  sheet.grid(grid);
}

std::string at(const SheetFigure& figure) {
  std::vector<std::string> words;
  const auto add = [&](const char* symbol, double value, Dimension dimension) {
    if (!std::isnan(value)) words.push_back(fmt::format("{} {}", symbol, format_quantity(value, dimension)));
  };
  add("IC", figure.collector_current, Dimension::current);
  add("VCE", figure.collector_emitter_voltage, Dimension::voltage);
  add("VR", figure.reverse_voltage, Dimension::voltage);
  add("T", figure.temperature, Dimension::temperature);
  return join(words, ", ");
}

// The figures of one transistor, and the sources they name.
class FigureGrid {
public:
  FigureGrid() {
    grid_.columns = {{"figure", false}, {"symbol", false}, {"min", true},         {"typ", true},
                     {"max", true},     {"at", false},     {"provenance", false}, {"sources", false}};
    grid_.flexible = {7};
  }
  void add(const std::string& label, const char* symbol, const SheetFigure& figure, Dimension dimension) {
    if (std::isnan(figure.min) && std::isnan(figure.typ) && std::isnan(figure.max)) return;
    grid_.add({label, symbol, quantity(figure.min, dimension), quantity(figure.typ, dimension),
               quantity(figure.max, dimension), at(figure), describe(figure.provenance), join(figure.sources, ", ")});
    sources_.insert(figure.sources.begin(), figure.sources.end());
    if (!figure.note.empty()) notes_.push_back(label + ": " + figure.note);
  }
  void add(const std::string& label, const char* symbol, const std::vector<SheetFigure>& figures, Dimension dimension) {
    for (const SheetFigure& one : figures) add(label, symbol, one, dimension);
  }
  const TextGrid& grid() const { return grid_; }
  const std::set<std::string>& sources() const { return sources_; }
  const std::vector<std::string>& notes() const { return notes_; }

private:
  TextGrid grid_;
  std::set<std::string> sources_;
  std::vector<std::string> notes_;
};

FigureGrid figure_grid(const Transistor& t) {
  FigureGrid grid;
  grid.add("collector-emitter breakdown", "VCEO", t.collector_emitter_breakdown, Dimension::voltage);
  grid.add("collector current limit", "IC max", t.collector_current_limit, Dimension::current);
  grid.add("power limit", "Ptot", t.power_limit, Dimension::power);
  grid.add("thermal resistance to ambient", "θJA", t.thermal_resistance, Dimension::thermal_resistance);
  grid.add("junction limit", "Tj max", t.junction_limit, Dimension::temperature);
  grid.add("current gain", "hFE", t.current_gain, Dimension::gain);
  grid.add("base-emitter voltage", "VBE", t.base_emitter_voltage, Dimension::voltage);
  grid.add("saturation voltage", "VCE(sat)", t.saturation_voltage, Dimension::voltage);
  grid.add("Early voltage", "VA", t.early_voltage, Dimension::voltage);
  grid.add("transition frequency", "fT", t.transition_frequency, Dimension::frequency);
  grid.add("output capacitance", "Cob", t.output_capacitance, Dimension::capacitance);
  grid.add("input capacitance", "Cib", t.input_capacitance, Dimension::capacitance);
  grid.add("base spreading resistance", "rbb'", t.base_resistance, Dimension::resistance);
  grid.add("collector cutoff current", "ICBO", t.cutoff_current, Dimension::current);
  return grid;
}

void add_sources(TextSheet& sheet, const Catalogue& catalogue, const std::set<std::string>& keys) {
  if (keys.empty()) return;
  sheet.heading("Sources");
  for (const std::string& key : keys) {
    const auto entry = catalogue.sources.find(key);
    if (entry == catalogue.sources.end())
      sheet.item(key + ": not described");
    else
      sheet.item(fmt::format("{}: {} ({})", key, entry->second.title, entry->second.read));
  }
}

void add_packages(TextSheet& sheet, const Transistor& transistor, std::set<std::string>& sources) {
  sheet.heading("Packages and lead order (makers differ: check the part in hand)");
  if (transistor.packages.empty()) sheet.line("none recorded");
  for (const Package& one : transistor.packages) {
    const std::string note = one.note.empty() ? "" : "; " + one.note;
    sheet.item(fmt::format("{}: {}{} ({}{}{})", one.name, one.lead_order, note, describe(one.provenance),
                           one.sources.empty() ? "" : ", ", join(one.sources, ", ")));
    sources.insert(one.sources.begin(), one.sources.end());
  }
}

}  // namespace

std::string write_catalogue(const Catalogue& catalogue) {
  TextSheet sheet{{}};
  sheet.paragraph(fmt::format("{} transistors, {} part families, {} series", catalogue.transistors.size(),
                              catalogue.families.size(), series().size()));
  list_transistors(sheet, catalogue);
  list_families(sheet, catalogue);
  list_series(sheet);
  sheet.space();
  sheet.paragraph("One entry in full: bandwright catalogue NAME");
  return sheet.text();
}

std::string write_transistor(const Catalogue& catalogue, const Transistor& transistor) {
  TextSheet sheet{{}};
  sheet.paragraph(fmt::format("{}: {} bipolar transistor", transistor.type, transistor.pnp ? "PNP" : "NPN"));
  if (!transistor.use.empty()) sheet.paragraph("Use: " + transistor.use);
  if (!transistor.complement.empty()) sheet.paragraph("Complement: " + transistor.complement);
  const FigureGrid figures = figure_grid(transistor);
  sheet.heading("Figures, as magnitudes, at 25 °C where nothing else is said");
  sheet.grid(figures.grid());
  for (const std::string& note : figures.notes()) sheet.item(note);
  std::set<std::string> sources = figures.sources();
  add_packages(sheet, transistor, sources);
  add_sources(sheet, catalogue, sources);
  return sheet.text();
}

namespace {

std::string cost_text(const Family& family) {
  std::string text = fmt::format("{:.4g}", family.unit_cost);
  if (family.unit_cost_per_value > 0) text += fmt::format(" and {:.4g} for each uF", 1e-6 * family.unit_cost_per_value);
  return text + (family.invented_cost ? ", invented for demonstration" : "");
}

}  // namespace

std::string write_family(const Catalogue& catalogue, const Family& family) {
  TextSheet sheet{{}};
  const Dimension dimension = dimension_of(family);
  sheet.paragraph(family.key + ": " + family.name);
  sheet.heading("Figures");
  TextGrid grid{{{"", false}, {"", false}}, {}, {1}};
  grid.add({"made from", range_text(family.made, dimension)});
  grid.add({"first choice",
            family.first_choice.max > 0 ? range_text(family.first_choice, dimension) : "only when asked for"});
  grid.add({"series", join(family.series, ", ")});
  grid.add({"tolerance", tolerances_text(family) + (family.tolerances.size() > 1 ? ", the usual one first" : "")});
  grid.add({"temperature coefficient", fmt::format("±{:.4g} ppm/K", 1e6 * family.temperature_coefficient)});
  grid.add({"rated voltages", ratings_text(family.voltage_ratings, Dimension::voltage)});
  grid.add({"rated powers", ratings_text(family.power_ratings, Dimension::power)});
  grid.add({"polarised", family.polarised ? "yes" : "no"});
  if (family.cold_loss > 0)
    grid.add({"cold", fmt::format("loses {:.3g} % a kelvin below 20 °C", 100 * family.cold_loss)});
  if (family.bias_loss > 0)
    grid.add(
        {"bias", fmt::format("loses {:.3g} % at its rated DC voltage, in proportion below", 100 * family.bias_loss)});
  if (family.further_limits != Tolerance{})
    grid.add(
        {"temperature and ageing", fmt::format("-{:.3g}/+{:.3g} % beyond the tolerance",
                                               100 * family.further_limits.below, 100 * family.further_limits.above)});
  if (!family.unpolarised.empty())
    grid.add({"where the polarity is not settled", family.unpolarised + " in its place"});
  if (std::isfinite(family.unit_cost)) grid.add({"unit cost", cost_text(family)});
  std::erase_if(grid.rows, [](const auto& row) { return row[1].empty(); });
  sheet.grid(grid);
  if (family.provenance.empty()) return sheet.text();
  sheet.heading("Provenance");
  std::set<std::string> sources;
  for (const auto& [field, text] : family.provenance) {
    sheet.item(field + ": " + text);
    for (const auto& [key, entry] : catalogue.sources)
      if (text.find(key) != std::string::npos) sources.insert(key);
  }
  add_sources(sheet, catalogue, sources);
  return sheet.text();
}

std::string write_series(const Series& one) {
  TextSheet sheet{{}};
  sheet.paragraph(
      fmt::format("{}: {} values a decade, {} significant digits (IEC 60063)", one.name, one.number, one.digits));
  std::vector<std::string> words;
  for (const double value : decade_values(one)) words.push_back(fmt::format("{:.{}f}", value, one.digits - 1));
  sheet.line(join(words, " "));
  return sheet.text();
}

}  // namespace bandwright
