#include <bandwright/spec.hpp>
#include <string_view>

#include "spec/field.hpp"
#include "spec/spec_json.hpp"

namespace bandwright {

namespace {

void put(Json& document, std::string_view path, Json value) {
  Json* node = &document;
  for (std::size_t dot = path.find('.'); dot != std::string_view::npos; dot = path.find('.')) {
    node = &(*node)[std::string(path.substr(0, dot))];
    path.remove_prefix(dot + 1);
  }
  (*node)[std::string(path)] = std::move(value);
}

}  // namespace

nlohmann::ordered_json spec_json(const Spec& spec) {
  Json out = Json::object();
  for (const Field& field : fields()) {
    Json value = field.show ? field.show(spec) : Json(nullptr);
    if (!value.is_null()) put(out, field.path, std::move(value));
  }
  return out;
}

std::string write_spec(const Spec& spec) { return spec_json(spec).dump(2) + "\n"; }

}  // namespace bandwright
