#include "spec/reading.hpp"

#include <fmt/format.h>

#include <array>
#include <charconv>
#include <cmath>
#include <system_error>

#include "units/number_text.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

constexpr std::size_t kLongestText = 500;  // bytes

using Read = bool (*)(const Field&, const Json&, Reading&, Objection&);

bool object_to(Objection& objection, std::string expected) {
  objection.expected = std::move(expected);
  return false;
}

bool in_range(double value, const ValueRange& range) { return value >= range.min && value <= range.max; }

bool out_of_range(const Field& field, Objection& objection) {
  return object_to(objection, "a value " + describe_range(field));
}

bool is_fit_text(const Json& value) {
  if (!value.is_string()) return false;
  const auto& text = value.get_ref<const std::string&>();
  return text.find_first_not_of(' ') != std::string::npos && text.size() <= kLongestText;
}

bool read_text(const Field&, const Json& value, Reading& reading, Objection& objection) {
  if (value.is_string()) reading.text = value.get<std::string>();
  const bool fits = value.is_string() && reading.text.size() <= kLongestText;
  return fits || object_to(objection, fmt::format("text of at most {} bytes", kLongestText));
}

std::string one_of(const std::vector<std::string>& words) {
  std::string out = words.front();
  for (std::size_t i = 1; i < words.size(); ++i) out += (i + 1 < words.size() ? ", " : " or ") + words[i];
  return out;
}

bool read_word(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  objection.expected = one_of(field.words);
  if (!value.is_string()) return false;
  reading.text = value.get<std::string>();
  for (const std::string& word : field.words)
    if (word == reading.text) return true;
  objection.suggestion = nearest_name(reading.text, field.words);
  return false;
}

bool read_names(const Field&, const Json& value, Reading& reading, Objection& objection) {
  objection.expected = R"(a list of names such as ["one", "two"])";
  if (!value.is_array()) return false;
  for (const Json& one : value) {
    if (!is_fit_text(one)) return false;
    reading.names.push_back(one.get<std::string>());
  }
  return true;
}

// A bare number is SI, but for temperatures, which need their unit.
bool read_plain_number(const Field& field, double value, Reading& reading, Objection& objection) {
  if (field.dimension == Dimension::temperature)
    return object_to(objection, describe_dimension(field.dimension) + " (the unit is missing)");
  reading.number = value == 0 ? 0 : value;
  if (field.dimension != Dimension::gain || value >= 0) return true;
  reading.number = -value;
  reading.note = "a minus sign: inverting";
  return true;
}

bool read_plain_text(const Field& field, const std::string& text, Reading& reading, Objection& objection) {
  const auto quantity = read_quantity(text, field.dimension, objection.expected);
  if (!quantity) return false;
  if (field.direct && !quantity->note.empty()) return object_to(objection, "a DC voltage such as 12 V");
  reading.number = quantity->value;
  reading.note = quantity->note;
  return true;
}

bool read_one_quantity(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  if (value.is_number()) return read_plain_number(field, value.get<double>(), reading, objection);
  if (value.is_string()) return read_plain_text(field, value.get<std::string>(), reading, objection);
  return object_to(objection, describe_dimension(field.dimension));
}

bool read_quantity_field(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  if (!read_one_quantity(field, value, reading, objection)) return false;
  return in_range(reading.number, field.allowed) || out_of_range(field, objection);
}

bool read_range(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  if (!value.is_array() || value.size() != 2)
    return object_to(objection, "two values, [smallest, largest], on the command line smallest:largest");
  Reading second;
  if (!read_one_quantity(field, value[0], reading, objection) || !read_one_quantity(field, value[1], second, objection))
    return false;
  reading.second = second.number;
  return (in_range(reading.number, field.allowed) && in_range(reading.second, field.allowed)) ||
         out_of_range(field, objection);
}

bool read_tolerance_field(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  if (value.is_number()) {
    const auto share = value.get<double>();
    reading.tolerance = {{share, share}, false};
    if (share >= 1) return object_to(objection, describe_tolerance(field.dimension));
  } else if (value.is_string()) {
    const auto written = read_tolerance(value.get<std::string>(), field.dimension, objection.expected);
    if (!written) return false;
    reading.tolerance = *written;
  } else {
    return object_to(objection, describe_tolerance(field.dimension));
  }
  const auto [below, above] = reading.tolerance.value;
  const bool fits = std::fmin(below, above) >= 0 && in_range(std::fmax(below, above), field.allowed);
  return fits || object_to(objection, "a tolerance " + describe_range(field));
}

bool read_difference(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  const std::string text = value.is_string() ? value.get<std::string>() : "";
  const auto difference = read_temperature_difference(text, objection.expected);
  if (!difference) return false;
  reading.number = *difference;
  return in_range(reading.number, field.allowed) || out_of_range(field, objection);
}

// A bare number is SI: 1/K.
bool read_per_kelvin_field(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  const std::string text = value.is_string() ? value.get<std::string>() : "";
  const auto share = value.is_number() ? value.get<double>() : read_per_kelvin(text, objection.expected);
  if (!share) return false;
  reading.number = *share;
  return in_range(reading.number, field.allowed) || out_of_range(field, objection);
}

std::optional<double> whole_number(const Json& value) {
  if (value.is_number()) {
    const auto number = value.get<double>();
    return number == std::floor(number) ? std::optional(number) : std::nullopt;
  }
  if (!value.is_string()) return std::nullopt;
  const std::string text = one_spelling(value.get<std::string>());
  std::uint64_t whole = 0;
  const auto read = std::from_chars(text.data(), text.data() + text.size(), whole);
  const bool complete = read.ec == std::errc() && read.ptr == text.data() + text.size();
  return complete ? std::optional(static_cast<double>(whole)) : std::nullopt;
}

bool read_count(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  const auto number = whole_number(value);
  if (number && in_range(*number, field.allowed)) {
    reading.number = *number;
    return true;
  }
  const bool limited = std::isfinite(field.allowed.max);
  return object_to(objection, limited ? "a whole number " + describe_range(field) : "a whole number");
}

bool read_flag(const Field&, const Json& value, Reading& reading, Objection& objection) {
  if (!value.is_boolean()) return object_to(objection, "true or false");
  reading.number = value.get<bool>() ? 1 : 0;
  return true;
}

bool read_keyed(const Field& field, const Json&, Reading&, Objection& objection) {
  return object_to(objection, fmt::format("an object of {} and value", field.key_noun));
}

struct Reader {
  Shape shape;
  Read read;
};
constexpr std::array kReaders = {
    Reader{Shape::text, read_text},
    Reader{Shape::word, read_word},
    Reader{Shape::names, read_names},
    Reader{Shape::quantity, read_quantity_field},
    Reader{Shape::tolerance, read_tolerance_field},
    Reader{Shape::difference, read_difference},
    Reader{Shape::per_kelvin, read_per_kelvin_field},
    Reader{Shape::count, read_count},
    Reader{Shape::flag, read_flag},
    Reader{Shape::range, read_range},
    Reader{Shape::keyed, read_keyed},
};

bool read_limit(const Field& field, const Json& value, Reading& reading) {
  if (field.word_for_limit.empty() || value != Json(field.word_for_limit)) return false;
  reading.number = field.limit;
  reading.tolerance = {{field.limit, field.limit}, false};
  return true;
}

bool read_shape(const Field& field, const Json& value, Reading& reading, Objection& objection) {
  for (const Reader& reader : kReaders)
    if (reader.shape == field.shape) return reader.read(field, value, reading, objection);
  return false;
}

// The command line knows text only: a number alone is one.
Json number_or_text(const std::string& text) {
  const Json number = Json::parse(text, nullptr, false);
  return number.is_number() ? number : Json(text);
}

Json pair_of(const std::string& text) {
  const std::size_t colon = text.find(':');
  if (colon == std::string::npos) return text;
  return Json{text.substr(0, colon), text.substr(colon + 1)};
}

}  // namespace

std::optional<Reading> read_value(const Field& field, const Json& value, Objection& objection) {
  Reading reading;
  if (!read_limit(field, value, reading) && !read_shape(field, value, reading, objection)) {
    if (!field.word_for_limit.empty()) objection.expected += ", or " + field.word_for_limit;
    return std::nullopt;
  }
  objection = {};
  if (field.refuse) objection.expected = field.refuse(reading);
  if (!objection.expected.empty()) return std::nullopt;
  return reading;
}

std::vector<std::string> comma_separated(const std::string& text) {
  std::vector<std::string> out;
  std::string_view rest = text;
  for (;;) {
    const std::size_t comma = rest.find(',');
    out.emplace_back(trimmed(rest.substr(0, comma)));
    if (comma == std::string_view::npos) return out;
    rest.remove_prefix(comma + 1);
  }
}

Json command_line_value(const Field& field, const std::string& text) {
  if (field.shape == Shape::names) return comma_separated(text);
  if (field.shape == Shape::range) return pair_of(text);
  if (field.shape == Shape::per_kelvin) return number_or_text(text);
  if (field.shape == Shape::flag && (text.empty() || text == "true")) return true;
  if (field.shape == Shape::flag && text == "false") return false;
  return text;
}

}  // namespace bandwright
