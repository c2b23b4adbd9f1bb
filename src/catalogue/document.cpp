#include "catalogue/document.hpp"

#include <bandwright/fault.hpp>
#include <set>

#include "catalogue/costs_json.hpp"
#include "catalogue/family_json.hpp"
#include "catalogue/json_place.hpp"
#include "catalogue/names.hpp"
#include "catalogue/provenance.hpp"
#include "catalogue/transistor_json.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

// What one reading gathers over all documents.
struct Gathering {
  Catalogue& catalogue;
  std::set<std::string> seen;  // types and keys met in this reading
  std::vector<Fault> faults;
  std::vector<ReadingLog::Reference> references;
  std::vector<CostTable> costs;  // set when every family and transistor is known
};

// True at the first meeting in this reading; a second one is a fault, since neither can be right.
bool first_meeting(Gathering& all, const JsonPlace& place, const std::string& what, const std::string& name) {
  if (all.seen.insert(what + " " + small_letters(name)).second) return true;
  place.log().faults.push_back({place.where(), name, "each " + what + " once", ""});
  return false;
}

template <class Entry>
void put(std::vector<Entry>& entries, Entry entry, std::string Entry::*name) {
  for (Entry& old : entries) {
    if (!same_name(old.*name, entry.*name)) continue;
    old = std::move(entry);
    return;
  }
  entries.push_back(std::move(entry));
}

void add_transistor(Gathering& all, const JsonPlace& place) {
  std::optional<Transistor> transistor = read_transistor(place);
  if (!transistor || !first_meeting(all, place, "type", transistor->type)) return;
  put(all.catalogue.transistors, std::move(*transistor), &Transistor::type);
}

void add_family(Gathering& all, const JsonPlace& place) {
  std::optional<Family> family = read_family(place);
  if (!family || !first_meeting(all, place, "family", family->key)) return;
  put(all.catalogue.families, std::move(*family), &Family::key);
}

void add_sources(Gathering& all, const JsonPlace& place) {
  if (!place.is_object("an object of source keys")) return;
  for (const auto& [key, value] : place.value().items()) {
    const JsonPlace entry = place.member(key);
    if (!entry.is_object("a source such as {\"title\": ..., \"read\": ...}")) continue;
    entry.only_keys({"title", "read"});
    if (!entry.has("title")) entry.missing("title", "maker, document, revision, date");
    all.catalogue.sources[key] = {text_or(entry, "title", "maker, document, revision, date"),
                                  text_or(entry, "read", "how it was read")};
  }
}

void add_lists(Gathering& all, const JsonPlace& root) {
  root.only_keys({"transistors", "families", "sources", "costs", "note"});
  if (root.has("sources")) add_sources(all, root.member("sources"));
  if (root.has("transistors")) {
    for (const JsonPlace& place : root.member("transistors").elements()) add_transistor(all, place);
  }
  if (root.has("families")) {
    for (const JsonPlace& place : root.member("families").elements()) add_family(all, place);
  }
  if (root.has("costs")) all.costs.push_back(read_costs(root.member("costs")));
}

void add_document(Gathering& all, const CatalogueDocument& document) {
  ReadingLog log;
  log.file = document.name;
  try {
    const nlohmann::json json = nlohmann::json::parse(document.text);
    const JsonPlace root(json, "", log);
    if (!root.is_object("a transistor, or an object with transistors, families or sources")) {
      // told; nothing else can be read here
    } else if (root.has("type") || root.has("polarity")) {
      add_transistor(all, root);
    } else {
      add_lists(all, root);
    }
  } catch (const nlohmann::json::exception& error) {
    const std::string what = error.what();
    const std::size_t after = what.find("] ");
    log.faults.push_back({log.file, after == std::string::npos ? what : what.substr(after + 2), "JSON text", ""});
  }
  if (log.is_a_source) {
    all.catalogue.sources[own_source_key(document.name)] = {"Figures given in " + document.name, "entered by the user"};
  }
  all.faults.insert(all.faults.end(), log.faults.begin(), log.faults.end());
  all.references.insert(all.references.end(), log.references.begin(), log.references.end());
}

void check_references(Gathering& all) {
  std::vector<std::string> known;
  for (const auto& [key, entry] : all.catalogue.sources) known.push_back(key);
  for (const ReadingLog::Reference& reference : all.references) {
    if (all.catalogue.sources.count(reference.key) > 0) continue;
    all.faults.push_back(
        {reference.where, reference.key, "a key that stands in \"sources\"", nearest_name(reference.key, known)});
  }
}

}  // namespace

Catalogue with_documents(Catalogue base, const std::vector<CatalogueDocument>& documents) {
  Gathering all{base, {}, {}, {}, {}};
  for (const CatalogueDocument& document : documents) add_document(all, document);
  check_references(all);
  for (const CostTable& table : all.costs) set_costs(table, base, all.faults);
  if (!all.faults.empty()) throw InputError(std::move(all.faults));
  return base;
}

}  // namespace bandwright
