#include "spec/json_document.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <set>

#include "units/printable.hpp"

namespace bandwright {

namespace {

using Event = Json::parse_event_t;

// Ends the reading of a document that is not worth more time.
struct Abandoned {
  Fault fault;
};

// Watches the parser: paths of duplicate keys, depth, number of members.
class Watch {
public:
  Watch(std::string_view name, std::vector<Fault>& faults) : name_(name), faults_(faults) {}

  bool operator()(int depth, Event event, const Json& value) {
    if (event == Event::object_start || event == Event::array_start) enter(depth);
    if (event == Event::object_end || event == Event::array_end) levels_.pop_back();
    if (event == Event::key) take_key(value.get_ref<const std::string&>());
    return true;
  }

private:
  struct Level {
    std::set<std::string> keys;
    std::string last;
  };

  void enter(int depth) {
    if (depth >= kDeepestDocument)
      throw Abandoned{{name_, "", fmt::format("objects and arrays at most {} deep", kDeepestDocument), ""}};
    levels_.emplace_back();
  }

  void take_key(const std::string& key) {
    Level& level = levels_.back();
    level.last = key;
    if (!level.keys.insert(key).second) faults_.push_back({path(), key, "each key once", ""});
    if (level.keys.size() > kMostMembers)
      throw Abandoned{{name_, "", fmt::format("at most {} members in one object", kMostMembers), ""}};
    if (faults_.size() > kMostMembers) throw Abandoned{{name_, "", "each key once", ""}};
  }

  std::string path() const {
    std::string out;
    for (const Level& level : levels_) {
      if (level.last.empty()) continue;  // an array
      if (!out.empty()) out += '.';
      out += level.last;
    }
    return out;
  }

  std::string name_;
  std::vector<Fault>& faults_;
  std::vector<Level> levels_;
};

// What the parser objects to, without its own position and quotation.
std::string complaint(std::string text) {
  const std::size_t last_read = text.find("; last read: ");
  if (last_read != std::string::npos) {
    const std::size_t end = text.find("'; expected ", last_read);
    text.erase(last_read, end == std::string::npos ? end : end + 1 - last_read);
  }
  const std::size_t start = text.find("while parsing ");
  return start == std::string::npos ? "well-formed JSON" : "well-formed JSON (" + text.substr(start) + ")";
}

Fault syntax_fault(std::string_view text, std::string_view name, const Json::parse_error& error) {
  const std::size_t at = std::min(error.byte > 0 ? error.byte - 1 : 0, text.size());
  const std::string_view before = text.substr(0, at);
  const std::size_t line_start = before.rfind('\n') == std::string_view::npos ? 0 : before.rfind('\n') + 1;
  const auto line = std::count(before.begin(), before.end(), '\n') + 1;
  std::string_view found = text.substr(line_start, at - line_start + 1);
  while (!found.empty() && (found.back() == '\n' || found.back() == '\r')) found.remove_suffix(1);
  constexpr std::size_t kShown = 40;
  if (found.size() > kShown) found.remove_prefix(found.size() - kShown);
  return {fmt::format("{}, line {}, column {}", name, line, at - line_start + 1), std::string(found),
          printable(complaint(error.what()), 300), ""};
}

}  // namespace

std::optional<Json> read_document(std::string_view text, std::string_view name, std::vector<Fault>& faults) {
  const std::string shown_name(name.empty() ? "input" : name);
  if (text.size() > kLargestDocument) {
    faults.push_back({shown_name, fmt::format("{} bytes", text.size()),
                      fmt::format("at most {} MB of text", kLargestDocument >> 20u), ""});
    return std::nullopt;
  }
  try {
    return Json::parse(text, Watch(shown_name, faults));
  } catch (const Json::parse_error& error) {
    faults.push_back(syntax_fault(text, shown_name, error));
  } catch (const Json::exception& error) {  // a number beyond the range of double
    const std::string what = error.what();
    const std::size_t quote = std::min(what.find('\''), what.size());
    faults.push_back({shown_name, what.substr(quote), "numbers within the range of double precision", ""});
  } catch (const Abandoned& abandoned) {
    faults.push_back(abandoned.fault);
  }
  return std::nullopt;
}

std::string found_text(const Json& value) {
  constexpr std::size_t kShown = 200;
  const std::string text = value.is_string() ? value.get<std::string>() : value.dump();
  return text.substr(0, kShown);
}

}  // namespace bandwright
