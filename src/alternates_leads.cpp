// Lead orders: in words, and where two types differ.
#include <algorithm>
#include <bandwright/alternates.hpp>
#include <cctype>

namespace bandwright {

namespace {

/// "TO-92" of "TO-92 (PN2222A, MPS2222A)": the body without what is said of it.
std::string body(const Package& package) { return package.name.substr(0, package.name.find(' ')); }

struct Lead {
  int number;
  char letter;
};

bool stands_alone(const std::string& text, std::size_t i) {
  const auto is_word = [&](std::size_t k) {
    return k < text.size() && std::isalpha(static_cast<unsigned char>(text[k])) != 0;
  };
  return !is_word(i + 1) && !(i > 0 && is_word(i - 1));
}

/// Leads as they are named before any remark in brackets; without numbers they count from 1.
std::vector<Lead> leads_of(const std::string& order) {
  std::vector<Lead> leads;
  int number = 0;
  for (std::size_t i = 0; i < order.size() && order[i] != '('; ++i) {
    const char c = order[i];
    if (std::isdigit(static_cast<unsigned char>(c)) != 0) number = c - '0';
    if ((c != 'E' && c != 'B' && c != 'C') || !stands_alone(order, i)) continue;
    leads.push_back({number > 0 ? number : static_cast<int>(leads.size()) + 1, c});
    number = 0;
  }
  std::stable_sort(leads.begin(), leads.end(), [](const Lead& a, const Lead& b) { return a.number < b.number; });
  return leads;
}

std::string shown_leads(const Package& package) {
  const std::string letters = lead_letters(package);
  return letters.empty() ? package.lead_order : letters;
}

std::string joined(const std::vector<std::string>& list, const char* separator) {
  std::string text;
  for (const std::string& one : list) text += (text.empty() ? "" : separator) + one;
  return text;
}

/// Of the same body: how the leads differ; empty where they are alike.
std::string difference(const Package& other, const Package& chosen, const std::string& chosen_type) {
  const std::string leads = shown_leads(other), instead = shown_leads(chosen);
  if (leads == instead) return "";
  const std::string turned(instead.rbegin(), instead.rend());
  return other.name + ": " + leads + ", " + chosen_type + " has " + instead +
         (leads == turned ? " (turned round)" : "");
}

void add_once(std::vector<std::string>& list, const std::string& text) {
  if (!text.empty() && std::find(list.begin(), list.end(), text) == list.end()) list.push_back(text);
}

std::string bodies(const Transistor& t) {
  std::vector<std::string> list;
  for (const Package& p : t.packages) add_once(list, body(p));
  return list.empty() ? "an unstated package" : joined(list, " or ");
}

/// What the sources of one type say against each other.
void add_own_differences(const Transistor& t, std::vector<std::string>& list) {
  for (std::size_t i = 0; i < t.packages.size(); ++i) {
    const Package& p = t.packages[i];
    if (!p.note.empty()) add_once(list, p.name + ", by source: " + p.note);
    for (std::size_t k = i + 1; k < t.packages.size(); ++k)
      if (body(p) == body(t.packages[k]) && shown_leads(p) != shown_leads(t.packages[k]))
        add_once(list, body(p) + ", by source: " + shown_leads(p) + " or " + shown_leads(t.packages[k]));
  }
}

}  // namespace

std::string lead_letters(const Package& package) {
  const std::vector<Lead> leads = leads_of(package.lead_order);
  std::string seen, text;
  for (const Lead& lead : leads) {
    if (seen.find(lead.letter) != std::string::npos) return "";
    seen += lead.letter;
    if (!text.empty()) text += '-';
    text += lead.letter;
  }
  return leads.size() == 3 ? text : "";
}

std::string lead_warning(const Transistor& chosen, const Transistor& other) {
  std::vector<std::string> list;
  bool shared = false;
  for (const Package& p : other.packages) {
    for (const Package& q : chosen.packages) {
      if (body(p) != body(q)) continue;
      shared = true;
      add_once(list, difference(p, q, chosen.type));
    }
  }
  if (!shared) list.push_back("comes in " + bodies(other) + ", " + chosen.type + " in " + bodies(chosen));
  add_own_differences(other, list);
  return joined(list, "; ");
}

}  // namespace bandwright
