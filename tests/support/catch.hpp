// Catch2, version 2.13 or 3, under one set of names: Approx, Catch::Matchers::WithinRel, WithinAbs and
// ContainsSubstring work with both.
#pragma once

#if __has_include(<catch2/catch_all.hpp>)
#include <catch2/catch_all.hpp>
using Catch::Approx;
#else
#include <catch2/catch.hpp>
namespace Catch::Matchers {
inline StdString::ContainsMatcher ContainsSubstring(const std::string& text) { return Contains(text); }
}  // namespace Catch::Matchers
#endif
