// Text from outside, made fit to be shown in a message.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace bandwright {

/// The text with control characters and bytes that are not UTF-8 written as \xNN, cut after `limit` bytes with "...".
std::string printable(std::string_view text, std::size_t limit = 60);

/// True where every byte belongs to a well-formed UTF-8 character.
bool is_utf8(std::string_view text);

}  // namespace bandwright
