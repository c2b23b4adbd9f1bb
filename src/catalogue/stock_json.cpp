// A stock as JSON: a list of objects whose keys are the headings, or {"stock": [...]}.
#include <fmt/format.h>

#include "catalogue/stock_rows.hpp"
#include "spec/json_document.hpp"
#include "units/number_text.hpp"
#include "units/suggest.hpp"

namespace bandwright {

namespace {

constexpr const char* kShape = "a list of parts such as [{\"kind\": \"resistor\", \"value\": \"4K7\"}]";

class JsonStock {
public:
  JsonStock(FaultList& faults, const TakeStockRow& take) : faults_(faults), take_(take), known_(stock_headings()) {
    row_.where_of = [this](StockColumn column) { return row_.where + "." + info(column).key; };
  }

  void read(const Json& root) {
    if (root.is_array()) return read_list(root, "");
    if (!root.is_object()) return refuse(faults_.file(), found_text(root), kShape);
    for (const auto& [key, value] : root.items())
      if (key != "stock") refuse(faults_.file(), key, "the key stock alone", nearest_name(key, {"stock"}));
    if (!root.contains("stock")) {
      if (root.empty()) refuse(faults_.file(), "", "the key stock with " + std::string(kShape));
      return;
    }
    const Json& list = root.at("stock");
    if (!list.is_array()) return refuse(faults_.file() + ": stock", found_text(list), kShape);
    read_list(list, "stock");
  }

private:
  void refuse(const std::string& where, const std::string& found, const std::string& expected,
              const std::string& suggestion = {}) {
    faults_.add([&]() -> Fault { return {where, found, expected, suggestion}; });
  }

  void read_list(const Json& list, const std::string& path) {
    for (std::size_t i = 0; i < list.size(); ++i) {
      row_.where = fmt::format("{}: {}[{}]", faults_.file(), path, i);
      if (!list[i].is_object()) {
        refuse(row_.where, found_text(list[i]), "a part such as {\"kind\": \"resistor\", \"value\": \"4K7\"}");
        continue;
      }
      if (take_members(list[i])) take_(row_);
    }
  }

  // False where cells are missing for a fault that is told already.
  bool take_members(const Json& part) {
    row_.cells.fill("");
    std::array<bool, kStockColumnCount> seen{};
    bool all_known = true;
    bool all_read = true;
    for (const auto& [key, value] : part.items()) {
      const StockColumnInfo* column = find_stock_column(key);
      if (column == nullptr) {
        refuse_key(key);
        all_known = false;
      } else if (seen[index(column->column)]) {
        refuse(row_.where, key, "each key once");
      } else {
        seen[index(column->column)] = true;
        all_read = take_value(column->column, value) && all_read;
      }
    }
    state_units(part);
    const bool has_needed = seen[index(StockColumn::kind)] && seen[index(StockColumn::value)];
    return all_read && (all_known || has_needed);
  }

  void refuse_key(const std::string& key) {
    faults_.add([&]() -> Fault {
      return {row_.where, key, fmt::format("one of the keys {}", fmt::join(known_, ", ")),
              nearest_name(one_name(key), known_)};
    });
  }

  bool take_value(StockColumn column, const Json& value) {
    std::string& cell = row_.cells[index(column)];
    if (value.is_string())
      cell = trimmed(value.get_ref<const std::string&>());
    else if (value.is_number())
      cell = fmt::format("{}", value.get<double>());
    else if (!value.is_null())
      refuse(row_.where_of(column), found_text(value), "text or a number");
    return value.is_string() || value.is_number() || value.is_null();
  }

  // A number is SI: a capacitance gets the unit that its text needs.
  void state_units(const Json& part) {
    if (one_name(row_[StockColumn::kind]) != "capacitor") return;
    for (const auto& [key, value] : part.items())
      if (value.is_number() && one_name(key) == "value") row_.cells[index(StockColumn::value)] += " F";
  }

  FaultList& faults_;
  const TakeStockRow& take_;
  std::vector<std::string> known_;
  StockRow row_;
};

}  // namespace

void read_stock_json(std::string_view text, FaultList& faults, const TakeStockRow& take) {
  std::vector<Fault> of_document;
  const auto root = read_document(text, faults.file(), of_document);
  for (Fault& fault : of_document) {
    if (!fault.where.starts_with(faults.file())) fault.where = faults.file() + ": " + fault.where;
    faults.add([&] { return fault; });
  }
  if (root) JsonStock(faults, take).read(*root);
}

}  // namespace bandwright
