// Statements: all that the file and the command line say of a spec, by path of field, and what is wrong with it.
#pragma once

#include <bandwright/fault.hpp>
#include <bandwright/spec.hpp>
#include <map>
#include <set>
#include <string>
#include <string_view>
#include <vector>

#include "spec/field.hpp"

namespace bandwright {

/// A value and where it stands: "requirements.gain.min" or "--gain-min".
struct Statement {
  std::string where;
  Json value;
};

class Statements {
public:
  /// Takes the whole spec; `prefix` stands before every path in faults ("spec." in a result document).
  void take_document(const Json& spec, const std::string& prefix);
  /// Takes command-line forms, on top of what is there.
  void take_overrides(const std::vector<Override>& overrides);

  const Statement* find(const std::string& path) const;
  bool touched(const std::string& path) const { return touched_.count(path) > 0; }  ///< something was said of it
  bool spoiled(const std::string& path) const { return spoiled_.count(path) > 0; }  ///< a fault lies on or under it

  /// Adds a fault at a field or object: says where and what stands there.
  void object(const std::string& path, const std::string& expected, const std::string& suggestion = "");
  void object_at(const std::string& path, Fault fault);

  const std::vector<Fault>& faults() const { return faults_; }

private:
  void walk(const Json& node, const std::string& path);
  void walk_members(const Json& node, const std::string& path);
  void unknown_key(const std::string& parent, const std::string& key, const Json& value);
  void take_override(const Override& given);
  void take_keyed(const Field& field, const Override& given);
  void unknown_option(const std::string& option, const std::string& text);
  void state(const std::string& path, Statement statement);
  void spoil_under(const std::string& path);

  std::string prefix_;
  std::map<std::string, Statement> statements_;
  std::set<std::string> touched_, spoiled_;
  std::set<std::string> given_options_;
  std::vector<Fault> faults_;
};

}  // namespace bandwright
