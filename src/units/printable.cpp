#include "units/printable.hpp"

#include <fmt/format.h>

#include <array>
#include <cstdint>

namespace bandwright {

namespace {

// One row a length: the bits that mark the first byte and the smallest code point that needs it (RFC 3629).
struct Utf8Form {
  std::size_t length;
  unsigned mask, mark;
  std::uint32_t smallest;
};
constexpr std::array<Utf8Form, 4> kForms = {
    {{1, 0x80, 0x00, 0}, {2, 0xE0, 0xC0, 0x80}, {3, 0xF0, 0xE0, 0x800}, {4, 0xF8, 0xF0, 0x10000}}};

bool is_scalar(std::uint32_t point) { return point < 0xD800 || (point > 0xDFFF && point <= 0x10FFFF); }

bool fits(std::string_view text, const Utf8Form& form) {
  const auto first = static_cast<unsigned char>(text[0]);
  if ((first & form.mask) != form.mark || text.size() < form.length) return false;
  std::uint32_t point = first & ~form.mask & 0xFFU;
  for (std::size_t i = 1; i < form.length; ++i) {
    const auto next = static_cast<unsigned char>(text[i]);
    if ((next & 0xC0U) != 0x80U) return false;
    point = (point << 6U) | (next & 0x3FU);
  }
  return point >= form.smallest && is_scalar(point);
}

// Bytes of the character the text begins with; 0 where it is not UTF-8.
std::size_t character_length(std::string_view text) {
  for (const Utf8Form& form : kForms)
    if (fits(text, form)) return form.length;
  return 0;
}

bool is_control(unsigned char c) { return c < 0x20 || c == 0x7F; }

}  // namespace

bool is_utf8(std::string_view text) {
  while (!text.empty()) {
    const std::size_t length = character_length(text);
    if (length == 0) return false;
    text.remove_prefix(length);
  }
  return true;
}

std::string printable(std::string_view text, std::size_t limit) {
  std::string out;
  while (!text.empty()) {
    if (out.size() >= limit) return out + "...";
    const std::size_t length = character_length(text);
    const auto first = static_cast<unsigned char>(text[0]);
    if (length == 0 || is_control(first)) {
      out += fmt::format("\\x{:02X}", first);
      text.remove_prefix(1);
    } else {
      out += text.substr(0, length);
      text.remove_prefix(length);
    }
  }
  return out;
}

}  // namespace bandwright
