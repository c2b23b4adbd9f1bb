// The filled-in spec as a JSON document, for writers that embed it.
#pragma once

#include <bandwright/spec.hpp>
#include <nlohmann/json.hpp>

namespace bandwright {

nlohmann::ordered_json spec_json(const Spec& spec);

}  // namespace bandwright
