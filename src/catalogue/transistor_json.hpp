// Transistors as JSON. One table of figures serves reading, checks and the list of known keys.
#pragma once

#include <bandwright/catalogue.hpp>
#include <optional>

#include "catalogue/json_place.hpp"

namespace bandwright {

/// Reads one transistor; every fault goes to the place's log. Nothing where there is no type.
std::optional<Transistor> read_transistor(const JsonPlace& place);

}  // namespace bandwright
