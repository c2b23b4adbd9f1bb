#include "catalogue/family_json.hpp"

#include <cmath>

#include "catalogue/provenance.hpp"
#include "units/quantity_text.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

Dimension dimension_of(PartKind kind) {
  return kind == PartKind::resistor ? Dimension::resistance : Dimension::capacitance;
}

// A member object with its marks, which go to Family::provenance for display.
std::optional<JsonPlace> marked(const JsonPlace& place, const std::string& key, std::vector<std::string> keys,
                                Family& family) {
  if (!place.has(key)) return std::nullopt;
  JsonPlace member = place.member(key);
  if (!member.is_object("an object with the keys " + keys.front() + ", provenance, sources")) return std::nullopt;
  keys.insert(keys.end(), marks_keys().begin(), marks_keys().end());
  member.only_keys(keys);
  const Marks marks = read_marks(member);
  std::string shown;
  for (const std::string& source : marks.sources) shown += (shown.empty() ? "" : ", ") + source;
  shown += std::string(": ") + describe(marks.provenance);
  if (!marks.note.empty()) shown += ", " + marks.note;
  family.provenance[key] = shown;
  return member;
}

std::optional<double> above_zero(const JsonPlace& place, std::string_view key, Dimension dimension) {
  if (!place.has(key)) {
    place.missing(key, describe_dimension(dimension));
    return std::nullopt;
  }
  const JsonPlace member = place.member(key);
  const std::optional<double> value = member.quantity(dimension);
  if (!value || *value > 0) return value;
  member.fault(describe_dimension(dimension) + ", above 0");
  return std::nullopt;
}

ValueRange read_range(const JsonPlace& place, Dimension dimension) {
  const std::optional<double> low = above_zero(place, "min", dimension);
  const std::optional<double> high = above_zero(place, "max", dimension);
  if (!low || !high) return {};
  if (*low > *high) place.fault("min not above max");
  return {*low, *high};
}

bool inside(const ValueRange& inner, const ValueRange& outer) {
  return inner.max == 0 || outer.max == 0 || (inner.min >= outer.min && inner.max <= outer.max);
}

void read_series(const JsonPlace& place, Family& family) {
  if (!place.has("names")) return place.missing("names", "a list of series such as [\"E24\"]");
  std::vector<std::string> known;
  for (const Series& s : series()) known.push_back(s.name);
  for (const JsonPlace& element : place.member("names").elements()) {
    const std::optional<std::string> name = element.text("a series such as E24");
    if (!name) continue;
    if (find_series(*name) == nullptr) element.fault("a series of IEC 60063 such as E24", nearest_name(*name, known));
    family.series.push_back(*name);
  }
}

void read_tolerances(const JsonPlace& place, Family& family) {
  if (!place.has("offered")) return place.missing("offered", "a list of tolerances such as [\"5 %\"]");
  for (const JsonPlace& element : place.member("offered").elements()) {
    const std::optional<std::string> text = element.text("a tolerance such as 5 %");
    if (!text) continue;
    std::string expected;
    const auto tolerance = read_tolerance(*text, dimension_of(family.kind), expected);
    if (!tolerance) element.fault(expected);
    if (tolerance) family.tolerances.push_back(tolerance->value);
  }
}

double per_kelvin(const JsonPlace& place) {
  std::string expected;
  const std::string text = place.value().is_string() ? place.value().get<std::string>() : "";
  const std::optional<double> share = read_per_kelvin(text, expected);
  if (!share) place.fault(expected);
  return share.value_or(0);
}

void read_ratings(const JsonPlace& place, Family& family) {
  if (!place.has("rows")) return place.missing("rows", "a list such as [{\"voltage\": \"50 V\"}]");
  for (const JsonPlace& row : place.member("rows").elements()) {
    if (!row.is_object("a rating such as {\"voltage\": \"50 V\"}")) continue;
    const bool resistor = family.kind == PartKind::resistor;
    row.only_keys(resistor ? std::vector<std::string>{"power", "voltage"} : std::vector<std::string>{"voltage"});
    if (const auto volts = above_zero(row, "voltage", Dimension::voltage)) {
      if (!family.voltage_ratings.empty() && *volts < family.voltage_ratings.back()) row.fault("ratings that rise");
      family.voltage_ratings.push_back(*volts);
    }
    if (!resistor) continue;
    if (const auto watts = above_zero(row, "power", Dimension::power)) {
      if (!family.power_ratings.empty() && *watts < family.power_ratings.back()) row.fault("ratings that rise");
      family.power_ratings.push_back(*watts);
    }
  }
}

void read_further_limits(const JsonPlace& place, Family& family) {
  if (place.has("below")) family.further_limits.below = place.member("below").quantity(Dimension::fraction).value_or(0);
  if (place.has("above")) family.further_limits.above = place.member("above").quantity(Dimension::fraction).value_or(0);
  if (!(family.further_limits.below >= 0 && family.further_limits.below < 1 && family.further_limits.above >= 0))
    place.fault("shares: below from 0 up to, but not, 1, above at least 0");
}

void read_kind(const JsonPlace& place, Family& family) {
  const std::string kind = text_or(place, "kind", "resistor or capacitor");
  if (!place.has("kind")) place.missing("kind", "resistor or capacitor");
  if (place.has("kind") && kind != "resistor" && kind != "capacitor") {
    place.member("kind").fault("resistor or capacitor");
  }
  family.kind = kind == "capacitor" ? PartKind::capacitor : PartKind::resistor;
}

const std::vector<std::string> kFamilyKeys = {"key",
                                              "name",
                                              "kind",
                                              "polarised",
                                              "electrolytic",
                                              "unpolarised",
                                              "series",
                                              "made",
                                              "first_choice",
                                              "tolerances",
                                              "temperature_coefficient",
                                              "ratings",
                                              "cold_loss",
                                              "bias_loss",
                                              "further_limits",
                                              "note"};

void require(const JsonPlace& place) {
  for (const char* key : {"series", "made", "tolerances", "ratings"}) {
    if (!place.has(key)) place.missing(key, "this member: nothing can be offered without it");
  }
}

}  // namespace

std::optional<Family> read_family(const JsonPlace& place) {
  if (!place.is_object("a family such as {\"key\": \"metal-film\", ...}")) return std::nullopt;
  place.only_keys(kFamilyKeys);
  Family family;
  if (!place.has("key")) place.missing("key", "a key such as \"metal-film\"");
  family.key = text_or(place, "key", "a key such as \"metal-film\"");
  family.name = text_or(place, "name", "a name such as \"metal film resistor\"", family.key);
  read_kind(place, family);
  require(place);
  const Dimension dimension = dimension_of(family.kind);
  const auto member = [&](const std::string& key, std::vector<std::string> keys) {
    return marked(place, key, std::move(keys), family);
  };
  if (place.has("polarised")) family.polarised = place.member("polarised").truth().value_or(false);
  if (place.has("electrolytic")) family.electrolytic = place.member("electrolytic").truth().value_or(false);
  family.unpolarised = text_or(place, "unpolarised", "the key of a family");
  if (const auto m = member("series", {"names"})) read_series(*m, family);
  if (const auto m = member("made", {"min", "max"})) family.made = read_range(*m, dimension);
  if (const auto m = member("first_choice", {"min", "max"})) {
    family.first_choice = read_range(*m, dimension);
    if (!inside(family.first_choice, family.made)) m->fault("a range inside \"made\"");
  }
  if (const auto m = member("tolerances", {"offered"})) read_tolerances(*m, family);
  if (const auto m = member("ratings", {"rows"})) read_ratings(*m, family);
  if (const auto m = member("temperature_coefficient", {"max"}); m && m->has("max")) {
    family.temperature_coefficient = per_kelvin(m->member("max"));
  }
  if (const auto m = member("cold_loss", {"typ"}); m && m->has("typ")) family.cold_loss = per_kelvin(m->member("typ"));
  if (const auto m = member("bias_loss", {"typ"}); m && m->has("typ")) {
    family.bias_loss = m->member("typ").quantity(Dimension::fraction).value_or(0);
    if (!(family.bias_loss >= 0 && family.bias_loss < 1)) m->fault("a share from 0 up to, but not, 1");
  }
  if (const auto m = member("further_limits", {"below", "above"})) read_further_limits(*m, family);
  if (family.key.empty()) return std::nullopt;
  return family;
}

}  // namespace bandwright
