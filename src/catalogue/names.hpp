// Types and keys are written in capitals by some and in small letters by others: either is the same name.
#pragma once

#include <algorithm>
#include <string>
#include <string_view>

namespace bandwright {

inline std::string small_letters(std::string_view text) {
  std::string out(text);
  std::transform(out.begin(), out.end(), out.begin(),
                 [](char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; });
  return out;
}

inline bool same_name(std::string_view a, std::string_view b) { return small_letters(a) == small_letters(b); }

}  // namespace bandwright
