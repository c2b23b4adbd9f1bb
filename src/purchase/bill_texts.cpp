#include "purchase/bill_texts.hpp"

#include <algorithm>
#include <tuple>

namespace bandwright {

namespace {

bool is_digit(char c) { return c >= '0' && c <= '9'; }

// "R10A" as "R", 10, "A"; the designator without its board.
std::tuple<std::string, long, std::string> pieces(const std::string& designator) {
  const auto first = std::find_if(designator.begin(), designator.end(), is_digit);
  auto last = first;
  long number = 0;
  for (; last != designator.end() && is_digit(*last); ++last) number = 10 * number + (*last - '0');
  return {{designator.begin(), first}, number, {last, designator.end()}};
}

/// A text with the designators it is said of.
struct Said {
  std::string text;
  std::vector<std::string> designators;
};

void say(std::vector<Said>& list, const std::string& text, const std::string& designator) {
  if (text.empty()) return;
  const auto found = std::find_if(list.begin(), list.end(), [&](const Said& one) { return one.text == text; });
  if (found == list.end())
    list.push_back({text, {designator}});
  else
    found->designators.push_back(designator);
}

std::string merged(const std::vector<Placed>& places, std::string Part::*text, const char* behind) {
  std::vector<Said> list;
  for (const Placed& one : places) say(list, one.part.*text, one.designator);
  if (list.size() == 1 && list.front().designators.size() == places.size()) return list.front().text;
  std::vector<std::string> texts;
  for (const Said& one : list) texts.push_back(listed(one.designators) + behind + one.text);
  return listed(texts, "; ");
}

bool has_two_on_a_board(const std::vector<Placed>& places) {
  const auto same_board = [](const Placed& a, const Placed& b) { return a.board == b.board; };
  return std::adjacent_find(places.begin(), places.end(), same_board) != places.end();
}

}  // namespace

bool stands_before(const Placed& a, const Placed& b) {
  return std::make_tuple(a.board, pieces(a.part.designator)) < std::make_tuple(b.board, pieces(b.part.designator));
}

std::string listed(const std::vector<std::string>& names, const std::string& separator) {
  std::string all;
  for (const std::string& name : names) {
    if (!all.empty()) all += separator;
    all += name;
  }
  return all;
}

std::string polarity_of(const std::vector<Placed>& places) { return merged(places, &Part::polarity, " "); }
std::string note_of(const std::vector<Placed>& places) { return merged(places, &Part::note, ": "); }

std::vector<std::string> alternates_of(const std::vector<Placed>& places) {
  std::vector<Said> list;
  for (const Placed& one : places)
    for (const std::string& alternate : one.part.alternates) say(list, alternate, one.designator);
  const bool crowded = has_two_on_a_board(places);
  std::vector<std::string> texts;
  for (const Said& one : list) {
    const bool everywhere = one.designators.size() == places.size() && !crowded;
    texts.push_back(everywhere ? one.text : one.text + " for " + listed(one.designators));
  }
  return texts;
}

}  // namespace bandwright
