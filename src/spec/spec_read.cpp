#include <fmt/format.h>

#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>

#include "spec/json_document.hpp"
#include "spec/reading.hpp"
#include "spec/resolve.hpp"
#include "spec/statements.hpp"

namespace bandwright {

namespace {

constexpr const char* kResultFormat = "bandwright/result";
constexpr int kResultVersion = 1;

void fail(const std::vector<Fault>& faults) {
  if (!faults.empty()) throw InputError(faults);
}

bool is_result(const Json& document) {
  const auto format = document.find("format");
  return format != document.end() && *format == kResultFormat;
}

void take_result(const Json& document, Statements& statements) {
  const auto version = document.find("version");
  if (version == document.end() || *version != kResultVersion)
    statements.object_at("version", {"version", version == document.end() ? "" : found_text(*version),
                                     fmt::format("version {} of the result document", kResultVersion), ""});
  const auto spec = document.find("spec");
  if (spec != document.end() && spec->is_object()) return statements.take_document(*spec, "spec.");
  statements.object_at("spec", {"spec", spec == document.end() ? "" : found_text(*spec), "the spec of the result", ""});
}

void take_file(std::string_view text, std::string_view name, Statements& statements) {
  std::vector<Fault> faults;
  const auto document = read_document(text, name, faults);
  if (!document) fail(faults);
  for (Fault& fault : faults) statements.object_at(fault.where, fault);
  if (!document->is_object()) fail({{std::string(name), found_text(*document), "a spec: an object { ... }", ""}});
  if (is_result(*document))
    take_result(*document, statements);
  else
    statements.take_document(*document, "");
}

// "output_swing: 2 Vpp read as 1 V peak", "gain: -50, a minus sign: inverting"
std::string note_on(const Field& field, const Json& value, const std::string& note) {
  std::string name = field.path;
  if (name.starts_with("requirements.")) name.erase(0, name.find('.') + 1);
  if (field.bare) name.erase(name.rfind('.'));
  const char* between = note.starts_with("read as") ? " " : ", ";
  return name + ": " + found_text(value) + between + note;
}

Draft read_all(Statements& statements) {
  Draft draft;
  draft.spec.topologies = {"common-emitter"};
  for (const Field& field : fields()) {
    const Statement* statement = statements.find(field.path);
    if (!statement) continue;
    Objection objection;
    const auto reading = read_value(field, statement->value, objection);
    if (!reading) {
      statements.object(field.path, objection.expected, objection.suggestion);
      continue;
    }
    field.store(draft, *reading);
    if (!reading->note.empty()) draft.spec.notes.push_back(note_on(field, statement->value, reading->note));
  }
  return draft;
}

std::string help_of(const Field& field) {
  std::string out = field.help;
  const bool limited = field.allowed.min > -kUnlimited;
  if (field.shape == Shape::word) {
    out += ": ";
    for (const std::string& word : field.words) out += (&word == &field.words.front() ? "" : ", ") + word;
  } else if (field.shape == Shape::tolerance) {
    out += describe_tolerance(field.dimension).substr(std::string_view("a tolerance").size());
  } else if (limited) {
    out += ", " + describe_range(field);
  }
  return field.usual.empty() ? out : out + " (default " + field.usual + ")";
}

std::vector<OptionKey> all_options() {
  std::vector<OptionKey> out;
  for (const Field& field : fields())
    if (!field.option.empty()) out.push_back({field.option, field.path, help_of(field), field.shape == Shape::flag});
  return out;
}

}  // namespace

const std::vector<OptionKey>& spec_options() {
  static const std::vector<OptionKey> kOptions = all_options();
  return kOptions;
}

Spec read_spec(std::string_view json, std::string_view name, const std::vector<Override>& overrides, SpecUse use,
               bool allow_high_voltage) {
  Statements statements;
  if (!json.empty()) take_file(json, name, statements);
  statements.take_overrides(overrides);
  Draft draft = read_all(statements);
  resolve_conditions(draft, statements, allow_high_voltage);
  resolve_requirements(draft, statements, use);
  resolve_parts(draft, statements);
  fail(statements.faults());
  return draft.spec;
}

}  // namespace bandwright
