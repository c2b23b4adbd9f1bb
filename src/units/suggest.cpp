#include "units/suggest.hpp"

#include <algorithm>

namespace bandwright {

namespace {

constexpr std::size_t kLongestName = 64;  // longer ones are no misspelling of a known name

char folded(char c) {
  if (c >= 'A' && c <= 'Z') return static_cast<char>(c - 'A' + 'a');
  return c == '-' || c == ' ' ? '_' : c;
}

std::string folded(std::string_view name) {
  std::string out(name);
  std::transform(out.begin(), out.end(), out.begin(), [](char c) { return folded(c); });
  return out;
}

// A third of the letters may be wrong, at least one, at most three.
std::size_t allowed_distance(std::size_t length) { return std::clamp<std::size_t>(length / 3, 1, 3); }

}  // namespace

std::size_t name_distance(std::string_view first, std::string_view second) {
  const std::string a = folded(first);
  const std::string b = folded(second);
  std::vector<std::size_t> before(b.size() + 1), last(b.size() + 1), now(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) last[j] = j;
  for (std::size_t i = 1; i <= a.size(); ++i) {
    now[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const std::size_t substituted = last[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1);
      now[j] = std::min({last[j] + 1, now[j - 1] + 1, substituted});
      const bool swapped = i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1];
      if (swapped) now[j] = std::min(now[j], before[j - 2] + 1);
    }
    std::swap(before, last);
    std::swap(last, now);
  }
  return last[b.size()];
}

std::string nearest_name(std::string_view name, const std::vector<std::string>& known) {
  if (name.size() > kLongestName) return "";
  std::string nearest;
  std::size_t best = allowed_distance(name.size()) + 1;
  for (const std::string& candidate : known) {
    const std::size_t distance = name_distance(name, candidate);
    if (distance < best && distance < candidate.size()) {
      best = distance;
      nearest = candidate;
    }
  }
  return nearest;
}

}  // namespace bandwright
