#include "catalogue/provenance.hpp"

#include <array>

#include "units/suggest.hpp"

namespace bandwright {

namespace {

struct Wording {
  Provenance provenance;
  const char* words;
};
constexpr std::array<Wording, 5> kWordings = {{{Provenance::several_sheets, "two or more sheets"},
                                               {Provenance::one_sheet, "one sheet"},
                                               {Provenance::derived, "derived here"},
                                               {Provenance::memory, "from memory"},
                                               {Provenance::assumed, "assumed"}}};

Provenance read_provenance(const JsonPlace& place) {
  const std::optional<std::string> words = place.text("words such as \"one sheet\"");
  if (!words) return Provenance::memory;
  std::vector<std::string> known;
  std::string listed;
  for (const Wording& row : kWordings) {
    if (*words == row.words) return row.provenance;
    known.emplace_back(row.words);
    listed += (listed.empty() ? "one of: " : ", ") + known.back();
  }
  place.fault(listed, nearest_name(*words, known));
  return Provenance::memory;
}

}  // namespace

const char* describe(Provenance provenance) {
  for (const Wording& row : kWordings) {
    if (row.provenance == provenance) return row.words;
  }
  return "";
}

const std::vector<std::string>& marks_keys() {
  static const std::vector<std::string> keys = {"provenance", "sources", "note"};
  return keys;
}

Marks read_marks(const JsonPlace& place) {
  Marks marks;
  if (place.has("provenance")) marks.provenance = read_provenance(place.member("provenance"));
  if (place.has("sources") && place.member("sources").is_list("a list of source keys")) {
    for (const JsonPlace& source : place.member("sources").elements()) {
      const std::optional<std::string> key = source.text("a source key");
      if (!key) continue;
      source.log().references.push_back({source.where(), *key});
      marks.sources.push_back(*key);
    }
  }
  if (marks.sources.empty()) {
    marks.sources.push_back(own_source_key(place.log().file));
    place.log().is_a_source = true;
  }
  marks.note = text_or(place, "note", "a note in words");
  return marks;
}

std::string own_source_key(const std::string& file) { return "file " + file; }

}  // namespace bandwright
