// Part families as JSON.
#pragma once

#include <bandwright/catalogue.hpp>
#include <optional>

#include "catalogue/json_place.hpp"

namespace bandwright {

/// Reads one family; every fault goes to the place's log. Nothing where there is no key.
std::optional<Family> read_family(const JsonPlace& place);

}  // namespace bandwright
