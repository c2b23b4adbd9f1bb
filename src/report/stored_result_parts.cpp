#include "report/stored_result_parts.hpp"

#include "catalogue/pairs.hpp"

namespace bandwright {

namespace {

using Json = PartReader::Json;

std::string text_of(const Json& part, const char* key) {
  const auto found = part.find(key);
  return found != part.end() && found->is_string() ? found->get<std::string>() : "";
}

PartChoice pair_of(PartKind kind, const PartChoice& first, const PartChoice& second) {
  PartChoice both = first;
  const double a = first.value, b = second.value;
  both.value = adds_up(kind, first.connection) ? a + b : a * b / (a + b);
  both.pair = {a, b};
  both.part_number.clear();
  both.from_stock = first.from_stock || second.from_stock;
  return both;
}

}  // namespace

void PartReader::read(const Json& part, std::size_t position) {
  const std::string where = path_ + "[" + std::to_string(position) + "]";
  const auto role = part.is_object() ? find_role(text_of(part, "role")) : std::nullopt;
  if (!role) return add(where + ".role", part, "role", "a role such as upper_divider");
  if (!part.contains("value") || !part["value"].is_number() || !(part["value"].get<double>() > 0))
    return add(where + ".value", part, "value", "a number above 0, in ohm or farad");
  PartChoice choice;
  choice.value = part["value"].get<double>();
  choice.family = text_of(part, "family");
  choice.part_number = text_of(part, "part_number");
  const auto from_stock = part.find("from_stock");
  choice.from_stock = from_stock == part.end() || !from_stock->is_boolean() || from_stock->get<bool>();
  choice.connection = connection_of(part, where);
  entries_[index(*role)].push_back({part, where, choice});
}

Connection PartReader::connection_of(const Json& part, const std::string& where) {
  const auto stated = part.find("connection");
  if (stated == part.end() || stated->is_null()) return Connection::single;
  for (const Connection one : {Connection::series, Connection::parallel})
    if (*stated == word(one)) return one;
  add(where + ".connection", part, "connection", "series or parallel, or nothing where one part stands alone");
  return Connection::single;
}

PartChoice PartReader::role_of(Role role, const std::vector<Entry>& entries) {
  const Entry& first = entries.front();
  const Entry& last = entries.back();
  const Connection connection = first.choice.connection;
  const char* once = "each role once; two parts of one role state their connection";
  if (entries.size() > 2) {
    add(last.where + ".role", last.part, "role", "at most two parts in one role");
  } else if (entries.size() == 1 && connection != Connection::single) {
    add(first.where + ".connection", first.part, "connection",
        "a second part in the same role, in the same connection");
  } else if (entries.size() == 2 && last.choice.connection == Connection::single && connection == Connection::single) {
    add(last.where + ".role", last.part, "role", once);
  } else if (entries.size() == 2 && last.choice.connection != connection) {
    add(last.where + ".connection", last.part, "connection", "the connection of the other part in its role");
  } else if (entries.size() == 2) {
    return pair_of(info(role).kind, first.choice, last.choice);
  }
  return first.choice;
}

PartChoices PartReader::finish() {
  PartChoices choices;
  for (const RoleInfo& row : roles())
    if (const auto& entries = entries_[index(row.role)]; !entries.empty())
      choices[index(row.role)] = role_of(row.role, entries);
  return choices;
}

void PartReader::add(const std::string& where, const Json& part, const char* key, const std::string& expected) {
  const std::string found = part.is_object() && part.contains(key) ? part[key].dump() : "";
  faults_.push_back({where, found, expected, ""});
}

}  // namespace bandwright
